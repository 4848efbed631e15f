import { Refusal } from '../base/refusal.ts';
import type { Catalogue, Cut, RowAccount, SetAsideRow } from './catalogue.ts';
import { findColumn, listColumns } from './columnNames.ts';
import { findRepeats, keptRepeats } from './positions.ts';
import { type Contains, checkCuts, cutText, OUTSIDE_REGION, STAYS, whyLeftOut } from './selection.ts';
import { Tally } from './tally.ts';

/** Which rows of a catalogue stay, and what happened to all rows of its file. */
export interface Selection {
  /** Indices into the catalogue's arrays, ascending. */
  readonly indices: Uint32Array;
  readonly account: RowAccount;
  /** Rows set aside by each cut: by the first that they fail. */
  readonly cutCounts: readonly number[];
}

/**
 * Selects again in memory: the same rows and the same account as loading the file with this region and these cuts,
 * if the catalogue was loaded without. Each cut's column must be among the extras.
 *
 * Throws Refusal for a cut on a column that was not loaded and for one the wrong way round.
 */
export function select(
  catalogue: Catalogue,
  contains: Contains,
  cuts: readonly Cut[],
  onSetAside?: (row: SetAsideRow) => void,
): Selection {
  checkCuts(cuts);
  const { raDeg, decDeg, line } = catalogue;
  const columns = cuts.map((cut) => extraNamed(catalogue, cut.column));
  const values = new Float64Array(cuts.length);
  const keep = new Uint8Array(raDeg.length);
  const cutCounts = cuts.map(() => 0);
  const tally = new Tally(catalogue.account);
  let kept = 0;
  for (let i = 0; i < raDeg.length; i++) {
    for (let k = 0; k < columns.length; k++) values[k] = columns[k]![i]!;
    const left = whyLeftOut(raDeg[i]!, decDeg[i]!, contains, cuts, values);
    if (left === STAYS) {
      keep[i] = 1;
      kept++;
      tally.keep();
    } else if (left === OUTSIDE_REGION) {
      tally.setAside('outsideRegion');
      onSetAside?.({ line: line[i]!, reason: 'outsideRegion', column: null, text: null });
    } else {
      cutCounts[left]!++;
      tally.setAside('outsideCuts');
      onSetAside?.({
        line: line[i]!,
        reason: 'outsideCuts',
        column: cuts[left]!.column,
        text: cutText(values[left]!),
      });
    }
  }
  const indices = new Uint32Array(kept);
  for (let i = 0, next = 0; i < keep.length; i++) if (keep[i] === 1) indices[next++] = i;
  const repeats = keptRepeats(findRepeats(raDeg, decDeg), keep);
  return { indices, account: tally.account(repeats.row.length), cutCounts };
}

/** The selected rows as a catalogue of their own, with the selection's account. Arrays are copies. */
export function take(catalogue: Catalogue, selection: Selection): Catalogue {
  const { indices, account } = selection;
  const copies = new Map<Float64Array, Float64Array>();
  const taken = (column: Float64Array) => {
    let copy = copies.get(column);
    if (copy === undefined) {
      copy = new Float64Array(indices.length);
      for (let i = 0; i < indices.length; i++) copy[i] = column[indices[i]!]!;
      copies.set(column, copy);
    }
    return copy;
  };
  return {
    account,
    raDeg: taken(catalogue.raDeg),
    decDeg: taken(catalogue.decDeg),
    redshift: taken(catalogue.redshift),
    weight: catalogue.weight && taken(catalogue.weight),
    magnitude: catalogue.magnitude && taken(catalogue.magnitude),
    extras: new Map([...catalogue.extras].map(([name, column]) => [name, taken(column)])),
    line: taken(catalogue.line),
  };
}

function extraNamed(catalogue: Catalogue, name: string): Float64Array {
  const names = [...catalogue.extras.keys()];
  const found = names[findColumn(names, name)];
  if (found === undefined) {
    const loaded =
      names.length === 0 ? 'no column was loaded for cuts' : `loaded for cuts are ${listColumns(names)}`;
    throw new Refusal(
      `The cut on "${name}" needs that column, but ${loaded}: load the file again with it.`,
      'use',
    );
  }
  return catalogue.extras.get(found)!;
}
