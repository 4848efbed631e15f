import { cssColour, shellColours } from '../../colour/shellColours.ts';
import type { Point } from '../../cone/overlay/pen.ts';
import { radiusAt, radiusTable } from '../../cone/points/radiusTable.ts';
import { thousands } from '../caption.ts';
import { pictureScale } from '../numbers.ts';
import { fillRuns, penOn, type ViewDrawing, type ViewInput } from './view.ts';
import { layWedge, type WedgeLayout } from './wedgeLayout.ts';
import { paintAngles, paintWedgeRulers } from './wedgeRulers.ts';
import { wedgeSlab } from './wedgeSlab.ts';

const ARC_STEP_DEG = 0.5;

/** A slab of the sky laid flat: the angle around, the radius outward, the observer at the tip. */
export function wedgeView(input: ViewInput): ViewDrawing {
  const { box, numbers, options, theme } = input;
  const slab = wedgeSlab(options.slab, numbers);
  const layout = layWedge(slab.range, box);
  const { scale, axis, window } = pictureScale(numbers, layout.radiusUnits);
  const table = radiusTable(scale.table.comovingMpc, scale.table.radius);
  const farMpc = scale.table.comovingMpc.at(-1)!;
  const radius = (mpc: number): number => radiusAt(table, mpc);
  const colours = shellColours(numbers.shells.length, theme.mode);

  const under = penOn(input);
  const over = penOn(input);
  if (options.rulers)
    for (const tick of scale.rulers[scale.reading])
      if (tick.level === 0 && tick.comovingMpc > 0)
        under.pen.line(arcAt(layout, radius(tick.comovingMpc)), theme.line, 0.5);
  if (options.shells)
    for (const [i, shell] of numbers.shellInputs.entries()) {
      const inner = radius(shell.comovingMinMpc);
      const outer = radius(shell.comovingMaxMpc);
      const body = [arcAt(layout, outer), arcAt(layout, inner).reverse()];
      // A full circle is a ring with a hole; a sector is one run out and back.
      fillRuns(under.pen, layout.full ? body : [body.flat()], cssColour(colours[i]!, theme.shellAlpha));
      for (const r of [inner, outer]) over.pen.line(arcAt(layout, r), cssColour(colours[i]!, 0.75), 0.9);
    }
  if (options.rulers) {
    paintWedgeRulers(over.pen, numbers, layout, scale, axis.redshiftAt(axis.at(window[1])), radius, farMpc);
    paintAngles(over.pen, layout, slab);
  }
  const placeIn = (x: number, y: number, z: number, mpc: number): Point | null => {
    const angle = slab.angleOf(x, y, z);
    if (angle === null || angle < slab.range[0] - 1e-6 || angle > slab.range[1] + 1e-6) return null;
    return layout.at(angle, radius(mpc));
  };
  const opened = layout.factor === 1 ? [] : [`angles opened × ${layout.factor}`];
  const flat = `laid flat: distances across are to scale only in the middle of the slab`;
  const reading =
    scale.reading === 'comoving' ? [] : ['radius is not comoving distance: lengths are not to scale'];
  return {
    under: under.items,
    over: over.items,
    notes: [`${slab.words}, with ${thousands(slab.galaxies)} of the galaxies`, ...opened, flat, ...reading],
    words: `${slab.words}, the observer at the tip and depth outward`,
    place: ([x, y, z], mpc) => placeIn(x, y, z, mpc),
    placeAll(outX, outY) {
      const { selected, background } = numbers.facts;
      if (!selected || !background) return;
      const { x, y, z } = selected.directions;
      for (let i = 0; i < outX.length; i++) {
        const p = placeIn(x[i]!, y[i]!, z[i]!, background.comovingMpc[i]!);
        outX[i] = p ? p[0] + box.left : Number.NaN;
        outY[i] = p ? p[1] + box.top : Number.NaN;
      }
    },
  };
}

function arcAt(layout: WedgeLayout, radius: number): Point[] {
  const [low, high] = layout.range;
  const steps = Math.max(8, Math.ceil(((high - low) * layout.factor) / ARC_STEP_DEG));
  return Array.from({ length: steps + 1 }, (_, i) => layout.at(low + ((high - low) * i) / steps, radius));
}
