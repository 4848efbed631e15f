import { cssColour } from '../../colour/shellColours.ts';
import { project } from '../geometry/projection.ts';
import type { Pen, Point } from './pen.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** The outline of a field at one displayed radius. */
function outlineAt({ shape, matrix }: PaintedLane, radius: number): (Point | null)[][] {
  return shape.rings.map((ring) => {
    const out: (Point | null)[] = [];
    for (let i = 0; i < ring.length; i += 3) {
      out.push(project(matrix, ring[i]!, ring[i + 1]!, ring[i + 2]!, radius));
    }
    if (out.length > 0) out.push(out[0]!);
    return out;
  });
}

/** Outline of a whole sphere about the observer: the great circle that faces the viewer. */
function silhouetteAt(scene: OverlayScene, radius: number): Point[] {
  const centre = project(scene.pixels, 0, 0, 0);
  if (!centre) return [];
  const radiusPx = radius / scene.unitsPerPixel / scene.pixels[11]!;
  const steps = 180;
  return Array.from({ length: steps + 1 }, (_, i): Point => {
    const angle = (2 * Math.PI * i) / steps;
    return [centre[0] + radiusPx * Math.cos(angle), centre[1] + radiusPx * Math.sin(angle)];
  });
}

function paintCorners(
  pen: Pen,
  lane: PaintedLane,
  inner: number,
  outer: number,
  colour: string,
  widthPx: number,
): void {
  for (const [x, y, z] of lane.shape.corners) {
    pen.line([project(lane.matrix, x, y, z, inner), project(lane.matrix, x, y, z, outer)], colour, widthPx);
  }
}

/** The edges of the shells; the chosen and the hovered one heavier and on top. */
export function paintShells(pen: Pen, scene: OverlayScene): void {
  const { shells, selected, hovered } = scene.shells;
  const strong = (i: number): boolean => i === selected || i === hovered;
  const order = [...shells.keys()].sort((a, b) => Number(strong(a)) - Number(strong(b)));
  for (const lane of scene.lanes) {
    // The rulers stand on the cone's own edges when it is seen side-on.
    if (!scene.aligned) paintCorners(pen, lane, 0, 1, pen.theme.line, 1);
    for (const i of order) {
      const shell = shells[i]!;
      const colour = cssColour(scene.shellColours[i]!, strong(i) ? 1 : 0.6);
      const widthPx = strong(i) ? 1.6 : 1;
      const inner = scene.radius(shell.comovingMinMpc);
      const outer = scene.radius(shell.comovingMaxMpc);
      const shared = !strong(i) && shells[i - 1]?.comovingMaxMpc === shell.comovingMinMpc;
      for (const radius of shared ? [outer] : [inner, outer]) {
        const lines = lane.shape.rings.length > 0 ? outlineAt(lane, radius) : [silhouetteAt(scene, radius)];
        for (const line of lines) pen.line(line, colour, widthPx);
      }
      paintCorners(pen, lane, inner, outer, colour, widthPx);
    }
  }
}

/** Names of the chosen and the hovered shell, above the first lane. */
export function paintShellLabels(pen: Pen, scene: OverlayScene): void {
  const { shells, selected, hovered } = scene.shells;
  const lane = scene.lanes[0];
  if (!lane) return;
  for (const index of new Set([selected, hovered])) {
    const shell = index === null ? undefined : shells[index];
    if (!shell || index === null) continue;
    const middle = (scene.radius(shell.comovingMinMpc) + scene.radius(shell.comovingMaxMpc)) / 2;
    const [x, y, z] = lane.shape.upper;
    const p = project(lane.matrix, x, y, z, middle);
    if (!p) continue;
    const text = shell.longLabel ?? shell.label;
    const colour = cssColour(scene.shellColours[index]!);
    for (const dy of [-54, -70, -36, 20, 38, 60, 90]) {
      if (pen.text(text, p[0], p[1] + dy, colour, { sizePx: 12.5, weight: 600 })) break;
    }
  }
}
