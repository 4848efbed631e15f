import { Refusal } from '../../shared-core/base/refusal.ts';
import { type Cosmology, createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import type { PictureOptions } from '../../shared-core/picture/options.ts';
import type { ShownUnits } from '../../shared-core/report/quantity.ts';
import { radialAxis } from '../../shared-core/shells/radial.ts';
import { rankBelow, type SortedSample, sortSample } from '../../shared-core/shells/sample.ts';
import type { ShellStatistics } from '../../shared-core/shells/shell.ts';
import { allAsOne, shellStatistics } from '../../shared-core/shells/statistics.ts';
import type { Light, Study } from '../../shared-core/study/schema.ts';
import type { ShellInput } from '../cone/types.ts';
import type { Background, ColumnValues, FootprintPicture, Selected } from '../engine/protocol.ts';
import { readyRegion } from '../engine/regionReady.ts';
import { colourWords } from '../stage/colourWords.ts';
import { type Colours, colouring, coneShells, radialScale } from '../stage/coneInputs.ts';
import { radialPixel, wholeWindow } from '../strip/layout.ts';
import { type Readings, readingsOf } from '../strip/readings.ts';

/** What a picture is made from: the study, and the arrays that the engine made of it (null while there are none). */
export interface PictureFacts {
  readonly study: Study;
  /** SHA-256 of the study's text, lower-case hexadecimal. */
  readonly fingerprint: string;
  readonly selected: Selected | null;
  readonly background: Background | null;
  /** Only needed where galaxies are coloured by it. */
  readonly density: Float32Array | null;
  readonly columns: readonly ColumnValues[];
}

/** Everything that the views draw, by the functions that the window uses. */
export interface PictureNumbers {
  readonly study: Study;
  readonly facts: PictureFacts;
  readonly cosmology: Cosmology;
  readonly units: ShownUnits;
  readonly readings: Readings;
  readonly deepestRedshift: number;
  /** How many galaxies, sorted by redshift, lie within it. */
  readonly galaxiesWithin: number;
  readonly footprint: FootprintPicture | null;
  readonly shells: readonly ShellStatistics[];
  /** One shell from the first edge to the last; null where there are no shells. */
  readonly all: ShellStatistics | null;
  readonly shellInputs: readonly ShellInput[];
  readonly colours: Colours;
  readonly light: Light;
}

/**
 * The numbers of a picture.
 * @throws Refusal where there is neither a galaxy nor a region nor a shell to show, and for colours that the catalogue has no
 * values for
 */
export function pictureNumbers(options: PictureOptions, facts: PictureFacts): PictureNumbers {
  const { study, selected } = facts;
  const cosmology = createCosmology(study.cosmology);
  const footprint = selected?.footprint ?? (study.region && readyRegion(study.region).picture);
  const { edges } = study;
  if ((selected?.sample.count ?? 0) === 0 && (footprint === null || edges.length < 2))
    throw new Refusal(
      'The study has no galaxies, and no region with shells either, so there is nothing to draw: open a catalogue, or give a region and shell edges.',
    );
  const sample = selected?.sample ?? sortSample(new Float64Array(0), null);
  const conditions = footprint && {
    cosmology,
    areaDeg2: footprint.areaDeg2,
    p0Mpc3PerH3: study.p0Mpc3PerH3,
  };
  const measurable = conditions !== null && edges.length >= 2;
  const shells = measurable ? shellStatistics(sample, edges, conditions) : [];
  const units = { perH: study.look.perH, h: cosmology.h };
  const deepest = depthOf(options, sample, edges);
  const galaxiesWithin = rankBelow(sample, deepest, true);
  const colours = coloursOf(options, facts, galaxiesWithin);
  return {
    study,
    facts,
    cosmology,
    units,
    readings: readingsOf(cosmology, units),
    deepestRedshift: deepest,
    galaxiesWithin,
    footprint,
    shells,
    all: measurable ? allAsOne(sample, edges, conditions) : null,
    shellInputs: coneShells(shells),
    colours,
    light: lightOf(options, study.look.light),
  };
}

/**
 * The radial scale of a picture whose radius takes `lengthUnits`, in the study's reading.
 * @param ages beside the lookback times, where there is no ruler of ages
 */
export function pictureScale(
  numbers: PictureNumbers,
  lengthUnits: number,
  ages: 'with ages' | 'without ages' = 'without ages',
) {
  const { cosmology, study, readings, units, deepestRedshift } = numbers;
  const axis = radialAxis(study.look.radial, cosmology);
  const window = wholeWindow(axis, deepestRedshift);
  // The strip's pixel scale says how dense the marks may stand; its insets are added to what the radius takes.
  const pixel = radialPixel(axis, window, lengthUnits + 128);
  const scale = radialScale(study.look.radial, readings, cosmology, units, pixel, window[1] / 1.1, ages);
  return { axis, window, scale };
}

/** Where the picture ends. @throws Refusal ('use') for a depth that would cut a shell */
function depthOf(options: PictureOptions, sample: SortedSample, edges: readonly number[]): number {
  const last = options.shells ? (edges.at(-1) ?? 0) : 0;
  const wanted = options.depthRedshift;
  if (wanted !== null) {
    if (wanted < last)
      throw new Refusal(
        `The picture was to end at redshift ${wanted}, within the shells, which reach to ${last}: give a greater depth, or leave the shells out.`,
        'use',
      );
    return wanted;
  }
  const deepest = Math.max(sample.count === 0 ? 0 : sample.redshift[sample.count - 1]!, edges.at(-1) ?? 0);
  return deepest > 0 ? deepest : 1;
}

/** That a picture has not the colours of its study, in a sentence for whoever makes it; null where it has. */
export function colourRemark(
  options: PictureOptions,
  facts: Omit<PictureFacts, 'fingerprint'>,
): string | null {
  const { selected, background, density, columns, study } = facts;
  if (options.colourBy !== null || selected === null || background === null) return null;
  const { colourBy, colourMap } = study.look;
  const { lookbackGyr } = background;
  if (colouring(colourBy, colourMap, selected, { lookbackGyr, density, columns }) !== null) return null;
  return `Galaxies are coloured by redshift, since the catalogue has no values for ${colourWords(colourBy)}, by which the study colours them.`;
}

function coloursOf(options: PictureOptions, facts: PictureFacts, within: number): Colours {
  const { selected, background, density, columns, study } = facts;
  const byShell: Colours = { input: { kind: 'shell' }, legend: null };
  if (selected === null || background === null) return byShell;
  const wanted = options.colourBy ?? study.look.colourBy;
  const map = options.colourMap ?? study.look.colourMap;
  // The colours span what is shown.
  const { sample } = selected;
  const shown = { ...selected, sample: { ...sample, redshift: sample.redshift.subarray(0, within) } };
  const lookbackGyr = background.lookbackGyr.subarray(0, within);
  const found = colouring(wanted, map, shown, {
    lookbackGyr,
    density: density?.subarray(0, within) ?? null,
    columns: columns.map(({ column, values }) => ({ column, values: values.subarray(0, within) })),
  });
  if (found !== null) return found;
  if (options.colourBy !== null)
    throw new Refusal(
      `Galaxies were to be coloured by ${colourWords(wanted)}, which this catalogue has no values for: choose redshift, lookback or shell.`,
      'use',
    );
  return colouring('redshift', map, shown, { lookbackGyr, density: null, columns: [] }) ?? byShell;
}

/** The study's light, as far as the options say nothing else. */
function lightOf(options: PictureOptions, own: Light): Light {
  return {
    stretch: options.stretch ?? own.stretch,
    exposureStops: options.exposureStops ?? own.exposureStops,
    glow: options.glow ?? own.glow,
    depthCue: options.depthCue ?? own.depthCue,
    pointSize: options.pointSize ?? own.pointSize,
  };
}
