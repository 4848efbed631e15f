import type { ViewName } from '../types.ts';
import { commonFrame, type Lane } from './arrangement.ts';
import { SKY_FRAME } from './fieldFrame.ts';
import { fitPose, lookingFrom, type Margins, viewPose } from './poses.ts';
import type { PreparedField } from './preparedField.ts';
import type { Pose, Viewport } from './projection.ts';

const FREE_ROOM: Margins = { left: 60, right: 60, top: 58, bottom: 76 };
const RING_ROOM: Margins = { left: 30, right: 30, top: 26, bottom: 26 };
const SEAT_ROOM: Margins = { left: 60, right: 60, top: 30, bottom: 30 };

/**
 * The pose at rest of a view that is not bound to the strip's axis: everything is on the stage.
 * @param corners of what is shown, see `cornersOf`
 */
export function freePose(
  view: Exclude<ViewName, 'sideOn' | 'parallel'>,
  fields: readonly PreparedField[],
  current: number,
  corners: Float64Array,
  viewport: Viewport,
): Pose {
  const skyFrame = commonFrame(fields) === SKY_FRAME;
  let start = viewPose(view, skyFrame ? [0, 0, 0] : [0.5, 0, 0]);
  if (view === 'whole' && skyFrame) start = { ...start, axes: lookingFrom([0.35, -0.75, 0.55], [0, 0, 1]) };
  if (view === 'downTheCone') start = { ...start, axes: skyAxes(fields[current]) };
  const rings = fields.every((field) => field.surrounds);
  const room = view === 'downTheCone' ? SEAT_ROOM : rings ? RING_ROOM : FREE_ROOM;
  const { enlarged = 1 } = viewport;
  const { left, right, top, bottom } = room;
  return fitPose(start, corners, viewport, {
    left: left * enlarged,
    right: right * enlarged,
    top: top * enlarged,
    bottom: bottom * enlarged,
  });
}

/** Points that a view must hold: observer and outlines at the far end, in display space. */
export function cornersOf(lanes: readonly Lane[], fields: readonly PreparedField[]): Float64Array {
  const out: number[] = [0, 0, 0];
  const put = (m: ArrayLike<number>, x: number, y: number, z: number): void => {
    for (let row = 0; row < 3; row++) {
      out.push(m[row * 4]! * x + m[row * 4 + 1]! * y + m[row * 4 + 2]! * z + m[row * 4 + 3]!);
    }
  };
  for (const lane of lanes) {
    for (const ring of fields[lane.field]!.rings) {
      const step = 3 * Math.max(1, Math.floor(ring.length / 3 / 90));
      for (let i = 0; i < ring.length; i += step) put(lane.model, ring[i]!, ring[i + 1]!, ring[i + 2]!);
    }
  }
  if (out.length === 3) {
    // All of a sphere: in perspective its outline is none of its great circles.
    for (let lat = -80; lat <= 80; lat += 10) {
      const [across, up] = [Math.cos((lat * Math.PI) / 180), Math.sin((lat * Math.PI) / 180)];
      for (let lon = 0; lon < 360; lon += 10)
        out.push(across * Math.cos((lon * Math.PI) / 180), across * Math.sin((lon * Math.PI) / 180), up);
    }
  }
  return Float64Array.from(out);
}

/** From the observer's seat with north up, so that east is to the left. */
function skyAxes(field: PreparedField | undefined): Pose['axes'] {
  return lookingFrom([-1, 0, 0], field?.north ?? [0, 1, 0]);
}
