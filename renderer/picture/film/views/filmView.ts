import type { ViewDrawing } from '../../views/view.ts';

/** What a film shows at one moment. */
export interface FilmDrawing extends Omit<ViewDrawing, 'notes' | 'words'> {
  /** Takes light from galaxies: multiplies what each has, 0..1; null where none is taken. */
  readonly dim: ((light: Float32Array) => void) | null;
}

/** A film's view in its box, before any moment is drawn. */
export interface FilmView {
  /** What a reader must know. */
  readonly notes: readonly string[];
  /** What is seen, as the beginning of a sentence. */
  readonly words: string;
  /** @param share how far the film is, 0..1 */
  readonly drawingAt: (share: number) => FilmDrawing;
}
