import { type ConeFrame, partsOf } from './coneFrame.ts';
import { pickShell, type ShellHit } from './geometry/pickShell.ts';
import { compose } from './geometry/projection.ts';
import type { PointPainter } from './points/pointPainter.ts';
import { radiusAt } from './points/radiusTable.ts';
import type { ConeEvents, GalaxyHit, ShellInput } from './types.ts';

const REACH_PX = 8;

/** What pointing needs to know of the view at this moment. */
export interface PointingSource {
  readonly painter: PointPainter;
  readonly events: ConeEvents;
  frame(): ConeFrame;
  shells(): readonly ShellInput[];
  /** The hovered galaxy changed: its ring is to be drawn. */
  redraw(): void;
}

/** Finds what the pointer is on, one search at a time, and tells it. */
export class Pointing {
  /** Row of the galaxy under the pointer. */
  hovered: number | null = null;
  private pointer: readonly [number, number] | null = null;
  private searching = false;
  private hoveredShell: number | null = null;
  private ended = false;
  private readonly source: PointingSource;

  constructor(source: PointingSource) {
    this.source = source;
  }

  hover(at: readonly [number, number] | null): void {
    this.pointer = at;
    if (at === null) {
      this.tellHover(null);
      this.tellShell(null);
    } else if (!this.searching) {
      this.searching = true;
      requestAnimationFrame(() => void this.search());
    }
  }

  /** A plain click points out a galaxy and the shell behind it; an extending one a second galaxy only. */
  async click(xPx: number, yPx: number, extend: boolean): Promise<void> {
    const hit = await this.galaxyAt(xPx, yPx);
    if (this.ended) return;
    const { events } = this.source;
    if (!extend) events.onPickShell?.(this.shellAt(xPx, yPx));
    if (hit || !extend) events.onPick?.(hit, extend);
  }

  /** The galaxy drawn nearest to a pixel, within reach. */
  async galaxyAt(xPx: number, yPx: number): Promise<GalaxyHit | null> {
    const { painter } = this.source;
    const { store, current } = painter.galaxies;
    if (!store || !current) return null;
    const parts = partsOf(this.source.frame(), painter.galaxies);
    // Workers that end in the middle find nothing; the next search asks new ones.
    const best = await painter.pick(parts, xPx, yPx, REACH_PX).catch(() => null);
    if (!best || store !== painter.galaxies.store || !painter.galaxies.current) return null;
    return { index: store.rows[best.slot]!, xPx: best.xPx, yPx: best.yPx };
  }

  /** The shell that is seen first at a pixel. */
  shellAt(xPx: number, yPx: number): number | null {
    const frame = this.source.frame();
    const { table, pose } = frame.shown;
    const radii = this.source
      .shells()
      .map(
        (shell) => [radiusAt(table, shell.comovingMinMpc), radiusAt(table, shell.comovingMaxMpc)] as const,
      );
    const backRow = [...pose.axes[2], 0, 0, 0, 0, 0, 0, 0, 0, 0];
    let best: ShellHit | null = null;
    for (const [i, lane] of frame.lanes.entries()) {
      const { mesh } = frame.fields[lane.field]!;
      const hit = pickShell(mesh, frame.laneMatrices[i]!, compose(backRow, lane.model), radii, xPx, yPx);
      if (hit && (!best || hit.nearness > best.nearness)) best = hit;
    }
    return best?.shell ?? null;
  }

  /** Other galaxies: what was under the pointer is not any more. */
  forget(): void {
    this.hovered = null;
  }

  dispose(): void {
    this.ended = true;
    this.pointer = null;
  }

  private async search(): Promise<void> {
    const at = this.pointer;
    const hit = at ? await this.galaxyAt(at[0], at[1]) : null;
    this.searching = false;
    const { pointer } = this;
    if (!at || !pointer || this.ended) return;
    this.tellHover(hit);
    this.tellShell(this.shellAt(at[0], at[1]));
    // The pointer went on while the search ran.
    if (pointer !== at) this.hover(pointer);
  }

  private tellHover(hit: GalaxyHit | null): void {
    const row = hit?.index ?? null;
    if (row === this.hovered) return;
    this.hovered = row;
    this.source.events.onHover?.(hit);
    this.source.redraw();
  }

  private tellShell(shell: number | null): void {
    if (shell === this.hoveredShell) return;
    this.hoveredShell = shell;
    this.source.events.onHoverShell?.(shell);
  }
}
