import { Refusal } from '../base/refusal.ts';
import { log1p } from '../numerics/elementary/elementary.ts';

/** The table ends here: a little before the cosmic background was released. */
export const TABLE_MAX_REDSHIFT = 1100;

/** Above about this redshift electron-positron pairs still heat the photons and the laws used here do not hold. */
export const MAX_REDSHIFT = 1e9;

/** ln(1+z). @throws Refusal outside 0..1e9 */
export function logOnePlus(z: number): number {
  if (!(z >= 0 && z <= MAX_REDSHIFT)) {
    throw new Refusal(
      `Redshift ${z} is outside the range of the cosmology; give one from 0 to ${MAX_REDSHIFT}.`,
      'use',
    );
  }
  return log1p(z);
}
