import type { Light } from '../../shared-core/study/schema.ts';
import { ConeLayers } from './coneLayers.ts';
import { ConeLook } from './coneLook.ts';
import { ConeModel } from './coneModel.ts';
import { ConePictures } from './conePictures.ts';
import { GlStage } from './graphics/glStage.ts';
import { ConeWork } from './jobs/coneWork.ts';
import { listen } from './navigation.ts';
import { PictureLoop } from './pictureLoop.ts';
import { Pointing } from './pointing.ts';
import { type LayerChoice, PointPainter } from './points/pointPainter.ts';
import { RegionInTurn } from './regionInTurn.ts';
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

const TRANSITION_MS = 520;

/**
 * The cone: galaxies, shells and rulers in an element. Plain data in, events out; it draws when something changed and
 * never in a loop.
 */
export class ConeView {
  private readonly stage: Stage;
  private readonly gl: GlStage;
  private readonly model = new ConeModel();
  private readonly look = new ConeLook();
  private readonly work = new ConeWork();
  private readonly painter: PointPainter;
  private readonly layers: ConeLayers;
  private readonly region: RegionInTurn;
  private readonly pointing: Pointing;
  private readonly pictures: ConePictures;
  private readonly loop: PictureLoop;
  private readonly events: ConeEvents;
  private readonly stopListening: () => void;
  /** The part of the axis asked for, until the next picture takes it. */
  private asked: { readonly window: AxisWindow; readonly insets?: AxisInsets } | null = null;

  /** @param container an element with a size; the cone fills it */
  constructor(container: HTMLElement, events: ConeEvents = {}) {
    this.events = events;
    this.loop = new PictureLoop((now, touched) => {
      this.takeAsked();
      return this.pictures.next(now, touched);
    });
    this.stage = new Stage(container, () => this.resized());
    this.gl = new GlStage(this.stage.solids, (state) => this.drawingStateChanged(state));
    this.painter = new PointPainter(
      this.gl,
      this.work,
      () => this.loop.invalidate(),
      (sentence) => events.onTrouble?.(sentence),
    );
    this.layers = new ConeLayers(this.stage, this.gl);
    void this.layers.warmUp();
    this.region = new RegionInTurn(this.work, this.painter.galaxies, (fields, footprint, views) => {
      this.change(0, () => this.model.setFields(fields, footprint));
      this.layers.meshes = fields.map((field) => field.mesh);
      for (const change of views) this.change(0, change);
    });
    this.pointing = new Pointing({
      painter: this.painter,
      events,
      frame: () => this.pictures.frame(performance.now()),
      shells: () => this.look.shells.shells,
      redraw: () => this.loop.invalidate(),
    });
    const { stage, gl, model, look, painter, layers, pointing } = this;
    this.pictures = new ConePictures({ stage, gl, model, look, painter, layers, pointing, events });
    this.stopListening = listen(this.stage.surface, {
      orbit: (dx, dy) => this.orbitBy(dx, dy),
      pan: (dx, dy) => this.panBy(dx, dy),
      zoom: (factor, x, y) => this.zoomBy(factor, x, y),
      hover: (at) => this.pointing.hover(at),
      click: (x, y, extend) => void this.pointing.click(x, y, extend),
      settle: () => this.loop.invalidate(),
    });
    this.resized();
    this.drawingStateChanged(this.gl.state);
  }

  /** The galaxies; null for none. The old picture stays until they and the region are ready. */
  setGalaxies(galaxies: GalaxyInput | null): void {
    this.holdGalaxies();
    this.region.setGalaxies(galaxies);
    this.loop.invalidate();
  }

  /** Other galaxies will come: the picture stays, and none of it can be pointed at. */
  holdGalaxies(): void {
    this.pointing.forget();
    this.painter.galaxies.hold();
  }

  setColouring(colouring: ColouringInput): void {
    this.look.setColouring(colouring);
    this.painter.galaxies.setColouring(colouring);
    this.loop.invalidate();
  }

  setLight(light: Light): void {
    this.look.setLight(light);
    this.loop.invalidate();
  }

  /** The observed region; takes the view that fits it. The old picture stays until it is ready. */
  setFootprint(footprint: FootprintInput): void {
    this.region.setFootprint(footprint);
  }

  setShells(shells: ShellsInput): void {
    if (shells.shells !== this.look.shells.shells) this.painter.galaxies.setShells(shells.shells);
    this.look.setShells(shells);
    this.loop.invalidate();
  }

  /** How distance becomes radius, with the rulers; `window` is the part on screen, in the unit of the reading. */
  setRadialScale(scale: RadialScaleInput, window: AxisWindow): void {
    const before = this.look.scale;
    const switched = before !== null && before.reading !== scale.reading;
    this.look.scale = scale;
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
    this.loop.touch();
    this.loop.invalidate();
  }

  setTheme(theme: ConeTheme): void {
    const before = this.look.theme.enlarged;
    this.look.setTheme(theme);
    if (theme.enlarged !== before) this.resized();
    this.loop.invalidate();
  }

  /** Software or WebGL for the points; 'auto' takes WebGL where a GPU stands behind it. */
  setPointLayer(choice: LayerChoice): void {
    this.pictures.forgetPoints();
    this.painter.choose(choice);
  }

  setView(view: ViewName): void {
    this.changeView(() => this.model.setView(view));
  }

  /** One field of several, seen by itself. */
  setField(field: number): void {
    this.changeView(() => this.model.setCurrent(field));
  }

  /** How much the field looked at is widened; null takes the proposal for it. */
  setSidewaysFactor(factor: number | null): void {
    this.changeView(() => this.model.setSidewaysFactor(factor));
  }

  /** Rings around galaxies (rows of the catalogue), and a line with a text between the first two. */
  setMarks(rows: readonly number[], pairText = ''): void {
    this.look.picked = rows;
    this.look.pairText = pairText;
    this.loop.invalidate();
  }

  orbitBy(dxPx: number, dyPx: number): void {
    this.loop.touch();
    this.model.orbit(dxPx, dyPx);
    this.loop.invalidate();
  }

  panBy(dxPx: number, dyPx: number): void {
    this.loop.touch();
    this.takeAsked();
    this.tellWindow(this.model.pan(dxPx, dyPx));
  }

  /** Above 1 is nearer; the pixel stays where it is (the middle of the stage when none is given). */
  zoomBy(factor: number, xPx = this.stage.widthPx / 2, yPx = this.stage.heightPx / 2): void {
    this.loop.touch();
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
    this.loop.dispose();
    this.region.dispose();
    this.stopListening();
    this.painter.dispose();
    this.work.dispose();
    this.pointing.dispose();
    this.gl.dispose();
    this.stage.dispose();
  }

  /** What is asked of the view while a region is made ready holds for that one too. */
  private changeView(change: () => void): void {
    this.region.noteView(change);
    this.change(TRANSITION_MS, change);
  }

  private takeAsked(): void {
    const { asked } = this;
    this.asked = null;
    if (asked) this.model.setAxis(asked.window, asked.insets);
  }

  private change(milliseconds: number, change: () => void): void {
    const still = matchMedia('(prefers-reduced-motion: reduce)').matches;
    this.model.transition(performance.now(), still ? 0 : milliseconds, change);
    this.loop.invalidate();
  }

  private tellWindow(window: AxisWindow | null): void {
    if (window) this.events.onAxisWindow?.(window);
    this.loop.invalidate();
  }

  private resized(): void {
    const { widthPx, heightPx } = this.stage;
    this.model.setViewport({ widthPx, heightPx, enlarged: this.look.theme.enlarged ?? 1 });
    this.loop.invalidate();
  }

  private drawingStateChanged(state: DrawingState): void {
    this.painter.takeGl();
    this.events.onDrawingState?.(state);
    this.loop.invalidate();
  }
}
