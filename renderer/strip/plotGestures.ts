import { addEdge } from '../../shared-core/study/edits.ts';
import type { App } from '../state/app.ts';
import { draggedTo } from './edgeMoves.ts';
import { shellAt } from './shellActions.ts';
import type { StripModel } from './stripModel.ts';
import { panBy, windowOfShells, zoomAround } from './zoom.ts';

/** Less than this is a click, not a drag. */
const CLICK_PX = 4;
const NOTCH = 1.2;

/** What pointer, wheel and keys do to the strip as a whole. Pixels count from the strip's left edge. */
export interface PlotGestures {
  /** @param factor below 1 comes closer */
  zoom(px: number, factor: number): void;
  zoomNotch(px: number, closer: boolean): void;
  wheel(event: WheelEvent, px: number): void;
  showWhole(): void;
  showShells(): void;
  press(px: number): void;
  /** @returns whether it pans */
  drag(px: number): boolean;
  /** @param selects whether a click at this place selects a shell */
  release(px: number, selects: boolean): void;
  abandon(): void;
  addEdgeAt(px: number): void;
  selectAt(px: number): void;
}

export function createPlotGestures(app: App, model: StripModel): PlotGestures {
  const { view, derived, studyState } = app;
  let pressed: { fromPx: number; lastPx: number; pans: boolean } | null = null;
  const deepest = () => derived.deepestRedshift.peek();
  const gestures: PlotGestures = {
    zoom(px, factor) {
      const scale = model.scale.peek();
      if (scale !== null) view.redshiftWindow.value = zoomAround(scale, px, factor, deepest());
    },
    zoomNotch: (px, closer) => gestures.zoom(px, closer ? 1 / NOTCH : NOTCH),
    wheel(event, px) {
      const scale = model.scale.peek();
      if (scale === null) return;
      // A wheel that speaks in lines or pages turns as far as one that speaks in pixels.
      const unit = event.deltaMode === 1 ? 16 : event.deltaMode === 2 ? 160 : 1;
      const [dx, dy] = [event.deltaX * unit, event.deltaY * unit];
      if (Math.abs(dx) > Math.abs(dy)) view.redshiftWindow.value = panBy(scale, -dx, deepest());
      else gestures.zoom(px, NOTCH ** (Math.max(-300, Math.min(300, dy)) / 100));
    },
    showWhole: () => void (view.redshiftWindow.value = null),
    showShells() {
      const scale = model.scale.peek();
      const found = scale === null ? null : windowOfShells(scale, studyState.study.peek().edges);
      if (found !== null) view.redshiftWindow.value = found;
    },
    press: (px) => void (pressed = { fromPx: px, lastPx: px, pans: false }),
    drag(px) {
      const scale = model.scale.peek();
      if (pressed === null || scale === null) return false;
      if (!pressed.pans && Math.abs(px - pressed.fromPx) < CLICK_PX) return false;
      pressed.pans = true;
      view.redshiftWindow.value = panBy(scale, px - pressed.lastPx, deepest());
      pressed.lastPx = px;
      return true;
    },
    release(px, selects) {
      if (pressed !== null && !pressed.pans && selects) gestures.selectAt(px);
      pressed = null;
    },
    abandon: () => void (pressed = null),
    addEdgeAt(px) {
      const scale = model.scale.peek();
      if (scale === null) return;
      const limits = { low: 0, high: scale.redshiftAt(scale.rightPx) };
      studyState.perform(addEdge(draggedTo(px, limits, scale, model.primary.peek(), model.snap.peek())));
    },
    selectAt(px) {
      const scale = model.scale.peek();
      if (scale !== null)
        view.selectedShell.value = shellAt(studyState.study.peek().edges, scale.redshiftAt(px));
    },
  };
  return gestures;
}
