/** Measured generously: bytes that drawing takes beside the galaxies, and for each of them: their copy, places and colours. */
const BASE_BYTES = 300e6;
const BYTES_A_GALAXY = 90;
/** What a film takes beyond that: for each pixel sums of light, canvases and the encoder's own frames. */
const FILM_BYTES_A_PIXEL = 110;
const FILM_BYTES_A_GALAXY = 20;

/** The size of a film's frames. */
interface FrameSize {
  readonly widthPx: number;
  readonly heightPx: number;
}

/**
 * Memory that drawing takes, the galaxies' own arrays aside. A picture is drawn band by band, so its size does not
 * matter (null); a film's frames are whole, and written as they are made, so its length does not.
 */
export function drawingBytes(galaxies: number, film: FrameSize | null): number {
  const picture = BASE_BYTES + BYTES_A_GALAXY * galaxies;
  if (film === null) return picture;
  return picture + FILM_BYTES_A_PIXEL * film.widthPx * film.heightPx + FILM_BYTES_A_GALAXY * galaxies;
}

/** An amount of memory in words. */
export const memoryText = (bytes: number): string => `${(bytes / 1e9).toFixed(1)} GB`;
