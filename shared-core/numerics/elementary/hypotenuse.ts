import { powerOfTwo } from './bits.ts';

const LARGE = 1e150;
const SMALL = 1e-140;

/** Length of the vector (x, y, z), within 2 units in the last place, without overflow or underflow on the way. */
export function hypot(x: number, y: number, z = 0): number {
  const most = Math.max(Math.abs(x), Math.abs(y), Math.abs(z));
  if (most < LARGE && most > SMALL) return Math.sqrt(x * x + y * y + z * z);
  if (Math.abs(x) === Infinity || Math.abs(y) === Infinity || Math.abs(z) === Infinity) return Infinity;
  if (!(most > 0)) return most;
  const scale = most < 1 ? powerOfTwo(-600) : powerOfTwo(600);
  const [a, b, c] = [x / scale, y / scale, z / scale];
  return Math.sqrt(a * a + b * b + c * c) * scale;
}
