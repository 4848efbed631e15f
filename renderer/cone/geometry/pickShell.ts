import { project } from './projection.ts';
import type { ShellMesh } from './shellMesh.ts';

export interface ShellHit {
  readonly shell: number;
  /** Along the line of sight, toward the viewer: the greater is in front. */
  readonly nearness: number;
}

/**
 * The shell whose solid is hit first at a pixel.
 *
 * @param pixels sky direction times radius to pixels, three rows of four
 * @param back the row (four numbers) that gives nearness to the viewer
 * @param radii inner and outer displayed radius of each shell
 */
export function pickShell(
  mesh: ShellMesh,
  pixels: ArrayLike<number>,
  back: ArrayLike<number>,
  radii: readonly (readonly [inner: number, outer: number])[],
  xPx: number,
  yPx: number,
): ShellHit | null {
  const { directions, ends, triangles } = mesh;
  const count = ends.length;
  const sx = new Float64Array(count);
  const sy = new Float64Array(count);
  const sn = new Float64Array(count);
  let best: ShellHit | null = null;
  for (const [shell, [inner, outer]] of radii.entries()) {
    for (let i = 0; i < count; i++) {
      const r = ends[i] === 1 ? outer : inner;
      const x = directions[3 * i]!;
      const y = directions[3 * i + 1]!;
      const z = directions[3 * i + 2]!;
      const p = project(pixels, x, y, z, r);
      sx[i] = p ? p[0] : Number.NaN;
      sy[i] = p ? p[1] : Number.NaN;
      sn[i] = r * (back[0]! * x + back[1]! * y + back[2]! * z) + back[3]!;
    }
    for (let t = 0; t < triangles.length; t += 3) {
      const a = triangles[t]!;
      const b = triangles[t + 1]!;
      const c = triangles[t + 2]!;
      const u = (sx[b]! - xPx) * (sy[c]! - yPx) - (sx[c]! - xPx) * (sy[b]! - yPx);
      const v = (sx[c]! - xPx) * (sy[a]! - yPx) - (sx[a]! - xPx) * (sy[c]! - yPx);
      const w = (sx[a]! - xPx) * (sy[b]! - yPx) - (sx[b]! - xPx) * (sy[a]! - yPx);
      const inside = (u >= 0 && v >= 0 && w >= 0) || (u <= 0 && v <= 0 && w <= 0);
      const area = u + v + w;
      if (!inside || area === 0) continue;
      const nearness = (u * sn[a]! + v * sn[b]! + w * sn[c]!) / area;
      if (!best || nearness > best.nearness) best = { shell, nearness };
    }
  }
  return best;
}
