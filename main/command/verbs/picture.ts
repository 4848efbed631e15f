import { freemem, homedir, totalmem } from 'node:os';
import { basename, extname, join } from 'node:path';
import type { Command } from 'commander';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { FILM_FORMATS, PICTURE_FORMATS, type PictureJob } from '../../../shared-core/picture/job.ts';
import {
  PICTURE_STYLES,
  PICTURE_VIEWS,
  type PictureOptions,
  parsePictureSize,
  pictureOptions,
  SIZE_FORMS,
} from '../../../shared-core/picture/options.ts';
import { colourOfKey } from '../../../shared-core/study/colourBy.ts';
import { readStudy } from '../../../shared-core/study/document.ts';
import {
  COLOUR_CHOICES,
  COLOUR_MAP_NAMES,
  STRETCHES,
  type Study,
} from '../../../shared-core/study/schema.ts';
import { FileHistory } from '../../files/history.ts';
import { locateSource } from '../../files/locateSource.ts';
import { userFolder } from '../../files/userFolder.ts';
import { findBrowser } from '../../launch/findBrowser.ts';
import { fromHere, readableSize, readTextFile } from '../files.ts';
import { numberList, oneNumber } from '../numbers.ts';
import { outputPlaces } from '../outputPlaces.ts';
import { addFilmOptions, type FilmWishes, filmOf, sayFilm } from '../picture/filmWishes.ts';
import { makePicture } from '../picture/makePicture.ts';

interface PictureVerbOptions extends FilmWishes {
  output: string;
  size?: string;
  dpi: number;
  view?: string;
  style: string;
  title?: string;
  caption?: string;
  credit?: string;
  label?: PictureOptions['labels'];
  rulers: boolean;
  shells: boolean;
  stretch?: string;
  exposure?: number;
  glow?: number;
  depthCue?: number;
  pointSize?: number;
  colour?: string;
  colourMap?: string;
  dec?: number[];
  greatCircle?: number[];
  depth?: number;
  transparent?: true;
  catalogue?: string;
  overwrite?: true;
}

const DEMO = 'demo';
/** Bytes that the work takes beside the catalogue, and for each byte of it (measured generously). */
const BASE_BYTES = 500e6;
const BYTES_A_BYTE = 4;

/** conewright picture: a study as a picture worth printing, or as a film. */
export function addPicture(program: Command, say: (text: string) => void, windowFolder: string | null): void {
  const verb = program
    .command('picture')
    .argument('<study>', 'study file, or demo for the invented survey')
    .description('draw a study as PNG, SVG or PDF, or film it as WebM or MP4')
    .requiredOption(
      '-o, --output <file>',
      'file to write; its ending says the format: .png, .svg or .pdf, for a film .webm or .mp4',
    )
    .option('--view <name>', `${PICTURE_VIEWS.join(', ')} (cone if not given)`)
    .option('--size <size>', `${SIZE_FORMS} (4k if not given, 1920x1080 for a film)`)
    .option('--dpi <n>', 'pixels an inch, for sizes on paper', oneNumber('--dpi'), 300)
    .option('--style <name>', PICTURE_STYLES.join(' or '), 'dark')
    .option('--title <text>', "title; the study's name if not given, an empty text for none")
    .option('--caption <text>', 'caption; one that says what a reader must know if not given')
    .option('--credit <text>', 'credit line')
    .option(
      '--label <ra,dec,z,text>',
      'label tied to a place in the survey; repeat it for several',
      parseLabel,
    )
    .option('--no-rulers', 'leave the rulers out')
    .option('--no-shells', 'leave the shells out')
    .option(
      '--colour <by>',
      `colour galaxies by ${COLOUR_CHOICES.join(', ')} or column:NAME; the study's choice if not given, as for all of the light`,
    )
    .option('--colour-map <name>', COLOUR_MAP_NAMES.join(', '))
    .option('--stretch <name>', STRETCHES.join(', '))
    .option(
      '--exposure <stops>',
      "brighter (above 0) or fainter than the data's own",
      oneNumber('--exposure'),
    )
    .option('--glow <share>', 'how far the brightest places turn to white, 0 to 1', oneNumber('--glow'))
    .option(
      '--depth-cue <share>',
      'how much fainter the farthest galaxies are than the nearest, 0 to 1',
      oneNumber('--depth-cue'),
    )
    .option('--point-size <times>', 'diameter of a galaxy, 0.25 to 4 times', oneNumber('--point-size'))
    .option('--dec <min,max>', 'slab of the wedge by declination, degrees', numberList('--dec'))
    .option(
      '--great-circle <ra,dec,thickness>',
      'slab of the wedge along the great circle with this pole, degrees',
      numberList('--great-circle'),
    )
    .option(
      '--depth <z>',
      'redshift at which the picture ends; the deepest galaxy or shell if not given',
      oneNumber('--depth'),
    )
    .option('--transparent', 'leave the ground clear')
    .option('--catalogue <file>', "the study's catalogue, where it was moved")
    .option('--overwrite', 'replace a picture that exists');
  addFilmOptions(verb)
    .addHelpText(
      'after',
      '\nExamples:\n  npm run -s conewright -- picture demo -o cone.png --size 7680x4320\n  npm run -s conewright -- picture demo -o cone.webm --film turntable --seconds 12 --fps 30',
    )
    .action(async (file: string, options: PictureVerbOptions) => {
      const format = formatOf(options.output);
      const film = filmOf(format, options);
      const wanted = optionsOf(options, film === null ? '4k' : '1920x1080');
      const text = file === DEMO ? null : await readTextFile(file, 'a study');
      const catalogue =
        text === null ? null : await catalogueOf(readStudy(text), fromHere(file), options, say);
      const { '--output': path } = await outputPlaces(
        { '--output': options.output },
        [...(text === null ? [] : [file]), ...(catalogue === null ? [] : [catalogue.path])],
        { overwrite: options.overwrite === true },
      );
      const obtainable = obtainableBytes(process.platform, freemem(), totalmem());
      checkMemory(catalogue?.sizeBytes ?? 0, obtainable);
      if (film !== null) sayFilm(film, wanted, catalogue?.sizeBytes ?? 0, obtainable, say);
      const browser = findBrowser({ platform: process.platform, env: process.env, homeFolder: homedir() });
      if (browser === null)
        throw new Refusal(
          'No Chromium, Chrome or Edge was found, which draws the pictures: install one, or name it in CHROME_PATH.',
        );
      if (windowFolder === null)
        throw new Refusal(
          'The window is not built, which draws the pictures: start this by npm run conewright.',
        );
      await makePicture({
        browser,
        windowFolder,
        job: { format, options: wanted, film, study: text },
        catalogue,
        path,
        overwrite: options.overwrite === true,
        say,
      });
      say(`Written: ${options.output}, ${wanted.widthPx} x ${wanted.heightPx} pixels.`);
    });
}

function formatOf(output: string): PictureJob['format'] {
  const ending = extname(output).slice(1).toLowerCase();
  const format = [...PICTURE_FORMATS, ...FILM_FORMATS].find((name) => name === ending);
  if (format === undefined)
    throw new Refusal(
      `The picture's file is ${output}, expected an ending .png, .svg or .pdf, or .webm or .mp4 for a film.`,
      'use',
    );
  return format;
}

function optionsOf(options: PictureVerbOptions, size: string): PictureOptions {
  if (!(options.dpi >= 1 && options.dpi <= 10_000))
    throw new Refusal(`--dpi is ${options.dpi}, expected a number from 1 to 10000.`, 'use');
  return pictureOptions({
    ...parsePictureSize(options.size ?? size, options.dpi),
    dpi: options.dpi,
    view: options.view,
    style: options.style,
    title: options.title ?? null,
    caption: options.caption ?? null,
    credit: options.credit,
    labels: options.label,
    rulers: options.rulers,
    shells: options.shells,
    stretch: options.stretch,
    exposureStops: options.exposure,
    glow: options.glow,
    depthCue: options.depthCue,
    pointSize: options.pointSize,
    colourBy: options.colour === undefined ? null : colourOfKey(options.colour),
    colourMap: options.colourMap,
    slab: slabOf(options),
    depthRedshift: options.depth ?? null,
    transparent: options.transparent === true,
  });
}

function slabOf({ dec, greatCircle, view }: PictureVerbOptions): PictureOptions['slab'] {
  if (dec === undefined && greatCircle === undefined) return null;
  if (view !== 'wedge')
    throw new Refusal('--dec and --great-circle say what a wedge shows: give --view wedge with them.', 'use');
  if (dec !== undefined && greatCircle !== undefined)
    throw new Refusal('--dec came with --great-circle: give one of them.', 'use');
  if (dec !== undefined) {
    const [decMinDeg, decMaxDeg, ...rest] = dec;
    if (decMinDeg === undefined || decMaxDeg === undefined || rest.length > 0)
      throw new Refusal(`--dec is "${dec.join(',')}", expected two declinations such as 7,12.`, 'use');
    return { kind: 'declination', decMinDeg, decMaxDeg };
  }
  const [poleRaDeg, poleDecDeg, thicknessDeg, ...rest] = greatCircle!;
  if (poleRaDeg === undefined || poleDecDeg === undefined || thicknessDeg === undefined || rest.length > 0)
    throw new Refusal(
      `--great-circle is "${greatCircle!.join(',')}", expected the pole and a thickness such as 10,60,4.`,
      'use',
    );
  return { kind: 'greatCircle', poleRaDeg, poleDecDeg, thicknessDeg };
}

function parseLabel(text: string, before: PictureOptions['labels'] = []): PictureOptions['labels'] {
  const [, ra, dec, z, words] = /^([^,]+),([^,]+),([^,]+),(.+)$/s.exec(text) ?? [];
  if (ra === undefined || dec === undefined || z === undefined || words === undefined)
    throw new Refusal(`--label is "${text}", expected RA,DEC,Z,TEXT such as 212,11,0.8,cluster A.`, 'use');
  const read = oneNumber('--label');
  return [...before, { raDeg: read(ra), decDeg: read(dec), redshift: read(z), text: words.trim() }];
}

/** The file that the study was made from: as named on the command line, else where the study may be trusted. */
async function catalogueOf(
  study: Study,
  studyPath: string,
  { catalogue }: PictureVerbOptions,
  say: (text: string) => void,
): Promise<{ path: string; name: string; sizeBytes: number } | null> {
  if (study.source?.kind !== 'file') return null;
  const own = userFolder({ platform: process.platform, env: process.env, homeFolder: homedir() });
  const history = new FileHistory(own, join(own, 'locks'), say);
  const path =
    catalogue === undefined
      ? await locateSource({ ...study.source, studyId: null }, studyPath, history)
      : fromHere(catalogue);
  if (path === null)
    throw new Refusal(
      `The study's catalogue ${study.source.name} is not beside the study: put it there, or name it with --catalogue.`,
    );
  return { path, name: basename(path), sizeBytes: await readableSize(path) };
}

/**
 * Memory that the work may count on. macOS fills memory with what it can give back at once and does not count that
 * as free; there it is a share of the whole (our choice), elsewhere what the system calls available.
 */
export function obtainableBytes(platform: NodeJS.Platform, freeBytes: number, totalBytes: number): number {
  return platform === 'darwin' ? 0.75 * totalBytes : freeBytes;
}

/** Says so before starting where the catalogue will not fit. @throws Refusal */
export function checkMemory(catalogueBytes: number, obtainable: number): void {
  const needed = BASE_BYTES + BYTES_A_BYTE * catalogueBytes;
  if (needed <= obtainable) return;
  const gb = (bytes: number): string => (bytes / 1e9).toFixed(1);
  throw new Refusal(
    `The picture needs about ${gb(needed)} GB of memory and ${gb(obtainable)} GB can be had: close other programs, or cut the catalogue to the columns and rows you need.`,
  );
}
