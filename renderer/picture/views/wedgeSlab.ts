import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import { cross, direction, dot, unit, type Vec3 } from '../../cone/geometry/vector.ts';
import type { PictureNumbers } from '../numbers.ts';

const DEGREE = Math.PI / 180;
/** The slab offered for a field that is higher than this. */
const OFFERED_DEG = 6;
/** From this on a wedge is drawn as the full circle that it nearly is. */
const FULL_FROM_DEG = 300;
const FULL_RANGE = [-180, 180] as const;

/** A slab of the sky and its angles, counted from the middle of the wedge. */
export interface WedgeSlab {
  /** Degrees along the slab from its middle, or null outside it. */
  readonly angleOf: (x: number, y: number, z: number) => number | null;
  readonly range: readonly [low: number, high: number];
  /** What stands beside an angle: its right ascension or place along the circle. */
  readonly angleText: (angle: number) => string;
  /** Angles between marks stand at multiples of a step after this is added. */
  readonly origin: number;
  readonly words: string;
  /** Galaxies of the sample that lie in it. */
  readonly galaxies: number;
}

type SlabOption = NonNullable<PictureOptions['slab']>;

/**
 * The slab asked for, or one through the middle of the largest field.
 * @throws Refusal ('use') when neither the region nor a galaxy lies in it
 */
export function wedgeSlab(wanted: SlabOption | null, numbers: PictureNumbers): WedgeSlab {
  const field = numbers.footprint?.fields[0];
  const narrow = field && field.rings.length > 0 && !field.wide ? field : null;
  const slab = wanted ?? offeredSlab(narrow?.rings.flatMap((ring) => Array.from(ring.decDeg)) ?? []);
  const middleRaDeg = narrow?.centreRaDeg ?? 0;
  const made = slab.kind === 'declination' ? byDeclination(slab, middleRaDeg) : byCircle(slab, narrow);
  return { ...made, ...contentsOf(made.angleOf, numbers) };
}

function offeredSlab(decDeg: readonly number[]): Extract<SlabOption, { kind: 'declination' }> {
  const low = decDeg.reduce((least, dec) => Math.min(least, dec), 90);
  const high = decDeg.reduce((most, dec) => Math.max(most, dec), -90);
  if (!(high > low)) return { kind: 'declination', decMinDeg: -OFFERED_DEG / 2, decMaxDeg: OFFERED_DEG / 2 };
  const middle = (low + high) / 2;
  const half = Math.min(high - low, OFFERED_DEG) / 2;
  return { kind: 'declination', decMinDeg: round(middle - half), decMaxDeg: round(middle + half) };
}

const round = (deg: number): number => Number(deg.toFixed(1));

function byDeclination(
  { decMinDeg, decMaxDeg }: Extract<SlabOption, { kind: 'declination' }>,
  middleRaDeg: number,
): Omit<WedgeSlab, 'range' | 'galaxies'> {
  const [low, high] = [Math.sin(decMinDeg * DEGREE) - 1e-7, Math.sin(decMaxDeg * DEGREE) + 1e-7];
  return {
    angleOf(x, y, z) {
      if (!(z >= low && z <= high)) return null;
      return wrapped(Math.atan2(y, x) / DEGREE - middleRaDeg);
    },
    angleText: (angle) => `${+((angle + middleRaDeg + 720) % 360).toFixed(4)}°`,
    origin: middleRaDeg,
    words: `wedge of declination ${degrees(decMinDeg)} to ${degrees(decMaxDeg)}, right ascension around`,
  };
}

function byCircle(
  { poleRaDeg, poleDecDeg, thicknessDeg }: Extract<SlabOption, { kind: 'greatCircle' }>,
  field: { readonly centreRaDeg: number; readonly centreDecDeg: number } | null,
): Omit<WedgeSlab, 'range' | 'galaxies'> {
  const pole = direction(poleRaDeg, poleDecDeg);
  const seed: Vec3 = field ? direction(field.centreRaDeg, field.centreDecDeg) : [1, 0, 0];
  // The middle is the point of the circle nearest to the field; about the pole itself any will do.
  const aside: Vec3 = Math.abs(dot(seed, pole)) > 0.999 ? [pole[1], pole[2], pole[0]] : seed;
  const along = unit(cross(pole, aside));
  const middle = cross(along, pole);
  const half = Math.sin((thicknessDeg / 2) * DEGREE) + 1e-7;
  const thick = thicknessDeg >= 180;
  return {
    angleOf(x, y, z) {
      const off = x * pole[0] + y * pole[1] + z * pole[2];
      if (!thick && Math.abs(off) > half) return null;
      const c = x * middle[0] + y * middle[1] + z * middle[2];
      const s = x * along[0] + y * along[1] + z * along[2];
      return Math.atan2(s, c) / DEGREE;
    },
    angleText: (angle) => `${+angle.toFixed(4)}°`,
    origin: 0,
    words: `wedge of ${+thicknessDeg.toFixed(3)}° about the great circle with pole at RA ${+poleRaDeg.toFixed(3)}°, Dec ${degrees(poleDecDeg)}`,
  };
}

/** What of region and galaxies lies in the slab, from end to end. */
function contentsOf(
  angleOf: WedgeSlab['angleOf'],
  { footprint, facts }: PictureNumbers,
): Pick<WedgeSlab, 'range' | 'galaxies'> {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  const take = (x: number, y: number, z: number): number => {
    const angle = angleOf(x, y, z);
    if (angle === null) return 0;
    if (angle < low) low = angle;
    if (angle > high) high = angle;
    return 1;
  };
  for (const ring of footprint?.rings ?? [])
    for (let i = 0; i < ring.raDeg.length; i++) take(...direction(ring.raDeg[i]!, ring.decDeg[i]!));
  let galaxies = 0;
  const directions = facts.selected?.directions;
  const count = facts.selected?.sample.count ?? 0;
  if (directions)
    for (let i = 0; i < count; i++) galaxies += take(directions.x[i]!, directions.y[i]!, directions.z[i]!);
  if (footprint !== null && footprint.rings.length === 0) return { range: FULL_RANGE, galaxies };
  if (!(high > low))
    throw new Refusal(
      'Nothing of the survey lies in the slab that the wedge was asked for: give one that crosses the region.',
      'use',
    );
  return { range: high - low > FULL_FROM_DEG ? FULL_RANGE : [low, high], galaxies };
}

const wrapped = (deg: number): number => deg - 360 * Math.round(deg / 360);

const degrees = (deg: number): string => `${deg < 0 ? '−' : '+'}${+Math.abs(deg).toFixed(3)}°`;
