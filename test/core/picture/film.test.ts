import { describe, expect, it } from 'vitest';
import {
  checkFilmSize,
  FILM_KINDS,
  filmFrames,
  filmOptions,
  filmShare,
  frameStartUs,
  MOST_FILM_PIXELS,
  waitText,
} from '../../../shared-core/picture/film.ts';
import { drawingBytes } from '../../../shared-core/picture/memory.ts';

describe('what a film is', () => {
  it('is filled in where nothing is said', () => {
    const film = filmOptions({ kind: 'turntable' });
    expect(film).toEqual({ kind: 'turntable', seconds: 12, framesPerSecond: 30, field: 1 });
    expect(filmFrames(film)).toBe(360);
  });

  it.each([
    [{ kind: 'spin' }, /at kind/],
    [{ kind: 'turntable', speed: 2 }, /speed/],
    [{ kind: 'turntable', seconds: 0 }, /was to last 0 seconds: give a number from 0\.1 to 600/],
    [{ kind: 'turntable', seconds: 1e6 }, /was to last 1000000 seconds/],
    [{ kind: 'turntable', seconds: -3 }, /was to last -3 seconds/],
    [{ kind: 'turntable', framesPerSecond: 0 }, /0 frames a second: give a whole number from 1 to 60/],
    [{ kind: 'turntable', framesPerSecond: 29.97 }, /29\.97 frames a second/],
    [{ kind: 'turntable', framesPerSecond: 1000 }, /1000 frames a second/],
    [{ kind: 'fly-along', field: 0 }, /field 0: fields are counted from 1/],
    [{ kind: 'fly-along', seconds: 600, framesPerSecond: 60 }, /are 36000 frames, and a film has 2 to 10800/],
    [{ kind: 'fly-along', seconds: 0.1, framesPerSecond: 10 }, /are 1 frame, and a film has 2/],
  ])('%j is refused with a sentence', (raw, sentence) => {
    expect(() => filmOptions(raw)).toThrow(sentence);
  });

  it('begins each frame at its time, in whole microseconds', () => {
    const film = filmOptions({ kind: 'turntable', seconds: 2, framesPerSecond: 24 });
    // 1/24 s is 41 666.67 microseconds.
    expect([0, 1, 2, 48].map((frame) => frameStartUs(film, frame))).toEqual([0, 41_667, 83_333, 2_000_000]);
  });

  it.each(FILM_KINDS)('%s runs from 0 to its end', (kind) => {
    const film = filmOptions({ kind, seconds: 1, framesPerSecond: 10 });
    expect(filmShare(film, 0)).toBe(0);
    // A turntable comes to its first frame one after its last, so that it repeats without a halt.
    expect(filmShare(film, kind === 'turntable' ? 10 : 9)).toBe(1);
  });
});

describe('the size of a film', () => {
  it.each([
    [0, 720, /a side of 0 pixels: give sides of 64 to 4096/],
    [1_000_000, 720, /a side of 1000000 pixels/],
    [1280, 721, /721 pixels: films need even sides, such as 722/],
    [1281, 720, /1281 pixels: films need even sides/],
    [4096, 4096, /more than players take \(8912896 pixels\)/],
    [Number.NaN, 720, /a side of NaN pixels/],
  ])('%d x %d is refused', (width, height, sentence) => {
    expect(() => checkFilmSize(width, height)).toThrow(sentence);
  });

  it('takes 4K and what fits one frame of level 5', () => {
    expect(() => checkFilmSize(3840, 2160)).not.toThrow();
    expect(() => checkFilmSize(4096, MOST_FILM_PIXELS / 4096)).not.toThrow();
  });

  it('asks for memory by its pixels and galaxies, and says times in words', () => {
    const size = { widthPx: 1280, heightPx: 720 };
    const small = drawingBytes(0, size);
    const large = drawingBytes(0, { widthPx: 2560, heightPx: 1440 });
    expect(large - small).toBe(3 * (small - drawingBytes(0, null)));
    expect(drawingBytes(1e6, size) - small).toBeGreaterThan(drawingBytes(1e6, null) - drawingBytes(0, null));
    expect([0.5, 31, 99, 100, 3000].map(waitText)).toEqual([
      'a second or two',
      'about 35 seconds',
      'about 100 seconds',
      'about 2 minutes',
      'about 50 minutes',
    ]);
  });
});
