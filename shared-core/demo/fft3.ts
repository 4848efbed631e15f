import { cos, sin } from '../numerics/elementary/elementary.ts';

/**
 * Discrete Fourier transform of a complex cube in place, n x n x n in C order, n a power of two.
 *
 * forward: F(k) = sum over x of f(x) exp(-2 pi i k.x / n); inverse: the same with +, and NOT divided by n^3.
 * Source: Cooley & Tukey 1965, Math. Comp. 19, 297, decimation in time, axis by axis.
 *
 * @param re real parts, n^3 of them
 * @param im imaginary parts, n^3 of them
 */
export function fourierCube(re: Float64Array, im: Float64Array, n: number, way: 'forward' | 'inverse'): void {
  const cosines = new Float64Array(n / 2);
  const sines = new Float64Array(n / 2);
  const sign = way === 'forward' ? -1 : 1;
  for (let i = 0; i < n / 2; i++) {
    cosines[i] = cos((2 * Math.PI * i) / n);
    sines[i] = sign * sin((2 * Math.PI * i) / n);
  }
  const lineRe = new Float64Array(n);
  const lineIm = new Float64Array(n);
  for (const stride of [1, n, n * n]) {
    for (let line = 0; line < n * n; line++) {
      // Lines along this axis start where its own index is 0.
      const start = Math.floor(line / stride) * stride * n + (line % stride);
      for (let i = 0, at = start; i < n; i++, at += stride) {
        lineRe[i] = re[at]!;
        lineIm[i] = im[at]!;
      }
      transformLine(lineRe, lineIm, n, cosines, sines);
      for (let i = 0, at = start; i < n; i++, at += stride) {
        re[at] = lineRe[i]!;
        im[at] = lineIm[i]!;
      }
    }
  }
}

function transformLine(
  re: Float64Array,
  im: Float64Array,
  n: number,
  cosines: Float64Array,
  sines: Float64Array,
) {
  for (let i = 1, j = 0; i < n; i++) {
    let bit = n >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) {
      const r = re[i]!;
      re[i] = re[j]!;
      re[j] = r;
      const m = im[i]!;
      im[i] = im[j]!;
      im[j] = m;
    }
  }
  for (let length = 2; length <= n; length <<= 1) {
    const half = length >> 1;
    const step = n / length;
    for (let first = 0; first < n; first += length) {
      for (let k = 0; k < half; k++) {
        const c = cosines[k * step]!;
        const s = sines[k * step]!;
        const a = first + k;
        const b = a + half;
        const r = re[b]! * c - im[b]! * s;
        const m = re[b]! * s + im[b]! * c;
        re[b] = re[a]! - r;
        im[b] = im[a]! - m;
        re[a] = re[a]! + r;
        im[a] = im[a]! + m;
      }
    }
  }
}
