import { Refusal } from '../base/refusal.ts';
import { type ColumnChoice, ROLES, type Role } from './spellings.ts';

const OPTIONAL: readonly Role[] = ['weight', 'mag', 'id'];
const EXAMPLE = 'ra=RA,dec=DEC,z=Z';

/**
 * Reads a column map as a person writes it: `ra=RA,dec=DEC,cz=V,mag=Mag`. Keys: ra, dec, z (a redshift) or cz (a
 * velocity in km/s, read as z = v/c), weight, mag, id, in any order and case; parts that are not named are left to
 * the header's spelling. `weight=`, `mag=` or `id=` without a name: no such column, even if the header has one. A
 * name may hold commas.
 *
 * Throws Refusal ('use') for an unknown or repeated key, for z and cz together, and for ra, dec, z or cz without a
 * name.
 */
export function parseColumnMap(text: string): ColumnChoice {
  const named = new Map<Role, string>();
  // A comma parts two entries only where another KEY= follows, so that names may hold commas.
  for (const entry of text.split(/,(?=[^,=]*=)/)) {
    const [, key, name] = /^\s*([^=]*?)\s*=\s*(.*?)\s*$/s.exec(entry) ?? [];
    const role = ROLES.find((candidate) => candidate === key?.toLowerCase());
    if (role === undefined) {
      throw new Refusal(
        `The column map has the entry "${entry.trim()}", where KEY=COLUMN with a key among ${ROLES.join(', ')} was expected: write it as in ${EXAMPLE}.`,
        'use',
      );
    }
    if (named.has(role)) throw new Refusal(`The column map names ${role} twice: name it once.`, 'use');
    if (name === '' && !OPTIONAL.includes(role)) {
      throw new Refusal(`The column map names no column for ${role}: write it as in ${EXAMPLE}.`, 'use');
    }
    named.set(role, name ?? '');
  }
  return choiceOf(named);
}

function choiceOf(named: ReadonlyMap<Role, string>): ColumnChoice {
  const z = named.get('z');
  const cz = named.get('cz');
  if (z !== undefined && cz !== undefined) {
    throw new Refusal('The column map names both z and cz: keep the one to take the redshift from.', 'use');
  }
  const ra = named.get('ra');
  const dec = named.get('dec');
  const orNone = (role: Role) => named.get(role) || null;
  return {
    ...(ra !== undefined && { ra }),
    ...(dec !== undefined && { dec }),
    ...(z !== undefined && { radial: { column: z, kind: 'redshift' } }),
    ...(cz !== undefined && { radial: { column: cz, kind: 'czKmS' } }),
    ...(named.has('weight') && { weight: orNone('weight') }),
    ...(named.has('mag') && { magnitude: orNone('mag') }),
    ...(named.has('id') && { id: orNone('id') }),
  };
}
