import { cssColour, shellColours } from '../../colour/shellColours.ts';
import type { Pen } from '../../cone/overlay/pen.ts';
import type { ShellInput } from '../../cone/types.ts';
import type { PictureNumbers } from '../numbers.ts';
import { type ConeOfLight, layLightCone } from './lightConeLayout.ts';
import { paintLightConeRulers } from './lightConeRulers.ts';
import { fillRuns, penOn, type ViewDrawing, type ViewInput } from './view.ts';

/**
 * The past light cone: conformal time upward, comoving distance sideways, the survey's galaxies on it by their right
 * ascension. Light moves at 45 degrees in these coordinates, whatever the expansion.
 */
export function lightConeView(input: ViewInput): ViewDrawing {
  const { box, numbers, options, theme } = input;
  const layout = layLightCone(numbers, box);
  const under = penOn(input);
  const over = penOn(input);
  paintGround(under.pen, layout);
  if (options.shells) {
    const colours = shellColours(numbers.shells.length, theme.mode);
    for (const [i, shell] of numbers.shellInputs.entries())
      paintShell(
        under.pen,
        over.pen,
        layout,
        shell,
        cssColour(colours[i]!, 0.22),
        cssColour(colours[i]!, 0.9),
      );
  }
  paintEdges(over.pen, layout);
  paintNames(over.pen, numbers, layout);
  if (options.rulers) paintLightConeRulers(over.pen, numbers, layout);
  return {
    under: under.items,
    over: over.items,
    notes: [
      'conformal time against comoving distance, where light moves at 45°; galaxies stand on the past light cone at their right ascension, and declination is left out',
      ...(layout.horizon ? [] : ['this cosmology has no finite particle horizon, so the diagram ends below']),
    ],
    words: 'the past light cone of here and now, conformal time upward and comoving distance sideways',
    place: ([x, y], mpc) => layout.at(Math.atan2(y, x), mpc),
    placeAll(outX, outY) {
      const { selected, background } = numbers.facts;
      if (!selected || !background) return;
      const { x, y } = selected.directions;
      for (let i = 0; i < outX.length; i++) {
        const p = layout.at(Math.atan2(y[i]!, x[i]!), background.comovingMpc[i]!);
        outX[i] = p[0] + box.left;
        outY[i] = p[1] + box.top;
      }
    },
  };
}

/** The beginning below, and what will have come into the horizon by today. */
function paintGround(pen: Pen, layout: ConeOfLight): void {
  const { line, inkMuted } = pen.theme;
  pen.line(layout.arc(layout.depthMpc, 'back'), line, 0.6, [3, 3]);
  pen.line([layout.flat(0, 0), layout.flat(0, layout.depthMpc)], inkMuted, 0.8, [1.5, 3]);
  if (!layout.horizon) return;
  for (const side of [-1, 1]) {
    const x = side * layout.depthMpc;
    pen.line([layout.flat(x, 0), layout.flat(x, layout.depthMpc)], line, 0.8, [5, 4]);
    // The horizon as it grew: light that left us at the beginning.
    pen.line([layout.flat(0, layout.depthMpc), layout.flat(x, 0)], line, 0.6, [2, 4]);
  }
  pen.line(
    [layout.flat(-layout.depthMpc, layout.depthMpc), layout.flat(layout.depthMpc, layout.depthMpc)],
    line,
    0.6,
  );
}

function paintShell(
  under: Pen,
  over: Pen,
  layout: ConeOfLight,
  shell: ShellInput,
  fill: string,
  stroke: string,
): void {
  const ends = [shell.comovingMinMpc, shell.comovingMaxMpc];
  for (const half of ['back', 'front'] as const) {
    const [inner, outer] = ends.map((mpc) => layout.arc(mpc, half));
    fillRuns(under, [[...outer!, ...inner!.reverse()]], fill);
  }
  for (const mpc of ends) {
    under.line(layout.arc(mpc, 'back'), stroke, 0.5);
    over.line(layout.arc(mpc, 'front'), stroke, 1);
  }
}

function paintEdges(pen: Pen, layout: ConeOfLight): void {
  const { ink } = pen.theme;
  pen.line([layout.edge(-1, layout.depthMpc), layout.edge(-1, 0), layout.edge(1, layout.depthMpc)], ink, 1.1);
  pen.line(layout.arc(layout.depthMpc, 'front'), pen.theme.inkMuted, 0.9);
  const tip = layout.edge(1, 0);
  pen.disc(tip, 3, ink);
}

function paintNames(pen: Pen, numbers: PictureNumbers, layout: ConeOfLight): void {
  const { ink, inkMuted } = pen.theme;
  const [x, y] = layout.edge(1, 0);
  pen.text('here and now', x, y - 14, ink, { sizePx: 12, weight: 600 });
  const low = layout.flat(0, layout.depthMpc * 0.93);
  const world = 'our world line';
  pen.text(world, low[0] + pen.measure(world) / 2 + 8, low[1], inkMuted);
  if (!layout.horizon) return;
  const { readings, units } = numbers;
  const shown = layout.depthMpc * (units.perH ? units.h : 1);
  const text = `particle horizon, ${shown.toFixed(0)} ${readings.comoving.unit}`;
  const corner = layout.flat(layout.depthMpc, layout.depthMpc * 0.04);
  pen.text(text, corner[0] - pen.measure(text) / 2 - 10, corner[1], inkMuted);
  const bang = layout.flat(-0.55 * layout.depthMpc, layout.depthMpc);
  pen.text('the beginning, z = ∞', bang[0], bang[1] - 11, inkMuted);
}
