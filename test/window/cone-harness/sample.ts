import type { GalaxyInput } from '../../../renderer/cone/types.ts';

/** Seeded numbers 0..1 (a 32-bit mixing generator). */
export function seeded(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** Flat universe with matter 0.3, H0 70: comoving distance and lookback time at even steps of redshift. */
export function universe(zMax: number, steps = 600) {
  const z = new Float64Array(steps + 1);
  const comovingMpc = new Float64Array(steps + 1);
  const lookbackGyr = new Float64Array(steps + 1);
  const e = (x: number) => Math.sqrt(0.3 * (1 + x) ** 3 + 0.7);
  for (let i = 1; i <= steps; i++) {
    const a = (zMax * (i - 1)) / steps;
    const b = (zMax * i) / steps;
    const m = (a + b) / 2;
    z[i] = b;
    comovingMpc[i] = comovingMpc[i - 1]! + (4282.7494 * (b - a) * (1 / e(a) + 4 / e(m) + 1 / e(b))) / 6;
    const t = (x: number) => 13.968 / ((1 + x) * e(x));
    lookbackGyr[i] = lookbackGyr[i - 1]! + ((b - a) * (t(a) + 4 * t(m) + t(b))) / 6;
  }
  return { z, comovingMpc, lookbackGyr };
}

/** Straight-line reading of one rising table against another. */
export function read(x: Float64Array, y: Float64Array, at: number): number {
  let low = 0;
  let high = x.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (x[middle]! <= at) low = middle;
    else high = middle;
  }
  return y[low]! + ((at - x[low]!) / (x[high]! - x[low]!)) * (y[high]! - y[low]!);
}

export interface Patch {
  readonly raDeg: number;
  readonly decDeg: number;
  readonly widthDeg: number;
  readonly heightDeg: number;
  readonly nearMpc: number;
  readonly farMpc: number;
  readonly count: number;
}

/** Clustered galaxies in a patch of sky: knots, the bridges between neighbouring knots, and a thin field. */
export function clustered(patches: readonly Patch[], seed = 7): GalaxyInput {
  const total = patches.reduce((sum, patch) => sum + patch.count, 0);
  return total > 1e6 ? crowded(patches, total, seed) : fewer(patches, seed);
}

/** A large set: a million galaxies, each with companions scattered about it. */
function crowded(patches: readonly Patch[], total: number, seed: number): GalaxyInput {
  const times = Math.ceil(total / 5e5);
  const core = fewer(
    patches.map((patch) => ({ ...patch, count: Math.ceil(patch.count / times) })),
    seed,
  );
  const { raDeg, decDeg } = core.directions as { raDeg: Float64Array; decDeg: Float64Array };
  const random = seeded(seed + 1);
  const ra = new Float64Array(total);
  const dec = new Float64Array(total);
  const mpc = new Float64Array(total);
  for (let i = 0; i < total; i++) {
    const k = i % core.count;
    const r = core.comovingMpc[k]!;
    const spread = (12 * 57.3) / r;
    ra[i] = raDeg[k]! + (random() + random() - 1) * spread;
    dec[i] = decDeg[k]! + (random() + random() - 1) * spread;
    mpc[i] = r + (random() + random() - 1) * 18;
  }
  return { count: total, directions: { raDeg: ra, decDeg: dec }, comovingMpc: mpc };
}

function fewer(patches: readonly Patch[], seed: number): GalaxyInput {
  const count = patches.reduce((sum, patch) => sum + patch.count, 0);
  const raDeg = new Float64Array(count);
  const decDeg = new Float64Array(count);
  const comovingMpc = new Float64Array(count);
  const random = seeded(seed);
  const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
  let n = 0;
  for (const patch of patches) {
    const end = n + patch.count;
    const whole = patch.widthDeg >= 360;
    const place = (): [number, number, number] => {
      const r3 = patch.nearMpc ** 3 + random() * (patch.farMpc ** 3 - patch.nearMpc ** 3);
      const r = Math.min(Math.cbrt(r3), patch.nearMpc + (patch.farMpc - patch.nearMpc) * random() ** 0.8);
      const dec = whole
        ? (Math.asin(2 * random() - 1) * 180) / Math.PI
        : patch.decDeg + (random() - 0.5) * patch.heightDeg;
      return [patch.raDeg + (random() - 0.5) * patch.widthDeg, dec, r];
    };
    const knots = Array.from({ length: Math.max(8, Math.min(2500, Math.round(patch.count / 30))) }, place);
    while (n < end) {
      const kind = random();
      let p: [number, number, number];
      const k = knots[Math.floor(random() * knots.length)]!;
      const degPerMpc = 57.3 / k[2];
      if (kind < 0.3)
        p = [k[0] + normal() * 1.4 * degPerMpc, k[1] + normal() * 1.4 * degPerMpc, k[2] + normal() * 9];
      else if (kind < 0.8) {
        let near = knots[0]!;
        let best = 1e9;
        for (let i = 0; i < 60; i++) {
          const q = knots[Math.floor(random() * knots.length)]!;
          const d = Math.hypot((q[0] - k[0]) / degPerMpc, (q[1] - k[1]) / degPerMpc, q[2] - k[2]);
          if (d > 1 && d < best) [near, best] = [q, d];
        }
        const t = random();
        p = [
          k[0] + t * (near[0] - k[0]) + normal() * 2.5 * degPerMpc,
          k[1] + t * (near[1] - k[1]) + normal() * 2.5 * degPerMpc,
          k[2] + t * (near[2] - k[2]) + normal() * 3,
        ];
      } else p = place();
      const inside =
        whole ||
        (Math.abs(p[0] - patch.raDeg) <= patch.widthDeg / 2 &&
          Math.abs(p[1] - patch.decDeg) <= patch.heightDeg / 2);
      if (!inside || p[2] < patch.nearMpc || p[2] > patch.farMpc || Math.abs(p[1]) > 90) continue;
      raDeg[n] = p[0];
      decDeg[n] = p[1];
      comovingMpc[n] = p[2];
      n++;
    }
  }
  return { count, directions: { raDeg, decDeg }, comovingMpc };
}
