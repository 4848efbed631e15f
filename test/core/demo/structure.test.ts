import { beforeAll, describe, expect, it } from 'vitest';
import { makeDemoSurvey } from '../../../shared-core/demo/demoSurvey.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';
import { countsInCells, placesIn, readDemo } from './readDemo.ts';

/*
 * Structure of the wide field, held against a sample without any: the same redshifts at random places of the same
 * field. Distances along and across the line of sight are of pairs, as common practice has it.
 */

const MIDDLE = { raDeg: 212, decDeg: 12 };

interface Places {
  x: number[];
  y: number[];
  z: number[];
}
let galaxies: Places;
let randoms: Places;

beforeAll(async () => {
  const { catalogue } = await readDemo([makeDemoSurvey().csv]);
  galaxies = placesIn(catalogue, 0, MIDDLE);
  const random = createRandom(1);
  const shuffled = catalogue.redshift.slice();
  for (let i = shuffled.length - 1; i > 0; i--) {
    const j = random.integer(i + 1);
    [shuffled[i], shuffled[j]] = [shuffled[j]!, shuffled[i]!];
  }
  const sin = (deg: number) => Math.sin((deg * Math.PI) / 180);
  const inWide = galaxies.x.length;
  randoms = placesIn(
    {
      ...catalogue,
      redshift: shuffled.subarray(0, inWide),
      raDeg: Float64Array.from({ length: inWide }, () => 202 + 20 * random.uniform()),
      decDeg: Float64Array.from({ length: inWide }, () => {
        return (Math.asin(sin(7) + (sin(17) - sin(7)) * random.uniform()) * 180) / Math.PI;
      }),
    },
    0,
    MIDDLE,
  );
});

/** Pairs by separation across (columns) and along (rows) the line of sight, in steps of `stepMpc`, `steps` of each. */
function pairCounts({ x, y, z }: Places, farthestMpc: number, stepMpc: number, steps: number): Float64Array {
  const reach = stepMpc * steps * Math.SQRT2;
  const near = Array.from(x.keys()).filter((i) => x[i]! < farthestMpc);
  const order = Uint32Array.from(near.sort((a, b) => x[a]! - x[b]!));
  const counts = new Float64Array(steps * steps);
  for (let i = 0; i < order.length; i++) {
    const a = order[i]!;
    for (let j = i + 1; j < order.length; j++) {
      const b = order[j]!;
      const [dx, dy, dz] = [x[b]! - x[a]!, y[b]! - y[a]!, z[b]! - z[a]!];
      if (dx > reach) break;
      if (Math.abs(dy) > reach || Math.abs(dz) > reach) continue;
      const [mx, my, mz] = [x[b]! + x[a]!, y[b]! + y[a]!, z[b]! + z[a]!];
      const along = Math.abs(dx * mx + dy * my + dz * mz) / Math.sqrt(mx * mx + my * my + mz * mz);
      const across = Math.sqrt(Math.max(0, dx * dx + dy * dy + dz * dz - along * along));
      const row = Math.floor(along / stepMpc);
      const column = Math.floor(across / stepMpc);
      if (row < steps && column < steps) counts[row * steps + column] = counts[row * steps + column]! + 1;
    }
  }
  return counts;
}

describe('large-scale structure', () => {
  // Within the wide field from z 0.6 to 1: a box of 1000 x 600 x 260 Mpc
  const low = [2300, -300, -130] as const;
  const cells = [50, 30, 13] as const;
  const moments = (places: Places) => {
    const counts = countsInCells(places, low, cells, 20);
    const mean = counts.reduce((a, b) => a + b, 0) / counts.length;
    return {
      mean,
      variance: counts.reduce((a, b) => a + (b - mean) ** 2, 0) / counts.length,
      empty: counts.filter((count) => count === 0).length / counts.length,
    };
  };

  it('makes counts in cells of 20 Mpc scatter far more than chance does', () => {
    const even = moments(randoms);
    // Poisson: the variance is the mean; n(z) adds a little
    expect(even.variance / even.mean).toBeGreaterThan(0.9);
    expect(even.variance / even.mean).toBeLessThan(1.1);
    const real = moments(galaxies);
    expect(real.mean).toBeGreaterThan(0.2);
    expect(real.variance / real.mean).toBeGreaterThan(3);
  });

  it('leaves voids and fills walls: more empty cells and fewer of one galaxy than chance leaves', () => {
    const real = moments(galaxies);
    expect(real.empty).toBeGreaterThan(Math.exp(-real.mean) * 1.15);
  });

  it('leaves round voids of 25 Mpc radius that chance would not', () => {
    const random = createRandom(2);
    const emptySpheres = (places: Places) => {
      let empty = 0;
      const inside = places.x
        .map((x, i) => [x, places.y[i]!, places.z[i]!] as const)
        .filter(([x]) => x > 2300 && x < 2900);
      for (let n = 0; n < 400; n++) {
        const [a, b, c] = [
          2350 + 500 * random.uniform(),
          500 * (random.uniform() - 0.5),
          200 * (random.uniform() - 0.5),
        ];
        if (inside.every(([x, y, z]) => (x - a) ** 2 + (y - b) ** 2 + (z - c) ** 2 > 25 ** 2)) empty++;
      }
      return empty / 400;
    };
    expect(emptySpheres(galaxies)).toBeGreaterThan(3 * emptySpheres(randoms) + 0.05);
  });
});

describe('the line of sight', () => {
  it('has fingers: close pairs stand along it, not across', () => {
    const counts = pairCounts(galaxies, 6000, 2, 10);
    const even = pairCounts(randoms, 6000, 2, 10);
    let [along, alongEven, across, acrossEven] = [0, 0, 0, 0];
    for (let i = 4; i < 10; i++) {
      // 8 to 20 Mpc apart one way, within 2 Mpc the other way
      along += counts[10 * i]!;
      alongEven += even[10 * i]!;
      across += counts[i]!;
      acrossEven += even[i]!;
    }
    // There are some 10 chance pairs in the narrow cylinder: a third of error
    expect(along / alongEven).toBeGreaterThan(2 * (across / acrossEven));
  });

  it('is squashed on large scales: walls across it stand out, as matter falls towards them (Kaiser 1987)', () => {
    const steps = 7;
    const counts = pairCounts(galaxies, 3300, 10, steps);
    const even = pairCounts(randoms, 3300, 10, steps);
    const excess = (row: number, column: number) =>
      counts[row * steps + column]! / even[row * steps + column]! - 1;
    // Pairs 40 to 70 Mpc apart across and at most 20 along, against the same with the two exchanged
    let [across, along] = [0, 0];
    for (let i = 4; i < 7; i++) {
      for (let j = 0; j < 2; j++) {
        across += excess(j, i);
        along += excess(i, j);
      }
    }
    expect(across).toBeGreaterThan(0);
    expect(across).toBeGreaterThan(1.2 * along);
  });
});
