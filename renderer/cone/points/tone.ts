import type { Stretch } from '../../../shared-core/study/schema.ts';
import type { Triple } from '../../colour/oklab.ts';

export interface Tone {
  /** sRGB bytes of the ground. */
  readonly background: Triple;
  /** 256 colours, sRGB bytes. */
  readonly colours: Uint8Array;
  readonly stretch: Stretch;
  /** Sum of light at full strength. */
  readonly full: number;
  /** Sum of light from which on brightness grows by ratios rather than by sums: about one galaxy. */
  readonly single: number;
  /** Dark ground: the brightest places turn toward white. On paper: toward a deeper tone of their own. */
  readonly glow: Triple;
  /** How far they do, 0..1. */
  readonly glowShare: number;
}

/** Steps of the colour value and of the light in the table. */
export const VALUE_STEPS = 128;
/** Light is indexed by the top bits of its 32-bit float: 32 steps an octave from 2^-10 to 2^22. */
const BITS_SHIFT = 18;
const FIRST_INDEX = (127 - 10) << 5;
export const LIGHT_STEPS = 1024;

const word = new Float32Array(1);
const bits = new Uint32Array(word.buffer);

/** Index of an amount of light given as the bits of its float. */
export const lightIndex = (floatBits: number): number => {
  const i = (floatBits >>> BITS_SHIFT) - FIRST_INDEX;
  return i < 0 ? 0 : i >= LIGHT_STEPS ? LIGHT_STEPS - 1 : i;
};

/** The light in the middle of a step of the table. */
export function lightOfIndex(index: number): number {
  bits[0] = ((index + FIRST_INDEX) << BITS_SHIFT) | (1 << (BITS_SHIFT - 1));
  return word[0]!;
}

/**
 * Brightness 0..1 of a sum of light. `single` (one galaxy) and `full` fix the curve: one galaxy is seen, and the
 * densest places are not burnt out.
 */
export function strength(light: number, stretch: Stretch, single: number, full: number): number {
  if (!(light > 0)) return 0;
  const x = light / full;
  switch (stretch) {
    case 'linear':
      return Math.min(1, x);
    case 'squareRoot':
      return Math.min(1, Math.sqrt(x));
    case 'logarithmic': {
      const k = Math.min(1000, Math.max(1, (2 * full) / single));
      return Math.min(1, Math.log1p(k * x) / Math.log1p(k));
    }
    case 'asinh': {
      const k = Math.min(1000, Math.max(1, full / single));
      return Math.min(1, Math.asinh(k * x) / Math.asinh(k));
    }
  }
}

/** Toward full strength the colour itself begins to glow: how much of it gives way to the glow's, by brightness 0..1. */
export const glowAt = (cover: number, share: number): number => (share * Math.max(0, cover - 0.7)) / 0.3;

/**
 * Table of finished pixels: VALUE_STEPS rows of LIGHT_STEPS words, each red, green, blue, alpha bytes in memory order
 * of a little-endian machine (as ImageData wants). Entry 0 of each row is the bare ground.
 *
 * @param table is filled and handed back; VALUE_STEPS x LIGHT_STEPS words
 */
export function toneTable<T extends Uint32Array>(tone: Tone, table: T): T {
  // A pixel is fixed + own * share: what does not depend on the colour is worked out once for each step of light.
  const share = new Float64Array(LIGHT_STEPS);
  const fixed = [0, 1, 2].map(() => new Float64Array(LIGHT_STEPS));
  for (let i = 0; i < LIGHT_STEPS; i++) {
    const cover = i === 0 ? 0 : strength(lightOfIndex(i), tone.stretch, tone.single, tone.full);
    const burn = glowAt(cover, tone.glowShare);
    share[i] = cover * (1 - burn);
    for (let k = 0; k < 3; k++) {
      fixed[k]![i] = tone.background[k]! * (1 - cover) + cover * burn * tone.glow[k]! + 0.5;
    }
  }
  const [reds, greens, blues] = fixed as [Float64Array, Float64Array, Float64Array];
  for (let v = 0, at = 0; v < VALUE_STEPS; v++) {
    const colour = 3 * Math.round((255 * v) / (VALUE_STEPS - 1));
    const [r, g, b] = [tone.colours[colour]!, tone.colours[colour + 1]!, tone.colours[colour + 2]!];
    for (let i = 0; i < LIGHT_STEPS; i++, at++) {
      const s = share[i]!;
      table[at] = 0xff000000 | ((blues[i]! + s * b) << 16) | ((greens[i]! + s * g) << 8) | (reds[i]! + s * r);
    }
  }
  return table;
}
