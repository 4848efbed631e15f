import { Refusal } from '../base/refusal.ts';
import type { Region, SkyShape } from './region.ts';

/** The ways to write a shape in one word; degrees, ICRS. */
export const SHAPE_FORMS =
  'sky, box:RA1,RA2,DEC1,DEC2, cap:RA,DEC,RADIUS or polygon:RA,DEC,RA,DEC,... (in degrees)';

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** The numbers of a list with commas, or null when one is none. */
function numbersOf(list: string): number[] | null {
  const cells = list.split(',').map((cell) => cell.trim());
  return cells.every((cell) => NUMBER.test(cell)) ? cells.map(Number) : null;
}

function splitWord(word: string): { kind: string; rest: string } {
  const colon = word.indexOf(':');
  if (colon < 0) return { kind: word.trim().toLowerCase(), rest: '' };
  return { kind: word.slice(0, colon).trim().toLowerCase(), rest: word.slice(colon + 1).trim() };
}

function sideOf(kind: string): 'smaller' | 'larger' | null {
  if (kind === 'polygon') return 'smaller';
  return kind === 'polygon-larger' ? 'larger' : null;
}

/**
 * For polygon:FILE and polygon-larger:FILE the file's name, so that the caller can read it and hand its text to
 * parsePolygonText; null for every other word, also for a polygon whose vertices stand in the word itself.
 */
export function polygonFileOf(word: string): { file: string; side: 'smaller' | 'larger' } | null {
  const { kind, rest } = splitWord(word);
  const side = sideOf(kind);
  return side === null || rest === '' || numbersOf(rest) !== null ? null : { file: rest, side };
}

/**
 * A shape from one word: see SHAPE_FORMS; polygon-larger: takes the larger side. The inverse of formatShape.
 * Ranges are checked by compileRegion.
 * @throws Refusal (kind 'use') when the word has another form
 */
export function parseRegionShape(word: string): SkyShape {
  const { kind, rest } = splitWord(word);
  if (kind === 'sky' && rest === '') return { kind: 'wholeSky' };
  const numbers = numbersOf(rest);
  const refuse = (expected: string): never => {
    throw new Refusal(`The shape '${word}' was given where ${expected} was expected: write it so.`, 'use');
  };
  const side = sideOf(kind);
  if (kind === 'box') {
    if (numbers?.length !== 4) return refuse('box: with four numbers, RA1,RA2,DEC1,DEC2 in degrees,');
    const [raMinDeg, raMaxDeg, decMinDeg, decMaxDeg] = numbers as [number, number, number, number];
    return { kind, raMinDeg, raMaxDeg, decMinDeg, decMaxDeg };
  }
  if (kind === 'cap') {
    if (numbers?.length !== 3) return refuse('cap: with three numbers, RA,DEC,RADIUS in degrees,');
    const [raDeg, decDeg, radiusDeg] = numbers as [number, number, number];
    return { kind, raDeg, decDeg, radiusDeg };
  }
  if (side !== null) {
    if (numbers === null || numbers.length < 6 || numbers.length % 2 === 1) {
      return refuse('polygon: with RA,DEC of at least three vertices in degrees');
    }
    const verticesDeg = Array.from(
      { length: numbers.length / 2 },
      (_, i) => [numbers[2 * i]!, numbers[2 * i + 1]!] as const,
    );
    return { kind: 'polygon', verticesDeg, side };
  }
  return refuse(`one of ${SHAPE_FORMS}`);
}

/** A shape in one word that parseRegionShape reads back to the last bit. */
export function formatShape(shape: SkyShape): string {
  switch (shape.kind) {
    case 'wholeSky':
      return 'sky';
    case 'box':
      return `box:${[shape.raMinDeg, shape.raMaxDeg, shape.decMinDeg, shape.decMaxDeg].join()}`;
    case 'cap':
      return `cap:${[shape.raDeg, shape.decDeg, shape.radiusDeg].join()}`;
    case 'polygon':
      return `${shape.side === 'larger' ? 'polygon-larger' : 'polygon'}:${shape.verticesDeg.flat().join()}`;
  }
}

/** Enough digits for a tenth of an arcsecond, no trailing zeros. */
function short(deg: number): string {
  return String(Number(deg.toFixed(5)));
}

function describeShape(shape: SkyShape): string {
  switch (shape.kind) {
    case 'wholeSky':
      return 'whole sky';
    case 'box':
      return `box RA ${short(shape.raMinDeg)} to ${short(shape.raMaxDeg)}, Dec ${short(shape.decMinDeg)} to ${short(shape.decMaxDeg)} deg`;
    case 'cap':
      return `cap of radius ${short(shape.radiusDeg)} deg around RA ${short(shape.raDeg)}, Dec ${short(shape.decDeg)} deg`;
    case 'polygon':
      return `polygon of ${shape.verticesDeg.length} vertices${shape.side === 'larger' ? ' (larger side)' : ''}`;
  }
}

const PLURALS = { wholeSky: 'whole skies', box: 'boxes', cap: 'caps', polygon: 'polygons' } as const;
const SINGULARS = { wholeSky: 'whole sky', box: 'box', cap: 'cap', polygon: 'polygon' } as const;

function describeShapes(shapes: readonly SkyShape[]): string {
  if (shapes.length <= 3) return shapes.map(describeShape).join(' + ');
  const counts = new Map<SkyShape['kind'], number>();
  for (const { kind } of shapes) counts.set(kind, (counts.get(kind) ?? 0) + 1);
  return [...counts]
    .map(([kind, count]) => `${count} ${(count === 1 ? SINGULARS : PLURALS)[kind]}`)
    .join(' + ');
}

/** One line for captions and tables: 'box RA 350 to 10, Dec -5 to 5 deg, less 12 caps'. */
export function describeRegion(region: Region): string {
  const parts = describeShapes(region.parts);
  return region.holes.length === 0 ? parts : `${parts}, less ${describeShapes(region.holes)}`;
}

export { parsePolygonText } from './polygonText.ts';
