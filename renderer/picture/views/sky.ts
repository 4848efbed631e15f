import { cssColour, shellColours } from '../../colour/shellColours.ts';
import { SKY_FRAME } from '../../cone/geometry/fieldFrame.ts';
import { lookingFrom, viewPose } from '../../cone/geometry/poses.ts';
import { prepareField } from '../../cone/geometry/preparedField.ts';
import { compose, modelMatrix, pixelMatrix, project } from '../../cone/geometry/projection.ts';
import { direction, dot, type Vec3 } from '../../cone/geometry/vector.ts';
import type { Pen, Point } from '../../cone/overlay/pen.ts';
import { drawRuler } from '../../cone/overlay/ruler.ts';
import type { PaintedLane } from '../../cone/overlay/scene.ts';
import { radiusAt, radiusTable } from '../../cone/points/radiusTable.ts';
import type { RadialScaleInput } from '../../cone/types.ts';
import { coneFootprint } from '../../stage/coneInputs.ts';
import { pictureScale } from '../numbers.ts';
import { paintEndTitle } from './endTitle.ts';
import { paintBodies } from './shellBodies.ts';
import { paintShellEdges } from './shellEdges.ts';
import { fillRuns, penOn, type ViewDrawing, type ViewInput } from './view.ts';

const ROOM = 46;
const GRID_STEP_DEG = 30;
const LINE_STEP_DEG = 2;

/** The shells in their true directions, nested about the observer inside a globe of the sky. */
export function skyView(input: ViewInput): ViewDrawing {
  const { box, numbers, options, theme } = input;
  const globe = Math.max(40, Math.min(box.width, box.height) / 2 - ROOM / 2);
  const { scale } = pictureScale(numbers, globe);
  const table = radiusTable(scale.table.comovingMpc, scale.table.radius);
  const radius = (mpc: number): number => radiusAt(table, mpc);
  const footprint =
    numbers.footprint === null ? { fields: [], wide: true } : coneFootprint(numbers.footprint);
  const fields = footprint.fields.map(prepareField);
  const back = bestSide(fields.map((field) => field.centre));
  const pose = {
    ...viewPose('aroundTheObserver', [0, 0, 0]),
    axes: lookingFrom(back, [0, 0, 1]),
    unitsPerPixel: 1 / globe,
  };
  const pixels = pixelMatrix(pose, { widthPx: box.width, heightPx: box.height });
  const model = modelMatrix(SKY_FRAME, 1, 0);
  const lanes = fields.map(
    (shape, field): PaintedLane => ({
      field,
      model,
      sidewaysFactor: 1,
      lift: 0,
      matrix: compose(pixels, model),
      shape,
    }),
  );
  const colours = shellColours(numbers.shells.length, theme.mode);
  const under = penOn(input);
  const over = penOn(input);
  paintGlobe(under.pen, pixels, back, globe);
  const shells = options.shells ? numbers.shellInputs : [];
  for (const [i, shell] of shells.entries()) {
    const ends = [radius(shell.comovingMinMpc), radius(shell.comovingMaxMpc)] as const;
    for (const lane of lanes) {
      paintBodies(under.pen, lane, false, ends, cssColour(colours[i]!, theme.shellAlpha));
      paintShellEdges(over.pen, lane, ends, cssColour(colours[i]!, 0.85));
    }
    // A whole sky has no outline: its shells are rings about the observer.
    if (lanes.length === 0) {
      const rings = ends.map((r) => circle(box.width / 2, box.height / 2, globe * r));
      fillRuns(under.pen, rings, cssColour(colours[i]!, theme.shellAlpha));
      for (const ring of rings) over.pen.line(ring, cssColour(colours[i]!, 0.85), 0.9);
    }
  }
  const middle: Point = [box.width / 2, box.height / 2];
  over.pen.ring(middle, 4, theme.ink, 1.4);
  over.pen.disc(middle, 1.4, theme.ink);
  if (options.rulers) paintSpoke(over.pen, scale, middle, globe, radius);
  const place: ViewDrawing['place'] = ([x, y, z], mpc) => project(pixels, x, y, z, radius(mpc));
  return {
    under: under.items,
    over: over.items,
    notes: [
      'fields in their true directions about the observer, nothing stretched',
      ...(scale.reading === 'comoving' ? [] : ['radius is not comoving distance: lengths are not to scale']),
    ],
    words: 'the shells in their true directions about the observer, inside a globe of the sky',
    place,
    placeAll(outX, outY) {
      const { selected, background } = numbers.facts;
      if (!selected || !background) return;
      const { x, y, z } = selected.directions;
      for (let i = 0; i < outX.length; i++) {
        const p = project(pixels, x[i]!, y[i]!, z[i]!, radius(background.comovingMpc[i]!));
        outX[i] = p ? p[0] + box.left : Number.NaN;
        outY[i] = p ? p[1] + box.top : Number.NaN;
      }
    },
  };
}

/** The side from which the fields are seen longest, one by one and apart from each other. */
function bestSide(centres: readonly Vec3[]): Vec3 {
  let best: Vec3 = direction(-65, 25);
  let bestScore = -1;
  for (let ra = 0; ra < 360; ra += 5) {
    for (const dec of [12, 20, 28, 36]) {
      const back = direction(ra, dec);
      // The first field is the largest and counts most.
      const score = centres.reduce((sum, centre, i) => {
        const depth = dot(centre, back);
        return sum + (Math.sqrt(Math.max(0, 1 - depth * depth)) + 0.25 * depth) / (1 + i);
      }, 0);
      if (score > bestScore + 1e-9) {
        bestScore = score;
        best = back;
      }
    }
  }
  return best;
}

function paintGlobe(pen: Pen, pixels: Float64Array, back: Vec3, globe: number): void {
  const lines: Vec3[][] = [];
  for (let ra = 0; ra < 360; ra += GRID_STEP_DEG) lines.push(run(-90, 90, (dec) => direction(ra, dec)));
  for (let dec = -90 + GRID_STEP_DEG; dec < 90; dec += GRID_STEP_DEG)
    lines.push(run(0, 360, (ra) => direction(ra, dec)));
  const { line } = pen.theme;
  for (const points of lines)
    for (const front of [false, true]) {
      const seen = points.map((p) =>
        dot(p, back) >= 0 === front ? project(pixels, p[0], p[1], p[2]) : null,
      );
      pen.line(seen, line, front ? 0.45 : 0.2);
    }
  pen.line(circle(pen.width / 2, pen.height / 2, globe), line, 1);
}

function run(from: number, to: number, at: (deg: number) => Vec3): Vec3[] {
  const out: Vec3[] = [];
  for (let deg = from; deg <= to; deg += LINE_STEP_DEG) out.push(at(deg));
  return out;
}

function circle(x: number, y: number, radius: number): Point[] {
  return Array.from({ length: 361 }, (_, i): Point => {
    const angle = (i * Math.PI) / 180;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
}

/** How far out the shells lie: distance on a line beside the globe, redshift and lookback time below it. */
function paintSpoke(
  pen: Pen,
  scale: RadialScaleInput,
  [x, y]: Point,
  globe: number,
  radius: (mpc: number) => number,
): void {
  const farMpc = scale.table.comovingMpc.at(-1)!;
  const left = x - globe - 78;
  for (const [which, shift] of [
    ['redshift', 0],
    ['lookback', -96],
  ] as const) {
    if (left + shift < 40) continue;
    drawRuler(pen, {
      title: '',
      ticks: scale.rulers[which],
      at: (mpc) => [left + shift, y - globe * radius(mpc)],
      fromMpc: 0,
      toMpc: farMpc,
      awayFrom: [x, y - globe / 2],
    });
    paintEndTitle(pen, scale.titles[which], [left + shift, y - globe], [left + shift, y]);
  }
  const right = x + globe + 78;
  if (right > pen.width - 40) return;
  drawRuler(pen, {
    title: '',
    ticks: scale.rulers.comoving,
    at: (mpc) => [right, y - globe * radius(mpc)],
    fromMpc: 0,
    toMpc: farMpc,
    awayFrom: [x, y - globe / 2],
  });
  paintEndTitle(pen, scale.titles.comoving, [right, y - globe], [right, y]);
}
