import { useSignal } from '@preact/signals';
import { useApp } from '../state/app.ts';
import type { PlotGestures } from './plotGestures.ts';
import { depthAt, readBin } from './readBin.ts';
import type { StripRows } from './rows.ts';
import { shellAt } from './shellActions.ts';
import type { StripModel } from './stripModel.ts';

const COARSE_BINS = 5;

interface Props {
  readonly model: StripModel;
  readonly rows: StripRows;
  readonly gestures: PlotGestures;
}

/**
 * The ground of the plot: it reads the density under the pointer, pans, selects and takes new edges. With the
 * keyboard it is a reading cursor that walks from bin to bin.
 */
export function PlotSurface({ model, rows, gestures }: Props) {
  const { studyState, view } = useApp();
  const panning = useSignal(false);
  const scale = model.scale.value;
  if (scale === null) return null;
  const { leftPx, rightPx } = scale;
  const { plotTop, plotBottom, railBottom } = rows;
  const read = model.readPx.value;
  const cursorPx = read ?? (leftPx + rightPx) / 2;
  const shown = scale.readingAt(cursorPx) * model.primary.value.factor;

  const hover = (px: number): void => {
    const inside = px >= leftPx && px <= rightPx;
    model.readPx.value = inside ? px : null;
    view.hoveredShell.value = inside ? shellAt(studyState.study.peek().edges, scale.redshiftAt(px)) : null;
  };
  const leave = (): void => {
    model.readPx.value = null;
    view.hoveredShell.value = null;
  };
  const step = (bins: number): void => {
    const { factor } = model.primary.peek();
    const size = model.binStep.peek();
    const bin = Math.floor((scale.readingAt(cursorPx) * factor) / size + 1e-9) + bins;
    const px = scale.atReading(((bin + 0.5) * size) / factor);
    hover(Math.min(rightPx - 0.5, Math.max(leftPx + 0.5, px)));
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const by = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[event.key];
    if (by !== undefined) step(event.shiftKey ? by * COARSE_BINS : by);
    else if (event.key === 'Home') hover(leftPx + 0.5);
    else if (event.key === 'End') hover(rightPx - 0.5);
    else if (event.key === 'Enter' || event.key === ' ') gestures.selectAt(cursorPx);
    else if (event.key === 'a' || event.key === 'A' || event.key === 'Insert') gestures.addEdgeAt(cursorPx);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };
  return (
    <g
      class={panning.value ? 'strip-surface strip-panning' : 'strip-surface'}
      role="slider"
      tabindex={0}
      aria-label="Reading cursor along the depth"
      aria-orientation="horizontal"
      aria-valuemin={scale.low * model.primary.value.factor}
      aria-valuemax={scale.high * model.primary.value.factor}
      aria-valuenow={shown}
      aria-valuetext={[depthAt(model, cursorPx), ...readBin(model, cursorPx)].join(', ')}
      onFocus={() => model.readPx.peek() === null && hover(cursorPx)}
      onBlur={leave}
      onKeyDown={onKeyDown}
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        gestures.press(pxOf(event));
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={(event) => {
        const pans = gestures.drag(pxOf(event));
        panning.value = pans;
        if (pans) leave();
        else hover(pxOf(event));
      }}
      onPointerUp={(event) => {
        gestures.release(pxOf(event), pxOf(event) >= leftPx && pxOf(event) <= rightPx);
        panning.value = false;
      }}
      onPointerCancel={gestures.abandon}
      onPointerLeave={leave}
      onDblClick={(event) => gestures.addEdgeAt(pxOf(event))}
    >
      <rect
        class="strip-ground"
        x={leftPx}
        y={plotTop}
        width={rightPx - leftPx}
        height={plotBottom - plotTop}
      />
      {read === null ? null : <line class="strip-cursor" x1={read} x2={read} y1={plotTop} y2={railBottom} />}
    </g>
  );
}

/** The rail under the plot: a plus follows the pointer, and a click puts an edge there. */
export function EdgeRail({ model, rows, gestures }: Props) {
  const ghost = useSignal<number | null>(null);
  const scale = model.scale.value;
  if (scale === null) return null;
  const { leftPx, rightPx } = scale;
  const { plotTop, plotBottom, railBottom } = rows;
  const at = ghost.value;
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: for the pointer only; keys add edges at the reading cursor
    <g
      class="strip-rail"
      onPointerMove={(event) => {
        const px = pxOf(event);
        ghost.value = px >= leftPx && px <= rightPx ? px : null;
      }}
      onPointerLeave={() => void (ghost.value = null)}
      onClick={(event) => {
        ghost.value = null;
        gestures.addEdgeAt(pxOf(event));
      }}
    >
      <rect
        class="strip-rail-ground"
        x={leftPx}
        y={plotBottom}
        width={rightPx - leftPx}
        height={railBottom - plotBottom}
      >
        <title>Click to add an edge</title>
      </rect>
      {at === null ? null : (
        <g class="strip-ghost">
          <line x1={at} x2={at} y1={plotTop} y2={plotBottom} />
          <path d={`M${at - 4.5} ${plotBottom + 7.5}h9M${at} ${plotBottom + 3}v9`} />
        </g>
      )}
    </g>
  );
}

/** The ground under the three axes: dragged to pan, double-clicked to see everything. */
export function AxisGround({ model, rows, gestures }: Props) {
  const size = model.size.value;
  if (size === null) return null;
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: for the pointer only; keys zoom, buttons show everything
    <rect
      class="strip-axis-ground"
      x="0"
      y={rows.railBottom}
      width={size.widthPx}
      height={Math.max(1, size.heightPx - rows.railBottom)}
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        gestures.press(pxOf(event));
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={(event) => void gestures.drag(pxOf(event))}
      onPointerUp={(event) => gestures.release(pxOf(event), false)}
      onPointerCancel={gestures.abandon}
      onDblClick={gestures.showWhole}
    />
  );
}

function pxOf(event: MouseEvent & { readonly currentTarget: SVGElement }): number {
  return event.clientX - event.currentTarget.ownerSVGElement!.getBoundingClientRect().left;
}
