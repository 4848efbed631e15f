import { Refusal } from '../base/refusal.ts';

/*
 * Gauss-Kronrod pair of 10 and 21 points on [-1, 1]: Piessens et al. 1983, QUADPACK, rule QK21.
 * Nodes fall from the end to the middle; the Gauss nodes are those of odd index.
 */
const NODES = [
  0.9956571630258081, 0.9739065285171717, 0.9301574913557082, 0.8650633666889845, 0.7808177265864169,
  0.6794095682990244, 0.5627571346686047, 0.4333953941292472, 0.2943928627014602, 0.14887433898163122,
];
const KRONROD_WEIGHTS = [
  0.011694638867371874, 0.032558162307964725, 0.054755896574351995, 0.07503967481091996, 0.0931254545836976,
  0.10938715880229764, 0.12349197626206584, 0.13470921731147334, 0.14277593857706009, 0.1477391049013385,
];
const KRONROD_WEIGHT_MIDDLE = 0.1494455540029169;
const GAUSS_WEIGHTS = [
  0.06667134430868814, 0.1494513491505806, 0.219086362515982, 0.26926671930999635, 0.29552422471475287,
];

const MAX_DEPTH = 60;
/** However short, a part may err by this share of the tolerance: an end like that of a square root converges. */
const LEAST_SHARE = 1 / 64;
/** Below this share of the sum of |f| a difference of the two rules is rounding, not error. */
const ROUNDING = 1e-15;

/**
 * Integral of f from a to b (a > b gives the negative), adaptive Gauss-Kronrod.
 *
 * The interval is halved until the two rules agree to `relativeTolerance` of the integral of |f| over the whole
 * interval, shared out by length. The estimate of QUADPACK is used, (200 |K - G| / spread)^1.5 times the spread.
 *
 * @param f finite on the closed interval; a kink or an integrable end singularity costs evaluations only
 * @throws Refusal when f is not finite somewhere, or 60 halvings do not suffice
 */
export function integrate(f: (x: number) => number, a: number, b: number, relativeTolerance = 1e-13): number {
  if (a === b) return 0;
  const whole = gaussKronrod(f, a, b);
  const tolerance = relativeTolerance * whole.absolute;
  if (whole.error <= Math.max(tolerance, ROUNDING * whole.absolute)) return whole.value;
  return halves(f, a, b, tolerance, 1, 0);
}

function halves(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance: number,
  share: number,
  depth: number,
): number {
  if (depth >= MAX_DEPTH) {
    throw new Refusal(`An integral near ${a} does not converge; expected a function without a pole there.`);
  }
  const middle = (a + b) / 2;
  return (
    part(f, a, middle, tolerance, share / 2, depth + 1) + part(f, middle, b, tolerance, share / 2, depth + 1)
  );
}

function part(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance: number,
  share: number,
  depth: number,
): number {
  const rule = gaussKronrod(f, a, b);
  const allowed = Math.max(tolerance * Math.max(share, LEAST_SHARE), ROUNDING * rule.absolute);
  return rule.error <= allowed ? rule.value : halves(f, a, b, tolerance, share, depth);
}

function gaussKronrod(f: (x: number) => number, a: number, b: number) {
  const middle = (a + b) / 2;
  const half = (b - a) / 2;
  const atMiddle = f(middle);
  let kronrod = KRONROD_WEIGHT_MIDDLE * atMiddle;
  let gauss = 0;
  let absolute = KRONROD_WEIGHT_MIDDLE * Math.abs(atMiddle);
  const below: number[] = [];
  const above: number[] = [];
  for (let i = 0; i < NODES.length; i++) {
    const step = half * NODES[i]!;
    const low = f(middle - step);
    const high = f(middle + step);
    below.push(low);
    above.push(high);
    kronrod += KRONROD_WEIGHTS[i]! * (low + high);
    absolute += KRONROD_WEIGHTS[i]! * (Math.abs(low) + Math.abs(high));
    if (i % 2 === 1) gauss += GAUSS_WEIGHTS[(i - 1) / 2]! * (low + high);
  }
  if (!Number.isFinite(kronrod)) {
    throw new Refusal(`A function to integrate is not finite between ${a} and ${b}; expected finite values.`);
  }
  const mean = kronrod / 2;
  let spread = KRONROD_WEIGHT_MIDDLE * Math.abs(atMiddle - mean);
  for (let i = 0; i < NODES.length; i++) {
    spread += KRONROD_WEIGHTS[i]! * (Math.abs(below[i]! - mean) + Math.abs(above[i]! - mean));
  }
  const size = Math.abs(half);
  let error = Math.abs(kronrod - gauss) * size;
  if (spread > 0 && error > 0) {
    const ratio = (200 * error) / (spread * size);
    error = spread * size * Math.min(1, ratio * Math.sqrt(ratio));
  }
  return { value: kronrod * half, absolute: absolute * size, error };
}
