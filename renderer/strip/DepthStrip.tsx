import { useEffect, useMemo, useRef } from 'preact/hooks';
import { useApp } from '../state/app.ts';
import { smallTypePx } from '../ui/smallType.ts';
import { useBoxSize } from '../ui/useBoxSize.ts';
import { DensityPlot } from './DensityPlot.tsx';
import { DepthAxes } from './DepthAxes.tsx';
import { EdgeHandles } from './EdgeHandles.tsx';
import { AxisGround, EdgeRail, PlotSurface } from './PlotSurface.tsx';
import { createPlotGestures, type PlotGestures } from './plotGestures.ts';
import { stripRows } from './rows.ts';
import { ShellBands } from './ShellBands.tsx';
import { AxisNames, ZoomTools } from './StripControls.tsx';
import './strip.css';
import './stripTools.css';
import { StripLegend } from './StripLegend.tsx';
import { EdgeBubble, ProfileText, Sentence, Tip } from './StripNotes.tsx';
import { StripTools } from './StripTools.tsx';
import { createStripModel, type StripModel } from './stripModel.ts';
import { TypedEdge } from './TypedEdge.tsx';

/** Density along the line of sight, the shells as bands, and their edges to take hold of. */
export function DepthStrip() {
  const app = useApp();
  const model = useMemo(() => createStripModel(app), [app]);
  const gestures = useMemo(() => createPlotGestures(app, model), [app, model]);
  return (
    <div class="strip">
      <StripTools model={model} />
      <StripLegend model={model} />
      <StripDrawing model={model} gestures={gestures} />
    </div>
  );
}

interface PartProps {
  readonly model: StripModel;
  readonly gestures: PlotGestures;
}

function StripDrawing({ model, gestures }: PartProps) {
  const box = useRef<HTMLDivElement>(null);
  useBoxSize(box, (widthPx, heightPx) => {
    model.size.value = { widthPx, heightPx, fontPx: smallTypePx() };
  });
  useEffect(() => {
    const element = box.current!;
    // The page must not scroll under a wheel that zooms, and only an active listener may say so.
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      gestures.wheel(event, event.clientX - element.getBoundingClientRect().left);
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    return () => element.removeEventListener('wheel', onWheel);
  }, [gestures]);
  const size = model.size.value;
  const rows = size === null ? null : stripRows(size);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: the keys zoom whatever in the drawing has the focus
    <div class="strip-drawing" ref={box} onKeyDown={(event) => zoomByKey(event, model, gestures)}>
      {size === null || rows === null ? null : (
        <>
          {/* biome-ignore lint/a11y/useSemanticElements: there are no fieldsets in a drawing */}
          <svg width={size.widthPx} height={size.heightPx} role="group" aria-label="Depth strip">
            {/* biome-ignore lint/a11y/noAriaHiddenOnFocusable: nothing in this group takes the focus */}
            <g aria-hidden="true">
              <ShellBands model={model} rows={rows} />
              <DensityPlot model={model} rows={rows} />
              <AxisGround model={model} rows={rows} gestures={gestures} />
              <DepthAxes model={model} rows={rows} />
              <EdgeRail model={model} rows={rows} gestures={gestures} />
            </g>
            <PlotSurface model={model} rows={rows} gestures={gestures} />
            <EdgeHandles model={model} rows={rows} />
          </svg>
          <AxisNames model={model} rows={rows} />
          <ZoomTools model={model} rows={rows} gestures={gestures} />
          <Sentence model={model} rows={rows} />
          <Tip model={model} rows={rows} />
          <EdgeBubble model={model} />
          <TypedEdge model={model} />
        </>
      )}
      <ProfileText model={model} />
    </div>
  );
}

function zoomByKey(event: KeyboardEvent, model: StripModel, gestures: PlotGestures): void {
  if (event.ctrlKey || event.metaKey || event.altKey) return;
  const scale = model.scale.peek();
  if (scale === null) return;
  const middle = (scale.leftPx + scale.rightPx) / 2;
  const edge = model.spokenEdge.peek();
  const around = model.readPx.peek() ?? (edge === null ? middle : edgePx(event, middle));
  if (event.key === '+' || event.key === '=') gestures.zoomNotch(around, true);
  else if (event.key === '-') gestures.zoomNotch(around, false);
  else if (event.key === '0') gestures.showWhole();
  else return;
  event.preventDefault();
  event.stopPropagation();
}

function edgePx(event: KeyboardEvent, otherwise: number): number {
  const element = event.target;
  if (!(element instanceof SVGElement) || element.ownerSVGElement === null) return otherwise;
  const line = element.querySelector('line');
  return line === null ? otherwise : Number(line.getAttribute('x1'));
}
