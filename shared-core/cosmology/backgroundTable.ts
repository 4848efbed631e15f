import type { BackgroundTable } from './cosmology.ts';
import type { ExpansionIntegrals } from './integrals.ts';
import { TABLE_MAX_REDSHIFT } from './redshiftRange.ts';

export function createBackgroundTable(
  integrals: ExpansionIntegrals,
  hubbleMpc: number,
  hubbleGyr: number,
): BackgroundTable {
  const comovingMpc = (z: number) => hubbleMpc * integrals.comoving(0, Math.log1p(z));
  const lookbackGyr = (z: number) => hubbleGyr * integrals.time(0, Math.log1p(z));
  return {
    comovingMpc,
    lookbackGyr,
    fill: (redshift, comoving, lookback) => {
      for (let i = 0; i < redshift.length; i++) {
        const z = redshift[i]!;
        const inside = z >= 0 && z <= TABLE_MAX_REDSHIFT;
        comoving[i] = inside ? comovingMpc(z) : Number.NaN;
        if (lookback) lookback[i] = inside ? lookbackGyr(z) : Number.NaN;
      }
    },
  };
}
