import { roundTo } from '../../shared-core/base/roundTo.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { areaText } from '../../shared-core/report/areaWords.ts';
import { cutWords } from '../../shared-core/report/cuts.ts';
import { UNNAMED } from '../../shared-core/study/document.ts';
import type { PictureNumbers } from './numbers.ts';

/** A count with its thousands parted by narrow spaces. */
export const thousands = (count: number): string => String(count).replace(/\B(?=(\d{3})+$)/g, '\u202f');

/** How many galaxies are drawn, in words. */
export function galaxiesText(numbers: PictureNumbers): string {
  const count = numbers.facts.selected?.sample.count ?? 0;
  if (count === 0) return 'No galaxies, shells only';
  return `${thousands(count)} ${count === 1 ? 'galaxy' : 'galaxies'}`;
}

/**
 * What a reader must know to use the picture: how many galaxies, what is not to scale, the region and whether it is an
 * estimate, the selection, the cosmology.
 *
 * @param notes of the view
 */
export function offeredCaption(numbers: PictureNumbers, notes: readonly string[]): string {
  const { study, facts } = numbers;
  const account = facts.selected?.account;
  const of = account ? ` of ${thousands(account.rowsRead)} rows read` : '';
  const beyond = (facts.selected?.sample.count ?? 0) - numbers.galaxiesWithin;
  const hidden = beyond > 0 ? `; ${thousands(beyond)} lie beyond the depth shown` : '';
  const parts = [`${galaxiesText(numbers)}${of}${hidden}.`, ...notes.map(sentence)];
  const cuts = study.cuts.map((cut) => cutWords(cut, '≤'));
  if (cuts.length > 0) parts.push(`Selected: ${cuts.join(', ')}.`);
  parts.push(...regionText(numbers), cosmologyText(numbers));
  if (study.source?.kind === 'demo') parts.push('The survey is invented.');
  return parts.join(' ');
}

const sentence = (note: string): string => `${note.charAt(0).toUpperCase()}${note.slice(1)}.`;

const digits = (value: number, count: number): string => String(roundTo(value, count));

function regionText({ footprint }: PictureNumbers): string[] {
  if (footprint === null) return [];
  const fields = footprint.fields.length > 1 ? ` in ${footprint.fields.length} fields` : '';
  if (footprint.estimate === null) return [`Area ${digits(footprint.areaDeg2, 4)} deg²${fields}.`];
  const { value, error } = areaText(footprint);
  return [`Area ${value} ± ${error} deg²${fields}, estimated from the galaxies' positions.`];
}

/** Enough to repeat every distance: name and parameters. */
function cosmologyText({ study, cosmology }: PictureNumbers): string {
  const set = study.cosmologySet === null ? null : findPublishedSet(study.cosmologySet);
  const p = cosmology.parameters;
  const parts = [
    Math.abs(cosmology.omegaK0) < 1e-12 ? 'flat' : `Ωk ${digits(cosmology.omegaK0, 4)}`,
    `H0 ${digits(p.h0KmSMpc, 6)} km/s/Mpc`,
    `Ωm ${digits(p.omegaM0, 6)} (without neutrinos)`,
    `ΩΛ ${digits(cosmology.omegaDe0, 5)}`,
  ];
  if (p.w0 !== -1 || p.wa !== 0) parts.push(`w0 ${digits(p.w0, 5)}, wa ${digits(p.wa, 5)}`);
  const masses = p.neutrinoMassesEv.reduce((sum, mass) => sum + mass, 0);
  parts.push(p.tCmbK === 0 ? 'no radiation' : `neutrino masses ${digits(masses, 3)} eV`);
  return `Cosmology: ${set === null ? '' : `${set.name}, `}${parts.map(unbroken).join(', ')}.`;
}

/** A name and its number stay on one line. */
const unbroken = (text: string): string => text.replace(' ', '\u00a0');

/** The title of a picture that was given none: its study's name, once somebody has named it. */
export const offeredTitle = ({ name }: { readonly name: string }): string => (name === UNNAMED ? '' : name);
