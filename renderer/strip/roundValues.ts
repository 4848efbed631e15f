import { roundTo } from '../../shared-core/base/roundTo.ts';

/** Round numbers are 1, 2 or 5 times a power of ten. */
const LEADING = [1, 2, 5] as const;
/** Distances that differ by less are equal: else an even axis would be marked unevenly. */
const ROUNDING_PX = 1e-6;

/** The smallest round number that is not below `least` (above 0). */
export function roundStepAbove(least: number): number {
  const power = Math.floor(Math.log10(least));
  for (const p of [power, power + 1])
    for (const lead of LEADING) {
      const step = roundNumber(lead, p);
      if (step >= least * (1 - 1e-9)) return step;
    }
  return roundNumber(1, power + 2);
}

/** The nearest multiple of a round step, free of the dust of binary fractions (0.3, not 0.30000000000000004). */
export function toMultiple(value: number, step: number, round: (x: number) => number = Math.round): number {
  return clean(round(value / step) * step);
}

/** All multiples of a round step from low to high, ends included. */
export function multiples(low: number, high: number, step: number): number[] {
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => clean((first + i) * step));
}

/**
 * Round values along an axis that may be stretched unevenly: everywhere as dense as `gapPx` allows, each stretch
 * between two neighbours divided evenly, so that the eye can count.
 *
 * @param pxOf pixel of a value, monotone over low..high
 * @param gapPx least distance of neighbours where the step is that large
 */
export function roundValues(
  low: number,
  high: number,
  pxOf: (value: number) => number,
  gapPx: (step: number) => number,
): number[] {
  if (!(high > low && low >= 0)) return [];
  const size = 10 ** Math.ceil(Math.log10(high) - 1e-9);
  const found = new Set([0, clean(size)].filter((v) => v >= low && v <= high));
  divide(0, size, { low, high, pxOf, gapPx, found });
  return [...found].sort((a, b) => a - b);
}

interface Search {
  readonly low: number;
  readonly high: number;
  readonly pxOf: (value: number) => number;
  readonly gapPx: (step: number) => number;
  readonly found: Set<number>;
}

// Splits one stretch by the finest round step that fits in it, then tries each piece for itself: where the axis is
// stretched more, a piece can take a finer step.
function divide(start: number, size: number, search: Search): void {
  const [from, to] = [Math.max(search.low, start), Math.min(search.high, start + size)];
  if (!(to > from)) return;
  const roomPx = Math.abs(search.pxOf(to) - search.pxOf(from));
  let best = 0;
  for (const step of stepsWithin(size)) {
    const gap = search.gapPx(step);
    if (((to - from) / step - 2) * gap > 2 * roomPx) break;
    if (fits(from, to, step, gap, search.pxOf)) best = step;
  }
  if (best === 0) return;
  for (const value of multiples(from, to, best)) search.found.add(value);
  for (let i = Math.floor(from / best + 1e-9); i * best < to; i++) divide(i * best, best, search);
}

/** Whether neighbouring multiples of the step all lie at least `gap` pixels apart. */
function fits(from: number, to: number, step: number, gap: number, pxOf: (value: number) => number): boolean {
  let before = Number.NEGATIVE_INFINITY;
  const last = Math.floor(to / step + 1e-9);
  for (let i = Math.ceil(from / step - 1e-9); i <= last; i++) {
    const px = pxOf(i * step);
    if (Math.abs(px - before) < gap - ROUNDING_PX) return false;
    before = px;
  }
  return true;
}

const knownSteps = new Map<number, readonly number[]>();

// Round steps that divide the size evenly, from coarse to fine, over three powers of ten.
function stepsWithin(size: number): readonly number[] {
  const known = knownSteps.get(size);
  if (known !== undefined) return known;
  const power = Math.round(Math.log10(size) - 0.35);
  const steps: number[] = [];
  for (let p = power; p >= power - 3; p--)
    for (const lead of [5, 2, 1]) {
      const step = roundNumber(lead, p);
      const parts = size / step;
      if (parts > 1.5 && Math.abs(parts - Math.round(parts)) < 1e-6) steps.push(step);
    }
  knownSteps.set(size, steps);
  return steps;
}

function roundNumber(lead: number, power: number): number {
  return power < 0 ? lead / 10 ** -power : lead * 10 ** power;
}

function clean(value: number): number {
  return roundTo(value, 12);
}
