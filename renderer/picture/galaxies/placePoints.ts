import { indexer, palette } from '../../cone/points/colouring.ts';
import { pointSizePx } from '../../cone/points/exposure.ts';
import { radiusTable } from '../../cone/points/radiusTable.ts';
import type { PictureNumbers } from '../numbers.ts';
import type { ScenePoints } from '../scene.ts';
import type { PictureTheme } from '../themes.ts';
import type { ViewBox, ViewDrawing } from '../views/view.ts';
import { crowdingOf } from './crowding.ts';

/** Room for points, over the squares that hold any. */
const ROOM_SHARE = 2.5;
/** Print shows finer points than a screen. */
const FINER = 0.8;
/** Small sets have larger points: each galaxy counts. */
const LARGER = 0.5;
const SMALL_SET = 15_000;

/** How large galaxies are drawn and how their light adds up: what depends on how they crowd. */
export type PointLook = Pick<ScenePoints, 'diameter' | 'densest' | 'thinnest'>;

/** Places of a view's galaxies in units of the scene, where NaN is not drawn, and what light they keep by their depth. */
export function pointPlaces(
  drawing: Pick<ViewDrawing, 'placeAll'>,
  { facts, galaxiesWithin, light }: PictureNumbers,
): Pick<ScenePoints, 'count' | 'x' | 'y' | 'light'> {
  const count = facts.selected && facts.background ? facts.selected.sample.count : 0;
  const x = new Float32Array(count);
  const y = new Float32Array(count);
  const kept = light.depthCue > 0 ? new Float32Array(count).fill(1) : null;
  if (count > 0) {
    drawing.placeAll(x, y, kept);
    // Sorted by redshift: what lies beyond the picture's depth is the end of the list.
    x.fill(Number.NaN, galaxiesWithin);
    y.fill(Number.NaN, galaxiesWithin);
  }
  return { count, x, y, light: kept };
}

/** The look that suits galaxies at their places. */
export function pointLook(
  { x, y }: Pick<ScenePoints, 'x' | 'y'>,
  box: ViewBox,
  { light }: PictureNumbers,
): PointLook {
  const crowd = crowdingOf(x, y);
  // Points are made for the room that they have, which in a picture is often a part of the box.
  const side = Math.sqrt(Math.min(box.width * box.height, ROOM_SHARE * crowd.area));
  const size = FINER + LARGER * Math.exp(-crowd.onStage / SMALL_SET);
  const diameter = light.pointSize * size * pointSizePx(crowd.onStage, { widthPx: side, heightPx: side });
  return { diameter, densest: crowd.densest, thinnest: crowd.thinnest };
}

/** Colours of the galaxies and how light becomes brightness, wherever they are placed. */
export function pointColours(
  numbers: PictureNumbers,
  theme: PictureTheme,
): Pick<ScenePoints, 'value' | 'colours' | 'stretch' | 'exposureStops' | 'glow' | 'glowShare'> {
  const { background, selected } = numbers.facts;
  const { light } = numbers;
  const count = selected && background ? selected.sample.count : 0;
  const value = new Uint8Array(count);
  if (background && count > 0) {
    const { input } = numbers.colours;
    const far = background.comovingMpc[count - 1]!;
    const index = indexer(input, numbers.shellInputs, radiusTable([0, far > 0 ? far : 1], [0, 1]));
    for (let i = 0; i < count; i++) value[i] = index(i, background.comovingMpc[i]!);
  }
  return {
    value,
    colours: palette(numbers.colours.input, numbers.shells.length, theme.mode),
    stretch: light.stretch,
    exposureStops: light.exposureStops + theme.exposureStops,
    glow: theme.glow,
    glowShare: light.glow,
  };
}

/** The galaxies of a picture's view with their colours, and the light that suits them. */
export function placePoints(
  drawing: ViewDrawing,
  box: ViewBox,
  numbers: PictureNumbers,
  theme: PictureTheme,
): ScenePoints {
  const places = pointPlaces(drawing, numbers);
  return { ...places, ...pointColours(numbers, theme), ...pointLook(places, box, numbers) };
}
