import { type CaptionFacts, captionLines } from './caption.ts';
import { commonFrame, fittingView, type Lane, lanes } from './geometry/arrangement.ts';
import { type DepthRange, depthRange } from './geometry/depthCue.ts';
import { SKY_FRAME } from './geometry/fieldFrame.ts';
import { cornersOf, freePose } from './geometry/freePose.ts';
import { axisWindowOf, FRONT, orbited, panned, sideOnPose, zoomed } from './geometry/poses.ts';
import type { PreparedField } from './geometry/preparedField.ts';
import type { Pose, Viewport } from './geometry/projection.ts';
import { laneHeightsOf, restingHeight, type SideOn, sidewaysFactors } from './geometry/sideOn.ts';
import type { Vec3 } from './geometry/vector.ts';
import { Movement, type Shown } from './movement.ts';
import { type RadiusTable, radiusTable, sameTable } from './points/radiusTable.ts';
import type {
  AxisInsets,
  AxisWindow,
  FootprintInput,
  RadialReading,
  RadialScaleInput,
  ViewName,
  ViewState,
} from './types.ts';

/** Scale limits: no nearer than this part of the far radius a pixel, no farther than that. */
const NEAREST_SCALE = 1e-8;
const FARTHEST_SCALE = 0.05;
const ORBIT_RADIANS_PER_PIXEL = 0.0075;

/** What is looked at and from where: everything about the picture but the drawing. Times in milliseconds. */
export class ConeModel {
  fields: readonly PreparedField[] = [];
  /** The first region has come, or it is known that there is none: until then there is nothing to show. */
  ready = false;
  wide = false;
  estimated = false;
  view: ViewName = 'sideOn';
  exact = true;
  current = 0;
  /** As it was asked for: where there are fewer fields for a while, it is looked at again once it is back. */
  private fieldAsked = 0;
  reading: RadialReading = 'comoving';
  /** Displayed radius of the far end, in the unit of the reading. */
  farRadius = 1;
  farMpc = 1;
  private viewport: Viewport = { widthPx: 1, heightPx: 1 };
  private insets: AxisInsets = { leftPx: 48, rightPx: 48 };
  private window: AxisWindow = { min: 0, max: 1 };
  private chosenFactor: number | null = null;
  private panUp = 0;
  private table: RadiusTable = radiusTable([0, 1], [0, 1]);
  private pose: Pose = { axes: FRONT, target: [0.5, 0, 0], unitsPerPixel: 0.001, perspective: 0 };
  private readonly movement = new Movement();

  /** Changes something and lets the picture move there from what is shown now; 0 ms jumps. */
  transition(now: number, milliseconds: number, change: () => void): void {
    const before = this.shown(now);
    change();
    if (milliseconds > 0) this.movement.start(before, now, milliseconds);
    else this.movement.end();
  }

  moving(now: number): boolean {
    return this.movement.lasts(now);
  }

  shown(now: number): Shown {
    return this.movement.at(now, { pose: this.pose, factors: this.factors(), table: this.table });
  }

  setViewport(viewport: Viewport): void {
    this.viewport = viewport;
    if (this.exact) this.takePose();
  }

  /** @param fields made of the footprint by `prepareFields` */
  setFields(fields: readonly PreparedField[], input: FootprintInput): void {
    this.fields = fields;
    this.ready = true;
    this.wide = input.wide;
    this.estimated = input.estimated ?? false;
    this.current = this.fieldAt(this.fieldAsked);
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
    this.movement.end();
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
    this.fieldAsked = field;
    const next = this.fieldAt(field);
    if (next === this.current) return;
    this.current = next;
    if (this.view === 'parallel') this.view = 'sideOn';
    this.panUp = 0;
    this.exact = true;
    this.takePose();
  }

  /** Of the field looked at, whichever it is; null takes the proposal again. */
  setSidewaysFactor(factor: number | null): void {
    this.chosenFactor = factor;
    if (this.exact) this.takePose();
  }

  orbit(dxPx: number, dyPx: number): void {
    this.exact = false;
    this.movement.end();
    const k = ORBIT_RADIANS_PER_PIXEL;
    this.pose = orbited(this.pose, -dxPx * k, -dyPx * k, this.upright());
  }

  /** Answers the new window of the axis when the picture is still side-on. */
  pan(dxPx: number, dyPx: number): AxisWindow | null {
    this.movement.end();
    this.pose = panned(this.pose, dxPx, dyPx);
    return this.followPose();
  }

  zoom(factor: number, xPx: number, yPx: number): AxisWindow | null {
    this.movement.end();
    const next = this.pose.unitsPerPixel / factor;
    if (next < NEAREST_SCALE || next > FARTHEST_SCALE) return null;
    this.pose = zoomed(this.pose, factor, xPx, yPx, this.viewport);
    return this.followPose();
  }

  /** Steps past the last field come to the first. */
  private fieldAt(field: number): number {
    const n = Math.max(1, this.fields.length);
    return ((field % n) + n) % n;
  }

  /** True when the picture's x axis is the strip's. */
  get aligned(): boolean {
    return this.exact && (this.view === 'sideOn' || this.view === 'parallel');
  }

  /** Fields drawn and where, for factors of one moment. */
  lanes(factors: readonly number[]): Lane[] {
    return lanes(this.view, this.fields, this.current, this.wide, factors, laneHeightsOf(this.side()));
  }

  /** How far what is shown reaches along the line of sight. */
  depth({ pose }: Pick<Shown, 'pose'>, lanes: readonly Lane[]): DepthRange {
    const { near, far } = depthRange(pose, cornersOf(lanes, this.fields));
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
    this.panUp = this.pose.target[1] - restingHeight(this.side(), this.pose.unitsPerPixel);
    return this.window;
  }

  private side(): SideOn {
    const { fields, viewport, insets, current, chosenFactor } = this;
    return { fields, parallel: this.view === 'parallel', viewport, insets, current, chosenFactor };
  }

  private factors(): number[] {
    return sidewaysFactors(this.side());
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
      const height = restingHeight(this.side(), pose.unitsPerPixel) + this.panUp;
      this.pose = { ...pose, target: [pose.target[0], height, 0] };
      return;
    }
    const corners = cornersOf(this.lanes(this.factors()), this.fields);
    this.pose = freePose(this.view, this.fields, this.current, corners, this.viewport);
  }
}
