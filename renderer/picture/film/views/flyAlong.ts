import { Refusal } from '../../../../shared-core/base/refusal.ts';
import { edgeText } from '../../../../shared-core/report/shellRange.ts';
import { cssColour } from '../../../colour/shellColours.ts';
import { lookingFrom } from '../../../cone/geometry/poses.ts';
import type { PreparedField } from '../../../cone/geometry/preparedField.ts';
import { compose, type Pose, pixelMatrix, project } from '../../../cone/geometry/projection.ts';
import { dot, intoFrame } from '../../../cone/geometry/vector.ts';
import { compassOf } from '../../../cone/overlay/compass.ts';
import type { Pen } from '../../../cone/overlay/pen.ts';
import type { OverlayScene, PaintedLane } from '../../../cone/overlay/scene.ts';
import { paintShells } from '../../../cone/overlay/shellPaint.ts';
import { type ConeSetting, conePlaces, coneSetting } from '../../views/coneSetting.ts';
import { penOn, type ViewBox, type ViewInput } from '../../views/view.ts';
import { flownShare } from '../paths.ts';
import { DEPTH_RULER_HEIGHT, depthRuler } from './depthRuler.ts';
import type { FilmView } from './filmView.ts';

/** Where a flight ends at the latest, as a share of the way to the far end, and how many galaxies are behind it then. */
const FARTHEST_END = 0.74;
const PASSED_SHARE = 0.8;
/** Share of the stage that the field takes when it is seen from the observer's place. */
const SEAT_SHARE = 0.62;
/** Distance of the plane that is shown true to scale, in displayed radii; only the nearest thing seen depends on it. */
const PLANE = 0.1;
/** Fields wider than this tangent from the middle are not shown whole. */
const WIDEST_TANGENT = 1;
/** Lines nearer together than this give up their names, bit by bit. */
const NAME_GAP = 15;

/**
 * The camera leaves the observer along the line of sight of one field and flies outward, at one speed on the study's
 * radial axis but for its start and its end. The outlines of the shells are gates that it passes.
 */
export function flyAlongView(whole: ViewInput, fieldNumber: number): FilmView {
  const { box, options } = whole;
  const foot = options.rulers ? DEPTH_RULER_HEIGHT : 0;
  const input: ViewInput = { ...whole, box: { ...box, height: box.height - foot } };
  const setting = coneSetting(input, (model) => {
    const fields = model.fields.length;
    if (fieldNumber > fields)
      throw new Refusal(
        `The film was to fly through field ${fieldNumber}, and the study has ${fields === 1 ? 'one field' : `${fields} fields`}: give a number from 1 to ${fields}.`,
        'use',
      );
    model.setView('sideOn');
    model.setCurrent(fieldNumber - 1);
    // What a longer lens does for a narrow field, an opened cone would do twice.
    model.setSidewaysFactor(1);
  });
  const { model } = setting;
  const field = model.fields[model.current]!;
  const viewport = { widthPx: input.box.width, heightPx: input.box.height };
  const axes = lookingFrom([-1, 0, 0], field.north);
  const unitsPerPixel = PLANE / pixelsOfTangent(field, axes, viewport);
  const end = endOf(setting, whole);
  const ruler = depthRuler(whole, setting, foot);
  const only = (fields: number): string => (fields > 1 ? `field ${fieldNumber} of ${fields}` : 'the field');
  return {
    notes: [
      ...(model.fields.length > 1 ? [only(model.fields.length)] : []),
      'in perspective, true to shape; the camera flies from the observer outward along the line of sight',
    ],
    words: `a flight from the observer outward through ${only(model.fields.length)}, the outlines of the shells passing as gates`,
    drawingAt(share) {
      const at = end * flownShare(share);
      const pose: Pose = { axes, target: [at + PLANE, 0, 0], unitsPerPixel, perspective: 1 / PLANE };
      const pixels = pixelMatrix(pose, viewport);
      const lanes = setting.lanes.map(
        (lane): PaintedLane => ({ ...lane, matrix: compose(pixels, lane.model) }),
      );
      const moved: OverlayScene = {
        ...setting.scene,
        lanes,
        pixels,
        unitsPerPixel,
        aligned: false,
        perspective: true,
      };
      const over = penOn(input);
      paintShells(over.pen, moved);
      if (options.rulers) {
        compassOf(over.pen);
        nameGates(over.pen, moved, setting, whole, at);
      }
      // What fades with depth does so from the camera on.
      const places = conePlaces(setting, { lanes, pose, range: { near: at, far: 1 } }, input);
      const instruments = penOn(whole);
      ruler(instruments.pen, at);
      return {
        under: [],
        over: [...over.items, ...instruments.items],
        dim: null,
        place: places.place,
        placeAll(x, y, light) {
          places.placeAll(x, y, light);
          leaveOut(x, y, input.box);
        },
      };
    },
  };
}

/** Displayed radius at which the flight ends: some galaxies are still ahead, so that it does not end in the dark. */
function endOf({ radius }: ConeSetting, { numbers }: ViewInput): number {
  const last = numbers.facts.background?.comovingMpc[Math.floor(PASSED_SHARE * numbers.galaxiesWithin)];
  return last === undefined ? FARTHEST_END : Math.min(FARTHEST_END, radius(last));
}

/** Pixels of a tangent of one, with which the field's outline takes its share of the stage. */
function pixelsOfTangent(
  field: PreparedField,
  [right, up]: Pose['axes'],
  { widthPx, heightPx }: { readonly widthPx: number; readonly heightPx: number },
): number {
  let [across, above] = [0, 0];
  const reach = (tangent: number): number =>
    tangent >= 0 && tangent < WIDEST_TANGENT ? tangent : WIDEST_TANGENT;
  for (const ring of field.rings) {
    for (let i = 0; i < ring.length; i += 3) {
      const d = intoFrame(field.frame, [ring[i]!, ring[i + 1]!, ring[i + 2]!]);
      const ahead = d[0];
      across = Math.max(across, reach(Math.abs(dot(right, d)) / ahead));
      above = Math.max(above, reach(Math.abs(dot(up, d)) / ahead));
    }
  }
  if (across === 0 || above === 0) [across, above] = [WIDEST_TANGENT, WIDEST_TANGENT];
  return (SEAT_SHARE / 2) * Math.min(widthPx / across, heightPx / above);
}

/** Galaxies beside the stage would lie on title and caption. */
function leaveOut(x: Float32Array, y: Float32Array, { left, top, width, height }: ViewBox): void {
  for (let i = 0; i < x.length; i++) {
    if (x[i]! >= left && x[i]! <= left + width && y[i]! >= top && y[i]! <= top + height) continue;
    x[i] = Number.NaN;
    y[i] = Number.NaN;
  }
}

/** The redshift of each gate ahead at its highest point, fading where the next one's is close. */
function nameGates(
  pen: Pen,
  scene: OverlayScene,
  { radius }: ConeSetting,
  { numbers }: ViewInput,
  at: number,
): void {
  const lane = scene.lanes[0];
  if (!lane || !scene.shells.shells.length) return;
  const edges = [numbers.shells[0]!, ...numbers.shells].map((shell, i) =>
    i === 0 ? { z: shell.zMin, mpc: shell.comovingMinMpc } : { z: shell.zMax, mpc: shell.comovingMaxMpc },
  );
  let before = Number.NEGATIVE_INFINITY;
  for (const [i, { z, mpc }] of edges.entries()) {
    const r = radius(mpc);
    if (r <= at) continue;
    const top = highest(lane, r);
    if (!top || top[1] < 12 || top[0] < 40 || top[0] > pen.width - 40) continue;
    const clear = Math.min(1, Math.max(0, (top[1] - before - NAME_GAP) / NAME_GAP));
    before = top[1];
    if (clear === 0) continue;
    const colour = cssColour(scene.shellColours[Math.max(0, i - 1)]!, clear);
    pen.font(11.5, 600);
    pen.write(`z ${edgeText(z)}`, top[0], top[1] - 9, colour);
  }
}

function highest({ shape, matrix }: PaintedLane, radius: number): readonly [number, number] | null {
  let best: readonly [number, number] | null = null;
  for (const ring of shape.rings) {
    for (let i = 0; i < ring.length; i += 3) {
      const p = project(matrix, ring[i]!, ring[i + 1]!, ring[i + 2]!, radius);
      if (p && (best === null || p[1] < best[1])) best = p;
    }
  }
  return best;
}
