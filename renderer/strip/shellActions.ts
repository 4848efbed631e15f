import { addEdge, type Edit, removeEdge, removeShell } from '../../shared-core/study/edits.ts';
import { redshiftPerPixel, tidyRedshift } from './edgeMoves.ts';
import type { RadialPixel } from './layout.ts';

/** An edit of the shells, and which shell is selected after it. */
export interface ShellAction {
  readonly edit: Edit;
  readonly selected: number | null;
}

/** Index of the shell that holds a redshift (the last one holds its upper edge); null outside of all. */
export function shellAt(edges: readonly number[], z: number): number | null {
  const last = edges.length - 1;
  if (last < 1 || !(z >= edges[0]! && z <= edges[last]!)) return null;
  let [low, high] = [0, last - 1];
  while (low < high) {
    const middle = (low + high + 1) >>> 1;
    if (edges[middle]! <= z) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** The selected shell where it still exists. */
export function standingShell(edges: readonly number[], selected: number | null): number | null {
  return selected !== null && selected >= 0 && selected < edges.length - 1 ? selected : null;
}

/** Where a new edge is proposed: in the middle, as the depth is read, of a shell; behind all when there is none. */
export function middleOfShell(edges: readonly number[], shell: number, scale: RadialPixel): number {
  const [zMin, zMax] = [edges[shell]!, edges[shell + 1]!];
  const { axis } = scale;
  const z = axis.redshiftAt((axis.at(zMin) + axis.at(zMax)) / 2);
  const tidy = tidyRedshift(z, redshiftPerPixel(scale, z));
  return tidy > zMin && tidy < zMax ? tidy : z;
}

export function widestShell(edges: readonly number[], scale: RadialPixel): number | null {
  let widest: number | null = null;
  let widestPx = 0;
  for (let i = 0; i + 1 < edges.length; i++) {
    const px = scale.at(edges[i + 1]!) - scale.at(edges[i]!);
    if (px > widestPx) [widest, widestPx] = [i, px];
  }
  return widest;
}

export function splitShell(edges: readonly number[], shell: number, scale: RadialPixel): ShellAction {
  const edit = addEdge(middleOfShell(edges, shell, scale));
  return { edit: { ...edit, label: `Split shell ${shell + 1}` }, selected: shell };
}

/** Null for the last shell, which has no next one. */
export function mergeWithNext(edges: readonly number[], shell: number): ShellAction | null {
  if (shell + 2 >= edges.length) return null;
  return {
    edit: { ...removeEdge(shell + 1), label: `Merge shells ${shell + 1} and ${shell + 2}` },
    selected: shell,
  };
}

/** Takes a shell out; the one that follows, or else the last, is selected then. */
export function takeOut(edges: readonly number[], shell: number): ShellAction {
  const left = edges.length - 2;
  return { edit: removeShell(shell), selected: left <= 0 ? null : Math.min(shell, left - 1) };
}
