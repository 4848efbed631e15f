import { describe, expect, it } from 'vitest';
import { ConeWork } from '../../../renderer/cone/jobs/coneWork.ts';
import { Galaxies } from '../../../renderer/cone/points/galaxies.ts';
import type { GalaxyInput } from '../../../renderer/cone/types.ts';

/** Galaxies around the equator, so that each half of the sky has its own. */
function around(count: number): GalaxyInput {
  const raDeg = Float64Array.from({ length: count }, (_, i) => (360 * i) / count);
  const decDeg = new Float64Array(count);
  return { count, directions: { raDeg, decDeg }, comovingMpc: raDeg.map((ra) => 100 + ra) };
}

const ONE = Float64Array.of(1, 0, 0);
const TWO = Float64Array.of(1, 0, 0, -1, 0, 0);

/** Galaxies and all that they told. Here is no worker: the work is done in slices, as on a page that has none. */
function galaxiesWithLog(mostBytes = Number.POSITIVE_INFINITY) {
  const log: string[] = [];
  const troubles: (string | null)[] = [];
  const memory = {
    base: 0,
    allocate({ end }: { end: number }) {
      // As the engine refuses what it has no memory for.
      if (end > mostBytes) throw new RangeError('Array buffer allocation failed');
      return new ArrayBuffer(end);
    },
    rows: (slots: number) => new Uint32Array(slots),
    adopt: () => false,
  };
  const galaxies = new Galaxies(
    (what) => log.push(what),
    new ConeWork(),
    memory,
    (sentence) => troubles.push(sentence),
  );
  return { galaxies, log, troubles };
}

describe('galaxies that change', () => {
  it('are drawn as they were until the new ones are ready, and cannot be pointed at meanwhile', async () => {
    const { galaxies, log } = galaxiesWithLog();
    galaxies.setCentres(ONE, () => log.push('sorted'));
    galaxies.setInput(around(1000));
    await expect.poll(() => galaxies.store?.count).toBe(1000);
    expect(log).toEqual(['sorted', 'store']);
    const before = galaxies.store;
    galaxies.setInput(around(2000));
    expect(galaxies.store).toBe(before);
    expect(galaxies.current).toBe(false);
    await expect.poll(() => galaxies.store?.count).toBe(2000);
    expect(galaxies.current).toBe(true);
    galaxies.hold();
    expect(galaxies.current).toBe(false);
    galaxies.setInput(null);
    expect(galaxies.store).toBe(null);
  });

  it('say so where there is no memory for them, and are drawn again once there is', async () => {
    const { galaxies, log, troubles } = galaxiesWithLog(60_000);
    galaxies.setCentres(ONE, () => undefined);
    galaxies.setInput(around(1000));
    await expect.poll(() => log).toContain('store');
    galaxies.setInput(around(5000));
    await expect.poll(() => galaxies.store).toBe(null);
    expect(troubles.at(-1)).toMatch(/Memory ran short for drawing 5000 galaxies: close other programs/);
    galaxies.setInput(around(900));
    await expect.poll(() => galaxies.store?.count).toBe(900);
    expect(troubles.at(-1)).toBeNull();
  });

  it('take other fields together with the galaxies sorted by them, and the newest alone', async () => {
    const { galaxies, log } = galaxiesWithLog();
    const sorted: string[] = [];
    galaxies.setCentres(ONE, () => sorted.push('one'));
    galaxies.setInput(around(1000));
    await expect.poll(() => log).toContain('store');
    galaxies.setCentres(TWO, () => sorted.push('overtaken'));
    expect(galaxies.place(500)!.field).toBe(0);
    galaxies.setInput(around(3000));
    galaxies.setCentres(TWO, () => sorted.push(`two with ${galaxies.store!.ranges.length} ranges`));
    await expect.poll(() => galaxies.store?.count).toBe(3000);
    expect(sorted).toEqual(['one', 'two with 2 ranges']);
    expect(galaxies.store!.ranges.map((range) => range.count)).toEqual([1500, 1500]);
    expect(galaxies.place(1500)!.field).toBe(1);
  });

  it('are sorted by the fields that came last, also where those are the ones of before', async () => {
    const { galaxies, log } = galaxiesWithLog();
    const sorted: string[] = [];
    galaxies.setCentres(ONE, () => undefined);
    galaxies.setInput(around(1000));
    await expect.poll(() => log).toContain('store');
    const before = galaxies.store;
    galaxies.setCentres(TWO, () => sorted.push('overtaken'));
    galaxies.setCentres(ONE, () => sorted.push(`one with ${galaxies.store!.ranges.length} range`));
    await expect.poll(() => galaxies.store).not.toBe(before);
    expect(galaxies.store!.ranges).toHaveLength(1);
    expect(sorted).toEqual(['one with 1 range']);
    expect(galaxies.place(500)!.field).toBe(0);
  });

  it('cannot be pointed at while others are on the way, also after they were sorted by other fields', async () => {
    const { galaxies, log } = galaxiesWithLog();
    galaxies.setCentres(ONE, () => undefined);
    galaxies.setInput(around(1000));
    await expect.poll(() => galaxies.current).toBe(true);
    galaxies.hold();
    galaxies.setCentres(TWO, () => log.push('two'));
    await expect.poll(() => log).toContain('two');
    expect(galaxies.store!.ranges).toHaveLength(2);
    expect(galaxies.current).toBe(false);
    galaxies.setInput(around(1200));
    await expect.poll(() => galaxies.current).toBe(true);
    expect(galaxies.store!.count).toBe(1200);
  });

  it('keep their colours from values that belong to others', async () => {
    const { galaxies, log } = galaxiesWithLog();
    galaxies.setInput(around(100));
    await expect.poll(() => galaxies.current).toBe(true);
    const { value } = galaxies.store!.arrays;
    const before = value.slice();
    galaxies.hold();
    const values = new Float64Array(200).fill(1);
    galaxies.setColouring({ kind: 'values', values, from: 0, to: 1, map: 'harbour' });
    await new Promise((resolve) => setTimeout(resolve, 50));
    expect(value).toEqual(before);
    galaxies.setInput(around(200));
    await expect.poll(() => galaxies.current).toBe(true);
    expect([...new Set(galaxies.store!.arrays.value)]).toEqual([255]);
    expect(log).not.toContain('values');
  });
});
