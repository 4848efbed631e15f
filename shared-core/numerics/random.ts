import { Refusal } from '../base/refusal.ts';
import { exp, log } from './elementary/elementary.ts';
import { lnGamma } from './gamma.ts';
import { createTwister } from './twister.ts';

/** A stream of random numbers that depends on its seed alone. */
export interface Random {
  /** 0 <= value < 1 with 53 random bits. */
  uniform(): number;
  /** Whole number 0 <= value < limit, every one alike likely. */
  integer(limit: number): number;
  /** Mean 0, standard deviation 1. */
  normal(): number;
  /** Whole number with the given mean (0 to 1e9). */
  poisson(mean: number): number;
}

/**
 * Mersenne Twister (Matsumoto & Nishimura 1998, MT19937) with the usual ways to other distributions, draw for draw
 * the sequences of numpy's RandomState. A list of seeds gives independent streams: createRandom([seed, 3]).
 *
 * @param seed whole number from 0 to 2^32 - 1, or a list of such
 * @throws Refusal for any other seed; the methods for a limit or mean out of range
 */
export function createRandom(seed: number | readonly number[]): Random {
  const numbers = typeof seed === 'number' ? [seed] : seed;
  if (numbers.length === 0 || numbers.some((one) => !Number.isInteger(one) || one < 0 || one > 0xffffffff)) {
    throw new Refusal(
      `The seed is ${String(seed)}; give a whole number from 0 to 4294967295, or a list of such.`,
      'use',
    );
  }
  const next = createTwister(seed);
  let spare: number | null = null;

  const uniform = () => ((next() >>> 5) * 67108864 + (next() >>> 6)) / 9007199254740992;

  // Marsaglia's polar method: two values a pass
  const normal = () => {
    if (spare !== null) {
      const value = spare;
      spare = null;
      return value;
    }
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const r2 = x * x + y * y;
      if (r2 >= 1 || r2 === 0) continue;
      const factor = Math.sqrt((-2 * log(r2)) / r2);
      spare = factor * x;
      return factor * y;
    }
  };

  const integer = (limit: number) => {
    if (!Number.isInteger(limit) || limit < 1 || limit > 4294967296) {
      throw new Refusal(
        `The limit of a random whole number is ${limit}; give one from 1 to 4294967296.`,
        'use',
      );
    }
    // Masked rejection: no value is favoured
    const mask = limit === 1 ? 0 : 0xffffffff >>> Math.clz32(limit - 1);
    for (;;) {
      const value = (next() & mask) >>> 0;
      if (value < limit) return value;
    }
  };

  const poisson = (mean: number) => {
    if (!(mean >= 0 && mean <= 1e9)) {
      throw new Refusal(`The mean of a Poisson number is ${mean}; give one from 0 to 1000000000.`, 'use');
    }
    if (mean === 0) return 0;
    return mean < 10 ? poissonByProducts(uniform, mean) : poissonByRejection(uniform, mean);
  };

  return { uniform, integer, normal, poisson };
}

/** Knuth 1969: multiply uniforms until they fall below e^-mean. */
function poissonByProducts(uniform: () => number, mean: number): number {
  const floor = exp(-mean);
  let product = uniform();
  let count = 0;
  while (product > floor) {
    product *= uniform();
    count++;
  }
  return count;
}

/** Hormann 1993, Insurance: Mathematics and Economics 12, 39: transformed rejection (PTRS). */
function poissonByRejection(uniform: () => number, mean: number): number {
  const lnMean = log(mean);
  const b = 0.931 + 2.53 * Math.sqrt(mean);
  const a = -0.059 + 0.02483 * b;
  const invAlpha = 1.1239 + 1.1328 / (b - 3.4);
  const vr = 0.9277 - 3.6224 / (b - 2);
  for (;;) {
    const u = uniform() - 0.5;
    const v = uniform();
    const us = 0.5 - Math.abs(u);
    const k = Math.floor(((2 * a) / us + b) * u + mean + 0.43);
    if (us >= 0.07 && v <= vr) return k;
    if (k < 0 || (us < 0.013 && v > us)) continue;
    if (log(v) + log(invAlpha) - log(a / (us * us) + b) <= -mean + k * lnMean - lnGamma(k + 1)) {
      return k;
    }
  }
}
