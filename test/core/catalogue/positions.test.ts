import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findRepeats, keptRepeats } from '../../../shared-core/catalogue/positions.ts';

/** The plain way: a set of texts. */
function repeatsByText(ra: readonly number[], dec: readonly number[]): number {
  return ra.length - new Set(ra.map((value, i) => `${value + 0} ${dec[i]! + 0}`)).size;
}

const coordinate = fc.oneof(
  fc.integer({ min: 0, max: 4 }),
  fc.constantFrom(0, -0, 5e-324, 360),
  fc.double({ min: 0, max: 360, noNaN: true }),
);
const positions = fc.array(fc.tuple(coordinate, coordinate, fc.boolean()), { maxLength: 120 });

describe('findRepeats', () => {
  it('finds as many as a set of texts does, each with the first row of its position', () => {
    fc.assert(
      fc.property(positions, (all) => {
        const ra = all.map(([value]) => value);
        const dec = all.map(([, value]) => value);
        const repeats = findRepeats(Float64Array.from(ra), Float64Array.from(dec));
        expect(repeats.row).toHaveLength(repeatsByText(ra, dec));
        repeats.row.forEach((row, k) => {
          const first = repeats.first[k]!;
          expect(first).toBe(ra.findIndex((value, i) => value === ra[row] && dec[i] === dec[row]));
          expect(first).toBeLessThan(row);
        });
      }),
      { numRuns: 500 },
    );
  });

  it('finds among kept rows what it would find in them alone', () => {
    fc.assert(
      fc.property(positions, (all) => {
        const repeats = findRepeats(
          Float64Array.from(all, ([ra]) => ra),
          Float64Array.from(all, ([, dec]) => dec),
        );
        const keep = Uint8Array.from(all, ([, , isKept]) => (isKept ? 1 : 0));
        const kept = all.flatMap(([ra, dec, isKept], row) => (isKept ? [{ ra, dec, row }] : []));
        const alone = findRepeats(
          Float64Array.from(kept, ({ ra }) => ra),
          Float64Array.from(kept, ({ dec }) => dec),
        );
        const found = keptRepeats(repeats, keep);
        expect([...found.row]).toEqual([...alone.row].map((at) => kept[at]!.row));
        expect([...found.first]).toEqual([...alone.first].map((at) => kept[at]!.row));
      }),
      { numRuns: 500 },
    );
  });

  it('finds the repeats of a regular grid and of a view into a longer array', () => {
    const side = 300;
    const ra = new Float64Array(2 * side * side + 1).subarray(1);
    const dec = new Float64Array(2 * side * side);
    for (let i = 0; i < ra.length; i++) {
      ra[i] = (i % side) / 4;
      dec[i] = (Math.floor(i / side) % side) / 4;
    }
    const repeats = findRepeats(ra, dec);
    expect(repeats.row).toHaveLength(side * side);
    expect(repeats.first[5]).toBe(5);
  });
});
