import { DISTANCE_QUANTITIES, distanceRows } from '../../../../shared-core/report/distanceQuantities.ts';
import { formatNumber, shownUnit, shownValue } from '../../../../shared-core/report/quantity.ts';
import type { Pen, Point } from '../../../cone/overlay/pen.ts';
import { drawRuler } from '../../../cone/overlay/ruler.ts';
import { type PictureNumbers, pictureScale } from '../../numbers.ts';
import type { ConeSetting } from '../../views/coneSetting.ts';
import type { ViewInput } from '../../views/view.ts';

/** Room of the ruler and of the numbers above it. */
export const DEPTH_RULER_HEIGHT = 100;
const SIDE = 12;
const RULER_UP = 46;
const READING_UP = 88;

/**
 * Where the camera is: a radial ruler that holds still below the stage, redshift above and comoving distance below its
 * line, a mark that moves along it, and the numbers of the place.
 */
export function depthRuler(
  { box, numbers }: ViewInput,
  { radius, scene }: ConeSetting,
  height: number,
): (pen: Pen, at: number) => void {
  if (height === 0) return () => undefined;
  const y = box.height - RULER_UP;
  const { scale, axis } = pictureScale(numbers, box.width - 2 * SIDE);
  const far = scale.table.radius.at(-1)!;
  const xOf = (share: number): number => SIDE + share * (box.width - 2 * SIDE);
  const place = (mpc: number): Point => [xOf(radius(mpc)), y];
  return (pen, at) => {
    // Gates that reach out of the stage end at it.
    pen.context.fillStyle = pen.theme.background;
    pen.context.fillRect(0, box.height - height, box.width, height);
    const common = { at: place, fromMpc: 0, toMpc: scene.farMpc, title: '' } as const;
    drawRuler(pen, { ...common, ticks: scale.rulers.redshift, awayFrom: [box.width / 2, y + 100] });
    drawRuler(pen, { ...common, ticks: scale.rulers.comoving, awayFrom: [box.width / 2, y - 100] });
    const x = xOf(at);
    pen.line(
      [
        [xOf(0), y],
        [x, y],
      ],
      pen.theme.accent,
      2.2,
    );
    pen.disc([x, y], 6.5, pen.theme.background);
    pen.disc([x, y], 4.5, pen.theme.accent);
    paintReading(pen, axis.redshiftAt(at * far), numbers);
  };
}

/** What is told of the camera's place: the digits that can be read while it flies, each in a room of its own. */
const READINGS = [
  { words: 'camera at z', key: 'z', room: 140, decimals: 3 },
  { words: 'lookback time', key: 'lookbackGyr', room: 170, decimals: 2 },
  { words: 'comoving distance', key: 'comovingMpc', room: 0, decimals: 0 },
] as const;
const byKey = new Map(DISTANCE_QUANTITIES.map((quantity) => [quantity.key, quantity]));

function paintReading(pen: Pen, z: number, { cosmology, units }: PictureNumbers): void {
  const row = distanceRows(cosmology, [z])[0]!;
  const { context } = pen;
  let x = SIDE;
  for (const { words, key, room, decimals } of READINGS) {
    const quantity = byKey.get(key)!;
    const value = formatNumber(shownValue(quantity, row, units)!, { decimals });
    const text = `${words} ${value} ${shownUnit(quantity, units)}`.trimEnd();
    pen.font(12.5, key === 'z' ? 600 : 400);
    context.textAlign = 'left';
    context.textBaseline = 'alphabetic';
    context.fillStyle = key === 'z' ? pen.theme.ink : pen.theme.inkMuted;
    context.fillText(text, x, pen.height - READING_UP);
    x += room;
  }
}
