// The elementary functions of shared-core: the same bits on every engine, from + - * /, square roots and whole numbers.
export { acos, asin, atan2 } from './arcs.ts';
export { cbrt } from './cubeRoot.ts';
export { exp, expm1 } from './exponential.ts';
export { asinh, cosh, sinh } from './hyperbolic.ts';
export { hypot } from './hypotenuse.ts';
export { log, log1p, log2, log10 } from './logarithm.ts';
export { cube, pow, powerOf, square } from './powers.ts';
export { cos, sin, tan } from './trigonometry.ts';
