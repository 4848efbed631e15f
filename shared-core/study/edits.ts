import { Refusal } from '../base/refusal.ts';
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

/** Moves edge `index` to redshift z; it may not pass its neighbours. `gesture` names the drag it belongs to. */
export function moveEdge(index: number, z: number, gesture?: string): Edit {
  return {
    label: `Move edge ${index + 1}`,
    ...(gesture === undefined ? {} : { merge: gesture }),
    apply: (study) => {
      if (!(index >= 0 && index < study.edges.length))
        throw new Refusal(`There is no edge ${index + 1}: the study has ${study.edges.length}.`, 'use');
      return { ...study, edges: [...checkEdges(study.edges.with(index, z))] };
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
