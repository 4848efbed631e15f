import * as elementary from '../../../../shared-core/numerics/elementary/elementary.ts';
import { createRandom, type Random } from '../../../../shared-core/numerics/random.ts';

type RealFunction = (x: number, y: number) => number;

interface Case {
  readonly of: RealFunction;
  /** The engine's own function of the same name. */
  readonly native: RealFunction;
  /** Draws arguments over the range where the two must agree; uses exact arithmetic only, so that every engine draws the same. */
  readonly draw: (random: Random) => readonly [x: number, y: number];
}

/** A number of either sign whose binary exponent is even between two bounds. */
function wide(random: Random, lowest: number, highest: number): number {
  const power = elementary.powerOf(2, lowest + random.integer(highest - lowest));
  return (random.integer(2) === 0 ? 1 : -1) * (1 + random.uniform()) * power;
}

const one = (draw: (random: Random) => number) => (random: Random) => [draw(random), 0] as const;
const signed = (random: Random) => 2 * random.uniform() - 1;
const positive = one((random) =>
  random.integer(2) === 0 ? 0.5 + random.uniform() : Math.abs(wide(random, -1000, 1000)),
);
const angle = one((random) => (random.integer(2) === 0 ? 7 * signed(random) : wide(random, -30, 60)));
const sine = one((random) =>
  random.integer(3) === 0 ? 1 - Math.abs(wide(random, -52, -2)) : signed(random),
);

/** Every elementary function with the arguments it is tried on. */
export const CASES: Readonly<Record<string, Case>> = {
  exp: { of: elementary.exp, native: Math.exp, draw: one((r) => 700 * signed(r)) },
  expm1: { of: elementary.expm1, native: Math.expm1, draw: one((r) => wide(r, -50, 8)) },
  log: { of: elementary.log, native: Math.log, draw: positive },
  log1p: { of: elementary.log1p, native: Math.log1p, draw: one((r) => Math.max(-0.99, wide(r, -50, 100))) },
  log10: { of: elementary.log10, native: Math.log10, draw: positive },
  log2: { of: elementary.log2, native: Math.log2, draw: positive },
  sin: { of: elementary.sin, native: Math.sin, draw: angle },
  cos: { of: elementary.cos, native: Math.cos, draw: angle },
  tan: { of: elementary.tan, native: Math.tan, draw: angle },
  sinh: { of: elementary.sinh, native: Math.sinh, draw: one((r) => wide(r, -30, 8)) },
  cosh: { of: elementary.cosh, native: Math.cosh, draw: one((r) => wide(r, -30, 8)) },
  asinh: { of: elementary.asinh, native: Math.asinh, draw: one((r) => wide(r, -30, 100)) },
  asin: { of: elementary.asin, native: Math.asin, draw: sine },
  acos: { of: elementary.acos, native: Math.acos, draw: sine },
  atan2: { of: elementary.atan2, native: Math.atan2, draw: (r) => [wide(r, -20, 20), wide(r, -20, 20)] },
  cbrt: { of: elementary.cbrt, native: Math.cbrt, draw: one((r) => wide(r, -1000, 1000)) },
  hypot: { of: elementary.hypot, native: Math.hypot, draw: (r) => [wide(r, -700, 700), wide(r, -700, 700)] },
  pow: {
    of: elementary.pow,
    native: Math.pow,
    draw: (r) => [Math.abs(wide(r, -20, 20)), 30 * signed(r)],
  },
};

/** Values of a function at seeded arguments, in order. */
export function evaluations(name: string, count: number): Float64Array {
  const { of, draw } = CASES[name]!;
  const random = createRandom([2718, name.length, name.charCodeAt(0)]);
  return Float64Array.from({ length: count }, () => of(...draw(random)));
}

/** A 64-bit checksum of the bits of numbers: two multiplicative hashes of 32 bits, as 16 hexadecimal digits. */
export function checksum(values: Float64Array): string {
  const words = new Uint32Array(values.buffer, values.byteOffset, 2 * values.length);
  let [a, b] = [0x811c9dc5, 0x2545f491];
  for (const word of words) {
    a = Math.imul(a ^ word, 0x01000193);
    a ^= a >>> 15;
    b = Math.imul(b ^ word, 0x5bd1e995);
    b ^= b >>> 13;
  }
  return [a, b].map((word) => (word >>> 0).toString(16).padStart(8, '0')).join('');
}
