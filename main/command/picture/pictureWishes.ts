import type { Command } from 'commander';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import {
  PICTURE_STYLES,
  PICTURE_VIEWS,
  type PictureOptions,
  parsePictureSize,
  pictureOptions,
  SIZE_FORMS,
} from '../../../shared-core/picture/options.ts';
import { colourOfKey } from '../../../shared-core/study/colourBy.ts';
import { COLOUR_CHOICES, COLOUR_MAP_NAMES, STRETCHES } from '../../../shared-core/study/schema.ts';
import { numberList, oneNumber } from '../numbers.ts';

/** What a person may say of a picture's looks on the command line. */
export interface PictureWishes {
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
}

export const addPictureOptions = (command: Command): Command =>
  command
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
    .option(
      '--glow <share>',
      "how far the brightest places turn to the glow's colour (white; ink on paper), 0 to 1",
      oneNumber('--glow'),
    )
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
    .option('--transparent', 'leave the ground clear');

/**
 * The picture that is wished for.
 * @param size where none is given
 * @throws Refusal ('use') for what cannot be
 */
export function pictureOf(options: PictureWishes, size: string): PictureOptions {
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

function slabOf({ dec, greatCircle, view }: PictureWishes): PictureOptions['slab'] {
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
