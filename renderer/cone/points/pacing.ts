/** Pictures that move aim at this. */
const AIM_MS = 20;
/** Least and most time of a moving picture for its points. */
const LEAST_MS = 4;
const MOST_MS = 12;
/** Pictures farther apart than this were not one movement. */
const APART_MS = 250;
/** How fast it follows, and how far off it must be before the number of points changes: each change can be seen. */
const FOLLOW = 0.15;
const STEP = 1.2;
const NEAR = 0.15;

/** Gives the points of a moving picture what the rest of it leaves of the time aimed at. */
export class Pacing {
  budgetMs = 10;
  private wantedMs = this.budgetMs;
  private lastAt = Number.NEGATIVE_INFINITY;

  /** A picture of a movement was finished. @param at milliseconds on any clock that runs evenly */
  finished(at: number): void {
    const interval = at - this.lastAt;
    this.lastAt = at;
    if (interval > APART_MS) return;
    // Near enough: another number of points would only be seen to change.
    if (Math.abs(interval / AIM_MS - 1) < NEAR) {
      this.wantedMs = this.budgetMs;
      return;
    }
    const wanted = this.wantedMs * (AIM_MS / Math.max(1, interval)) ** FOLLOW;
    this.wantedMs = Math.min(MOST_MS, Math.max(LEAST_MS, wanted));
    const off = this.wantedMs / this.budgetMs;
    if (off > STEP || off < 1 / STEP) this.budgetMs = this.wantedMs;
  }
}
