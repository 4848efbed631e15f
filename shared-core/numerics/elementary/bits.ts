// A double and its two 32-bit words share this memory. Which word comes first is the machine's habit.
const value = new Float64Array(1);
const words = new Int32Array(value.buffer);
const HIGH = new Uint8Array(Int32Array.of(1).buffer)[0] === 1 ? 1 : 0;
const LOW = 1 - HIGH;

/** The upper 32 bits of a double (sign, exponent, 20 bits of the mantissa) as a signed integer. */
export function highWord(x: number): number {
  value[0] = x;
  return words[HIGH]!;
}

/** The double with these upper 32 bits and the lower ones of x. */
export function withHighWord(x: number, high: number): number {
  value[0] = x;
  words[HIGH] = high;
  return value[0]!;
}

/** The double with the upper 32 bits of x and zeros below: 21 bits of mantissa. */
export function upperPart(x: number): number {
  value[0] = x;
  words[LOW] = 0;
  return value[0]!;
}

// A table, since a word written and a double read at once make the processor wait.
const POWERS = new Float64Array(2046);
POWERS[1022] = 1;
for (let k = 1; k <= 1023; k++) {
  POWERS[1022 + k] = POWERS[1021 + k]! * 2;
  if (k < 1023) POWERS[1022 - k] = POWERS[1023 - k]! / 2;
}

/** 2^k for an integer -1022 <= k <= 1023. */
export function powerOfTwo(k: number): number {
  return POWERS[k + 1022]!;
}

/** y 2^k for 0.5 < |y| < 4 and an integer -2000 < k < 2000; overflows to infinity, underflows through the subnormals. */
export function scaled(y: number, k: number): number {
  if (k > -1020 && k < 1022) return y * powerOfTwo(k);
  if (k > 0) return k > 1030 ? y * Infinity : y * powerOfTwo(1000) * powerOfTwo(k - 1000);
  return k < -1090 ? y * 0 : y * powerOfTwo(k + 200) * powerOfTwo(-200);
}
