import { Refusal } from '../base/refusal.ts';
import type { ColumnMapping, RadialKind } from './catalogue.ts';
import { findColumn, listColumns, nearestColumn } from './columnNames.ts';
import { type ColumnChoice, plainName, ROLE_NAMES, type Role, SPELLINGS } from './spellings.ts';

/**
 * The columns whose names are usual spellings of right ascension (ra, RAJ2000, ra_deg, alpha ...), declination,
 * redshift (z, zspec ...) or else velocity (cz, v ...), weight, magnitude and name; case, underscores and units in
 * brackets do not matter. Only parts that were found are in the answer.
 *
 * A column z beside g, r and i is a magnitude, and so is v beside b: neither is suggested.
 */
export function suggestMapping(header: readonly string[]): ColumnChoice {
  const plain = header.map(plainName);
  const bands = new Set(plain);
  const isBand = (name: string) =>
    (name === 'z' && ['g', 'r', 'i'].every((band) => bands.has(band))) || (name === 'v' && bands.has('b'));
  const find = (role: Role) => {
    for (const spelling of SPELLINGS[role]) {
      const at = isBand(spelling) ? -1 : plain.indexOf(spelling);
      if (at !== -1) return header[at]!;
    }
    return null;
  };
  const [ra, dec, z, weight, magnitude, id] = [
    find('ra'),
    find('dec'),
    find('z'),
    find('weight'),
    find('mag'),
    find('id'),
  ];
  const cz = z === null ? find('cz') : null;
  return {
    ...(ra !== null && { ra }),
    ...(dec !== null && { dec }),
    ...(z !== null && { radial: { column: z, kind: 'redshift' } }),
    ...(cz !== null && { radial: { column: cz, kind: 'czKmS' } }),
    ...(weight !== null && { weight }),
    ...(magnitude !== null && { magnitude }),
    ...(id !== null && { id }),
  };
}

/**
 * The mapping to use: what was chosen, and the header's own spelling for the rest. Names are given back as they stand
 * in the header.
 *
 * Throws Refusal ('use') for a chosen column that the file does not have and for one column in two of the parts RA,
 * Dec, redshift and weight, and Refusal ('input') where RA, Dec or redshift was neither chosen nor found.
 */
export function resolveMapping(header: readonly string[], chosen: ColumnChoice = {}): ColumnMapping {
  const named: ColumnChoice = {
    ...suggestMapping(header),
    ...Object.fromEntries(Object.entries(chosen).filter(([, value]) => value !== undefined)),
  };
  const absent = [
    ...(named.ra === undefined ? ['right ascension (ra)'] : []),
    ...(named.dec === undefined ? ['declination (dec)'] : []),
    ...(named.radial === undefined ? ['redshift (z, or cz in km/s)'] : []),
  ];
  if (named.ra === undefined || named.dec === undefined || named.radial === undefined) {
    throw noSuchColumn(header, absent);
  }
  const mapping = {
    ra: columnNamed(header, named.ra, 'ra'),
    dec: columnNamed(header, named.dec, 'dec'),
    radial: {
      column: columnNamed(header, named.radial.column, named.radial.kind === 'redshift' ? 'z' : 'cz'),
      kind: named.radial.kind,
    },
    weight: named.weight == null ? null : columnNamed(header, named.weight, 'weight'),
    magnitude: named.magnitude == null ? null : columnNamed(header, named.magnitude, 'mag'),
    id: named.id == null ? null : columnNamed(header, named.id, 'id'),
  };
  refuseDoubleUse(mapping);
  return mapping;
}

/** The header's spelling of a column's name. Throws Refusal ('use') when the header has none such. */
export function columnNamed(header: readonly string[], name: string, role: Role | null = null): string {
  const at = findColumn(header, name);
  if (at !== -1) return header[at]!;
  const near = nearestColumn(header, name);
  const hint = near === null ? 'name one of these' : `did you mean "${near}"`;
  const part = role === null ? '' : ` (wanted as ${ROLE_NAMES[role]})`;
  throw new Refusal(
    `The file has no column "${name}"${part}; its columns are ${listColumns(header)}: ${hint}${near === null ? '.' : '?'}`,
    'use',
  );
}

function noSuchColumn(header: readonly string[], absent: readonly string[]): Refusal {
  if (header.length === 1) {
    return new Refusal(
      `The first line, "${listColumns(header)}", is a single column, where a header with columns for ${absent.join(', ')} was expected: separate the columns by commas, tabs, semicolons or bars.`,
    );
  }
  return new Refusal(
    `No column was recognised as ${absent.join(' nor as ')} among ${listColumns(header)}: choose them yourself (in the window under Columns, on a command line as in --columns ra=RA,dec=DEC,z=Z).`,
  );
}

function refuseDoubleUse(mapping: ColumnMapping): void {
  const { ra, dec, radial, weight } = mapping;
  const names = [ra, dec, radial.column, ...(weight === null ? [] : [weight])];
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined) {
    throw new Refusal(
      `The column "${twice}" is named for two of right ascension, declination, redshift and weight: name a column of its own for each.`,
      'use',
    );
  }
}

const RADIAL_WORDS: Readonly<Record<RadialKind, string>> = {
  redshift: 'redshift',
  czKmS: 'velocity cz in km/s, read as z = cz/c (the optical convention)',
};

/** The mapping in words, for a report: which column is what, and how a velocity becomes a redshift. */
export function describeMapping(mapping: ColumnMapping): string {
  const parts = [
    `right ascension in degrees from ${mapping.ra}`,
    `declination in degrees from ${mapping.dec}`,
    `${RADIAL_WORDS[mapping.radial.kind]}, from ${mapping.radial.column}`,
    mapping.weight === null ? 'every galaxy with weight 1' : `weight from ${mapping.weight}`,
    ...(mapping.magnitude === null ? [] : [`magnitude from ${mapping.magnitude}`]),
    ...(mapping.id === null ? [] : [`name from ${mapping.id}`]),
  ];
  return parts.join('; ');
}
