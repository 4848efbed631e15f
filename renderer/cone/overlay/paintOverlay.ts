import type { Triple } from '../../colour/oklab.ts';
import { cssColour } from '../../colour/shellColours.ts';
import { sidewaysText } from '../caption.ts';
import type { Lane } from '../geometry/arrangement.ts';
import type { PreparedField } from '../geometry/preparedField.ts';
import { compose, type PixelMatrix, project } from '../geometry/projection.ts';
import type { RadialReading, RadialScaleInput, ShellsInput, ViewName } from '../types.ts';
import type { Pen, Point } from './pen.ts';
import { drawRuler } from './ruler.ts';
import { drawScaleBar } from './scaleBar.ts';
import { circleAt, drawCorners, outlineAt } from './shellLines.ts';

/** Everything the overlay shows of one frame. */
export interface OverlayScene {
  readonly view: ViewName;
  readonly reading: RadialReading;
  /** Display space to CSS pixels. */
  readonly pixels: PixelMatrix;
  readonly unitsPerPixel: number;
  readonly perspective: boolean;
  readonly lanes: readonly Lane[];
  readonly fields: readonly PreparedField[];
  readonly wide: boolean;
  readonly scale: RadialScaleInput;
  /** Displayed radius (1 at the far end) of a comoving distance. */
  readonly radius: (comovingMpc: number) => number;
  /** Comoving distance of the far end. */
  readonly farMpc: number;
  readonly shells: ShellsInput;
  readonly shellColours: readonly Triple[];
  readonly caption: readonly string[];
  readonly marks: Marks;
}

/** Galaxies pointed out: the hovered, the picked, and the line between two. */
export interface Marks {
  readonly hovered: Point | null;
  readonly picked: readonly (Point | null)[];
  readonly pairText: string;
}

/** Paints lines, rulers, labels and marks over points and solids. */
export function paintOverlay(pen: Pen, scene: OverlayScene): void {
  const around = scene.view === 'aroundTheObserver' || (scene.view === 'whole' && scene.wide);
  paintShells(pen, scene);
  paintCaption(pen, scene);
  paintScaleBar(pen, scene);
  if (around) paintRings(pen, scene);
  else for (const lane of scene.lanes) paintLane(pen, scene, lane);
  paintShellLabels(pen, scene);
  paintMarks(pen, scene.marks);
}

function paintShells(pen: Pen, scene: OverlayScene): void {
  const { shells, selected, hovered } = scene.shells;
  for (const lane of scene.lanes) {
    const field = scene.fields[lane.field]!;
    const matrix = compose(scene.pixels, lane.model);
    // The cone itself, from the observer to the far end.
    drawCorners(pen, field, matrix, 0, 1, pen.theme.line, 1);
    for (const [i, shell] of shells.entries()) {
      const strong = i === selected || i === hovered;
      const colour = cssColour(scene.shellColours[i]!, strong ? 1 : 0.6);
      const inner = scene.radius(shell.comovingMinMpc);
      const outer = scene.radius(shell.comovingMaxMpc);
      const touches = shells[i - 1]?.comovingMaxMpc === shell.comovingMinMpc;
      for (const radius of touches && !strong ? [outer] : [inner, outer]) {
        const lines = field.rings.length > 0 ? outlineAt(field, matrix, radius) : [silhouette(scene, radius)];
        for (const line of lines) pen.line(line, colour, strong ? 1.6 : 1);
      }
      drawCorners(pen, field, matrix, inner, outer, colour, strong ? 1.6 : 1);
    }
  }
}

/** Outline of a whole sphere: the great circle that faces the viewer. */
const silhouette = (scene: OverlayScene, radius: number): (Point | null)[] => {
  const p = scene.pixels;
  const s = scene.unitsPerPixel;
  const w = p[11]!;
  const centre = project(p, 0, 0, 0);
  if (!centre) return [];
  const steps = 180;
  return Array.from({ length: steps + 1 }, (_, i): Point => {
    const angle = (2 * Math.PI * i) / steps;
    return [centre[0] + (radius / s / w) * Math.cos(angle), centre[1] + (radius / s / w) * Math.sin(angle)];
  });
};

function paintLane(pen: Pen, scene: OverlayScene, lane: Lane): void {
  const field = scene.fields[lane.field]!;
  const matrix = compose(scene.pixels, lane.model);
  const { rulers, titles } = scene.scale;
  const axisMiddle = project(scene.pixels, 0.5, lane.lift, 0) ?? [pen.width / 2, pen.height / 2];
  const along =
    ([x, y, z]: readonly [number, number, number]) =>
    (mpc: number) =>
      project(matrix, x, y, z, scene.radius(mpc));
  const common = { fromMpc: 0, toMpc: scene.farMpc, awayFrom: axisMiddle };
  paintObserver(pen, scene, lane);
  const only = scene.lanes.length === 1;
  const first = scene.lanes[0] === lane;
  const last = scene.lanes.at(-1) === lane;
  // The comoving ruler runs straight below everything, parallel to the axis.
  if (last) {
    const drop = lane.lift + field.extent.alongMin * lane.sidewaysFactor - 46 * scene.unitsPerPixel;
    const straight = (mpc: number) => project(scene.pixels, scene.radius(mpc), drop, 0);
    drawRuler(pen, { ...common, title: titles.comoving, ticks: rulers.comoving, at: straight, line: true });
  }
  if (only || first) {
    drawRuler(pen, {
      ...common,
      title: titles.lookback,
      ticks: rulers.lookback,
      at: along(field.upper),
      line: true,
    });
  }
  if (only || last) {
    drawRuler(pen, {
      ...common,
      title: titles.redshift,
      ticks: rulers.redshift,
      at: along(field.lower),
      line: true,
    });
  }
  if (scene.view === 'parallel' && scene.lanes.length > 1) paintLaneName(pen, scene, lane, field);
}

function paintLaneName(pen: Pen, scene: OverlayScene, lane: Lane, field: PreparedField): void {
  const start = project(scene.pixels, 0, lane.lift, 0);
  if (!start) return;
  const factor = lane.sidewaysFactor === 1 ? '' : sidewaysText(lane.sidewaysFactor);
  const text = [field.name, factor].filter((part) => part !== '').join(' · ');
  if (text === '') return;
  const width = pen.measure(text);
  const x = Math.max(start[0], 10) + width / 2 + 12;
  for (const dy of [-20, 20, -34, 34]) {
    if (pen.text(text, x, start[1] + dy, pen.theme.ink)) return;
  }
}

function paintObserver(pen: Pen, scene: OverlayScene, lane: Lane): void {
  const p = project(scene.pixels, 0, lane.lift, 0);
  if (!p || p[0] < -20 || p[0] > pen.width + 20) return;
  const { context } = pen;
  context.beginPath();
  context.arc(p[0], p[1], 4, 0, 2 * Math.PI);
  context.fillStyle = pen.theme.background;
  context.fill();
  context.strokeStyle = pen.theme.ink;
  context.lineWidth = 1.4;
  context.stroke();
  context.beginPath();
  context.arc(p[0], p[1], 1.4, 0, 2 * Math.PI);
  context.fillStyle = pen.theme.ink;
  context.fill();
  pen.labels.reserve({ x: p[0] - 5, y: p[1] - 5, width: 10, height: 10 });
  if (scene.lanes.length > 1 && scene.view === 'parallel') return;
  const half = pen.measure('observer') / 2;
  for (const [dx, dy] of [
    [half + 10, -16],
    [half + 10, 16],
    [0, 16],
    [-half - 10, 0],
  ] as const) {
    if (pen.text('observer', p[0] + dx, p[1] + dy, pen.theme.inkMuted)) return;
  }
}

/** Rulers as rings about the observer; their numbers stand on spokes, one for each ruler. */
function paintRings(pen: Pen, scene: OverlayScene): void {
  const { rulers, titles } = scene.scale;
  const spokes = [
    { ticks: rulers.comoving, title: titles.comoving, angle: -0.3, name: 'comoving' },
    { ticks: rulers.redshift, title: titles.redshift, angle: Math.PI * 0.72, name: 'redshift' },
    { ticks: rulers.lookback, title: titles.lookback, angle: Math.PI * 1.38, name: 'lookback' },
  ];
  for (const spoke of spokes.filter((s) => s.name === scene.reading)) {
    for (const tick of spoke.ticks.filter((t) => t.level === 0 && t.comovingMpc > 0)) {
      pen.line(circleAt(scene.pixels, scene.radius(tick.comovingMpc)), pen.theme.line, 1);
    }
  }
  if (scene.lanes[0]) paintObserver(pen, scene, { ...scene.lanes[0], lift: 0 });
  const centre = project(scene.pixels, 0, 0, 0) ?? [pen.width / 2, pen.height / 2];
  for (const { ticks, title, angle } of spokes) {
    const c = Math.cos(angle);
    const s = Math.sin(angle);
    const at = (mpc: number) => project(scene.pixels, c * scene.radius(mpc), s * scene.radius(mpc), 0);
    const side: Point = [centre[0] + 1000 * s, centre[1] + 1000 * c];
    drawRuler(pen, { title, ticks, at, fromMpc: 0, toMpc: scene.farMpc, awayFrom: side, line: true });
  }
}

function paintShellLabels(pen: Pen, scene: OverlayScene): void {
  const { shells, selected, hovered } = scene.shells;
  for (const index of new Set([hovered, selected])) {
    const shell = index === null ? undefined : shells[index];
    const lane = scene.lanes[0];
    if (!shell || !lane || index === null) continue;
    const field = scene.fields[lane.field]!;
    const matrix = compose(scene.pixels, lane.model);
    const middle = (scene.radius(shell.comovingMinMpc) + scene.radius(shell.comovingMaxMpc)) / 2;
    const [x, y, z] = field.upper;
    const p = project(matrix, x, y, z, middle);
    if (!p) continue;
    const text = shell.longLabel ?? shell.label;
    for (const dy of [-52, -66, 18, 34, 60, 90]) {
      const colour = cssColour(scene.shellColours[index]!);
      if (pen.text(text, p[0], p[1] + dy, colour, { sizePx: 12.5, weight: 600 })) break;
    }
  }
}

function paintCaption(pen: Pen, scene: OverlayScene): void {
  for (const [i, line] of scene.caption.entries()) {
    const width = pen.measure(line);
    pen.text(line, 18 + width / 2, 20 + 17 * i, pen.theme.inkMuted, { gap: 0 });
  }
}

function paintScaleBar(pen: Pen, scene: OverlayScene): void {
  if (scene.reading !== 'comoving' || scene.perspective) return;
  const mpcPerPixel = scene.unitsPerPixel * scene.farMpc;
  drawScaleBar(pen, mpcPerPixel, scene.scale.lengthUnitMpc, (mpc) => scene.scale.formatLength(mpc));
}

function paintMarks(pen: Pen, { hovered, picked, pairText }: Marks): void {
  const { context } = pen;
  const ring = (p: Point, radius: number, colour: string, width: number): void => {
    context.beginPath();
    context.arc(p[0], p[1], radius, 0, 2 * Math.PI);
    context.strokeStyle = colour;
    context.lineWidth = width;
    context.stroke();
  };
  const [a, b] = picked;
  if (a && b) {
    pen.line([a, b], pen.theme.background, 4);
    pen.line([a, b], pen.theme.accent, 1.5);
    if (pairText !== '') {
      pen.text(pairText, (a[0] + b[0]) / 2, (a[1] + b[1]) / 2 - 14, pen.theme.ink, {
        weight: 600,
        must: true,
      });
    }
  }
  for (const p of picked) {
    if (!p) continue;
    ring(p, 7, pen.theme.background, 4);
    ring(p, 7, pen.theme.accent, 2);
  }
  if (hovered) {
    ring(hovered, 6, pen.theme.background, 3);
    ring(hovered, 6, pen.theme.ink, 1.2);
  }
}
