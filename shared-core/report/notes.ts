import { roundTo } from '../base/roundTo.ts';
import {
  type ColumnMapping,
  type RowAccount,
  SET_ASIDE_REASONS,
  type SetAsideReason,
} from '../catalogue/catalogue.ts';
import { describeMapping } from '../catalogue/mapping.ts';
import { decimalsSentence, reasonText } from '../catalogue/reasons.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import type { PublishedSet } from '../cosmology/publishedSets.ts';
import type { Footprint } from '../sky/region.ts';
import { areaText, estimateWords } from './areaWords.ts';

const trim = (value: number, digits = 6) => String(roundTo(value, digits));

/** One line that lets a reader repeat the cosmology: its name and paper, or every parameter. */
export function describeCosmology(cosmology: Cosmology, set: PublishedSet | null): string {
  const p = cosmology.parameters;
  const curvature = Math.abs(cosmology.omegaK0) < 1e-12 ? 'flat' : `Omega_k ${trim(cosmology.omegaK0)}`;
  const dark = p.w0 === -1 && p.wa === 0 ? '' : `, w0 ${trim(p.w0)}, wa ${trim(p.wa)}`;
  const heat =
    p.tCmbK === 0
      ? ', no radiation'
      : `, T_CMB ${trim(p.tCmbK)} K, N_eff ${trim(p.nEff)}, neutrinos ${p.neutrinoMassesEv.map((m) => trim(m)).join(' + ') || '0'} eV`;
  const head = set === null ? 'own parameters' : `${set.name} (${set.source})`;
  return (
    `Cosmology: ${head}: ${curvature}, H0 ${trim(p.h0KmSMpc)} km/s/Mpc, Omega_m ${trim(p.omegaM0)} (baryons and cold dark matter), ` +
    `Omega_de ${trim(cosmology.omegaDe0)}${dark}${heat}; age ${cosmology.ageGyr(0).toFixed(3)} Gyr.`
  );
}

/** One line on the rows: read, kept, set aside by reason, repeated positions. */
export function describeAccount(account: RowAccount): string {
  const reasons = SET_ASIDE_REASONS.filter((r) => (account.reasons[r] ?? 0) > 0).map(
    (r: SetAsideReason) => `${account.reasons[r]} ${reasonText(r)}`,
  );
  const why = reasons.length === 0 ? '' : ` (${reasons.join('; ')})`;
  const repeats =
    account.repeatedPositions === 0
      ? ''
      : ` ${account.repeatedPositions} kept rows repeat an earlier position.`;
  const decimals = decimalsSentence(account);
  return `Rows: ${account.rowsRead} read = ${account.kept} kept + ${account.setAside} set aside${why}.${repeats}${decimals === null ? '' : ` ${decimals}`}`;
}

/** One line on which column was read as what, and how a velocity becomes a redshift. */
export function describeColumns(mapping: ColumnMapping): string {
  return `Columns: ${describeMapping(mapping)}.`;
}

/** One line on the sky area, that never lets an estimate pass for more. */
export function describeFootprint(
  footprint: Pick<Footprint, 'areaDeg2' | 'estimate'>,
  words: string | null,
): string {
  const area = areaText(footprint);
  if (footprint.estimate === null) return `Region: ${words ?? 'as given'}; area ${area.value} deg^2.`;
  const how = estimateWords(footprint.estimate);
  return `Region: area ${area.value} +- ${area.error} deg^2 is an ESTIMATE ${how}; give the region for an exact one.`;
}

/** One line on how the effective numbers were made. */
export function describeMethod(p0Mpc3PerH3: number): string {
  return `Effective volume and redshift at P0 = ${trim(p0Mpc3PerH3)} (Mpc/h)^3; errors of n are Poisson.`;
}
