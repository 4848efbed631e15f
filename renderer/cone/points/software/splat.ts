import type { PointArrays } from '../pointArrays.ts';

/**
 * Free pixels around the sums on every side, so that a disc at the border needs no clipping: the widest of a few
 * galaxies, at four times their size on a screen of two pixels a CSS pixel.
 */
export const PAD = 80;

/** One run of the splat: where points go and how much light they bring. Everything in device pixels. */
export interface Splat {
  /** Sky direction times radius to pixels, three rows of four, in 32-bit floats. */
  readonly matrix: Float32Array;
  readonly width: number;
  readonly height: number;
  readonly light: number;
  /** Radii from min (included) to max (excluded) have full light, all others `dim` of it. */
  readonly emphasisMin: number;
  readonly emphasisMax: number;
  readonly dim: number;
  /** Four numbers that give a place its part of the light, which stays within `least` and 1; null: all have all. */
  readonly depth: Float32Array | null;
  readonly least: number;
  /** Side of the disc's square in pixels, even; 0 puts all light into one pixel. */
  readonly side: number;
  /** 16 discs (4 places between pixels down, 4 across) of side x side weights; empty when side is 0. */
  readonly discs: Float32Array;
}

/** Pixels in one row of the sums. */
export const strideOf = (width: number): number => width + 2 * PAD;

/** Numbers in the sums of a picture: light and light times value for every pixel, the free border included. */
export const sumsLength = (width: number, height: number): number => 2 * strideOf(width) * (height + 2 * PAD);

const f = Math.fround;

/**
 * Adds points to the sums: the reference for the WASM kernel, which does the same 32-bit operations in the same order,
 * so that both give the same sums to the last bit.
 *
 * @param from,to slots, end excluded
 * @param sums pairs (light, light times value), rows of strideOf(width) pixels, the first PAD rows and columns free
 */
export function splat(points: PointArrays, from: number, to: number, how: Splat, sums: Float32Array): void {
  const { x, y, z, radius, value } = points;
  const { side, discs } = how;
  const m = how.matrix;
  const a0 = m[0]!;
  const a1 = m[1]!;
  const a2 = m[2]!;
  const a3 = m[3]!;
  const b0 = m[4]!;
  const b1 = m[5]!;
  const b2 = m[6]!;
  const b3 = m[7]!;
  const c0 = m[8]!;
  const c1 = m[9]!;
  const c2 = m[10]!;
  const c3 = m[11]!;
  const nearest = f(0.02);
  const byte = f(1 / 255);
  const stride = strideOf(how.width);
  const half = side / 2;
  const right = how.width + half;
  const bottom = how.height + half;
  const shift = f(0.5 - half);
  const full = f(how.light);
  const dimmed = f(full * f(how.dim));
  const d = how.depth;
  const [d0, d1, d2, d3] = d ? [d[0]!, d[1]!, d[2]!, d[3]!] : [0, 0, 0, 1];
  const least = f(how.least);
  const eMin = f(how.emphasisMin);
  const eMax = f(how.emphasisMax);
  for (let s = from; s < to; s++) {
    const r = radius[s]!;
    const dx = f(x[s]! * r);
    const dy = f(y[s]! * r);
    const dz = f(z[s]! * r);
    const w = f(f(f(f(c0 * dx) + f(c1 * dy)) + f(c2 * dz)) + c3);
    if (!(w > nearest)) continue;
    const px = f(f(f(f(f(a0 * dx) + f(a1 * dy)) + f(a2 * dz)) + a3) / w);
    const py = f(f(f(f(f(b0 * dx) + f(b1 * dy)) + f(b2 * dz)) + b3) / w);
    if (!(px >= -half && px < right && py >= -half && py < bottom)) continue;
    let light = r >= eMin && r < eMax ? full : dimmed;
    if (d) {
      const near = f(f(f(f(d0 * dx) + f(d1 * dy)) + f(d2 * dz)) + d3);
      light = f(light * Math.min(1, Math.max(least, near)));
    }
    const tinted = f(light * f(value[s]! * byte));
    if (side === 0) {
      const i = 2 * (((py | 0) + PAD) * stride + (px | 0) + PAD);
      sums[i]! += light;
      sums[i + 1]! += tinted;
      continue;
    }
    // Left and top pixel of the square whose middle is nearest, and the place between pixels in quarters.
    const left = Math.floor(f(px + shift));
    const top = Math.floor(f(py + shift));
    const quarterX = f(f(f(px + shift) - left) * 4) | 0;
    const quarterY = f(f(f(py + shift) - top) * 4) | 0;
    let k = (quarterY * 4 + quarterX) * side * side;
    for (let row = 0; row < side; row++) {
      let i = 2 * ((top + row + PAD) * stride + left + PAD);
      for (let column = 0; column < side; column++, i += 2, k++) {
        sums[i]! += f(discs[k]! * light);
        sums[i + 1]! += f(discs[k]! * tinted);
      }
    }
  }
}

/**
 * Soft discs of a diameter in pixels, 1 in the middle: exp(-4.5 (2r/diameter)^2), for 4 x 4 places of the middle
 * between pixels. Diameters up to 1.5 are drawn as one pixel: side 0; those beyond PAD as PAD, round all the same.
 */
export function softDiscs(wished: number): { side: number; discs: Float32Array } {
  if (wished <= 1.5) return { side: 0, discs: new Float32Array(0) };
  const diameter = Math.min(PAD, wished);
  const side = Math.min(PAD, 2 * Math.ceil((diameter + 0.5) / 2));
  const discs = new Float32Array(16 * side * side);
  let d = 0;
  for (let qy = 0; qy < 4; qy++) {
    for (let qx = 0; qx < 4; qx++) {
      // The middle of the light, from the left and top of the square.
      const cx = (side - 1) / 2 + (qx + 0.5) / 4;
      const cy = (side - 1) / 2 + (qy + 0.5) / 4;
      for (let row = 0; row < side; row++) {
        for (let column = 0; column < side; column++) {
          const r2 = (column + 0.5 - cx) ** 2 + (row + 0.5 - cy) ** 2;
          discs[d++] = Math.exp((-4.5 * 4 * r2) / diameter ** 2);
        }
      }
    }
  }
  return { side, discs };
}
