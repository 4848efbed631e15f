import { cssColour } from '../../colour/shellColours.ts';
import { NEAREST_W, project } from '../geometry/projection.ts';
import type { Pen, Point } from './pen.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** Strokes the outline of a field at one displayed radius. Written out without intermediate points: there are many. */
function strokeOutline(
  pen: Pen,
  { shape, matrix: m }: PaintedLane,
  radius: number,
  colour: string,
  widthPx: number,
): void {
  const { context } = pen;
  context.beginPath();
  for (const ring of shape.rings) {
    let down = false;
    const n = ring.length;
    for (let i = 0; i <= n; i += 3) {
      // The last step closes the ring.
      const k = i === n ? 0 : i;
      const x = radius * ring[k]!;
      const y = radius * ring[k + 1]!;
      const z = radius * ring[k + 2]!;
      const w = m[8]! * x + m[9]! * y + m[10]! * z + m[11]!;
      if (w > NEAREST_W) {
        const px = (m[0]! * x + m[1]! * y + m[2]! * z + m[3]!) / w;
        const py = (m[4]! * x + m[5]! * y + m[6]! * z + m[7]!) / w;
        if (down) context.lineTo(px, py);
        else context.moveTo(px, py);
        down = true;
      } else down = false;
    }
  }
  context.strokeStyle = colour;
  context.lineWidth = widthPx;
  context.lineJoin = 'round';
  context.stroke();
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
        if (lane.shape.rings.length > 0) strokeOutline(pen, lane, radius, colour, widthPx);
        else pen.line(silhouetteAt(scene, radius), colour, widthPx);
      }
      paintCorners(pen, lane, inner, outer, colour, widthPx);
    }
  }
}

/** Heights for a shell's name over the cone's upper edge: above its ruler where there is room, else over its galaxies. */
const LABEL_PLACES_PX = [-54, -70, -36, -88, 20, 38, 60, 90];

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
    for (const dy of LABEL_PLACES_PX) {
      if (pen.text(text, p[0], p[1] + dy, colour, { sizePx: 12.5, weight: 600, plate: dy > 0 })) break;
    }
  }
}
