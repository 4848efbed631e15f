import type { CellSet } from './cellSet.ts';
import { facePoint, faceToNest, pixelSizeDeg, pointOnFace } from './healpix.ts';
import { CORNER_X, CORNER_Y, cellPlace, cornerKey } from './healpixCells.ts';
import { OUTLINE_STEP_DEG } from './outline.ts';
import type { OutlineRing } from './region.ts';

interface EdgeStart {
  readonly cell: number;
  /** Edge k runs from corner k to corner k + 1, the cell on its left. */
  readonly edge: number;
}

/**
 * Boundary of a set of HEALPix cells (NESTED, ascending) as closed rings along cell edges, cells on the left; points
 * at most half a degree apart. Where two cells touch at a corner only, each keeps its own ring.
 */
export function cellOutline(nside: number, cells: Uint32Array, occupied: CellSet): OutlineRing[] {
  const open = openEdges(nside, cells, occupied);
  // Boundary edges by the corner that they start from: one, or two where cells touch at that corner only.
  const byCorner = new Map<number, EdgeStart[]>();
  for (const start of open) {
    const key = keyOf(nside, start);
    const list = byCorner.get(key);
    if (list) list.push(start);
    else byCorner.set(key, [start]);
  }
  const rings: OutlineRing[] = [];
  for (const first of open) {
    if (!byCorner.get(keyOf(nside, first))?.includes(first)) continue;
    const ring: EdgeStart[] = [];
    let current: EdgeStart | undefined = first;
    while (current !== undefined) {
      ring.push(current);
      remove(byCorner, keyOf(nside, current), current);
      const end = keyOf(nside, { cell: current.cell, edge: (current.edge + 1) % 4 });
      const choices: readonly EdgeStart[] = byCorner.get(end) ?? [];
      // Staying with the same cell keeps pieces that touch at a corner apart.
      current = choices.find((choice) => choice.cell === current!.cell) ?? choices[0];
    }
    rings.push(trace(nside, ring));
  }
  return rings;
}

function keyOf(nside: number, { cell, edge }: EdgeStart): number {
  const { face, x, y } = cellPlace(nside, cell);
  return cornerKey(nside, face, x + CORNER_X[edge]!, y + CORNER_Y[edge]!);
}

function remove(byCorner: Map<number, EdgeStart[]>, key: number, start: EdgeStart): void {
  const list = byCorner.get(key)!;
  list.splice(list.indexOf(start), 1);
}

/** Step to the cell across edge k, which holds within a face. */
const ACROSS_X = [0, 1, 0, -1] as const;
const ACROSS_Y = [-1, 0, 1, 0] as const;

function openEdges(nside: number, cells: Uint32Array, occupied: CellSet): EdgeStart[] {
  const open: EdgeStart[] = [];
  // Edges on a face's rim are matched by their two corners, each pair seen from both sides.
  const onRim: { start: EdgeStart; pair: string }[] = [];
  const pairs = new Map<string, number>();
  for (const cell of cells) {
    const { face, x, y } = cellPlace(nside, cell);
    for (let edge = 0; edge < 4; edge++) {
      const ax = x + ACROSS_X[edge]!;
      const ay = y + ACROSS_Y[edge]!;
      const start = { cell, edge };
      if (ax >= 0 && ay >= 0 && ax < nside && ay < nside) {
        if (!occupied.has(faceToNest(nside, face, ax, ay))) open.push(start);
        continue;
      }
      const a = keyOf(nside, start);
      const b = keyOf(nside, { cell, edge: (edge + 1) % 4 });
      const pair = a < b ? `${a} ${b}` : `${b} ${a}`;
      onRim.push({ start, pair });
      pairs.set(pair, (pairs.get(pair) ?? 0) + 1);
    }
  }
  for (const { start, pair } of onRim) if (pairs.get(pair) === 1) open.push(start);
  return open;
}

function trace(nside: number, ring: readonly EdgeStart[]): OutlineRing {
  // No edge of a cell is longer than 1.49 times the root of its area, at any nside (measured on healpy's boundaries).
  const steps = Math.max(1, Math.ceil((1.5 * pixelSizeDeg(nside)) / OUTLINE_STEP_DEG));
  const ra = new Float64Array(steps * ring.length);
  const dec = new Float64Array(steps * ring.length);
  let k = 0;
  for (const { cell, edge } of ring) {
    const { face, x, y } = cellPlace(nside, cell);
    const to = (edge + 1) % 4;
    for (let s = 0; s < steps; s++) {
      const part = s / steps;
      pointOnFace(
        nside,
        face,
        x + CORNER_X[edge]! + part * (CORNER_X[to]! - CORNER_X[edge]!),
        y + CORNER_Y[edge]! + part * (CORNER_Y[to]! - CORNER_Y[edge]!),
      );
      ra[k] = facePoint.raDeg;
      dec[k] = facePoint.decDeg;
      k++;
    }
  }
  return { raDeg: ra, decDeg: dec };
}
