import { expect, it } from 'vitest';
import { prepareFields } from '../../../renderer/cone/geometry/preparedField.ts';
import { direction, intoFrame } from '../../../renderer/cone/geometry/vector.ts';
import { coneFootprint } from '../../../renderer/stage/coneInputs.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import { footprintFields } from '../../../shared-core/sky/fields.ts';

it.each([
  ['one cell', [150, 151, 152], [2, 2, 2]],
  ['one cell, its galaxies apart', [150, 151, 152], [2, 3, 2.5]],
  ['three cells', [150, 150.75, 151.5, 152.25], [2, 3, 2, 2.67]],
])('the cone of %s holds its galaxies', (_, raDeg, decDeg) => {
  const footprint = estimateFootprint(raDeg, decDeg);
  const input = coneFootprint({ fields: footprintFields(footprint), estimate: footprint.estimate });
  const [field, ...others] = prepareFields(input);
  expect(others).toEqual([]);
  const { frame, upper, lower } = field!;
  const slope = (d: readonly [number, number, number]): number => {
    const [x, y] = intoFrame(frame, d);
    return y / x;
  };
  for (const [i, ra] of raDeg.entries()) {
    const at = slope(direction(ra, decDeg[i]!));
    expect(at).toBeLessThan(slope(upper));
    expect(at).toBeGreaterThan(slope(lower));
  }
});
