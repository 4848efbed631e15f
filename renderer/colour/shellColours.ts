import type { Ground } from './colourMap.ts';
import { encodeSrgb, greatestChroma, oklabToLinear, oklch, type Triple } from './oklab.ts';

/**
 * Colours of n shells, near to far, as sRGB bytes: hues from blue to amber with lightness that rises and also
 * alternates a little, so that neighbours differ without any hue and the order along the radius is kept.
 */
export function shellColours(count: number, ground: Ground): readonly Triple[] {
  if (last.count !== count || last.ground !== ground)
    last = { count, ground, colours: madeColours(count, ground) };
  return last.colours;
}

/** Asked for in every frame while an edge is dragged. */
let last: { count: number; ground: Ground; colours: readonly Triple[] } = {
  count: 0,
  ground: 'dark',
  colours: [],
};

function madeColours(count: number, ground: Ground): readonly Triple[] {
  const out: Triple[] = [];
  for (let i = 0; i < count; i++) {
    const t = count > 1 ? i / (count - 1) : 0.5;
    const base = ground === 'dark' ? 0.66 + 0.16 * t : 0.46 + 0.16 * t;
    const lightness = base + (i % 2 === 0 ? -0.035 : 0.035);
    const hue = 258 - 178 * t;
    const chroma = Math.min(0.105, 0.95 * greatestChroma(lightness, hue));
    const linear = oklabToLinear(oklch(lightness, chroma, hue));
    out.push([byte(linear[0]), byte(linear[1]), byte(linear[2])]);
  }
  return out;
}

const byte = (linear: number): number => Math.round(255 * encodeSrgb(linear));

/** CSS text of sRGB bytes, with an opacity when given. */
export const cssColour = ([r, g, b]: Triple, alpha = 1): string =>
  alpha === 1 ? `rgb(${r} ${g} ${b})` : `rgb(${r} ${g} ${b} / ${alpha})`;
