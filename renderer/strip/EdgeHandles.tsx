import { useRef } from 'preact/hooks';
import { moveEdge, removeEdge } from '../../shared-core/study/edits.ts';
import { useApp } from '../state/app.ts';
import { beginEdgeDrag, type EdgeDrag } from './edgeDrag.ts';
import { edgeLimits, movedByKey, redshiftPerPixel } from './edgeMoves.ts';
import type { StripRows } from './rows.ts';
import type { StripModel } from './stripModel.ts';
import { depthTexts } from './words.ts';

/** Half the width in which an edge can be taken, where its neighbours leave that much. */
const REACH_PX = 12;
const LEAST_REACH_PX = 3;
/** Key presses nearer to each other than this are one step of undo. */
const ONE_RUN_MS = 1200;
/** Edges are crowded where they have less room than this on average. */
const CROWDED_PX = 6;

/** A handle for every edge in view: dragged, moved by keys, typed over, removed. */
export function EdgeHandles({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const app = useApp();
  const drag = useRef<EdgeDrag | null>(null);
  const run = useRef({ name: '', at: 0, count: 0 });
  const group = useRef<SVGGElement>(null);
  const scale = model.scale.value;
  const readings = model.readings.value;
  const { edges } = app.studyState.study.value;
  if (scale === null) return null;
  const xs = edges.map((z) => scale.at(z));

  const endDrag = (): void => {
    drag.current?.end();
    drag.current = null;
  };
  // Escape belongs to the drag wherever the focus is; nobody else may hear it then.
  const onDragKey = (event: KeyboardEvent): void => {
    if (event.key !== 'Escape' || drag.current === null) return;
    event.preventDefault();
    event.stopPropagation();
    drag.current.cancel();
    endDrag();
  };
  const onPointerDown = (index: number) => (event: PointerEvent & { currentTarget: SVGGElement }) => {
    if (event.button !== 0 || drag.current !== null) return;
    event.stopPropagation();
    const at = pointerPx(event, event.currentTarget);
    drag.current = beginEdgeDrag(app, model, index, at);
    event.currentTarget.setPointerCapture(event.pointerId);
  };
  const onPointerMove = (event: PointerEvent & { currentTarget: SVGGElement }): void => {
    drag.current?.to(pointerPx(event, event.currentTarget));
  };
  const keyRun = (index: number): string => {
    const now = performance.now();
    const name = `${index}`;
    if (run.current.name !== name || now - run.current.at > ONE_RUN_MS) run.current.count++;
    run.current = { ...run.current, name, at: now };
    return `edge keys ${run.current.count}`;
  };
  const focusEdge = (index: number): void => {
    requestAnimationFrame(() => {
      const left = group.current?.querySelectorAll<SVGGElement>('[role=slider]');
      left?.[Math.min(index, left.length - 1)]?.focus();
    });
  };
  const onKeyDown = (index: number, z: number) => (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Enter') {
      event.preventDefault();
      event.stopPropagation();
      model.typing.value = { kind: 'move', index, z };
    } else if (event.key === 'Delete' || event.key === 'Backspace') {
      event.preventDefault();
      event.stopPropagation();
      if (app.studyState.perform(removeEdge(index))) focusEdge(Math.max(0, index - 1));
    } else {
      const limits = edgeLimits(edges, index, redshiftPerPixel(scale, z));
      const next = movedByKey(
        event.key,
        event.shiftKey,
        z,
        limits,
        scale,
        model.primary.peek(),
        model.snap.peek(),
      );
      if (next === null) return;
      event.preventDefault();
      event.stopPropagation();
      if (next !== z) app.studyState.perform(moveEdge(index, next, keyRun(index)));
    }
  };
  const spoken = model.spokenEdge.value;
  const seen = xs.filter((x) => x >= scale.leftPx && x <= scale.rightPx).length;
  const dense =
    seen > 2 && (Math.min(scale.rightPx, xs.at(-1)!) - Math.max(scale.leftPx, xs[0]!)) / seen < CROWDED_PX;
  return (
    <g
      class={dense ? 'strip-edges strip-edges-dense' : 'strip-edges'}
      ref={group}
      onKeyDownCapture={onDragKey}
    >
      {edges.map((z, index) => {
        const x = xs[index]!;
        if (x < scale.leftPx - 0.5 || x > scale.rightPx + 0.5) return null;
        const before = index === 0 ? REACH_PX : Math.min(REACH_PX, (x - xs[index - 1]!) / 2);
        const after = index === edges.length - 1 ? REACH_PX : Math.min(REACH_PX, (xs[index + 1]! - x) / 2);
        const [from, to] = [Math.max(LEAST_REACH_PX, before), Math.max(LEAST_REACH_PX, after)];
        const limits = edgeLimits(edges, index, redshiftPerPixel(scale, z));
        const { plotTop, plotBottom, railBottom } = rows;
        return (
          <g
            key={index}
            class={spoken === index ? 'strip-edge strip-edge-spoken' : 'strip-edge'}
            role="slider"
            tabindex={0}
            aria-label={edgeName(index, edges.length)}
            aria-orientation="horizontal"
            aria-valuemin={limits.low}
            aria-valuemax={index === edges.length - 1 ? Math.max(z, model.window.value[1]) : limits.high}
            aria-valuenow={z}
            aria-valuetext={depthTexts(z, readings).join(', ')}
            onPointerDown={onPointerDown(index)}
            onPointerMove={onPointerMove}
            onPointerUp={endDrag}
            onPointerCancel={endDrag}
            onLostPointerCapture={endDrag}
            onPointerEnter={() => void (model.spokenEdge.value = index)}
            onPointerLeave={() =>
              drag.current === null && model.spokenEdge.peek() === index && (model.spokenEdge.value = null)
            }
            onFocus={() => void (model.spokenEdge.value = index)}
            onBlur={() => model.spokenEdge.peek() === index && (model.spokenEdge.value = null)}
            onKeyDown={onKeyDown(index, z)}
            onDblClick={(event) => {
              event.stopPropagation();
              model.typing.value = { kind: 'move', index, z };
            }}
          >
            <rect
              class="strip-edge-reach"
              x={x - from}
              y={plotTop - 4}
              width={from + to}
              height={railBottom - plotTop + 4}
            />
            <line class="strip-edge-line" x1={x} x2={x} y1={plotTop - 3} y2={plotBottom + 2} />
            <path
              class="strip-edge-grip"
              d={gripPath(x, plotBottom, railBottom - 1, Math.max(1.5, Math.min(from, to) - 0.75))}
            />
          </g>
        );
      })}
    </g>
  );
}

/** "Edge 1 of 6, near side of shell 1": what a screen reader calls an edge. */
export function edgeName(index: number, edges: number): string {
  const between =
    edges === 1
      ? 'the only one'
      : index === 0
        ? 'where shell 1 begins'
        : index === edges - 1
          ? `where shell ${index} ends`
          : `between shells ${index} and ${index + 1}`;
  return `Edge ${index + 1} of ${edges}, ${between}`;
}

/** Half of a grip's width over its height. */
const GRIP_SHAPE = 4.5 / 13;

// A small house: its tip points at the edge, its body is taken hold of.
function gripPath(x: number, top: number, bottom: number, mostHalf: number): string {
  const half = Math.min(mostHalf, (bottom - top) * GRIP_SHAPE);
  return `M${x} ${top}l${half} ${half}V${bottom}h${-2 * half}V${top + half}z`;
}

function pointerPx(event: PointerEvent, target: SVGGElement): number {
  return event.clientX - target.ownerSVGElement!.getBoundingClientRect().left;
}
