import { roundTo } from '../../shared-core/base/roundTo.ts';
import type { Cosmology } from '../../shared-core/cosmology/cosmology.ts';
import { formatNumber, type ShownUnits } from '../../shared-core/report/quantity.ts';
import { edgeText, shellRanges } from '../../shared-core/report/shellRange.ts';
import type { ShellStatistics } from '../../shared-core/shells/shell.ts';
import { mainRings } from '../../shared-core/sky/mainRings.ts';
import type { ColourBy, ColourMapName, RadialReading } from '../../shared-core/study/schema.ts';
import type {
  ColouringInput,
  FootprintInput,
  RadialScaleInput,
  ShellInput,
  Tick,
  ViewName,
} from '../cone/types.ts';
import type { ColumnValues, FootprintPicture, Selected } from '../engine/protocol.ts';
import type { CameraView } from '../state/viewState.ts';
import { markText } from '../strip/axisMarks.ts';
import type { RadialPixel } from '../strip/layout.ts';
import type { Reading, Readings } from '../strip/readings.ts';
import { drawnAxis } from '../strip/readings.ts';
import { roundValues } from '../strip/roundValues.ts';

export const VIEW_NAMES: Readonly<Record<CameraView, ViewName>> = {
  'side-on': 'sideOn',
  'down-the-cone': 'downTheCone',
  'from-behind': 'fromBehind',
  whole: 'whole',
  around: 'aroundTheObserver',
  parallel: 'parallel',
};

const TABLE_STEPS = 1024;
const WIDE_GAP_PX = 130;
const NARROW_GAP_PX = 52;

/** How comoving distance becomes radius, and the three rulers with the strip's own round values. */
export function radialScale(
  reading: RadialReading,
  readings: Readings,
  cosmology: Cosmology,
  units: ShownUnits,
  scale: RadialPixel,
  deepestRedshift: number,
  ages: 'with ages' | 'without ages' = 'without ages',
): RadialScaleInput {
  const own = drawnAxis(reading, cosmology);
  const distance = drawnAxis('comoving', cosmology);
  const comovingMpc = new Float64Array(TABLE_STEPS + 1);
  const radius = new Float64Array(TABLE_STEPS + 1);
  const deepest = Math.min(1100, deepestRedshift * 1.1 + 0.001);
  for (let i = 1; i <= TABLE_STEPS; i++) {
    // Even in distance near the observer would waste the table far out; even in redshift is fine for every reading.
    const z = (deepest * i) / TABLE_STEPS;
    comovingMpc[i] = distance.at(z);
    radius[i] = own.at(z);
  }
  const title = (r: Reading) =>
    `${r.words}${r.kind === 'lookback' && ages === 'with ages' ? ' (age)' : ''}${r.unit === 'z' ? '' : `, ${r.unit}`}`;
  // Where there is room a lookback time is joined by the age that the universe had then.
  const ageTodayGyr = cosmology.ageGyr(0);
  const withAge = (lookbackGyr: number) =>
    ages === 'with ages' && Number.isFinite(ageTodayGyr)
      ? ` (${formatNumber(ageTodayGyr - lookbackGyr, { decimals: 1 })})`
      : '';
  const ticks = (r: Reading) =>
    rulerTicks(r, scale, deepest, distance.at, r.kind === 'lookback' ? withAge : () => '');
  const mpcText = (mpc: number) => {
    const shown = units.perH ? mpc * units.h : mpc;
    return `${markText(roundTo(shown, 3))} ${readings.comoving.unit}`;
  };
  return {
    reading,
    table: { comovingMpc, radius },
    rulers: {
      redshift: ticks(readings.redshift),
      lookback: ticks(readings.lookback),
      comoving: ticks(readings.comoving),
    },
    titles: {
      redshift: title(readings.redshift),
      lookback: title(readings.lookback),
      comoving: title(readings.comoving),
    },
    formatLength: mpcText,
    lengthUnitMpc: units.perH ? 1 / units.h : 1,
  };
}

function rulerTicks(
  reading: Reading,
  scale: RadialPixel,
  deepest: number,
  distanceAt: (z: number) => number,
  more: (value: number) => string,
): Tick[] {
  const pxOf = (value: number) => scale.at(reading.redshiftAt(value));
  const high = reading.shownAt(deepest);
  const coarse = new Set(roundValues(0, high, pxOf, () => WIDE_GAP_PX));
  return roundValues(0, high, pxOf, () => NARROW_GAP_PX).map((value) => ({
    comovingMpc: distanceAt(reading.redshiftAt(value)),
    text: markText(value) + (coarse.has(value) && value > 0 ? more(value) : ''),
    level: coarse.has(value) ? 0 : 1,
  }));
}

/** Shells as the cone takes them. */
export function coneShells(shells: readonly ShellStatistics[]): ShellInput[] {
  const ranges = shellRanges(shells);
  return shells.map((s, i) => ({
    comovingMinMpc: s.comovingMinMpc,
    comovingMaxMpc: s.comovingMaxMpc,
    label: `${edgeText(s.zMin)} – ${edgeText(s.zMax)}`,
    longLabel: ranges[i]!,
  }));
}

/** Parts of an estimated outline below this share of the largest one's area are not drawn: single cells at its rim. */
const SMALLEST_PART = 0.01;
/** How far the drawn outline of an estimate may lie from that of its cells: of a cell's side, and of the field's radius. */
const CELL_SHARE = 0.75;
const RADIUS_SHARE = 0.02;
/** And never farther than this of the radius: smoothed by its cells, a field of a few of them would be a sliver. */
const MOST_RADIUS_SHARE = 0.15;
const MOST_RADIUS_DEG = 50;

/** The footprint as the cone takes it. The rim of an estimate is smoothed: where a cell ends says nothing of the sky. */
export function coneFootprint({
  fields,
  estimate,
}: Pick<FootprintPicture, 'fields' | 'estimate'>): FootprintInput {
  const wide = fields.length === 0 || fields.some((f) => f.wide);
  const drawn = fields.filter((f) => f.rings.length > 0);
  if (estimate === null) return { fields: drawn, wide };
  const cellDeg = Math.sqrt(estimate.cellAreaDeg2);
  const smoothed = drawn.map((f) => ({
    ...f,
    rings: mainRings(f.rings, SMALLEST_PART),
    toleranceDeg: Math.min(
      MOST_RADIUS_SHARE * f.radiusDeg,
      Math.max(CELL_SHARE * cellDeg, RADIUS_SHARE * Math.min(f.radiusDeg, MOST_RADIUS_DEG)),
    ),
  }));
  return { fields: smoothed, wide, estimated: true };
}

export interface ColourLegend {
  readonly title: string;
  readonly map: string;
  readonly low: string;
  readonly high: string;
  readonly reversed: boolean;
}

/** A way to colour, and what its legend says (none where the shells' own marks say it). */
export interface Colours {
  readonly input: ColouringInput;
  readonly legend: ColourLegend | null;
}

/** What galaxies may be coloured by, beside the selection itself; sorted by redshift. */
export interface ColourValues {
  readonly lookbackGyr: Float32Array | null;
  readonly density: Float32Array | null;
  readonly columns: readonly ColumnValues[];
}

/** How galaxies are coloured, and what the legend says; null while the values are still being made. */
export function colouring(
  by: ColourBy,
  map: ColourMapName,
  selected: Selected,
  { lookbackGyr, density, columns }: ColourValues,
): Colours | null {
  const { redshift } = selected.sample;
  if (typeof by === 'object') {
    const values = columns.find((c) => c.column === by.column)?.values;
    if (values === undefined) return null;
    return valued(values, by.column, map, middlePart(values), (v) => String(roundTo(v, 3)));
  }
  switch (by) {
    case 'shell':
      return { input: { kind: 'shell' }, legend: null };
    case 'redshift':
      return valued(redshift, 'redshift', map, ends(redshift), (v) => formatNumber(v, { decimals: 2 }));
    case 'lookback':
      if (lookbackGyr === null) return null;
      return valued(
        lookbackGyr,
        'lookback time',
        map,
        ends(lookbackGyr),
        (v) => `${formatNumber(v, { decimals: 1 })} Gyr`,
      );
    case 'magnitude':
      if (selected.magnitude === null) return null;
      return valued(
        selected.magnitude,
        'magnitude',
        map,
        middlePart(selected.magnitude),
        (v) => formatNumber(v, { decimals: 1 }),
        true,
      );
    case 'density':
      if (density === null) return null;
      return valued(
        density,
        'local density, relative to its depth',
        map,
        middlePart(density),
        (v) => `× ${roundTo(10 ** v, 2)}`,
      );
  }
}

function valued(
  values: Float64Array | Float32Array,
  title: string,
  map: string,
  [from, to]: readonly [number, number],
  words: (value: number) => string,
  reversed = false,
) {
  return {
    input: { kind: 'values', values, from, to, map, reversed } as const,
    legend: { title, map, low: words(from), high: words(to), reversed },
  };
}

function ends(sorted: Float64Array | Float32Array): [number, number] {
  return apart(sorted[0] ?? 0, sorted.at(-1) ?? 1);
}

const SAMPLE = 20_000;

/** From the 2nd to the 98th percentile, so that a few odd values do not take all the colour; NaN is left out. */
function middlePart(values: Float32Array): [number, number] {
  const step = Math.max(1, Math.floor(values.length / SAMPLE));
  const some: number[] = [];
  for (let i = 0; i < values.length; i += step) if (Number.isFinite(values[i])) some.push(values[i]!);
  some.sort((a, b) => a - b);
  return apart(some[Math.floor(0.02 * some.length)] ?? 0, some[Math.ceil(0.98 * some.length) - 1] ?? 1);
}

function apart(from: number, to: number): [number, number] {
  return to > from ? [from, to] : [from - 0.5, from + 0.5];
}
