const SIZE = 624;
const SHIFT = 397;

/**
 * MT19937 of Matsumoto & Nishimura 1998 (ACM TOMACS 8, 3), with the initialisers of their 2002 revision.
 * A number seeds it alone; a list goes through the initialiser for arrays. Values are unsigned 32-bit.
 */
export function createTwister(seed: number | readonly number[]): () => number {
  const state = new Uint32Array(SIZE);
  if (typeof seed === 'number') seedByNumber(state, seed);
  else seedByList(state, seed);
  let index = SIZE;

  return () => {
    if (index === SIZE) {
      renew(state);
      index = 0;
    }
    let y = state[index++]!;
    y ^= y >>> 11;
    y ^= (y << 7) & 0x9d2c5680;
    y ^= (y << 15) & 0xefc60000;
    y ^= y >>> 18;
    return y >>> 0;
  };
}

function seedByNumber(state: Uint32Array, seed: number): void {
  state[0] = seed;
  for (let i = 1; i < SIZE; i++) {
    const previous = state[i - 1]! ^ (state[i - 1]! >>> 30);
    state[i] = Math.imul(1812433253, previous) + i;
  }
}

function seedByList(state: Uint32Array, seeds: readonly number[]): void {
  seedByNumber(state, 19650218);
  let i = 1;
  let j = 0;
  for (let k = Math.max(SIZE, seeds.length); k > 0; k--) {
    const previous = state[i - 1]! ^ (state[i - 1]! >>> 30);
    state[i] = (state[i]! ^ Math.imul(previous, 1664525)) + seeds[j]! + j;
    i++;
    j++;
    if (i >= SIZE) {
      state[0] = state[SIZE - 1]!;
      i = 1;
    }
    if (j >= seeds.length) j = 0;
  }
  for (let k = SIZE - 1; k > 0; k--) {
    const previous = state[i - 1]! ^ (state[i - 1]! >>> 30);
    state[i] = (state[i]! ^ Math.imul(previous, 1566083941)) - i;
    i++;
    if (i >= SIZE) {
      state[0] = state[SIZE - 1]!;
      i = 1;
    }
  }
  state[0] = 0x80000000;
}

function renew(state: Uint32Array): void {
  for (let k = 0; k < SIZE; k++) {
    const y = (state[k]! & 0x80000000) | (state[(k + 1) % SIZE]! & 0x7fffffff);
    state[k] = state[(k + SHIFT) % SIZE]! ^ (y >>> 1) ^ (y & 1 ? 0x9908b0df : 0);
  }
}
