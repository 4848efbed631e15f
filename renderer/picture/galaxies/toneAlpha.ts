import { exposure } from '../../cone/points/exposure.ts';
import { glowAt, LIGHT_STEPS, lightOfIndex, strength, VALUE_STEPS } from '../../cone/points/tone.ts';
import type { ScenePoints } from '../scene.ts';

const DEEPER = 1.4;

/**
 * Finished colours of galaxies as the window's tone table has them, with their cover as opacity instead of mixed with
 * a ground: VALUE_STEPS rows of LIGHT_STEPS times red, green, blue, alpha. Entry 0 of each row is clear.
 *
 * @param pxPerUnit pixels of a unit on the grid of the sums
 */
export function toneAlpha(points: ScenePoints, pxPerUnit: number): Uint8Array {
  const crowd = {
    onStage: points.count,
    densestPerPixel: points.densest,
    thinnestPerPixel: points.thinnest,
  };
  const { full, single } = exposure(crowd, pxPerUnit, points.diameter * pxPerUnit);
  // A picture is looked at closely: its densest places keep their colour where a screen's turn white.
  const dim = 2 ** -points.exposureStops;
  const table = new Uint8Array(VALUE_STEPS * LIGHT_STEPS * 4);
  for (let i = 1; i < LIGHT_STEPS; i++) {
    const cover = strength(lightOfIndex(i), points.stretch, single * dim, DEEPER * full * dim);
    const burn = glowAt(cover, points.glowShare);
    for (let v = 0; v < VALUE_STEPS; v++) {
      const colour = 3 * Math.round((255 * v) / (VALUE_STEPS - 1));
      const at = 4 * (v * LIGHT_STEPS + i);
      for (let k = 0; k < 3; k++)
        table[at + k] = Math.round(points.colours[colour + k]! * (1 - burn) + burn * points.glow[k]!);
      table[at + 3] = Math.round(255 * cover);
    }
  }
  return table;
}
