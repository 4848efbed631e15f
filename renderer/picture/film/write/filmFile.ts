import type { SceneMetadata } from '../../scene.ts';

/** What a film's file is told before its first frame. */
export interface FilmFacts {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly frames: number;
  readonly framesPerSecond: number;
  readonly metadata: SceneMetadata;
}

/** One frame as the encoder made it, in the order of showing. */
export interface EncodedFrame {
  readonly bytes: Uint8Array<ArrayBuffer>;
  /** Whether it can be shown without the frames before it. */
  readonly key: boolean;
}

/** A film's file, written in one go from its beginning to its end: what was given to the sink is never touched again. */
export interface FilmFile {
  add(frame: EncodedFrame): Promise<void>;
  /** Everything is written when the promise is kept. @throws Error when frames are missing */
  end(): Promise<void>;
}

/** What a film's file says of its study: the same words that a picture's says (pngTexts). */
export const studyText = ({ fingerprint }: SceneMetadata): string => `study sha256:${fingerprint}`;

/** Pieces one after the other. */
export function joined(parts: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}
