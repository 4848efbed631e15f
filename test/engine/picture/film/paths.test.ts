import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { modelMatrix } from '../../../../renderer/cone/geometry/projection.ts';
import { h264Codecs, vp9Codec } from '../../../../renderer/picture/film/levels.ts';
import { flownShare, shellLights, turnRadians } from '../../../../renderer/picture/film/paths.ts';
import { turnedModel } from '../../../../renderer/picture/film/views/turntable.ts';

describe('what moves in a film', () => {
  it('a turntable is exactly at its first angle when it has turned once', () => {
    expect(turnRadians(1)).toBe(turnRadians(0));
    expect(turnRadians(0.25)).toBeCloseTo(Math.PI / 2, 12);
  });

  it('a turned cone keeps its depth and its width about its own line of sight', () => {
    const frame = [
      [0.6, 0.8, 0],
      [-0.8, 0.6, 0],
      [0, 0, 1],
    ] as const;
    const lane = { model: modelMatrix(frame, 3, 0.2), lift: 0.2 };
    const at = (m: Float64Array, row: number, p: readonly number[]): number =>
      m[4 * row]! * p[0]! + m[4 * row + 1]! * p[1]! + m[4 * row + 2]! * p[2]! + m[4 * row + 3]!;
    const p = [0.5, 0.7, 0.1];
    const reach = (m: Float64Array) => Math.hypot(at(m, 1, p) - 0.2, at(m, 2, p));
    fc.assert(
      fc.property(fc.double({ min: 0, max: 7, noNaN: true }), (angle) => {
        const turned = turnedModel(lane, angle);
        expect(at(turned, 0, p)).toBe(at(lane.model, 0, p));
        expect(reach(turned)).toBeCloseTo(reach(lane.model), 12);
      }),
    );
    // A quarter of a turn brings what is toward the viewer straight down or up.
    expect(at(turnedModel(lane, Math.PI / 2), 1, p) - 0.2).toBeCloseTo(-at(lane.model, 2, p), 12);
  });

  it('a flight leaves at rest, never turns back, and arrives at rest', () => {
    const steps = Array.from({ length: 1001 }, (_, i) => flownShare(i / 1000));
    expect([steps[0], steps[1000]]).toEqual([0, 1]);
    for (let i = 1; i <= 1000; i++) expect(steps[i]!).toBeGreaterThan(steps[i - 1]!);
    const speed = (i: number) => 1000 * (steps[i + 1]! - steps[i]!);
    expect(speed(0)).toBeLessThan(0.01);
    expect(speed(999)).toBeLessThan(0.01);
    // Between, one speed: the way over what the two halves of easing leave of the time.
    for (const i of [200, 500, 800]) expect(speed(i)).toBeCloseTo(1 / 0.85, 9);
  });

  it('the light of shells is shared out whole, begins and ends with all, and stands on each in turn', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.integer({ min: 1, max: 40 }),
        (share, count) => {
          const { shells, all } = shellLights(share, count);
          expect(shells.reduce((sum, light) => sum + light, all)).toBeCloseTo(1, 9);
          for (const light of [...shells, all]) expect(light).toBeGreaterThan(-1e-12);
        },
      ),
    );
    for (const share of [0, 1]) expect(shellLights(share, 5)).toEqual({ shells: [0, 0, 0, 0, 0], all: 1 });
    for (let i = 0; i < 5; i++) expect(shellLights((i + 1) / 6, 5).shells[i]).toBe(1);
  });
});

describe('levels of the codecs', () => {
  it('rise with the bits a second', () => {
    const film = { widthPx: 1280, heightPx: 720, framesPerSecond: 30 };
    // Level 4.1 takes 50 million, level 5 135 million (ITU-T H.264, table A-1).
    expect([44e6, 51e6].map((bits) => h264Codecs(film, bits)[1])).toEqual(['avc1.4D4029', 'avc1.4D4032']);
  });

  // 1280 x 720 x 30 is 27.6 million samples a second: VP9 level 3.1 (webmproject.org/vp9/levels), and 3600 blocks of
  // 16 x 16 in each frame: H.264 level 3.1 (ITU-T H.264, table A-1). 1080p30 is level 4 of both, 2160p30 5 and 5.1.
  it.each([
    [1280, 720, 30, 'vp09.00.31.08', 'avc1.64001F'],
    [1920, 1080, 30, 'vp09.00.40.08', 'avc1.640028'],
    [3840, 2160, 30, 'vp09.00.50.08', 'avc1.640033'],
    [128, 72, 10, 'vp09.00.10.08', 'avc1.64001E'],
  ])('%d x %d at %d', (widthPx, heightPx, framesPerSecond, vp9, h264) => {
    const film = { widthPx, heightPx, framesPerSecond };
    expect(vp9Codec(film)).toBe(vp9);
    expect(h264Codecs(film, 1e6)[0]).toBe(h264);
  });
});
