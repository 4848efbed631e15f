import { cssColour } from '../../../colour/shellColours.ts';
import { FRONT } from '../../../cone/geometry/poses.ts';
import type { PreparedField } from '../../../cone/geometry/preparedField.ts';
import { compose, type Pose, pixelMatrix, type Viewport } from '../../../cone/geometry/projection.ts';
import { add, intoFrame, scale, type Vec3 } from '../../../cone/geometry/vector.ts';
import { paintOverlay } from '../../../cone/overlay/paintOverlay.ts';
import type { OverlayScene, PaintedLane } from '../../../cone/overlay/scene.ts';
import { paintShells } from '../../../cone/overlay/shellPaint.ts';
import { surveyText } from '../../views/cone.ts';
import { type ConeSetting, conePlaces, coneSetting, ensureComovingTitle } from '../../views/coneSetting.ts';
import { paintAllBodies } from '../../views/shellBodies.ts';
import { penOn, type ViewInput } from '../../views/view.ts';
import { turnRadians } from '../paths.ts';
import type { FilmView } from './filmView.ts';

/** Share of the stage's lesser side that a sky around the observer takes. */
const GLOBE_SHARE = 0.86;

/**
 * Every cone turns once about its own line of sight, seen from the side: depth stays where it is, so that the rulers
 * hold still and stay true, however far a narrow field is opened sideways. A sky on all sides turns about its poles.
 */
export function turntableView(input: ViewInput): FilmView {
  const { numbers, options, theme } = input;
  const setting = coneSetting(input, (model) => {
    if (model.view === 'aroundTheObserver') return;
    model.fields = model.fields.map(envelopeOf);
    model.setView(model.view);
    model.setSidewaysFactor(numbers.study.look.sideways);
  });
  const { model, radius } = setting;
  const around = model.view === 'aroundTheObserver';
  const pose = around ? globePose(setting.viewport) : setting.pose;
  const scene = around ? globeScene(setting, pose) : setting.scene;
  const reach = around ? 1 : Math.max(...setting.lanes.map(reachOf));
  const range = { near: -reach, far: reach };
  const rulers = penOn(input);
  if (options.rulers) {
    const bare: OverlayScene = { ...scene, shells: { ...scene.shells, shells: [] } };
    paintOverlay(rulers.pen, around ? { ...bare, lanes: [] } : bare);
    ensureComovingTitle(rulers, bare);
  }
  return {
    notes: [
      ...model.state().caption,
      around ? 'the sky turns once about its poles' : 'each cone turns once about its line of sight',
    ],
    words: around
      ? 'the sky around the observer, turning once about its poles'
      : `${surveyText(setting.lanes)} seen from the side, each cone turning once about its line of sight, the observer at the left and depth to the right`,
    drawingAt(share) {
      const angle = turnRadians(share);
      const lanes = setting.lanes.map((lane): PaintedLane => {
        const turned = around ? turnedSky(angle) : turnedModel(lane, angle);
        return { ...lane, model: turned, matrix: compose(scene.pixels, turned) };
      });
      const moved: OverlayScene = { ...scene, lanes, aligned: false };
      const under = penOn(input);
      paintAllBodies(under.pen, scene.shells.shells, lanes, false, radius, (i) =>
        cssColour(scene.shellColours[i]!, theme.shellAlpha),
      );
      const over = penOn(input);
      paintShells(over.pen, moved);
      return {
        under: under.items,
        over: [...over.items, ...rulers.items],
        dim: null,
        ...conePlaces(setting, { lanes, pose, range }, input),
      };
    },
  };
}

/** The lane's model turned about its line of sight. */
export function turnedModel(
  { model, lift }: Pick<PaintedLane, 'model' | 'lift'>,
  angle: number,
): Float64Array {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const out = model.slice();
  for (let k = 0; k < 4; k++) {
    const y = model[4 + k]! - (k === 3 ? lift : 0);
    const z = model[8 + k]!;
    out[4 + k] = c * y - s * z + (k === 3 ? lift : 0);
    out[8 + k] = s * y + c * z;
  }
  return out;
}

/** The sky seen from its equator, the north pole up, turned about it. */
function turnedSky(angle: number): Float64Array {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return Float64Array.of(c, -s, 0, 0, 0, 0, 1, 0, -s, -c, 0, 0);
}

/** The observer in the middle, as much as fits. */
const globePose = ({ widthPx, heightPx }: Viewport): Pose => ({
  axes: FRONT,
  target: [0, 0, 0],
  unitsPerPixel: 2 / (GLOBE_SHARE * Math.min(widthPx, heightPx)),
  perspective: 0,
});

const globeScene = ({ viewport, scene }: ConeSetting, pose: Pose): OverlayScene => ({
  ...scene,
  pixels: pixelMatrix(pose, viewport),
  unitsPerPixel: pose.unitsPerPixel,
  perspective: false,
  aligned: false,
});

/** How far a turning cone comes toward the viewer, and goes away. */
const reachOf = ({ shape, sidewaysFactor }: PaintedLane): number => shape.extent.alongMax * sidewaysFactor;

/** The round cone that a field's cone never leaves while it turns: what rulers stand on, and what needs room. */
function envelopeOf(field: PreparedField): PreparedField {
  let widest = 0;
  for (const ring of field.rings) {
    for (let i = 0; i < ring.length; i += 3) {
      const [, along, across] = intoFrame(field.frame, [ring[i]!, ring[i + 1]!, ring[i + 2]!]);
      widest = Math.max(widest, Math.hypot(along, across));
    }
  }
  const cosine = Math.sqrt(Math.max(0, 1 - widest * widest));
  const inPlane = (along: number): Vec3 => add(scale(field.frame[0], cosine), scale(field.frame[1], along));
  return {
    ...field,
    upper: inPlane(widest),
    lower: inPlane(-widest),
    extent: { alongMin: -widest, alongMax: widest, acrossMin: -widest, acrossMax: widest },
  };
}
