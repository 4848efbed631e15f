import { changeLook } from '../../shared-core/study/edits.ts';
import { useApp } from '../state/app.ts';
import { axisOrder } from './DepthAxes.tsx';
import type { PlotGestures } from './plotGestures.ts';
import type { StripRows } from './rows.ts';
import type { StripModel } from './stripModel.ts';
import { Tool } from './Tool.tsx';

/** The names of the three axes; the chosen one is linear. */
export function AxisNames({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const { studyState } = useApp();
  const primary = model.primary.value.kind;
  const readings = model.readings.value;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset would bring its own box and legend
    <div
      class="strip-axis-names"
      role="group"
      aria-label="Read the depth evenly in"
      style={{ top: `${rows.railBottom}px` }}
    >
      {axisOrder(primary).map((kind) => (
        <button
          key={kind}
          type="button"
          aria-pressed={kind === primary}
          aria-label={`${readings[kind].unit}: read evenly in ${readings[kind].words}`}
          title={
            kind === primary ? `Even in ${readings[kind].words}` : `Read evenly in ${readings[kind].words}`
          }
          style={{ height: `${rows.axisHeight}px` }}
          onClick={() =>
            studyState.perform(changeLook(`Read the depth in ${readings[kind].words}`, { radial: kind }))
          }
        >
          {readings[kind].unit}
        </button>
      ))}
    </div>
  );
}

/** Closer, farther, the shells, everything. */
export function ZoomTools({
  model,
  rows,
  gestures,
}: {
  readonly model: StripModel;
  readonly rows: StripRows;
  readonly gestures: PlotGestures;
}) {
  const { view, studyState } = useApp();
  const middle = (): number => {
    const scale = model.scale.peek();
    return scale === null ? 0 : (scale.leftPx + scale.rightPx) / 2;
  };
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset would bring its own box and legend
    <div
      class="strip-zoom"
      role="group"
      aria-label="Depth in view"
      style={{ top: `${rows.railBottom + 2}px` }}
    >
      <Tool
        icon="farther"
        label="Show more depth"
        detail="-"
        onClick={() => gestures.zoomNotch(middle(), false)}
      />
      <Tool
        icon="closer"
        label="Show less depth"
        detail="+"
        onClick={() => gestures.zoomNotch(middle(), true)}
      />
      <Tool
        icon="shells"
        label="Show the shells"
        disabled={studyState.study.value.edges.length < 2}
        onClick={gestures.showShells}
      />
      <Tool
        icon="whole"
        label="Show the whole depth"
        detail="0"
        disabled={view.redshiftWindow.value === null}
        onClick={gestures.showWhole}
      />
    </div>
  );
}
