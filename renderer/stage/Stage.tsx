import './stage.css';
import { useComputed, useSignal, useSignalEffect } from '@preact/signals';
import { useEffect, useMemo, useRef } from 'preact/hooks';
import { ConeView } from '../cone/coneView.ts';
import type { ViewState as ConeState, DrawingState, FootprintInput } from '../cone/types.ts';
import { useApp } from '../state/app.ts';
import { radialPixel, STRIP_LEFT_PX, STRIP_RIGHT_PX, shownWindow } from '../strip/layout.ts';
import { readingsOf } from '../strip/readings.ts';
import { useBoxSize } from '../ui/useBoxSize.ts';
import { colourTrouble } from './colourTrouble.ts';
import { colouring, coneFootprint, coneShells, radialScale, VIEW_NAMES } from './coneInputs.ts';
import { GalaxyCard } from './GalaxyCard.tsx';
import { MissingCatalogue } from './MissingCatalogue.tsx';
import { ownColouring } from './ownColouring.ts';
import { type Picks, picksAfter, picksMoved } from './picking.ts';
import { pageEnlarged, readTheme } from './readTheme.ts';
import { StageBar } from './StageBar.tsx';
import { separationText } from './separationText.ts';

const NO_FOOTPRINT: FootprintInput = { fields: [], wide: false };

/** Mounts the cone and keeps it in step with the study, the strip and the ledger. */
export function Stage() {
  const app = useApp();
  const { studyState, derived, engine, view, files } = app;
  const place = useRef<HTMLDivElement>(null);
  const cone = useSignal<ConeView | null>(null);
  const coneState = useSignal<ConeState | null>(null);
  const drawing = useSignal<DrawingState | null>(null);
  const trouble = useSignal<string | null>(null);
  const widthPx = useSignal(640);
  const enlarged = useSignal(1);
  const hovered = useSignal<{ readonly index: number; readonly xPx: number; readonly yPx: number } | null>(
    null,
  );

  const picks = useSignal<Picks>([]);

  useEffect(() => {
    const made = new ConeView(place.current!, {
      onHover: (hit) => (hovered.value = hit),
      onPick: (hit, extend) => {
        const measuring = view.measuring.value;
        // Picks given up elsewhere are none here either.
        const before = picks.value.filter(({ index }) => view.pickedGalaxies.value.includes(index));
        picks.value = picksAfter(before, hit, extend || measuring);
        view.pickedGalaxies.value = picks.value.map(({ index }) => index);
        if (picks.value.length > 1) view.measuring.value = false;
      },
      onMarksMoved: (places) => (picks.value = picksMoved(picks.peek(), places)),
      onHoverShell: (index) => (view.hoveredShell.value = index),
      onPickShell: (index) => {
        if (!view.measuring.value) view.selectedShell.value = index;
      },
      onAxisWindow: ({ min, max }) => {
        const axis = derived.axis.value;
        view.redshiftWindow.value = [axis.redshiftAt(Math.max(0, min)), axis.redshiftAt(max)];
      },
      onViewChanged: (state) => (coneState.value = state),
      onDrawingState: (state) => (drawing.value = state),
      onTrouble: (sentence) => (trouble.value = sentence),
    });
    cone.value = made;
    return () => made.dispose();
  }, []);
  useBoxSize(place, (width) => {
    widthPx.value = width;
    enlarged.value = pageEnlarged();
  });

  const window = useComputed(() =>
    shownWindow(view.redshiftWindow.value, derived.axis.value, derived.deepestRedshift.value),
  );
  const pixel = useComputed(() => radialPixel(derived.axis.value, window.value, widthPx.value));
  const readings = useComputed(() => readingsOf(derived.cosmology.value, derived.units.value));
  const shells = useComputed(() => coneShells(derived.shells.value));
  const colourBy = useComputed(() => studyState.study.value.look.colourBy);
  const colourMap = useComputed(() => studyState.study.value.look.colourMap);
  const light = useComputed(() => studyState.study.value.look.light);
  const colours = useComputed(() => {
    const selected = engine.selected.value;
    if (selected === null) return null;
    return colouring(colourBy.value, colourMap.value, selected, {
      lookbackGyr: engine.background.value?.lookbackGyr ?? null,
      density: engine.density.value,
      columns: engine.columns.value,
    });
  });
  const colourless = useComputed(() =>
    colourTrouble(colourBy.value, engine.selected.value, engine.failure.value),
  );
  const radial = useComputed(() => studyState.study.value.look.radial);
  const sideways = useComputed(() => studyState.study.value.look.sideways);

  useSignalEffect(() => {
    const { selected, background, failure } = engine;
    if (cone.value === null) return;
    const [galaxies, distances] = [selected.value, background.value];
    if (galaxies !== null && distances !== null)
      cone.value.setGalaxies({
        count: galaxies.sample.count,
        directions: galaxies.directions,
        comovingMpc: distances.comovingMpc,
      });
    // Their distances are on the way: the old picture stays.
    else if (galaxies !== null && failure.value === null) cone.value.holdGalaxies();
    else cone.value.setGalaxies(null);
  });
  // Before the catalogue is in, and in a plan without one, the region alone says what the cone looks like.
  const footprint = useComputed(() => engine.region.value ?? engine.selected.value?.footprint ?? null);
  // It is on its way: the old picture stays, and at the start there is none.
  const unknown = useComputed(
    () => footprint.value === null && !engine.fresh.value && engine.failure.value === null,
  );
  useSignalEffect(() => {
    if (unknown.value) return;
    // Nothing is left of the study before once there is neither region nor catalogue.
    const fitting = footprint.value === null ? NO_FOOTPRINT : coneFootprint(footprint.value);
    cone.value?.setFootprint(fitting);
  });
  const colouringOf = useMemo(ownColouring, []);
  useSignalEffect(() => {
    if (cone.value === null) return;
    const input = colouringOf(engine.selected.value, colours.value?.input ?? null, colourMap.value);
    if (input !== null) cone.value.setColouring(input);
  });
  useSignalEffect(() => cone.value?.setLight(light.value));
  useSignalEffect(() => {
    cone.value?.setShells({
      shells: shells.value,
      selected: view.selectedShell.value,
      hovered: view.hoveredShell.value,
    });
  });
  useSignalEffect(() => {
    const scale = pixel.value;
    if (cone.value === null || unknown.value) return;
    const deepest = Math.max(derived.deepestRedshift.value, window.value[1]);
    const shown = { min: scale.low, max: scale.high };
    cone.value.setAxisWindow(shown, { leftPx: STRIP_LEFT_PX, rightPx: STRIP_RIGHT_PX });
    cone.value.setRadialScale(
      radialScale(
        radial.value,
        readings.value,
        derived.cosmology.value,
        derived.units.value,
        scale,
        deepest,
        'with ages',
      ),
      shown,
    );
  });
  useSignalEffect(() => {
    // Read again when theme or size of type change: both stand in theme.css.
    void enlarged.value;
    const mode = view.theme.value;
    document.documentElement.dataset.theme = mode;
    cone.value?.setTheme(readTheme(mode));
  });
  useSignalEffect(() => {
    // Until somebody asks, each region has the view that fits it.
    if (view.cameraAsked.value > 0) cone.value?.setView(VIEW_NAMES[view.cameraView.value]);
  });
  useSignalEffect(() => cone.value?.setField(view.field.value));
  useSignalEffect(() => cone.value?.setSidewaysFactor(sideways.value));
  useSignalEffect(() => {
    cone.value?.setMarks(view.pickedGalaxies.value, separationText(app));
  });

  return (
    <div class="stage-frame">
      <StageBar coneState={coneState} colours={colours} />
      <div class={view.measuring.value ? 'stage-cone stage-measuring' : 'stage-cone'} ref={place} />
      <GalaxyCard hovered={hovered} picks={picks} />
      {trouble.value === null ? null : (
        <p class="stage-notice" role="status">
          {trouble.value}
        </p>
      )}
      {drawing.value?.webgl === 'lost' || drawing.value?.webgl === 'absent' ? (
        <p class="stage-notice" role="status">
          Shells cannot be drawn in 3D now ({drawing.value.reason}); everything else goes on working.
        </p>
      ) : null}
      {colourless.value === null ? null : (
        <p class="stage-notice" role="status">
          {colourless.value}
        </p>
      )}
      <MissingCatalogue />
      {footprint.value === null &&
      files.missingSource.value === null &&
      derived.sample.value.count === 0 &&
      engine.progress.value === null ? (
        <p class="stage-empty">
          {studyState.study.value.source === null
            ? 'Open a catalogue, or drop a file here, and its cone is drawn. A region alone is drawn too.'
            : engine.selected.value === null
              ? 'The cone is drawn once the catalogue can be read: see Source.'
              : 'There is no galaxy to draw: see Source.'}
        </p>
      ) : null}
    </div>
  );
}
