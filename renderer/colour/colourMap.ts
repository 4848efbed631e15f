import { Refusal } from '../../shared-core/base/refusal.ts';
import type { ColourMapName } from '../../shared-core/study/schema.ts';
import { encodeSrgb, greatestChroma, oklabToLinear, oklch, type Triple } from './oklab.ts';

/** The ground that a colour map stands on: the dark stage, or white paper. */
export type Ground = 'dark' | 'light';

/** A path through colour space: hue from one end to the other, how colourful, and lightness by ground. */
interface Recipe {
  readonly title: string;
  /** Degrees of OKLCH hue at the ends and, when bent, in the middle; may run past 360. */
  readonly hueDeg: readonly [number, number, number];
  /** Greatest OKLCH chroma; the map stays below 0.96 of what sRGB can show. */
  readonly chroma: number;
  readonly lightness: Readonly<Record<Ground, readonly [number, number]>>;
}

/**
 * The maps. Lightness rises steadily from end to end, so that the order of values is seen without any hue; the hues
 * run between blue and yellow, the axis that red-green colour blindness leaves intact.
 */
const RECIPES = {
  harbour: {
    title: 'Harbour: blue, sea green, sand',
    hueDeg: [258, 200, 106],
    chroma: 0.115,
    lightness: { dark: [0.49, 0.93], light: [0.28, 0.72] },
  },
  lantern: {
    title: 'Lantern: violet, rose, amber',
    hueDeg: [292, 368, 450],
    chroma: 0.17,
    lightness: { dark: [0.48, 0.93], light: [0.28, 0.72] },
  },
  heath: {
    title: 'Heath: indigo, mauve, cream',
    hueDeg: [275, 325, 430],
    chroma: 0.11,
    lightness: { dark: [0.48, 0.94], light: [0.28, 0.72] },
  },
  slate: {
    title: 'Slate: greys',
    hueDeg: [255, 255, 255],
    chroma: 0.02,
    lightness: { dark: [0.45, 0.96], light: [0.2, 0.7] },
  },
} as const satisfies Record<ColourMapName, Recipe>;

export interface ColourMap {
  readonly name: ColourMapName;
  readonly title: string;
  /** 256 colours as red, green, blue bytes of sRGB. */
  readonly bytes: Uint8Array;
  /** The same in OKLab, before rounding to bytes. */
  readonly oklab: readonly Triple[];
}

/** The maps to choose from, in the order to offer them. */
export const COLOUR_MAPS: readonly { readonly name: ColourMapName; readonly title: string }[] = (
  Object.keys(RECIPES) as ColourMapName[]
).map((name) => ({ name, title: RECIPES[name].title }));

const SIZE = 256;
const FINE = 1024;
const built = new Map<string, ColourMap>();

/**
 * The 256 colours of a map on a ground. The path is walked in OKLab and cut into steps of equal length, so that equal
 * differences of value look equally large.
 *
 * @throws Refusal for a name that is none of COLOUR_MAPS
 */
export function colourMap(name: string, ground: Ground): ColourMap {
  if (!(name in RECIPES)) {
    const known = COLOUR_MAPS.map((map) => map.name).join(', ');
    throw new Refusal(`There is no colour map "${name}": choose one of ${known}.`, 'use');
  }
  const key = `${name} ${ground}`;
  const known = built.get(key);
  if (known) return known;
  const map = build(name as ColourMapName, ground);
  built.set(key, map);
  return map;
}

function build(name: ColourMapName, ground: Ground): ColourMap {
  const recipe: Recipe = RECIPES[name];
  const fine: Triple[] = [];
  const length = new Float64Array(FINE);
  for (let i = 0; i < FINE; i++) {
    fine.push(onPath(recipe, ground, i / (FINE - 1)));
    if (i > 0) length[i] = length[i - 1]! + Math.hypot(...fine[i]!.map((v, k) => v - fine[i - 1]![k]!));
  }
  const oklab: Triple[] = [];
  const bytes = new Uint8Array(SIZE * 3);
  for (let i = 0, j = 0; i < SIZE; i++) {
    const wanted = (length[FINE - 1]! * i) / (SIZE - 1);
    while (j < FINE - 2 && length[j + 1]! < wanted) j++;
    const t = (wanted - length[j]!) / (length[j + 1]! - length[j]!);
    const colour = fine[j]!.map((v, k) => v + t * (fine[j + 1]![k]! - v)) as unknown as Triple;
    oklab.push(colour);
    const linear = oklabToLinear(colour);
    for (let k = 0; k < 3; k++) bytes[3 * i + k] = Math.round(255 * encodeSrgb(linear[k]!));
  }
  return { name, title: recipe.title, bytes, oklab };
}

function onPath(recipe: Recipe, ground: Ground, t: number): Triple {
  const [from, to] = recipe.lightness[ground];
  const lightness = from + t * (to - from);
  const [h0, h1, h2] = recipe.hueDeg;
  // A parabola through the three hues.
  const hue = h0 + t * (4 * h1 - 3 * h0 - h2) + t * t * (2 * h0 + 2 * h2 - 4 * h1);
  const limit = 0.96 * greatestChroma(lightness, hue);
  // A smooth minimum: no kink where the gamut takes over from the recipe.
  const chroma = (recipe.chroma * limit) / Math.cbrt(recipe.chroma ** 3 + limit ** 3);
  return oklch(lightness, chroma, hue);
}
