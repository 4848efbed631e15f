import { type Light, USUAL_LIGHT } from '../../shared-core/study/schema.ts';
import type { Triple } from '../colour/oklab.ts';
import { shellColours } from '../colour/shellColours.ts';
import { type ConeFrame, coneFrame, emphasisOf, partsOf } from './coneFrame.ts';
import { ConeLayers } from './coneLayers.ts';
import { ConeModel } from './coneModel.ts';
import type { PreparedField } from './geometry/preparedField.ts';
import { GlStage } from './graphics/glStage.ts';
import { listen } from './navigation.ts';
import { Pointing } from './pointing.ts';
import { type PointFrame, pictureKey } from './points/pointLayer.ts';
import { type LayerChoice, PointPainter } from './points/pointPainter.ts';
import { Stage } from './stage.ts';
import { DARK } from './theme.ts';
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
import { ConeWork } from './work/coneWork.ts';

const TRANSITION_MS = 520;
/** So long after the last touch the picture counts as at rest. */
const REST_MS = 140;
/** Pictures are drawn to the beat of the screen while they are quicker than this. */
const BEAT_MS = 14;
/**
 * The cone: galaxies, shells and rulers in an element. Plain data in, events out; it draws when something changed and
 * never in a loop.
 */
export class ConeView {
  private readonly stage: Stage;
  private readonly gl: GlStage;
  private readonly model = new ConeModel();
  private readonly work = new ConeWork();
  private readonly painter: PointPainter;
  private readonly layers: ConeLayers;
  private readonly pointing: Pointing;
  private readonly events: ConeEvents;
  private readonly stopListening: () => void;
  private theme: ConeTheme = DARK;
  private scale: RadialScaleInput | null = null;
  private asked: { readonly window: AxisWindow; readonly insets?: AxisInsets } | null = null;
  private shells: ShellsInput = { shells: [], selected: null, hovered: null };
  private colours: readonly Triple[] = [];
  private colouring: ColouringInput = { kind: 'radius', map: 'harbour' };
  private light: Light = USUAL_LIGHT;
  private picked: readonly number[] = [];
  private pairText = '';
  private frameRequest = 0;
  private restTimer = 0;
  private drawing = false;
  private again = false;
  private drawnKey = '';
  private lookVersion = 0;
  private touchedAt = Number.NEGATIVE_INFINITY;
  /** When the picture being drawn was asked for, and the one after it. */
  private requestedAt = 0;
  private askedAt = 0;
  private lastState = '';
  /** A region that is being made ready, with the galaxies that came since (undefined: none came). */
  private preparing: { galaxies: GalaxyInput | null | undefined } | null = null;
  /** What is asked of the view while a region is on its way; null while none is. */
  private viewAsked: (() => void)[] | null = null;
  private disposed = false;

  /** @param container an element with a size; the cone fills it */
  constructor(container: HTMLElement, events: ConeEvents = {}) {
    this.events = events;
    this.stage = new Stage(container, () => this.resized());
    this.gl = new GlStage(this.stage.solids, (state) => this.drawingStateChanged(state));
    this.painter = new PointPainter(this.gl, this.work, () => this.invalidate());
    this.layers = new ConeLayers(this.stage, this.gl);
    this.pointing = new Pointing({
      painter: this.painter,
      events,
      frame: () => this.frame(performance.now()),
      shells: () => this.shells.shells,
      redraw: () => this.invalidate(),
    });
    this.stopListening = listen(this.stage.surface, {
      orbit: (dx, dy) => this.orbitBy(dx, dy),
      pan: (dx, dy) => this.panBy(dx, dy),
      zoom: (factor, x, y) => this.zoomBy(factor, x, y),
      hover: (at) => this.pointing.hover(at),
      click: (x, y, extend) => void this.pointing.click(x, y, extend),
      settle: () => this.invalidate(),
    });
    this.resized();
    this.drawingStateChanged(this.gl.state);
  }

  /** The galaxies; null for none. The old picture stays until they and the region are ready. */
  setGalaxies(galaxies: GalaxyInput | null): void {
    this.holdGalaxies();
    if (this.preparing) this.preparing.galaxies = galaxies;
    else this.painter.galaxies.setInput(galaxies);
    this.invalidate();
  }

  /** Other galaxies will come: the picture stays, and none of it can be pointed at. */
  holdGalaxies(): void {
    this.pointing.forget();
    this.painter.galaxies.hold();
  }

  setColouring(colouring: ColouringInput): void {
    this.colouring = colouring;
    this.lookVersion++;
    this.painter.galaxies.setColouring(colouring);
    this.invalidate();
  }

  setLight(light: Light): void {
    this.light = light;
    this.lookVersion++;
    this.invalidate();
  }

  /** The observed region; takes the view that fits it. The old picture stays until it is ready. */
  setFootprint(footprint: FootprintInput): void {
    const waiting = { galaxies: this.preparing?.galaxies };
    this.preparing = waiting;
    this.viewAsked = [];
    void this.work.fields(footprint).then((fields) => {
      // A newer region is on its way.
      if (this.preparing !== waiting || this.disposed) return;
      this.preparing = null;
      const centres = Float64Array.from(fields.flatMap((field) => [...field.centre]));
      const { galaxies } = this.painter;
      galaxies.setCentres(centres, () => this.takeFields(fields, footprint));
      if (waiting.galaxies !== undefined) galaxies.setInput(waiting.galaxies);
    });
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
    // A window asked for just before may already be in the unit of this scale: only its insets are taken.
    const insets = this.asked?.insets;
    this.asked = null;
    this.change(switched ? TRANSITION_MS : 0, () => this.model.setScale(scale, window, insets));
  }

  /** The part of the axis on screen and the strip's insets: side-on, the two axes agree to the pixel. */
  setAxisWindow(window: AxisWindow, insets?: AxisInsets): void {
    // Taken with the next picture: a new radial scale may follow at once, in whose unit it is.
    const known = insets ?? this.asked?.insets;
    this.asked = known ? { window, insets: known } : { window };
    this.touch();
    this.invalidate();
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
    this.changeView(() => this.model.setView(view));
  }

  /** One field of several, seen by itself; steps wrap around. */
  stepField(step: number): void {
    this.changeView(() => this.model.setCurrent(this.model.current + step));
  }

  setField(field: number): void {
    this.changeView(() => this.model.setCurrent(field));
  }

  /** null takes the proposal for the field. */
  setSidewaysFactor(factor: number | null): void {
    this.changeView(() => this.model.setSidewaysFactor(factor));
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
    this.takeAsked();
    this.tellWindow(this.model.pan(dxPx, dyPx));
  }

  /** Above 1 is nearer; the pixel stays where it is (the middle of the stage when none is given). */
  zoomBy(factor: number, xPx = this.stage.widthPx / 2, yPx = this.stage.heightPx / 2): void {
    this.touch();
    this.takeAsked();
    this.tellWindow(this.model.zoom(factor, xPx, yPx));
  }

  /** The galaxy drawn nearest to a pixel of the stage, within reach of a pointer. */
  galaxyAt(xPx: number, yPx: number): Promise<GalaxyHit | null> {
    return this.pointing.galaxyAt(xPx, yPx);
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
    this.work.dispose();
    this.layers.dispose();
    this.pointing.dispose();
    this.gl.dispose();
    this.stage.dispose();
  }

  private takeFields(fields: readonly PreparedField[], footprint: FootprintInput): void {
    this.change(0, () => this.model.setFields(fields, footprint));
    this.layers.solids.setMeshes(fields.map((field) => field.mesh));
    if (this.preparing) return;
    const asked = this.viewAsked ?? [];
    this.viewAsked = null;
    for (const change of asked) this.change(0, change);
  }

  /** What is asked of the view while a region is made ready holds for that one too. */
  private changeView(change: () => void): void {
    this.viewAsked?.push(change);
    this.change(TRANSITION_MS, change);
  }

  private takeAsked(): void {
    const { asked } = this;
    this.asked = null;
    if (asked) this.model.setAxis(asked.window, asked.insets);
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
    this.painter.takeGl();
    this.events.onDrawingState?.(state);
    this.invalidate();
  }

  private invalidate(): void {
    if (this.drawing && !this.again) this.askedAt = performance.now();
    if (this.drawing) this.again = true;
    if (this.frameRequest !== 0 || this.drawing || this.disposed) return;
    this.requestedAt = performance.now();
    this.frameRequest = requestAnimationFrame(() => {
      this.frameRequest = 0;
      this.draw();
    });
  }

  private frame(now: number): ConeFrame {
    return coneFrame(this.model, this.stage, now, this.light.depthCue);
  }

  private draw(): void {
    // One picture at a time: what is asked meanwhile comes right after it.
    if (this.drawing) {
      this.again = true;
      return;
    }
    this.drawing = true;
    this.takeAsked();
    const now = performance.now();
    const frame = this.frame(now);
    const animated = this.model.moving(now);
    this.painter.galaxies.setTable(frame.shown.table, animated);
    const moving = animated || now - this.touchedAt < REST_MS;
    const points = this.pointFrame(frame, moving);
    const key = pictureKey(points, `${this.painter.version} ${this.lookVersion}`);
    const software = this.painter.layer === 'software';
    // What changed up to here is in this picture.
    this.again = false;
    if (software && key === this.drawnKey) {
      this.drawing = false;
      this.finish(frame, points, animated, performance.now() - this.requestedAt);
      if (animated) this.invalidate();
      return;
    }
    if (!software) this.layers.clear(points.tone.background);
    this.painter
      .draw(points, () => this.again)
      .then(
        (shown) => {
          this.drawing = false;
          if (this.disposed) return;
          if (shown) this.drawnKey = key;
          if (shown && moving) this.painter.pacing.finished(performance.now());
          const latencyMs = performance.now() - this.requestedAt;
          const next = this.again || animated;
          // A picture that took longer than the screen's beat does not wait for the next one: the workers go on with
          // what was asked meanwhile while the page finishes this one.
          const atOnce = next && performance.now() - now > BEAT_MS;
          if (atOnce) {
            this.requestedAt = this.again ? this.askedAt : performance.now();
            this.draw();
            // Nothing of the points had changed: that picture is finished already, and newer.
            if (!this.drawing) return;
          }
          if (shown) this.finish(frame, points, animated, latencyMs);
          if (next && !atOnce) this.invalidate();
        },
        () => {
          // Workers that ended are replaced by the painter, which has asked for a new picture.
          this.drawing = false;
          this.drawnKey = '';
          if (this.again) this.invalidate();
        },
      );
  }

  /** Solids, lines and labels over the points just shown, for the same moment. */
  private finish(frame: ConeFrame, points: PointFrame, animated: boolean, latencyMs: number): void {
    const start = performance.now();
    const look = {
      theme: this.theme,
      scale: this.scale,
      shells: this.shells,
      colours: this.colours,
      hovered: this.pointing.hovered,
      picked: this.picked,
      pairText: this.pairText,
    };
    const { image, galaxies } = this.painter;
    if (image) this.layers.drawTogether(image, points.pixelRatio, frame, this.model, look, galaxies);
    else this.layers.drawAbove(frame, this.model, look, galaxies);
    this.tellState();
    if (galaxies.store) this.gl.look();
    const total = this.painter.galaxies.store?.count ?? 0;
    const whole = points.fraction === 1 && points.pixelRatio === this.stage.pixelRatio;
    this.events.onFrame?.({
      drawn: Math.round(points.parts.reduce((sum, part) => sum + part.range.count, 0) * points.fraction),
      total,
      milliseconds: latencyMs + performance.now() - start,
      layer: this.painter.layer,
      atRest: !animated && whole,
    });
    clearTimeout(this.restTimer);
    if (!animated && !whole) this.restTimer = window.setTimeout(() => this.invalidate(), REST_MS);
  }

  private pointFrame(frame: ConeFrame, moving: boolean): PointFrame {
    const look = {
      theme: this.theme,
      colouring: this.colouring,
      shellCount: this.shells.shells.length,
      light: this.light,
    };
    const { widthPx, heightPx, pixelRatio } = this.stage;
    const viewport = { widthPx, heightPx };
    return this.painter.frame(
      partsOf(frame, this.painter.galaxies),
      viewport,
      pixelRatio,
      look,
      emphasisOf(frame, this.shells),
      moving,
    );
  }

  private tellState(): void {
    const state = this.model.state();
    const text = JSON.stringify(state);
    if (text === this.lastState) return;
    this.lastState = text;
    this.events.onViewChanged?.(state);
  }
}
