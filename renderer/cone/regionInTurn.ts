import type { PreparedField } from './geometry/preparedField.ts';
import type { ConeWork } from './jobs/coneWork.ts';
import type { Galaxies } from './points/galaxies.ts';
import type { FootprintInput, GalaxyInput } from './types.ts';

/**
 * Takes region and galaxies together: the old picture stands while a region is made ready, and galaxies that come
 * meanwhile wait for it. The newest region wins.
 */
export class RegionInTurn {
  private readonly work: ConeWork;
  private readonly galaxies: Galaxies;
  private readonly ready: (
    fields: readonly PreparedField[],
    footprint: FootprintInput,
    views: readonly (() => void)[],
  ) => void;
  /** A region that is being made ready, with the galaxies that came since (undefined: none came). */
  private preparing: { galaxies: GalaxyInput | null | undefined } | null = null;
  /** What is asked of the view while a region is on its way; null while none is. */
  private viewsAsked: (() => void)[] | null = null;
  private disposed = false;

  /** @param ready takes a region, and what was asked of the view meanwhile, to be done after it */
  constructor(work: ConeWork, galaxies: Galaxies, ready: RegionInTurn['ready']) {
    this.work = work;
    this.galaxies = galaxies;
    this.ready = ready;
  }

  setFootprint(footprint: FootprintInput): void {
    const waiting = { galaxies: this.preparing?.galaxies };
    this.preparing = waiting;
    this.viewsAsked = [];
    void this.work.fields(footprint).then((fields) => {
      // A newer region is on its way.
      if (this.preparing !== waiting || this.disposed) return;
      this.preparing = null;
      const centres = Float64Array.from(fields.flatMap((field) => [...field.centre]));
      this.galaxies.setCentres(centres, () => this.take(fields, footprint));
      if (waiting.galaxies !== undefined) this.galaxies.setInput(waiting.galaxies);
    });
  }

  setGalaxies(galaxies: GalaxyInput | null): void {
    if (this.preparing) this.preparing.galaxies = galaxies;
    else this.galaxies.setInput(galaxies);
  }

  /** What is asked of the view while a region is made ready holds for that one too. */
  noteView(change: () => void): void {
    this.viewsAsked?.push(change);
  }

  dispose(): void {
    this.disposed = true;
  }

  private take(fields: readonly PreparedField[], footprint: FootprintInput): void {
    let views: readonly (() => void)[] = [];
    // Where a newer region is on its way, what was asked of the view holds for that one.
    if (!this.preparing) {
      views = this.viewsAsked ?? [];
      this.viewsAsked = null;
    }
    this.ready(fields, footprint, views);
  }
}
