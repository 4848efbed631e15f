import { Color } from 'three';
import type { Triple } from '../colour/oklab.ts';
import { shellColours } from '../colour/shellColours.ts';
import { ConeModel, type Shown } from './coneModel.ts';
import type { Lane } from './geometry/arrangement.ts';
import { pickShell, type ShellHit } from './geometry/pickShell.ts';
import { compose, type PixelMatrix, pixelMatrix, project } from './geometry/projection.ts';
import { GlStage } from './glStage.ts';
import { listen } from './navigation.ts';
import { paintOverlay } from './overlay/paintOverlay.ts';
import { Pen, type Point } from './overlay/pen.ts';
import type { Emphasis, PointFrame, PointPart } from './points/pointLayer.ts';
import { type LayerChoice, PointPainter } from './points/pointPainter.ts';
import { radiusAt } from './points/radiusTable.ts';
import type { Stretch } from './points/tone.ts';
import { ShellSolids, type SolidLook, type SolidPlace } from './solids/shellSolids.ts';
import { Stage } from './stage.ts';
import type {
  AxisInsets,
  AxisWindow,
  ColouringInput,
  ConeEvents,
  ConeTheme,
  DrawingState,
  FootprintInput,
  GalaxyHit,
  GalaxyInput,
  RadialScaleInput,
  ShellsInput,
  ViewName,
  ViewState,
} from './types.ts';

const HOVER_REACH_PX = 9;
const TRANSITION_MS = 520;
/** So long after the last touch the picture counts as at rest. */
const REST_MS = 140;
/** Galaxies outside the chosen shell keep this part of their light. */
const DIMMED = 0.3;

const DARK: ConeTheme = {
  mode: 'dark',
  background: '#0d1117',
  ink: '#e6e9ee',
  inkMuted: '#a3abb8',
  line: '#4a5362',
  accent: '#f0b35b',
  fontFamily: 'system-ui, sans-serif',
};

/** Matrices of one frame. */
interface Frame {
  readonly shown: Shown;
  readonly lanes: readonly Lane[];
  readonly pixels: PixelMatrix;
  readonly laneMatrices: readonly Float64Array[];
}

/**
 * The cone: galaxies, shells and rulers in an element. Plain data in, events out; it draws when something changed and
 * never in a loop.
 */
export class ConeView {
  private readonly stage: Stage;
  private readonly gl: GlStage;
  private readonly model = new ConeModel();
  private readonly painter: PointPainter;
  private readonly solids = new ShellSolids();
  private readonly events: ConeEvents;
  private readonly stopListening: () => void;
  private theme: ConeTheme = DARK;
  private scale: RadialScaleInput | null = null;
  private insets: AxisInsets = { leftPx: 48, rightPx: 48 };
  private shells: ShellsInput = { shells: [], selected: null, hovered: null };
  private colours: readonly Triple[] = [];
  private colouring: ColouringInput = { kind: 'radius', map: 'harbour' };
  private stretch: Stretch = 'asinh';
  private picked: readonly number[] = [];
  private pairText = '';
  private hovered: number | null = null;
  private pointer: readonly [number, number] | null = null;
  private frameRequest = 0;
  private restTimer = 0;
  private drawing = false;
  private again = false;
  private drawnKey = '';
  private lookVersion = 0;
  private touchedAt = Number.NEGATIVE_INFINITY;
  private requestedAt = 0;
  private lastState = '';
  private disposed = false;

  /** @param container an element with a size; the cone fills it */
  constructor(container: HTMLElement, events: ConeEvents = {}) {
    this.events = events;
    this.stage = new Stage(container, () => this.resized());
    this.gl = new GlStage(this.stage.solids, (state) => this.drawingStateChanged(state));
    this.painter = new PointPainter(this.stage.points, this.gl, () => this.invalidate());
    this.stopListening = listen(this.stage.overlay, {
      orbit: (dx, dy) => this.orbitBy(dx, dy),
      pan: (dx, dy) => this.panBy(dx, dy),
      zoom: (factor, x, y) => this.zoomBy(factor, x, y),
      hover: (at) => this.hover(at),
      click: (x, y, extend) => void this.click(x, y, extend),
      settle: () => this.invalidate(),
    });
    this.resized();
    this.drawingStateChanged(this.gl.state);
  }

  /** The galaxies; null for none. Large sets are taken in slices, and the old picture stays until they are ready. */
  setGalaxies(galaxies: GalaxyInput | null): void {
    this.hovered = null;
    this.painter.galaxies.setInput(galaxies);
    this.invalidate();
  }

  setColouring(colouring: ColouringInput): void {
    this.colouring = colouring;
    this.lookVersion++;
    this.painter.galaxies.setColouring(colouring);
    this.invalidate();
  }

  setStretch(stretch: Stretch): void {
    this.stretch = stretch;
    this.lookVersion++;
    this.invalidate();
  }

  /** The observed region; takes the view that fits it. */
  setFootprint(footprint: FootprintInput): void {
    this.change(0, () => this.model.setFootprint(footprint));
    this.painter.galaxies.setCentres(
      Float64Array.from(this.model.fields.flatMap((field) => [...field.centre])),
    );
    if (this.gl.usable) this.solids.setMeshes(this.model.fields.map((field) => field.mesh));
  }

  setShells(shells: ShellsInput): void {
    if (shells.shells !== this.shells.shells) {
      this.colours = shellColours(shells.shells.length, this.theme.mode);
      if (this.colouring.kind === 'shell') this.lookVersion++;
      this.painter.galaxies.setShells(shells.shells);
    }
    this.shells = shells;
    this.invalidate();
  }

  /** How distance becomes radius, with the rulers; `window` is the part on screen, in the unit of the reading. */
  setRadialScale(scale: RadialScaleInput, window: AxisWindow): void {
    const switched = this.scale !== null && this.scale.reading !== scale.reading;
    this.scale = scale;
    this.change(switched ? TRANSITION_MS : 0, () => this.model.setScale(scale, window));
  }

  /** The part of the axis on screen and the strip's insets: side-on, the two axes agree to the pixel. */
  setAxisWindow(window: AxisWindow, insets: AxisInsets = this.insets): void {
    this.insets = insets;
    this.touch();
    this.change(0, () => this.model.setAxis(window, insets));
  }

  setTheme(theme: ConeTheme): void {
    this.theme = theme;
    this.lookVersion++;
    this.colours = shellColours(this.shells.shells.length, theme.mode);
    this.invalidate();
  }

  /** Software or WebGL for the points; 'auto' takes WebGL where a GPU stands behind it. */
  setPointLayer(choice: LayerChoice): void {
    this.drawnKey = '';
    this.painter.choose(choice);
  }

  setView(view: ViewName): void {
    this.change(TRANSITION_MS, () => this.model.setView(view));
  }

  /** One field of several, seen by itself; steps wrap around. */
  stepField(step: number): void {
    this.change(TRANSITION_MS, () => this.model.setCurrent(this.model.current + step));
  }

  setField(field: number): void {
    this.change(TRANSITION_MS, () => this.model.setCurrent(field));
  }

  /** null takes the proposal for the field. */
  setSidewaysFactor(factor: number | null): void {
    this.change(TRANSITION_MS, () => this.model.setSidewaysFactor(factor));
  }

  /** Rings around galaxies (rows of the catalogue), and a line with a text between the first two. */
  setMarks(rows: readonly number[], pairText = ''): void {
    this.picked = rows;
    this.pairText = pairText;
    this.invalidate();
  }

  orbitBy(dxPx: number, dyPx: number): void {
    this.touch();
    this.model.orbit(dxPx, dyPx);
    this.invalidate();
  }

  panBy(dxPx: number, dyPx: number): void {
    this.touch();
    this.tellWindow(this.model.pan(dxPx, dyPx));
  }

  /** Above 1 is nearer; the pixel stays where it is (the middle of the stage when none is given). */
  zoomBy(factor: number, xPx = this.stage.widthPx / 2, yPx = this.stage.heightPx / 2): void {
    this.touch();
    this.tellWindow(this.model.zoom(factor, xPx, yPx));
  }

  state(): ViewState {
    return this.model.state();
  }

  drawingState(): DrawingState {
    return this.gl.state;
  }

  dispose(): void {
    this.disposed = true;
    cancelAnimationFrame(this.frameRequest);
    clearTimeout(this.restTimer);
    this.stopListening();
    this.painter.dispose();
    this.solids.dispose();
    this.gl.dispose();
    this.stage.dispose();
  }

  private touch(): void {
    this.touchedAt = performance.now();
  }

  private change(milliseconds: number, change: () => void): void {
    const still = matchMedia('(prefers-reduced-motion: reduce)').matches;
    this.model.transition(performance.now(), still ? 0 : milliseconds, change);
    this.invalidate();
  }

  private tellWindow(window: AxisWindow | null): void {
    if (window) this.events.onAxisWindow?.(window);
    this.invalidate();
  }

  private resized(): void {
    this.model.setViewport({ widthPx: this.stage.widthPx, heightPx: this.stage.heightPx });
    this.invalidate();
  }

  private drawingStateChanged(state: DrawingState): void {
    if (state.webgl === 'ready') this.solids.setMeshes(this.model.fields.map((field) => field.mesh));
    this.painter.takeGl();
    this.events.onDrawingState?.(state);
    this.invalidate();
  }

  private invalidate(): void {
    if (this.drawing) this.again = true;
    if (this.frameRequest !== 0 || this.drawing || this.disposed) return;
    this.requestedAt = performance.now();
    this.frameRequest = requestAnimationFrame(() => {
      this.frameRequest = 0;
      this.draw();
    });
  }

  private frame(now: number): Frame {
    const shown = this.model.shown(now);
    const lanes = this.model.lanes(shown.factors);
    const pixels = pixelMatrix(shown.pose, this.stage);
    return { shown, lanes, pixels, laneMatrices: lanes.map((lane) => compose(pixels, lane.model)) };
  }

  private draw(): void {
    // One picture at a time: what is asked meanwhile comes right after it.
    if (this.drawing) {
      this.again = true;
      return;
    }
    const now = performance.now();
    const frame = this.frame(now);
    const animated = this.model.moving(now);
    this.painter.galaxies.setTable(frame.shown.table, animated);
    const moving = animated || now - this.touchedAt < REST_MS;
    const points = this.pointFrame(frame, moving);
    const key = this.pointKey(points);
    const software = this.painter.layer === 'software';
    if (software && key === this.drawnKey) {
      this.finish(frame, points, animated);
      return;
    }
    this.again = false;
    this.drawing = true;
    if (!software) this.prepareGl(points);
    this.painter
      .draw(points, () => this.again)
      .then(
        (shown) => {
          this.drawing = false;
          if (this.disposed) return;
          if (shown) {
            this.drawnKey = key;
            this.finish(frame, points, animated);
          }
          if (this.again) this.invalidate();
        },
        () => {
          // Workers that ended are replaced by the painter, which asks for a new picture.
          this.drawing = false;
          this.drawnKey = '';
        },
      );
  }

  /** Solids, lines and labels over the points just shown, for the same moment. */
  private finish(frame: Frame, points: PointFrame, animated: boolean): void {
    this.drawSolids(frame);
    this.drawOverlay(frame);
    this.tellState();
    const total = this.painter.galaxies.store?.count ?? 0;
    const whole = points.fraction === 1 && points.pixelRatio === this.stage.pixelRatio;
    this.events.onFrame?.({
      drawn: Math.round(points.parts.reduce((sum, part) => sum + part.range.count, 0) * points.fraction),
      total,
      milliseconds: performance.now() - this.requestedAt,
      layer: this.painter.layer,
      atRest: !animated && whole,
    });
    clearTimeout(this.restTimer);
    if (animated) this.invalidate();
    else if (!whole) this.restTimer = window.setTimeout(() => this.invalidate(), REST_MS);
  }

  /** Pictures of the points with the same key are the same. */
  private pointKey(points: PointFrame): string {
    const { viewport, pixelRatio, fraction, sizePx, emphasis, tone, parts } = points;
    const size = [viewport.widthPx, viewport.heightPx, pixelRatio, fraction, sizePx, tone.full];
    const look = [this.painter.version, this.lookVersion, emphasis?.min, emphasis?.max];
    return [...size, ...look, ...parts.flatMap((part) => [part.range.start, ...part.matrix])].join(' ');
  }

  private prepareGl(points: PointFrame): void {
    const { renderer } = this.gl;
    if (!renderer || !this.gl.usable) return;
    this.sizeRenderer();
    const [r, g, b] = points.tone.background;
    renderer.setClearColor(new Color(r / 255, g / 255, b / 255), 1);
    renderer.clear();
  }

  private parts(frame: Frame): PointPart[] {
    const { store } = this.painter.galaxies;
    if (!store) return [];
    if (this.model.fields.length === 0 && store.ranges[0]) {
      return [{ matrix: frame.pixels, range: store.ranges[0] }];
    }
    return frame.lanes.flatMap((lane, i) => {
      const range = store.ranges[lane.field];
      return range ? [{ matrix: frame.laneMatrices[i]!, range }] : [];
    });
  }

  private emphasis(frame: Frame): Emphasis | null {
    const { shells, selected } = this.shells;
    const shell = selected === null ? undefined : shells[selected];
    if (!shell) return null;
    const { table } = frame.shown;
    return {
      min: radiusAt(table, shell.comovingMinMpc),
      max: radiusAt(table, shell.comovingMaxMpc),
      dim: DIMMED,
    };
  }

  private pointFrame(frame: Frame, moving: boolean): PointFrame {
    const look = {
      theme: this.theme,
      colouring: this.colouring,
      shellCount: this.shells.shells.length,
      stretch: this.stretch,
    };
    const { widthPx, heightPx, pixelRatio } = this.stage;
    const viewport = { widthPx, heightPx };
    return this.painter.frame(this.parts(frame), viewport, pixelRatio, look, this.emphasis(frame), moving);
  }

  private sizeRenderer(): void {
    const { renderer } = this.gl;
    const { widthPx, heightPx, pixelRatio } = this.stage;
    if (!renderer) return;
    const canvas = renderer.domElement;
    const [w, h] = [Math.round(widthPx * pixelRatio), Math.round(heightPx * pixelRatio)];
    if (canvas.width === w && canvas.height === h) return;
    renderer.setPixelRatio(1);
    renderer.setSize(w, h, false);
  }

  private drawSolids(frame: Frame): void {
    const { renderer } = this.gl;
    if (!renderer || !this.gl.usable) return;
    if (this.painter.layer !== 'webgl') {
      this.sizeRenderer();
      renderer.setClearColor(0x000000, 0);
      renderer.clear();
    }
    const places: SolidPlace[] = frame.lanes.map((lane, i) => ({
      field: lane.field,
      pixels: frame.laneMatrices[i]!,
      seen: compose([...frame.shown.pose.axes.flatMap((axis) => [...axis, 0])], lane.model),
    }));
    this.solids.draw(renderer, this.stage, places, this.solidLooks(frame.shown));
  }

  private solidLooks(shown: Shown): SolidLook[] {
    const { shells, selected, hovered } = this.shells;
    const dark = this.theme.mode === 'dark';
    // Spheres in spheres: every line of sight crosses all of them.
    const wholeSky = this.model.fields.every((field) => field.rings.length === 0);
    return shells.map((shell, i) => {
      const strength = i === selected ? 2.2 : i === hovered ? 1.7 : selected === null ? 1 : 0.7;
      return {
        inner: radiusAt(shown.table, shell.comovingMinMpc),
        outer: radiusAt(shown.table, shell.comovingMaxMpc),
        colour: this.colours[i]!,
        alpha: (dark ? 0.045 : 0.06) * strength * (wholeSky ? 0.3 : 1),
      };
    });
  }

  private drawOverlay(frame: Frame): void {
    const { overlay, pixelRatio, widthPx, heightPx } = this.stage;
    const context = overlay.getContext('2d');
    if (!context) return;
    this.stage.fit(overlay);
    context.setTransform(pixelRatio, 0, 0, pixelRatio, 0, 0);
    context.clearRect(0, 0, widthPx, heightPx);
    if (!this.scale) return;
    const pen = new Pen(context, this.theme, widthPx, heightPx);
    const { fields } = this.model;
    paintOverlay(pen, {
      view: this.model.view,
      reading: this.model.reading,
      aligned: this.model.aligned,
      pixels: frame.pixels,
      unitsPerPixel: frame.shown.pose.unitsPerPixel,
      perspective: frame.shown.pose.perspective > 0,
      lanes: frame.lanes.map((lane, i) => ({
        ...lane,
        matrix: frame.laneMatrices[i]!,
        shape: fields[lane.field]!,
      })),
      scale: this.scale,
      radius: (mpc) => radiusAt(frame.shown.table, mpc),
      farMpc: this.model.farMpc,
      shells: this.shells,
      shellColours: this.colours,
      caption: this.model.state().caption,
      marks: {
        hovered: this.hovered === null ? null : this.pixelOf(this.hovered, frame),
        picked: this.picked.map((row) => this.pixelOf(row, frame)),
        pairText: this.pairText,
      },
    });
  }

  private pixelOf(row: number, frame: Frame): Point | null {
    const place = this.painter.galaxies.place(row);
    if (!place) return null;
    const nth = frame.lanes.findIndex((lane) => lane.field === place.field);
    const matrix = frame.laneMatrices[nth] ?? (this.model.fields.length === 0 ? frame.pixels : undefined);
    if (!matrix) return null;
    return project(matrix, place.x, place.y, place.z, radiusAt(frame.shown.table, place.comovingMpc));
  }

  private tellState(): void {
    const state = this.model.state();
    const text = JSON.stringify(state);
    if (text === this.lastState) return;
    this.lastState = text;
    this.events.onViewChanged?.(state);
  }

  private hover(at: readonly [number, number] | null): void {
    const waiting = this.pointer !== null;
    this.pointer = at;
    if (at === null) {
      this.tellHover(null);
      this.events.onHoverShell?.(null);
      return;
    }
    // One search at a time, at the latest place.
    if (waiting) return;
    requestAnimationFrame(() => void this.searchHover());
  }

  private async searchHover(): Promise<void> {
    const place = this.pointer;
    if (!place || this.disposed) return;
    const hit = await this.galaxyAt(place[0], place[1]);
    const latest = this.pointer;
    this.pointer = null;
    if (!latest || this.disposed) return;
    this.tellHover(hit);
    this.events.onHoverShell?.(hit ? null : this.shellAt(place[0], place[1]));
    if (latest !== place) this.hover(latest);
  }

  private tellHover(hit: GalaxyHit | null): void {
    const row = hit?.index ?? null;
    if (row === this.hovered) return;
    this.hovered = row;
    this.events.onHover?.(hit);
    this.invalidate();
  }

  private async click(xPx: number, yPx: number, extend: boolean): Promise<void> {
    const hit = await this.galaxyAt(xPx, yPx);
    if (this.disposed) return;
    if (hit) {
      this.events.onPick?.(hit, extend);
      return;
    }
    const shell = this.shellAt(xPx, yPx);
    this.events.onPickShell?.(shell);
    if (shell === null) this.events.onPick?.(null, extend);
  }

  /** The galaxy drawn nearest to a pixel of the stage, within reach of a pointer. */
  async galaxyAt(xPx: number, yPx: number): Promise<GalaxyHit | null> {
    const { store } = this.painter.galaxies;
    const parts = this.parts(this.frame(performance.now()));
    const best = await this.painter.pick(parts, xPx, yPx, HOVER_REACH_PX).catch(() => null);
    if (!best || !store || store !== this.painter.galaxies.store) return null;
    return { index: store.rows[best.slot]!, xPx: best.xPx, yPx: best.yPx };
  }

  private shellAt(xPx: number, yPx: number): number | null {
    const frame = this.frame(performance.now());
    const { table, pose } = frame.shown;
    const radii = this.shells.shells.map(
      (shell) => [radiusAt(table, shell.comovingMinMpc), radiusAt(table, shell.comovingMaxMpc)] as const,
    );
    const backRows = [...pose.axes[2], 0, 0, 0, 0, 0, 0, 0, 0, 0];
    let best: ShellHit | null = null;
    for (const [i, lane] of frame.lanes.entries()) {
      const field = this.model.fields[lane.field]!;
      const back = compose(backRows, lane.model);
      const hit = pickShell(field.mesh, frame.laneMatrices[i]!, back, radii, xPx, yPx);
      if (hit && (!best || hit.nearness > best.nearness)) best = hit;
    }
    return best?.shell ?? null;
  }
}
