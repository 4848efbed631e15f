import { moveEdge } from '../../shared-core/study/edits.ts';
import type { App } from '../state/app.ts';
import { draggedTo, edgeLimits, redshiftPerPixel } from './edgeMoves.ts';
import type { RadialPixel } from './layout.ts';
import type { StripModel } from './stripModel.ts';

let drags = 0;

/** An edge under the pointer, from pressing to letting go. All of it is one step of undo. */
export interface EdgeDrag {
  readonly index: number;
  to(px: number): void;
  /** Takes the whole drag back. */
  cancel(): void;
  end(): void;
}

/**
 * Begins to drag an edge. While it lasts the window in view stands still, though the depth shown otherwise follows
 * the last edge: nothing may slide away under the pointer.
 */
export function beginEdgeDrag(
  app: App,
  model: StripModel,
  index: number,
  pointerPx: number,
): EdgeDrag | null {
  const scale = model.scale.peek();
  const startZ = app.studyState.study.peek().edges[index];
  if (scale === null || startZ === undefined) return null;
  const gesture = `edge drag ${++drags}`;
  const window = app.view.redshiftWindow;
  const held = window.peek() === null ? model.window.peek() : null;
  if (held !== null) window.value = held;
  // Where in the handle it was taken is kept, so that the edge does not jump at the first movement.
  const offsetPx = scale.at(startZ) - pointerPx;
  let moved = false;
  return {
    index,
    to(px) {
      const at: RadialPixel = scale;
      const { edges } = app.studyState.study.peek();
      const z = edges[index];
      if (z === undefined) return;
      const limits = edgeLimits(edges, index, redshiftPerPixel(at, z));
      const next = draggedTo(px + offsetPx, limits, at, model.primary.peek(), model.snap.peek());
      if (next === z) return;
      moved = app.studyState.perform(moveEdge(index, next, gesture)) || moved;
    },
    cancel() {
      if (moved) app.studyState.undo();
    },
    end() {
      if (held !== null && window.peek() === held) window.value = null;
    },
  };
}
