import { mixPoses } from './geometry/poses.ts';
import type { Pose } from './geometry/projection.ts';
import { mixTables, type RadiusTable } from './points/radiusTable.ts';

/** What is on screen at one moment of a movement. */
export interface Shown {
  readonly pose: Pose;
  readonly factors: readonly number[];
  readonly table: RadiusTable;
}

/** The way of the picture from what was shown to what is asked for. Times in milliseconds. */
export class Movement {
  private from: Shown | null = null;
  private startedAt = 0;
  private duration = 0;

  start(from: Shown, now: number, milliseconds: number): void {
    this.from = from;
    this.startedAt = now;
    this.duration = milliseconds;
  }

  end(): void {
    this.from = null;
  }

  lasts(now: number): boolean {
    return this.from !== null && now < this.startedAt + this.duration;
  }

  /** What is shown on the way to `to`: `to` itself once the movement is over. */
  at(now: number, to: Shown): Shown {
    if (!this.from || !this.lasts(now)) {
      this.end();
      return to;
    }
    const linear = (now - this.startedAt) / this.duration;
    const t = linear * linear * (3 - 2 * linear);
    const { pose, factors, table } = this.from;
    return {
      pose: mixPoses(pose, to.pose, t),
      factors: to.factors.map((factor, i) => (factors[i] ?? factor) ** (1 - t) * factor ** t),
      table: mixTables(table, to.table, t),
    };
  }
}
