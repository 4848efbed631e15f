import { project } from '../../cone/geometry/projection.ts';
import { add, scale, unit } from '../../cone/geometry/vector.ts';
import type { Pen, Point } from '../../cone/overlay/pen.ts';
import type { PaintedLane } from '../../cone/overlay/scene.ts';
import type { ShellInput } from '../../cone/types.ts';
import { fillRuns } from './view.ts';

const ARC_STEPS = 48;

/** The body of one shell over one field, as flat glass between its two radii. */
export function paintBodies(
  pen: Pen,
  lane: PaintedLane,
  aligned: boolean,
  [inner, outer]: readonly [number, number],
  css: string,
): void {
  if (lane.shape.rings.length === 0) return;
  if (aligned) fillRuns(pen, [sideSector(lane, inner, outer)], css);
  else {
    fillRuns(pen, capAt(lane, outer), css);
    for (const wall of walls(lane, inner, outer)) fillRuns(pen, [wall], css);
  }
}

/** The bodies of shells over all lanes. @param colourOf of the i-th shell, as CSS */
export function paintAllBodies(
  pen: Pen,
  shells: readonly ShellInput[],
  lanes: readonly PaintedLane[],
  aligned: boolean,
  radius: (comovingMpc: number) => number,
  colourOf: (i: number) => string,
): void {
  for (const [i, shell] of shells.entries()) {
    const ends = [radius(shell.comovingMinMpc), radius(shell.comovingMaxMpc)] as const;
    for (const lane of lanes) paintBodies(pen, lane, aligned, ends, colourOf(i));
  }
}

/** Seen from the side a shell is the sector between the cone's upper and lower edge. */
function sideSector({ shape, matrix }: PaintedLane, inner: number, outer: number): (Point | null)[] {
  const arc = (radius: number): (Point | null)[] =>
    Array.from({ length: ARC_STEPS + 1 }, (_, i) => {
      const t = i / ARC_STEPS;
      const [x, y, z] = unit(add(scale(shape.upper, 1 - t), scale(shape.lower, t)));
      return project(matrix, x, y, z, radius);
    });
  return [...arc(outer), ...arc(inner).reverse()];
}

function capAt({ shape, matrix }: PaintedLane, radius: number): (Point | null)[][] {
  return shape.rings.map((ring) => {
    const out: (Point | null)[] = [];
    for (let i = 0; i < ring.length; i += 3)
      out.push(project(matrix, ring[i]!, ring[i + 1]!, ring[i + 2]!, radius));
    return out;
  });
}

/** The side walls, cut where they turn from the viewer, so that no piece lies over itself. */
function walls(lane: PaintedLane, inner: number, outer: number): Point[][] {
  const out: Point[][] = [];
  const near = capAt(lane, inner);
  const far = capAt(lane, outer);
  for (const [r, outside] of far.entries()) {
    const inside = near[r]!;
    if (outside.some((p) => !p) || inside.some((p) => !p)) continue;
    const [a, b] = [inside as Point[], outside as Point[]];
    const n = b.length;
    const turn = (i: number): boolean => {
      const [p, q, s] = [a[i % n]!, b[i % n]!, b[(i + 1) % n]!];
      return (q[0] - p[0]) * (s[1] - q[1]) - (q[1] - p[1]) * (s[0] - q[0]) > 0;
    };
    let start = 0;
    while (start < n && turn(start) === turn(start + n - 1)) start++;
    for (let i = start; i < start + n; ) {
      let end = i + 1;
      while (end < start + n && turn(end) === turn(i)) end++;
      const upper: Point[] = [];
      const lower: Point[] = [];
      for (let k = i; k <= end; k++) {
        upper.push(b[k % n]!);
        lower.unshift(a[k % n]!);
      }
      out.push([...upper, ...lower]);
      i = end;
    }
  }
  return out;
}
