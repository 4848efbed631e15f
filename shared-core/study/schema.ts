import { z } from '../base/schema.ts';

/** Version written by this program; older ones are migrated, newer ones refused. */
export const STUDY_VERSION = 2;
export const STUDY_FORMAT = 'conewright-study';

const finite = z.number().finite();
const columnName = z.string().min(1).max(1000);

const skyShape = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('wholeSky') }),
  z.strictObject({
    kind: z.literal('box'),
    raMinDeg: finite,
    raMaxDeg: finite,
    decMinDeg: finite,
    decMaxDeg: finite,
  }),
  z.strictObject({ kind: z.literal('cap'), raDeg: finite, decDeg: finite, radiusDeg: finite }),
  z.strictObject({
    kind: z.literal('polygon'),
    verticesDeg: z
      .array(z.tuple([finite, finite]))
      .min(3)
      .max(100_000),
    side: z.enum(['smaller', 'larger']),
  }),
]);

const region = z.strictObject({
  parts: z.array(skyShape).min(1).max(1000),
  holes: z.array(skyShape).max(1000),
});

const source = z.discriminatedUnion('kind', [
  /** The invented survey that the program makes itself. */
  z.strictObject({ kind: z.literal('demo'), seed: z.number().int().nonnegative() }),
  z.strictObject({
    kind: z.literal('file'),
    name: z.string().min(1).max(1000),
    /** Where it was last seen; null where the host does not know paths. */
    path: z.string().max(32_768).nullable(),
    sizeBytes: z.number().int().nonnegative(),
    /** Of the whole file, lower-case hexadecimal; null until it has been read once. */
    sha256: z
      .string()
      .regex(/^[0-9a-f]{64}$/)
      .nullable(),
  }),
]);

const mapping = z.strictObject({
  ra: columnName,
  dec: columnName,
  radial: z.strictObject({ column: columnName, kind: z.enum(['redshift', 'czKmS']) }),
  weight: columnName.nullable(),
  magnitude: columnName.nullable(),
  id: columnName.nullable(),
});

const cut = z.strictObject({ column: columnName, min: finite.nullable(), max: finite.nullable() });

const cosmology = z.strictObject({
  h0KmSMpc: finite,
  omegaM0: finite,
  omegaDe0: z.union([finite, z.literal('flat')]),
  w0: finite,
  wa: finite,
  tCmbK: finite,
  nEff: finite,
  neutrinoMassesEv: z.array(finite).max(20),
});

/** The radial axis shared by cone, strip and rulers. */
export const RADIAL_READINGS = ['comoving', 'redshift', 'lookback'] as const;
export type RadialReading = (typeof RADIAL_READINGS)[number];

export const COLOUR_CHOICES = ['redshift', 'lookback', 'shell', 'magnitude', 'density'] as const;
export type ColourChoice = (typeof COLOUR_CHOICES)[number];

/** What galaxies are coloured by: one of the choices, or the numbers of any column of the catalogue. */
export const colourBySchema = z.union([z.enum(COLOUR_CHOICES), z.strictObject({ column: columnName })]);
export type ColourBy = DeepReadonly<z.infer<typeof colourBySchema>>;

/** Colour maps, even to the eye and safe for colour-blind readers. */
export const COLOUR_MAP_NAMES = ['harbour', 'lantern', 'heath', 'slate'] as const;
export type ColourMapName = (typeof COLOUR_MAP_NAMES)[number];

/** How summed light becomes brightness. */
export const STRETCHES = ['asinh', 'logarithmic', 'squareRoot', 'linear'] as const;
export type Stretch = (typeof STRETCHES)[number];

/** What the parts of the light may be. */
export const LIGHT_RANGES = {
  exposureStops: { min: -8, max: 8 },
  glow: { min: 0, max: 1 },
  depthCue: { min: 0, max: 1 },
  pointSize: { min: 0.25, max: 4 },
} as const;
const inRange = ({ min, max }: { readonly min: number; readonly max: number }) => finite.min(min).max(max);

/** How the galaxies' light is shown, on the stage and in pictures. */
export const lightParts = {
  stretch: z.enum(STRETCHES),
  /** Stops brighter (above 0) or fainter than the data's own exposure. */
  exposureStops: inRange(LIGHT_RANGES.exposureStops),
  /** How far the brightest places turn toward the glow's colour. */
  glow: inRange(LIGHT_RANGES.glow),
  /** How much fainter the farthest galaxies are than the nearest, where the cone is seen from outside. */
  depthCue: inRange(LIGHT_RANGES.depthCue),
  /** Diameter of a galaxy over the one that suits how crowded they are. */
  pointSize: inRange(LIGHT_RANGES.pointSize),
} as const;
const light = z.strictObject(lightParts);
export type Light = DeepReadonly<z.infer<typeof light>>;
export const USUAL_LIGHT: Light = {
  stretch: 'asinh',
  exposureStops: 0,
  glow: 0.65,
  depthCue: 0,
  pointSize: 1,
};

const look = z.strictObject({
  radial: z.enum(RADIAL_READINGS),
  perH: z.boolean(),
  colourBy: colourBySchema,
  colourMap: z.enum(COLOUR_MAP_NAMES),
  light,
  /** Widening of narrow fields in the side-on view; null takes the program's proposal. */
  sideways: finite.min(1).max(10_000).nullable(),
  /** Edges dragged jump to round values of the radial reading. */
  snap: z.boolean(),
});

export const studySchema = z.strictObject({
  format: z.literal(STUDY_FORMAT),
  version: z.literal(STUDY_VERSION),
  name: z.string().min(1).max(200),
  source: source.nullable(),
  mapping: mapping.nullable(),
  cuts: z.array(cut).max(200),
  /** Null: the area is estimated from the catalogue and called an estimate. */
  region: region.nullable(),
  cosmology,
  /** Key of the published set that the parameters are, if they are one. */
  cosmologySet: z.string().max(100).nullable(),
  /** Redshift edges, increasing; empty while there are no shells. */
  edges: z.array(finite).max(1001),
  p0Mpc3PerH3: finite.positive(),
  look,
});

/** The saved document. Results are derived from it and never saved as truth. */
export type Study = DeepReadonly<z.infer<typeof studySchema>>;

type DeepReadonly<T> = T extends object ? { readonly [K in keyof T]: DeepReadonly<T[K]> } : T;
export type StudySource = NonNullable<Study['source']>;
