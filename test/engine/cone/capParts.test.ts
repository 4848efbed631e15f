import { describe, expect, it } from 'vitest';
import { ringDirections } from '../../../renderer/cone/geometry/rings.ts';
import { shellMesh } from '../../../renderer/cone/geometry/shellMesh.ts';
import { triangulateRings } from '../../../renderer/cone/geometry/triangulate.ts';
import { type CapPart, capParts } from '../../../renderer/cone/solids/capParts.ts';
import { boxRing, capRing } from './skies.ts';

const meshOf = (rings: Float64Array[], edgeDeg: number) => shellMesh(triangulateRings(rings, edgeDeg), rings);

/** Looking along the z axis. */
const FROM_ABOVE = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0];

/** Area of a part on the view's plane, above 0 when it is seen from the front. */
function areaOf({ loops }: CapPart, directions: Float32Array): number {
  let twice = 0;
  for (const loop of loops) {
    for (const [i, a] of loop.entries()) {
      const b = loop[(i + 1) % loop.length]!;
      twice += directions[3 * a]! * directions[3 * b + 1]! - directions[3 * b]! * directions[3 * a + 1]!;
    }
  }
  return twice / 2;
}

describe('the parts of a curved cap', () => {
  it('cover a sphere once in front and once behind', () => {
    const mesh = meshOf([], 4);
    const parts = capParts(mesh, FROM_ABOVE);
    const areas = parts.map((part) => areaOf(part, mesh.directions));
    const front = areas.filter((a) => a > 0).reduce((sum, a) => sum + a, 0);
    const behind = areas.filter((a) => a < 0).reduce((sum, a) => sum - a, 0);
    // A disc of radius 1; straight edges of 4 degrees at its rim cut off a part in a thousand at most.
    expect(Math.abs(front / Math.PI - 1)).toBeLessThan(2e-3);
    expect(Math.abs(behind / Math.PI - 1)).toBeLessThan(2e-3);
  });

  it('lie where a sphere faces as they say', () => {
    const mesh = meshOf([], 3);
    for (const { facing, loops } of capParts(mesh, FROM_ABOVE)) {
      const z = loops.flat().map((point) => Math.abs(mesh.directions[3 * point + 2]!));
      const mean = z.reduce((sum, v) => sum + v, 0) / z.length;
      // On a unit sphere the facing is |z|: a step of a tenth of (1 - facing) squared is up to 0.32 wide at its clear end.
      expect(Math.abs(mean - facing)).toBeLessThan(0.32);
    }
  });

  it.each([
    ['a wide cap', capRing(40, 30, 50)],
    ['a box', boxRing(100, 200, 10, 60)],
  ])('have the outline of %s as it was', (_, ring) => {
    const rings = [ringDirections(ring)];
    const mesh = meshOf(rings, 4);
    const parts = capParts(mesh, FROM_ABOVE);
    const whole = parts.reduce((sum, part) => sum + areaOf(part, mesh.directions), 0);
    const outline = rings[0]!;
    let twice = 0;
    for (let i = 0; i < outline.length; i += 3) {
      const k = (i + 3) % outline.length;
      twice += outline[i]! * outline[k + 1]! - outline[k]! * outline[i + 1]!;
    }
    // The same edges summed in another order, from 32-bit floats.
    expect(whole).toBeCloseTo(twice / 2, 4);
  });

  it('walk every outer edge once', () => {
    const ring = ringDirections(capRing(40, 90, 40));
    const mesh = meshOf([ring], 5);
    const walked = capParts(mesh, FROM_ABOVE).flatMap(({ loops }) =>
      loops.flatMap((loop) => loop.map((a, i) => `${a} ${loop[(i + 1) % loop.length]!}`)),
    );
    expect(walked.length).toBeGreaterThanOrEqual(ring.length / 3);
    expect(new Set(walked).size).toBe(walked.length);
  });
});
