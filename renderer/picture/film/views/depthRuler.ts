import { DISTANCE_QUANTITIES, distanceRows } from '../../../../shared-core/report/distanceQuantities.ts';
import { formatNumber, shownUnit, shownValue } from '../../../../shared-core/report/quantity.ts';
import type { Pen, Point } from '../../../cone/overlay/pen.ts';
import { drawRuler } from '../../../cone/overlay/ruler.ts';
import { type PictureNumbers, pictureScale } from '../../numbers.ts';
import { writeLeft } from '../../text/writeLeft.ts';
import type { ConeSetting } from '../../views/coneSetting.ts';
import type { ViewInput } from '../../views/view.ts';

/** Room of the ruler and of the numbers above it. */
export const DEPTH_RULER_HEIGHT = 110;
const SIDE = 12;
const RULER_UP = 56;
const READING_UP = 98;
const READING_SIZE = 12.5;

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
    const common = { at: place, fromMpc: 0, toMpc: scene.farMpc, inline: true } as const;
    const { rulers, titles } = scale;
    const [above, below] = [[box.width / 2, y + 100] as const, [box.width / 2, y - 100] as const];
    drawRuler(pen, { ...common, title: titles.redshift, ticks: rulers.redshift, awayFrom: above });
    drawRuler(pen, { ...common, title: titles.comoving, ticks: rulers.comoving, awayFrom: below });
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
  let x = SIDE;
  for (const { words, key, room, decimals } of READINGS) {
    const quantity = byKey.get(key)!;
    const value = formatNumber(shownValue(quantity, row, units)!, { decimals });
    const text = `${words} ${value} ${shownUnit(quantity, units)}`.trimEnd();
    const [colour, weight] = key === 'z' ? [pen.theme.ink, 600] : [pen.theme.inkMuted, 400];
    writeLeft(pen, text, x, pen.height - READING_UP, READING_SIZE, colour, weight);
    x += room;
  }
}
