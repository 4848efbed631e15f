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

/** The galaxies of a view with their colours, and the light that suits them. */
export function placePoints(
  drawing: ViewDrawing,
  box: ViewBox,
  numbers: PictureNumbers,
  theme: PictureTheme,
): ScenePoints {
  const { background, selected } = numbers.facts;
  const count = selected && background ? selected.sample.count : 0;
  const x = new Float32Array(count);
  const y = new Float32Array(count);
  const value = new Uint8Array(count);
  const { light } = numbers;
  const kept = light.depthCue > 0 ? new Float32Array(count).fill(1) : null;
  if (background && count > 0) {
    drawing.placeAll(x, y, kept);
    // Sorted by redshift: what lies beyond the picture's depth is the end of the list.
    x.fill(Number.NaN, numbers.galaxiesWithin);
    y.fill(Number.NaN, numbers.galaxiesWithin);
    const { input } = numbers.colours;
    const far = background.comovingMpc[count - 1]!;
    const index = indexer(input, numbers.shellInputs, radiusTable([0, far > 0 ? far : 1], [0, 1]));
    for (let i = 0; i < count; i++) value[i] = index(i, background.comovingMpc[i]!);
  }
  const crowd = crowdingOf(x, y);
  // Points are made for the room that they have, which in a picture is often a part of the box.
  const side = Math.sqrt(Math.min(box.width * box.height, ROOM_SHARE * crowd.area));
  const size = FINER + LARGER * Math.exp(-crowd.onStage / SMALL_SET);
  const diameter = light.pointSize * size * pointSizePx(crowd.onStage, { widthPx: side, heightPx: side });
  return {
    count,
    x,
    y,
    value,
    light: kept,
    colours: palette(numbers.colours.input, numbers.shells.length, theme.mode),
    stretch: light.stretch,
    exposureStops: light.exposureStops + theme.exposureStops,
    glow: theme.glow,
    glowShare: light.glow,
    diameter,
    densest: crowd.densest,
    thinnest: crowd.thinnest,
  };
}
