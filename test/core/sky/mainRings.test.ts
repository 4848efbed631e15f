import { expect, it } from 'vitest';
import { mainRings } from '../../../shared-core/sky/mainRings.ts';

/** A square about a place, sides in degrees on the sky. */
function square(raDeg: number, decDeg: number, side: number) {
  const dRa = side / 2 / Math.cos((decDeg * Math.PI) / 180);
  return {
    raDeg: Float64Array.of(raDeg - dRa, raDeg + dRa, raDeg + dRa, raDeg - dRa).map((ra) => (ra + 360) % 360),
    decDeg: Float64Array.of(decDeg - side / 2, decDeg - side / 2, decDeg + side / 2, decDeg + side / 2),
  };
}

it('keeps what goes around a share of the largest, islands and holes alike, also where right ascension begins anew', () => {
  const [large, island, hole] = [square(0.5, 60, 8), square(11, 66, 1.2), square(1, 60, 0.5)];
  // 64, 1.44 and 0.25 square degrees.
  expect(mainRings([island, large, hole], 0.02)).toEqual([island, large]);
  expect(mainRings([island, large, hole], 0.003)).toEqual([island, large, hole]);
  expect(mainRings([large, island], 0.1)).toEqual([large]);
});

it('keeps all of an outline without extent, and none of none', () => {
  const nothing = { raDeg: Float64Array.of(1, 1), decDeg: Float64Array.of(2, 2) };
  expect(mainRings([nothing, nothing], 0.5)).toHaveLength(2);
  expect(mainRings([], 0.5)).toEqual([]);
});
