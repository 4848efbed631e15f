import { Refusal } from '../base/refusal.ts';

const MAX_STEPS = 200;

/**
 * A root of f between a and b by Brent's method (Brent 1973, Algorithms for Minimization without Derivatives,
 * chapter 4): inverse quadratic interpolation and the secant, bisection where they do not shrink the bracket.
 *
 * @param tolerance absolute, of the root; 0 goes to the last bit
 * @throws Refusal when f has one sign at both ends or is not finite
 */
export function findRoot(f: (x: number) => number, a: number, b: number, tolerance = 0): number {
  let best = b;
  let previous = a;
  let fBest = f(best);
  let fPrevious = f(previous);
  if (!(fBest * fPrevious <= 0)) {
    throw new Refusal(
      `No root between ${a} and ${b}: the function is ${fPrevious} and ${fBest} there; expected two signs.`,
    );
  }
  let contra = previous;
  let fContra = fPrevious;
  let step = best - previous;
  let lastStep = step;
  for (let i = 0; i < MAX_STEPS; i++) {
    if (Math.abs(fContra) < Math.abs(fBest)) {
      previous = best;
      best = contra;
      contra = previous;
      fPrevious = fBest;
      fBest = fContra;
      fContra = fPrevious;
    }
    const close = 2 * Number.EPSILON * Math.abs(best) + tolerance / 2;
    const toMiddle = (contra - best) / 2;
    if (Math.abs(toMiddle) <= close || fBest === 0) return best;
    if (Math.abs(lastStep) >= close && Math.abs(fPrevious) > Math.abs(fBest)) {
      const s = fBest / fPrevious;
      let p: number;
      let q: number;
      if (previous === contra) {
        p = 2 * toMiddle * s;
        q = 1 - s;
      } else {
        const r = fBest / fContra;
        const t = fPrevious / fContra;
        p = s * (2 * toMiddle * t * (t - r) - (best - previous) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * toMiddle * q - Math.abs(close * q), Math.abs(lastStep * q))) {
        lastStep = step;
        step = p / q;
      } else {
        step = toMiddle;
        lastStep = toMiddle;
      }
    } else {
      step = toMiddle;
      lastStep = toMiddle;
    }
    previous = best;
    fPrevious = fBest;
    best += Math.abs(step) > close ? step : Math.sign(toMiddle) * close;
    fBest = f(best);
    if (!Number.isFinite(fBest)) {
      throw new Refusal(
        `A function is not finite at ${best} while its root is sought; expected finite values.`,
      );
    }
    if (Math.sign(fBest) === Math.sign(fContra)) {
      contra = previous;
      fContra = fPrevious;
      step = best - previous;
      lastStep = step;
    }
  }
  return best;
}

/** Newton converges quadratically: after a step this small (relative) one more is exact to rounding. */
const LAST_STEP = 1e-8;

/**
 * The root in [low, high] of a rising function whose slope is known: Newton's step, bisection where it would leave
 * the bracket.
 *
 * @param evaluate value and slope (above 0) of the function at x
 * @param guess where to start; anything inside the bracket
 */
export function findRisingRoot(
  evaluate: (x: number) => { value: number; slope: number },
  low: number,
  high: number,
  guess: number,
): number {
  let x = Math.min(Math.max(guess, low), high);
  let last = false;
  for (let i = 0; i < MAX_STEPS; i++) {
    const { value, slope } = evaluate(x);
    if (value === 0) return x;
    if (value > 0) high = x;
    else low = x;
    let next = x - value / slope;
    if (!(next >= low && next <= high)) next = low + (high - low) / 2;
    const change = Math.abs(next - x);
    x = next;
    if (last || change <= Number.EPSILON * Math.abs(x)) return x;
    last = change <= LAST_STEP * Math.abs(x);
  }
  return x;
}
