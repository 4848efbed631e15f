import { describe, expect, it } from 'vitest';
import { prepareField } from '../../../renderer/cone/geometry/preparedField.ts';
import { modelMatrix } from '../../../renderer/cone/geometry/projection.ts';
import { paintFlatSolids, wallStrips } from '../../../renderer/cone/solids/flatSolids.ts';
import { boxRing, capRing } from './skies.ts';

/** A context that notes what is filled: number of points and colour. */
function notes() {
  const fills: { points: number; style: string; rule: string }[] = [];
  let points = 0;
  const context = {
    fillStyle: '',
    beginPath: () => (points = 0),
    moveTo: () => points++,
    lineTo: () => points++,
    closePath: () => undefined,
    fill: (rule = 'nonzero') => fills.push({ points, style: context.fillStyle, rule }),
  };
  return { fills, context: context as unknown as CanvasRenderingContext2D };
}

const field = prepareField({
  centreRaDeg: 160,
  centreDecDeg: 4,
  radiusDeg: 11.2,
  positionAngleDeg: 90,
  rings: [boxRing(150, 170, -1, 9)],
});
const seen = modelMatrix(field.frame, 1, 0);
const look = { inner: 0.4, outer: 0.6, colour: [100, 150, 200], alpha: 0.05 } as const;

describe('flat solids', () => {
  it('take the four sides of a box as four strips, each edge once', () => {
    const strips = wallStrips(field.rings[0]!, seen);
    expect(strips).toHaveLength(4);
    expect(strips.reduce((sum, strip) => sum + strip.edges, 0)).toBe(field.rings[0]!.length / 3);
    // Seen from the side: two walls face the viewer, two are edge on.
    const facing = strips.map((strip) => strip.facing).sort((a, b) => a - b);
    expect(facing[0]!).toBeLessThan(0.1);
    expect(facing[1]!).toBeLessThan(0.1);
    expect(facing[2]!).toBeGreaterThan(0.95);
    expect(facing[3]!).toBeGreaterThan(0.95);
  });

  it('cut a round wall where its facing changes', () => {
    const round = prepareField({
      centreRaDeg: 20,
      centreDecDeg: 30,
      radiusDeg: 5,
      positionAngleDeg: 90,
      rings: [capRing(20, 30, 5)],
    });
    const strips = wallStrips(round.rings[0]!, modelMatrix(round.frame, 1, 0));
    expect(strips.length).toBeGreaterThan(8);
    expect(strips.reduce((sum, strip) => sum + strip.edges, 0)).toBe(round.rings[0]!.length / 3);
  });

  it('never take a near and a far wall together, which would cancel where they lie over each other', () => {
    // Looking along the axis of the view at a prism whose two sides face alike, one from outside and one from inside.
    const wedge = prepareField({
      centreRaDeg: 0,
      centreDecDeg: 0,
      radiusDeg: 20,
      positionAngleDeg: 90,
      rings: [{ raDeg: Float64Array.of(-10, 10, 0), decDeg: Float64Array.of(0, 0, 15) }],
    });
    const ring = wedge.rings[0]!;
    const back = [0, 1, 0];
    const along = Float64Array.of(1, 0, 0, 0, 0, 0, 1, 0, ...back, 0);
    const normalBack = (i: number): number => {
      const [a, b] = [i, (i + 1) % (ring.length / 3)].map((k) => ring.subarray(3 * k, 3 * k + 3));
      return a![2]! * b![0]! - a![0]! * b![2]!;
    };
    for (const { first, edges } of wallStrips(ring, along)) {
      const signs = Array.from({ length: edges }, (_, k) => Math.sign(normalBack(first + k)));
      expect(new Set(signs).size).toBe(1);
    }
  });

  it('fill two caps and the walls of every shell, stronger where they are edge on', () => {
    const { fills, context } = notes();
    const place = { rings: field.rings, centre: field.centre, curved: null, seen };
    const behind = Float64Array.from(seen);
    behind.fill(0, 8);
    paintFlatSolids(context, [{ ...place, pixels: behind }], [look, look]);
    // Everything lies behind the eye.
    expect(fills).toHaveLength(0);
    const pixels = Float64Array.from(seen);
    pixels.set([0, 0, 0, 1], 8);
    paintFlatSolids(context, [{ ...place, pixels }], [look, look]);
    expect(fills).toHaveLength(2 * (2 + 4));
    expect(fills.filter((fill) => fill.rule === 'evenodd')).toHaveLength(4);
    const alpha = (style: string): number => Number(/\/ ([\d.]+)\)/.exec(style)![1]);
    const alphas = fills.map((fill) => alpha(fill.style));
    expect(Math.min(...alphas)).toBeCloseTo(0.05, 2);
    // Edge on: 1 + 2.5 times the glass.
    expect(Math.max(...alphas)).toBeGreaterThan(0.15);
    expect(Math.max(...alphas)).toBeLessThan(0.176);
  });

  it('leave out what is not there', () => {
    const { fills, context } = notes();
    const pixels = Float64Array.from(seen);
    pixels.set([0, 0, 0, 1], 8);
    paintFlatSolids(
      context,
      [{ rings: field.rings, centre: field.centre, curved: null, pixels, seen }],
      [{ ...look, alpha: 0 }],
    );
    expect(fills).toHaveLength(0);
  });
});
