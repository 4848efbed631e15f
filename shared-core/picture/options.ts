import { Refusal } from '../base/refusal.ts';
import { z } from '../base/schema.ts';
import { COLOUR_MAP_NAMES, colourBySchema, lightParts } from '../study/schema.ts';

/** Longest side of a picture in pixels. */
export const MOST_SIDE_PX = 16_384;
export const LEAST_SIDE_PX = 64;
export const MOST_TEXT = 2000;

export const PICTURE_VIEWS = ['cone', 'perspective', 'wedge', 'sky', 'light-cone'] as const;
export type PictureView = (typeof PICTURE_VIEWS)[number];

export const PICTURE_STYLES = ['dark', 'paper'] as const;

const side = z.number().int().min(LEAST_SIDE_PX).max(MOST_SIDE_PX);
const raDeg = z.number().min(-360).max(360);
const decDeg = z.number().min(-90).max(90);

const label = z.strictObject({
  text: z.string().min(1).max(MOST_TEXT),
  raDeg,
  decDeg,
  /** Where along the line of sight it points. */
  redshift: z.number().min(0).max(1100),
});

/** The sky that a wedge lays flat. */
const slab = z.discriminatedUnion('kind', [
  /** All right ascensions of a field between two declinations; the angle around is right ascension. */
  z.strictObject({ kind: z.literal('declination'), decMinDeg: decDeg, decMaxDeg: decDeg }),
  /** What lies within half a thickness of the great circle about a pole; the angle around is measured along it. */
  z.strictObject({
    kind: z.literal('greatCircle'),
    poleRaDeg: raDeg,
    poleDecDeg: decDeg,
    thicknessDeg: z.number().positive().max(180),
  }),
]);

export const pictureOptionsSchema = z.strictObject({
  view: z.enum(PICTURE_VIEWS).default('cone'),
  widthPx: side.default(3840),
  heightPx: side.default(2160),
  /** Pixels an inch: says how large the picture is on paper. */
  dpi: z.number().min(1).max(10_000).default(300),
  style: z.enum(PICTURE_STYLES).default('dark'),
  /** Null takes the study's name, an empty text leaves the title out; the same for the caption that is offered. */
  title: z.string().max(MOST_TEXT).nullable().default(null),
  caption: z.string().max(MOST_TEXT).nullable().default(null),
  credit: z.string().max(MOST_TEXT).default(''),
  labels: z.array(label).max(200).default([]),
  rulers: z.boolean().default(true),
  shells: z.boolean().default(true),
  /** Null takes the study's choice; the same for colour. */
  stretch: lightParts.stretch.nullable().default(null),
  exposureStops: lightParts.exposureStops.nullable().default(null),
  glow: lightParts.glow.nullable().default(null),
  depthCue: lightParts.depthCue.nullable().default(null),
  pointSize: lightParts.pointSize.nullable().default(null),
  colourBy: colourBySchema.nullable().default(null),
  colourMap: z.enum(COLOUR_MAP_NAMES).nullable().default(null),
  slab: slab.nullable().default(null),
  /** Redshift at which the picture ends; null shows everything. */
  depthRedshift: z.number().positive().max(1100).nullable().default(null),
  transparent: z.boolean().default(false),
});

/** What a picture shows and how: plain data, ready to be saved or sent. */
export type PictureOptions = Readonly<z.infer<typeof pictureOptionsSchema>>;

/**
 * Options from plain data, with what is not said filled in.
 * @throws Refusal ('use') that names the first thing that cannot be used
 */
export function pictureOptions(raw: unknown): PictureOptions {
  const parsed = pictureOptionsSchema.safeParse(raw);
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    const place = issue?.path.map(String).join('.') || 'the options';
    throw new Refusal(
      `The picture cannot be made: at ${place}, ${issue?.message ?? 'something unexpected'}.`,
      'use',
    );
  }
  const { slab } = parsed.data;
  if (slab?.kind === 'declination' && !(slab.decMaxDeg > slab.decMinDeg))
    throw new Refusal(
      `The wedge's slab reaches from Dec ${slab.decMinDeg} to ${slab.decMaxDeg} degrees: give the lower one first.`,
      'use',
    );
  return parsed.data;
}

const PAPER_MM: Readonly<Record<string, readonly [number, number]>> = {
  a0: [841, 1189],
  a1: [594, 841],
  a2: [420, 594],
  a3: [297, 420],
  a4: [210, 297],
};
const MM_PER_INCH = 25.4;
const NAMED: Readonly<Record<string, readonly [number, number]>> = {
  '4k': [3840, 2160],
  '8k': [7680, 4320],
  square: [4096, 4096],
  portrait: [2160, 3840],
};
export const SIZE_FORMS =
  'WIDTHxHEIGHT in pixels such as 7680x4320, in mm such as 180x120mm, 4k, 8k, square, portrait, or a0 to a4 (a4-portrait)';

/**
 * Pixels of a size as people write it.
 * @param dpi pixels an inch where the size is one of paper (ISO 216)
 * @throws Refusal ('use') for a size that is none, and for sides outside LEAST_SIDE_PX..MOST_SIDE_PX
 */
export function parsePictureSize(text: string, dpi: number): { widthPx: number; heightPx: number } {
  const [widthPx, heightPx] = pixelsOf(text.trim().toLowerCase(), dpi);
  for (const px of [widthPx, heightPx]) {
    if (px < LEAST_SIDE_PX || px > MOST_SIDE_PX)
      throw new Refusal(
        `The picture's size is ${text}, a side of ${px} pixels: give sides of ${LEAST_SIDE_PX} to ${MOST_SIDE_PX} pixels${px > MOST_SIDE_PX ? ', or a lower --dpi for a size on paper' : ''}.`,
        'use',
      );
  }
  return { widthPx, heightPx };
}

function pixelsOf(text: string, dpi: number): readonly [number, number] {
  const named = NAMED[text];
  if (named) return named;
  const toPx = (mm: number) => Math.round((mm / MM_PER_INCH) * dpi);
  const [, sheet, upright] = /^(a[0-4])(-portrait)?$/.exec(text) ?? [];
  const paper = sheet === undefined ? undefined : PAPER_MM[sheet];
  if (paper) return upright ? [toPx(paper[0]), toPx(paper[1])] : [toPx(paper[1]), toPx(paper[0])];
  const [, width, height, unit] =
    /^(\d{1,9}(?:\.\d{1,3})?)[x×](\d{1,9}(?:\.\d{1,3})?)(px|mm)?$/.exec(text) ?? [];
  if (width === undefined || height === undefined)
    throw new Refusal(`The picture's size is "${text}", expected ${SIZE_FORMS}.`, 'use');
  if (unit === 'mm') return [toPx(Number(width)), toPx(Number(height))];
  return [Math.round(Number(width)), Math.round(Number(height))];
}
