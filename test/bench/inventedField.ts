import { closeSync, openSync, writeSync } from 'node:fs';
import { createRandom } from '../../shared-core/numerics/random.ts';

const AT_ONCE = 50_000;

/**
 * Writes a CSV of invented galaxies (ra, dec, z, mag): a field of 20 x 20 degrees, or the whole sky.
 *
 * @throws Error where the file cannot be written
 */
export function writeInventedField(path: string, rows: number, wholeSky: boolean): void {
  const random = createRandom(11);
  const file = openSync(path, 'w');
  try {
    writeSync(file, 'ra,dec,z,mag\n');
    for (let from = 0; from < rows; from += AT_ONCE) {
      const lines: string[] = [];
      for (let i = from; i < Math.min(rows, from + AT_ONCE); i++) {
        const ra = wholeSky ? 360 * random.uniform() : 150 + 20 * random.uniform();
        const sinDec = 2 * random.uniform() - 1;
        const dec = wholeSky ? (Math.asin(sinDec) * 180) / Math.PI : 10 * sinDec;
        // Walls across the line of sight, so that there is something to see.
        const z = 0.02 + 0.5 * (random.uniform() + random.uniform()) + 0.01 * Math.sin(ra + dec);
        const mag = 18 + 6 * random.uniform();
        lines.push(`${ra.toFixed(5)},${dec.toFixed(5)},${z.toFixed(5)},${mag.toFixed(2)}\n`);
      }
      writeSync(file, lines.join(''));
    }
  } finally {
    closeSync(file);
  }
}
