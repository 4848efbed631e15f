/** Three numbers: linear-light red, green, blue (0..1 in gamut), or lightness, a, b. */
export type Triple = readonly [number, number, number];

const DEGREE = Math.PI / 180;

/**
 * OKLab (lightness 0..1, a, b) to linear sRGB; values outside 0..1 are out of gamut.
 * Source: B. Ottosson, "A perceptual color space for image processing" (2020), matrices of the published text.
 */
export function oklabToLinear([lightness, a, b]: Triple): Triple {
  const l = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const m = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const s = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
  return [
    4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s,
    -1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s,
    -0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s,
  ];
}

/** Linear sRGB (0..1) to OKLab; the inverse of oklabToLinear, same source. */
export function linearToOklab([red, green, blue]: Triple): Triple {
  const l = Math.cbrt(0.4122214708 * red + 0.5363325363 * green + 0.0514459929 * blue);
  const m = Math.cbrt(0.2119034982 * red + 0.6806995451 * green + 0.1073969566 * blue);
  const s = Math.cbrt(0.0883024619 * red + 0.2817188376 * green + 0.6299787005 * blue);
  return [
    0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s,
  ];
}

/** Lightness, chroma and hue (degrees) to OKLab. */
export const oklch = (lightness: number, chroma: number, hueDeg: number): Triple => [
  lightness,
  chroma * Math.cos(hueDeg * DEGREE),
  chroma * Math.sin(hueDeg * DEGREE),
];

/** Whether a linear colour can be shown; the slack is far below half a step of 8 bits. */
export const inGamut = (linear: Triple): boolean => linear.every((v) => v >= -1e-4 && v <= 1 + 1e-4);

/** The greatest chroma that sRGB can show at this lightness and hue (bisection, to the last digits: a noisy limit would make uneven steps). */
export function greatestChroma(lightness: number, hueDeg: number): number {
  let low = 0;
  let high = 0.4;
  for (let i = 0; i < 30; i++) {
    const middle = (low + high) / 2;
    if (inGamut(oklabToLinear(oklch(lightness, middle, hueDeg)))) low = middle;
    else high = middle;
  }
  return low;
}

/** Linear light to the sRGB code value 0..1 (IEC 61966-2-1); values outside 0..1 are cut at the ends. */
export function encodeSrgb(linear: number): number {
  const v = Math.min(1, Math.max(0, linear));
  return v <= 0.0031308 ? 12.92 * v : 1.055 * v ** (1 / 2.4) - 0.055;
}
