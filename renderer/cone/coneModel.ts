import { type CaptionFacts, captionLines } from './caption.ts';
import {
  commonFrame,
  fittingView,
  type Lane,
  laneHeights,
  lanes,
  proposeSidewaysFactor,
} from './geometry/arrangement.ts';
import { type DepthRange, depthRange } from './geometry/depthCue.ts';
import { SKY_FRAME } from './geometry/fieldFrame.ts';
import {
  axisWindowOf,
  FRONT,
  fitPose,
  lookingFrom,
  type Margins,
  mixPoses,
  orbited,
  panned,
  sideOnPose,
  viewPose,
  zoomed,
} from './geometry/poses.ts';
import { type PreparedField, prepareFields } from './geometry/preparedField.ts';
import type { Pose, Viewport } from './geometry/projection.ts';
import type { Vec3 } from './geometry/vector.ts';
import { mixTables, type RadiusTable, radiusTable, sameTable } from './points/radiusTable.ts';
import type {
  AxisInsets,
  AxisWindow,
  FootprintInput,
  RadialReading,
  RadialScaleInput,
  ViewName,
  ViewState,
} from './types.ts';

/** Room for rulers above and below a cone seen side-on. */
const SIDE_ROOM = { top: 46, bottom: 74 };
const FREE_ROOM: Margins = { left: 60, right: 60, top: 44, bottom: 76 };
const RING_ROOM: Margins = { left: 30, right: 30, top: 26, bottom: 26 };
const SEAT_ROOM: Margins = { left: 60, right: 60, top: 30, bottom: 30 };
/** Scale limits: no nearer than this part of the far radius a pixel, no farther than that. */
const NEAREST_SCALE = 1e-8;
const FARTHEST_SCALE = 0.05;
const ORBIT_RADIANS_PER_PIXEL = 0.0075;

/** What is on screen at one moment of a transition. */
export interface Shown {
  readonly pose: Pose;
  readonly factors: readonly number[];
  readonly table: RadiusTable;
}

/** What is looked at and from where: everything about the picture but the drawing. Times in milliseconds. */
export class ConeModel {
  fields: readonly PreparedField[] = [];
  wide = false;
  estimated = false;
  view: ViewName = 'sideOn';
  exact = true;
  current = 0;
  reading: RadialReading = 'comoving';
  /** Displayed radius of the far end, in the unit of the reading. */
  farRadius = 1;
  farMpc = 1;
  private viewport: Viewport = { widthPx: 1, heightPx: 1 };
  private insets: AxisInsets = { leftPx: 48, rightPx: 48 };
  private window: AxisWindow = { min: 0, max: 1 };
  private chosenFactors = new Map<number, number>();
  private panUp = 0;
  private table: RadiusTable = radiusTable([0, 1], [0, 1]);
  private pose: Pose = { axes: FRONT, target: [0.5, 0, 0], unitsPerPixel: 0.001, perspective: 0 };
  private from: Shown | null = null;
  private start = 0;
  private duration = 0;

  /** Changes something and lets the picture move there from what is shown now; 0 ms jumps. */
  transition(now: number, milliseconds: number, change: () => void): void {
    const before = this.shown(now);
    change();
    this.from = milliseconds > 0 ? before : null;
    this.start = now;
    this.duration = milliseconds;
  }

  moving(now: number): boolean {
    return this.from !== null && now < this.start + this.duration;
  }

  shown(now: number): Shown {
    const end: Shown = { pose: this.pose, factors: this.factors(), table: this.table };
    if (!this.from || now >= this.start + this.duration) {
      this.from = null;
      return end;
    }
    const linear = (now - this.start) / this.duration;
    const t = linear * linear * (3 - 2 * linear);
    const { pose, factors, table } = this.from;
    return {
      pose: mixPoses(pose, end.pose, t),
      factors: end.factors.map((to, i) => (factors[i] ?? to) ** (1 - t) * to ** t),
      table: mixTables(table, end.table, t),
    };
  }

  setViewport(viewport: Viewport): void {
    this.viewport = viewport;
    if (this.exact) this.takePose();
  }

  setFootprint(input: FootprintInput): void {
    this.setFields(prepareFields(input), input);
  }

  /** @param fields made of the footprint by `prepareFields` */
  setFields(fields: readonly PreparedField[], input: FootprintInput): void {
    this.fields = fields;
    this.wide = input.wide;
    this.estimated = input.estimated ?? false;
    this.chosenFactors.clear();
    this.current = 0;
    this.panUp = 0;
    this.view = fittingView(this.fields.length, this.wide);
    this.exact = true;
    this.takePose();
  }

  setScale(input: RadialScaleInput, window: AxisWindow, insets: AxisInsets = this.insets): void {
    const { comovingMpc, radius } = input.table;
    this.reading = input.reading;
    const table = radiusTable(comovingMpc, radius);
    // The same table again, as when only ticks or window change, moves no galaxy.
    if (!sameTable(table, this.table)) this.table = table;
    this.farMpc = comovingMpc[comovingMpc.length - 1]!;
    this.farRadius = radius[radius.length - 1]!;
    this.window = window;
    this.insets = insets;
    if (this.exact) this.takePose();
  }

  setAxis(window: AxisWindow, insets: AxisInsets = this.insets): void {
    const same =
      window.min === this.window.min &&
      window.max === this.window.max &&
      insets.leftPx === this.insets.leftPx &&
      insets.rightPx === this.insets.rightPx;
    if (same) return;
    // A hand on the axis ends a transition.
    this.from = null;
    this.window = window;
    this.insets = insets;
    if (this.exact) this.takePose();
  }

  setView(view: ViewName): void {
    const available = view === 'parallel' && this.fields.length < 2 ? 'sideOn' : view;
    this.view = available;
    this.exact = true;
    this.panUp = 0;
    this.takePose();
  }

  setCurrent(field: number): void {
    const n = this.fields.length;
    if (n === 0) return;
    this.current = ((field % n) + n) % n;
    if (this.view === 'parallel') this.view = 'sideOn';
    this.panUp = 0;
    this.exact = true;
    this.takePose();
  }

  /** null takes the proposal again. */
  setSidewaysFactor(factor: number | null): void {
    if (factor === null) this.chosenFactors.delete(this.current);
    else this.chosenFactors.set(this.current, factor);
    if (this.exact) this.takePose();
  }

  orbit(dxPx: number, dyPx: number): void {
    this.exact = false;
    this.from = null;
    const k = ORBIT_RADIANS_PER_PIXEL;
    this.pose = orbited(this.pose, -dxPx * k, -dyPx * k, this.upright());
  }

  /** Answers the new window of the axis when the picture is still side-on. */
  pan(dxPx: number, dyPx: number): AxisWindow | null {
    this.from = null;
    this.pose = panned(this.pose, dxPx, dyPx);
    return this.followPose();
  }

  zoom(factor: number, xPx: number, yPx: number): AxisWindow | null {
    this.from = null;
    const next = this.pose.unitsPerPixel / factor;
    if (next < NEAREST_SCALE || next > FARTHEST_SCALE) return null;
    this.pose = zoomed(this.pose, factor, xPx, yPx, this.viewport);
    return this.followPose();
  }

  /** True when the picture's x axis is the strip's. */
  get aligned(): boolean {
    return this.exact && (this.view === 'sideOn' || this.view === 'parallel');
  }

  /** Fields drawn and where, for factors of one moment. */
  lanes(factors: readonly number[]): Lane[] {
    const heights = this.heights().map((px) => px * this.fullScale());
    return lanes(this.view, this.fields, this.current, this.wide, factors, heights);
  }

  /** How far what is shown reaches along the line of sight. */
  depth({ pose }: Shown): DepthRange {
    const { near, far } = depthRange(pose, this.corners());
    const lanes = this.lanes(this.factors());
    // What lies on all sides reaches toward the viewer as far as away, wherever its outline runs.
    const around = lanes.length === 0 || lanes.some((lane) => this.fields[lane.field]!.surrounds);
    return around ? { near: Math.min(near, -1), far: Math.max(far, 1) } : { near, far };
  }

  state(): ViewState {
    const factors = this.factors();
    return {
      view: this.view,
      exact: this.exact,
      sidewaysFactor: factors[this.current] ?? 1,
      field: this.current,
      fieldCount: this.fields.length,
      caption: captionLines(this.captionFacts(factors)),
    };
  }

  private captionFacts(factors: readonly number[]): CaptionFacts {
    return {
      view: this.view,
      reading: this.reading,
      lanes: this.lanes(factors).map(({ field, sidewaysFactor }) => ({
        name: this.fields[field]!.name,
        sidewaysFactor,
      })),
      field: this.current,
      fieldCount: this.fields.length,
      fieldName: this.fields[this.current]?.name ?? '',
      perspective: this.pose.perspective > 0,
      estimated: this.estimated,
    };
  }

  private followPose(): AxisWindow | null {
    if (!this.aligned) {
      this.exact = false;
      return null;
    }
    const [min, max] = axisWindowOf(this.pose, this.viewport, this.insets);
    this.window = { min: min * this.farRadius, max: max * this.farRadius };
    this.panUp = this.pose.target[1] - this.restingHeight(this.pose.unitsPerPixel);
    return this.window;
  }

  /** Display units of a pixel when the whole radial scale lies between the insets. */
  private fullScale(): number {
    const { leftPx, rightPx } = this.insets;
    return 1 / Math.max(1, this.viewport.widthPx - leftPx - rightPx);
  }

  private room(): number {
    return Math.max(60, this.viewport.heightPx - SIDE_ROOM.top - SIDE_ROOM.bottom);
  }

  private natural(): number[] {
    const scale = this.fullScale();
    return this.fields.map(({ extent }) => (extent.alongMax - extent.alongMin) / scale);
  }

  /** Heights of the parallel lanes in pixels, gaps included. */
  private heights(): number[] {
    return this.fields.length > 0 ? laneHeights(this.natural(), this.room()) : [];
  }

  private factors(): number[] {
    const natural = this.natural();
    const rooms =
      this.view === 'parallel' ? this.heights().map((h) => h * 0.86) : natural.map(() => this.room());
    // A lane of several is opened as soon as it can be; a cone alone keeps its true shape where that fills the stage.
    const slack = this.view === 'parallel' ? 1.2 : 2.5;
    return natural.map((px, i) => this.chosenFactors.get(i) ?? proposeSidewaysFactor(px, rooms[i]!, slack));
  }

  /** Display height at the middle of the stage for a cone at rest in its room between the rulers. */
  private restingHeight(unitsPerPixel: number): number {
    const shift = ((SIDE_ROOM.bottom - SIDE_ROOM.top) / 2) * unitsPerPixel;
    if (this.view === 'parallel') return -shift;
    const field = this.fields[this.current];
    if (!field) return -shift;
    const factor = this.factors()[this.current]!;
    return ((field.extent.alongMax + field.extent.alongMin) / 2) * factor - shift;
  }

  private upright(): Vec3 {
    const sky = this.view === 'whole' || this.view === 'aroundTheObserver';
    return sky && commonFrame(this.fields) === SKY_FRAME ? [0, 0, 1] : [0, 1, 0];
  }

  private takePose(): void {
    if (this.view === 'sideOn' || this.view === 'parallel') {
      const { min, max } = this.window;
      const [low, high] = [min / this.farRadius, max / this.farRadius];
      const pose = sideOnPose(low, high, this.viewport, this.insets, 0);
      const height = this.restingHeight(pose.unitsPerPixel) + this.panUp;
      this.pose = { ...pose, target: [pose.target[0], height, 0] };
      return;
    }
    const skyFrame = commonFrame(this.fields) === SKY_FRAME;
    let start = viewPose(this.view, skyFrame ? [0, 0, 0] : [0.5, 0, 0]);
    if (this.view === 'whole' && skyFrame) {
      start = { ...start, axes: lookingFrom([0.35, -0.75, 0.55], [0, 0, 1]) };
    }
    if (this.view === 'downTheCone') start = { ...start, axes: skyAxes(this.fields[this.current]) };
    const rings = this.fields.every((field) => field.surrounds);
    const room = this.view === 'downTheCone' ? SEAT_ROOM : rings ? RING_ROOM : FREE_ROOM;
    this.pose = fitPose(start, this.corners(), this.viewport, room);
  }

  /** Points that a view must hold: observer and outlines at the far end, in display space. */
  private corners(): Float64Array {
    const out: number[] = [0, 0, 0];
    const put = (m: ArrayLike<number>, x: number, y: number, z: number): void => {
      for (let row = 0; row < 3; row++) {
        out.push(m[row * 4]! * x + m[row * 4 + 1]! * y + m[row * 4 + 2]! * z + m[row * 4 + 3]!);
      }
    };
    for (const lane of this.lanes(this.factors())) {
      for (const ring of this.fields[lane.field]!.rings) {
        const step = 3 * Math.max(1, Math.floor(ring.length / 3 / 90));
        for (let i = 0; i < ring.length; i += step) put(lane.model, ring[i]!, ring[i + 1]!, ring[i + 2]!);
      }
    }
    if (out.length === 3) {
      for (let i = 0; i < 36; i++) out.push(Math.cos((i * Math.PI) / 18), Math.sin((i * Math.PI) / 18), 0);
    }
    return Float64Array.from(out);
  }
}

/** From the observer's seat with north up, so that east is to the left. */
function skyAxes(field: PreparedField | undefined): Pose['axes'] {
  return lookingFrom([-1, 0, 0], field?.north ?? [0, 1, 0]);
}
