import { Refusal } from '../base/refusal.ts';
import { roundTo } from '../base/roundTo.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import { type RadialAxis, radialAxis } from './radial.ts';
import { rankBelow, type SortedSample } from './sample.ts';
import type { ShellScheme } from './shell.ts';

/** The deepest edge: where the distance table ends. */
export const DEEPEST_REDSHIFT = 1100;
const MOST_SHELLS = 1000;

/**
 * Checks edges typed or dragged by a person.
 * @throws Refusal ('use') unless there are at least two, finite, in 0..1100 and strictly increasing
 */
export function checkEdges(edges: readonly number[]): readonly number[] {
  if (edges.length < 2)
    throw new Refusal(
      `${edges.length === 1 ? 'One shell edge' : 'No shell edge'} came, at least two are needed: give edges such as 0.6,0.8,1.`,
      'use',
    );
  return checkSomeEdges(edges);
}

/**
 * The same for edges in the making: none, or one alone, is no shell yet, but what is there must be usable.
 * @throws Refusal ('use') unless they are finite, in 0..1100 and strictly increasing
 */
export function checkSomeEdges(edges: readonly number[]): readonly number[] {
  if (edges.length - 1 > MOST_SHELLS)
    throw new Refusal(
      `${edges.length - 1} shells were asked for, at most ${MOST_SHELLS} are allowed: give fewer edges.`,
      'use',
    );
  for (const [i, edge] of edges.entries()) {
    if (!(Number.isFinite(edge) && edge >= 0 && edge <= DEEPEST_REDSHIFT))
      throw new Refusal(
        `Shell edge ${i + 1} is ${edge}, expected a redshift from 0 to ${DEEPEST_REDSHIFT}: correct it.`,
        'use',
      );
    if (i > 0 && !(edge > edges[i - 1]!))
      throw new Refusal(
        `Shell edges must increase: ${edges[i - 1]} is followed by ${edge}. Put them in order and leave out repeats.`,
        'use',
      );
  }
  return edges;
}

/**
 * Redshift edges of a scheme: as given, or n shells equal in redshift, comoving thickness, lookback time,
 * comoving volume or number of galaxies between two redshifts (default: the least and greatest of the sample).
 * @returns ascending edges, one more than there are shells
 * @throws Refusal when the numbers cannot be used, or the sample is empty and no range is given
 */
export function edgesOf(scheme: ShellScheme, sample: SortedSample, cosmology: Cosmology): readonly number[] {
  if (scheme.kind === 'edges') return checkEdges(scheme.edges);
  const { shells, kind } = scheme;
  if (!(Number.isInteger(shells) && shells >= 1 && shells <= MOST_SHELLS))
    throw new Refusal(
      `${shells} shells were asked for, expected a whole number from 1 to ${MOST_SHELLS}.`,
      'use',
    );
  if (sample.count === 0 && (kind === 'count' || scheme.zMin === null || scheme.zMax === null))
    throw new Refusal(
      'No galaxy is left to place shells by: give the edges, or change the region, cuts or columns.',
    );
  const zMin = scheme.zMin ?? sample.redshift[0]!;
  const zMax = scheme.zMax ?? sample.redshift[sample.count - 1]!;
  if (zMin === zMax && scheme.zMin === null && scheme.zMax === null)
    throw new Refusal(
      `All galaxies have the same redshift ${short(zMin)}, so no range can be divided: give the edges yourself.`,
    );
  checkEdges([zMin, zMax]);
  if (kind === 'count') return checkEdges(equalCountEdges(sample, zMin, zMax, shells));
  const along = coordinate(kind, cosmology);
  const [from, to] = [along.at(zMin), along.at(zMax)];
  const edges = Array.from({ length: shells + 1 }, (_, i) =>
    i === 0 ? zMin : i === shells ? zMax : along.redshiftAt(from + ((to - from) * i) / shells),
  );
  return checkEdges(edges);
}

function coordinate(
  kind: RadialAxis['kind'] | 'volume',
  cosmology: Cosmology,
): Pick<RadialAxis, 'at' | 'redshiftAt'> {
  if (kind !== 'volume') return radialAxis(kind, cosmology);
  return {
    at: (z) => cosmology.comovingVolumeMpc3(z),
    redshiftAt: (v) => cosmology.redshiftAtVolumeMpc3(v),
  };
}

// An edge stands midway between two neighbours, so that no galaxy sits on it and rounding cannot move one across.
function equalCountEdges(sample: SortedSample, zMin: number, zMax: number, shells: number): number[] {
  const first = rankBelow(sample, zMin);
  const last = rankBelow(sample, zMax, true);
  const inside = last - first;
  if (inside < shells)
    throw new Refusal(
      `${inside} galaxies lie between redshift ${short(zMin)} and ${short(zMax)}, too few for ${shells} shells: ask for fewer shells, or widen the range.`,
    );
  const edges = [zMin];
  for (let i = 1; i < shells; i++) {
    const rank = first + Math.round((inside * i) / shells);
    const [below, above] = [sample.redshift[rank - 1]!, sample.redshift[rank]!];
    const edge = below === above ? above : below + (above - below) / 2;
    if (!(edge > edges[i - 1]!))
      throw new Refusal(
        `Too many galaxies share the redshift ${short(edge)} to make ${shells} shells of equal count: ask for fewer shells.`,
      );
    edges.push(edge);
  }
  edges.push(zMax);
  return edges;
}

// Six digits tell a reader which redshift is meant; the rest is rounding.
function short(z: number): string {
  return String(roundTo(z, 6));
}
