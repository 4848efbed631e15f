import { Refusal } from '../base/refusal.ts';
import { roundTo } from '../base/roundTo.ts';
import { checkEdges, checkSomeEdges } from '../shells/edges.ts';
import type { Study } from './schema.ts';

/** A change of the study. Edits with the same `merge` text in a row count as one step of undo (a drag, typing). */
export interface Edit {
  readonly label: string;
  readonly merge?: string;
  readonly apply: (study: Study) => Study;
}

/** Replaces some parts of the study. */
export function change(label: string, parts: Partial<Study>, merge?: string): Edit {
  return { label, apply: (study) => ({ ...study, ...parts }), ...(merge === undefined ? {} : { merge }) };
}

/** Replaces some parts of the look. */
export function changeLook(label: string, parts: Partial<Study['look']>): Edit {
  return { label, apply: (study) => ({ ...study, look: { ...study.look, ...parts } }) };
}

/** Puts all edges in place of the old ones. @throws Refusal for edges that cannot be */
export function setEdges(edges: readonly number[], label = 'Set the shells'): Edit {
  return {
    label,
    apply: (study) => ({ ...study, edges: edges.length === 0 ? [] : [...checkEdges(edges)] }),
  };
}

/**
 * The edges in the way of edge `index` on its way to redshift z: those that it would pass, or come to stand on.
 * @returns index of the first and the last of them, ascending; null when the way is free
 */
export function edgesInTheWay(
  edges: readonly number[],
  index: number,
  z: number,
): readonly [first: number, last: number] | null {
  const first = edges.findIndex((edge, i) => i < index && edge >= z);
  if (first >= 0) return [first, index - 1];
  const last = edges.findLastIndex((edge, i) => i > index && edge <= z);
  return last >= 0 ? [index + 1, last] : null;
}

/** Moves edge `index` to redshift z and takes out the edges in its way. */
export function moveEdgeThrough(index: number, z: number): Edit {
  return {
    label: `Move edge ${index + 1}, and remove those in its way`,
    apply: (study) => {
      const way = edgesInTheWay(study.edges, index, z);
      const edges = study.edges.with(index, z).filter((_, i) => way === null || i < way[0] || i > way[1]);
      return { ...study, edges: [...checkSomeEdges(edges)] };
    },
  };
}

/**
 * Moves edge `index` to redshift z. `gesture` names the drag it belongs to.
 * @throws Refusal ('use') for an edge that is not there, a z outside of 0..1100, or one at or beyond another edge
 */
export function moveEdge(index: number, z: number, gesture?: string): Edit {
  return {
    label: `Move edge ${index + 1}`,
    ...(gesture === undefined ? {} : { merge: gesture }),
    apply: (study) => {
      if (!(index >= 0 && index < study.edges.length))
        throw new Refusal(`There is no edge ${index + 1}: the study has ${study.edges.length}.`, 'use');
      const way = edgesInTheWay(study.edges, index, z);
      if (way !== null) throw new Refusal(wayIsBarred(study.edges, index, z, way), 'use');
      return { ...study, edges: [...checkSomeEdges(study.edges.with(index, z))] };
    },
  };
}

/** Adds an edge: splits the shell that z lies in, or adds a shell at either end. */
export function addEdge(z: number): Edit {
  return {
    label: `Add an edge at z ${z}`,
    apply: (study) => {
      if (study.edges.includes(z))
        throw new Refusal(`There is an edge at redshift ${z} already: give another.`, 'use');
      const edges = [...study.edges, z].sort((a, b) => a - b);
      checkSomeEdges(edges);
      return { ...study, edges };
    },
  };
}

/** Removes an edge: merges the two shells beside it, or drops the first or last shell. */
export function removeEdge(index: number): Edit {
  return {
    label: `Remove edge ${index + 1}`,
    apply: (study) => {
      if (!(index >= 0 && index < study.edges.length))
        throw new Refusal(`There is no edge ${index + 1}: the study has ${study.edges.length}.`, 'use');
      const edges = study.edges.toSpliced(index, 1);
      return { ...study, edges: edges.length < 2 ? [] : edges };
    },
  };
}

/**
 * Takes one shell out. In the middle there can be no gap, so its room goes to its two neighbours, at the middle
 * of the shell; the first and last shell simply go.
 */
export function removeShell(index: number): Edit {
  return {
    label: `Remove shell ${index + 1}`,
    apply: (study) => {
      const { edges } = study;
      if (!(index >= 0 && index < edges.length - 1))
        throw new Refusal(
          `There is no shell ${index + 1}: the study has ${Math.max(0, edges.length - 1)}.`,
          'use',
        );
      if (edges.length === 2) return { ...study, edges: [] };
      if (index === 0) return { ...study, edges: edges.slice(1) };
      if (index === edges.length - 2) return { ...study, edges: edges.slice(0, -1) };
      return { ...study, edges: edges.toSpliced(index, 2, (edges[index]! + edges[index + 1]!) / 2) };
    },
  };
}

function wayIsBarred(
  edges: readonly number[],
  index: number,
  z: number,
  [first, last]: readonly [number, number],
): string {
  const back = first < index;
  const barrier = back ? first : last;
  const [shown, edge] = toldApart(z, edges[barrier]!);
  const place = shown === edge ? 'is the place of' : back ? 'lies before' : 'lies behind';
  const which = first === last ? `edge ${first + 1}` : `edges ${first + 1} to ${last + 1}`;
  const anew =
    index === edges.length - 1 && back
      ? ` or lay the shells out anew up to ${shown},`
      : index === 0 && !back
        ? ` or lay the shells out anew from ${shown},`
        : '';
  return `${shown} ${place} edge ${barrier + 1} (z ${edge}): remove ${which} first,${anew} or give another place.`;
}

// Five digits tell a reader which edge is meant; more of them only where two redshifts are nearly the same.
function toldApart(a: number, b: number): readonly [string, string] {
  const shown = (z: number, digits: number) => String(roundTo(z, digits));
  let digits = 5;
  while (digits < 17 && a !== b && shown(a, digits) === shown(b, digits)) digits++;
  return [shown(a, digits), shown(b, digits)];
}
