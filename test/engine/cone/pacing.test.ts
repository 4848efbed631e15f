import { describe, expect, it } from 'vitest';
import { Pacing } from '../../../renderer/cone/points/pacing.ts';

/** Pictures one after the other; each takes what its points and the rest of it take. */
function run(pacing: Pacing, pictures: number, takes: (budgetMs: number) => number): number[] {
  let at = 1000;
  return Array.from({ length: pictures }, () => {
    at += takes(pacing.budgetMs);
    pacing.finished(at);
    return pacing.budgetMs;
  });
}

describe('the time for points while they move', () => {
  it('falls where the rest of a picture is slow, and comes to stand near the aim', () => {
    const pacing = new Pacing();
    const budgets = run(pacing, 200, (budget) => 14 + budget);
    // 14 ms of other work leave 6 of 20; within 15 % of the aim it is left alone.
    expect(14 + budgets.at(-1)!).toBeGreaterThan(17);
    expect(14 + budgets.at(-1)!).toBeLessThan(23);
    expect(new Set(budgets.slice(100)).size).toBe(1);
  });

  it('never starves the points, nor gives them all', () => {
    expect(run(new Pacing(), 200, () => 200).at(-1)).toBeGreaterThanOrEqual(4);
    expect(run(new Pacing(), 200, () => 5).at(-1)).toBeLessThanOrEqual(12);
  });

  it('does not take a pause for a slow picture', () => {
    const pacing = new Pacing();
    const before = pacing.budgetMs;
    for (let i = 1; i < 50; i++) pacing.finished(1000 * i);
    expect(pacing.budgetMs).toBe(before);
  });
});
