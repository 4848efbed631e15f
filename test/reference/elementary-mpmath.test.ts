import { describe, expect, it } from 'vitest';
import { CASES } from '../core/numerics/elementary/evaluations.ts';
import reference from './elementary-mpmath.json' with { type: 'json' };

/** The space between a double and the next one. */
function unitInLastPlace(x: number): number {
  const bits = new DataView(new ArrayBuffer(8));
  bits.setFloat64(0, Math.abs(x));
  bits.setBigUint64(0, bits.getBigUint64(0) + 1n);
  return bits.getFloat64(0) - Math.abs(x);
}

/** Greatest error in units of the last place, as the functions' own descriptions promise; the reference adds half of one. */
const PROMISED: Readonly<Record<string, number>> = { tan: 2, sinh: 2, cosh: 2, asinh: 3, hypot: 2 };

describe('elementary functions against mpmath, 400 digits (elementary-mpmath.py)', () => {
  it.each(Object.entries(reference))('%s', (name, rows) => {
    for (const row of rows) {
      const exact = row.at(-1)!;
      const y = row.length === 3 ? row[1]! : 0;
      const off = Math.abs(CASES[name]!.of(row[0]!, y) - exact) / unitInLastPlace(exact);
      expect(off, `${name}(${row.slice(0, -1).join(', ')})`).toBeLessThanOrEqual(PROMISED[name] ?? 1);
    }
  });
});
