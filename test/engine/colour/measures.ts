import type { Triple } from '../../../renderer/colour/oklab.ts';

/** sRGB code value 0..1 to linear light, IEC 61966-2-1. */
const linear = (code: number): number => (code <= 0.04045 ? code / 12.92 : ((code + 0.055) / 1.055) ** 2.4);

/** CIE L*a*b* (D65) of linear sRGB; matrix and white of IEC 61966-2-1, CIE 1976 formula. */
export function labOfLinear([r, g, b]: Triple): Triple {
  const x = (0.4124 * r + 0.3576 * g + 0.1805 * b) / 0.9505;
  const y = 0.2126 * r + 0.7152 * g + 0.0722 * b;
  const z = (0.0193 * r + 0.1192 * g + 0.9505 * b) / 1.089;
  const f = (t: number): number => (t > 216 / 24389 ? Math.cbrt(t) : ((24389 / 27) * t + 16) / 116);
  return [116 * f(y) - 16, 500 * (f(x) - f(y)), 200 * (f(y) - f(z))];
}

export const linearOfBytes = (bytes: ArrayLike<number>, at = 0): Triple => [
  linear(bytes[at]! / 255),
  linear(bytes[at + 1]! / 255),
  linear(bytes[at + 2]! / 255),
];

export const labOfBytes = (bytes: ArrayLike<number>, at = 0): Triple => labOfLinear(linearOfBytes(bytes, at));

/** CIE 1976 colour difference. */
export const deltaE76 = (a: Triple, b: Triple): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);

/** Relative luminance contrast as in WCAG 2.2. */
export function contrast(a: Triple, b: Triple): number {
  const y = ([r, g, bl]: Triple): number => 0.2126 * r + 0.7152 * g + 0.0722 * bl;
  const [high, low] = [Math.max(y(a), y(b)), Math.min(y(a), y(b))];
  return (high + 0.05) / (low + 0.05);
}

/**
 * How dichromats see linear sRGB: Machado, Oliveira & Fernandes 2009 (IEEE TVCG 15, 1291), severity 1.0. Values from
 * memory; rows add up to 1, so that greys stay grey (tested).
 */
export const DICHROMATS = {
  protanopia: [0.152286, 1.052583, -0.204868, 0.114503, 0.786281, 0.099216, -0.003882, -0.048116, 1.051998],
  deuteranopia: [0.367322, 0.860646, -0.227968, 0.280085, 0.672501, 0.047413, -0.01182, 0.04294, 0.968881],
} as const;

export function seenBy(matrix: readonly number[], [r, g, b]: Triple): Triple {
  const row = (i: number): number =>
    Math.min(1, Math.max(0, matrix[i]! * r + matrix[i + 1]! * g + matrix[i + 2]! * b));
  return [row(0), row(3), row(6)];
}
