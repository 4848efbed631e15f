import { RowCleaner } from '../../../shared-core/catalogue/cleaning.ts';
import type { DecimalMark } from '../../../shared-core/catalogue/formats/delimited/decimals.ts';
import { reasonText } from '../../../shared-core/catalogue/reasons.ts';
import type { MappingDraft } from './mappingDraft.ts';

/** Whether a row of the preview can be used, by the very function that reads the catalogue. */
export interface JudgedRow {
  /** Null for a usable row. */
  readonly reason: string | null;
  /** The cell to blame, or -1. */
  readonly blamedCell: number;
}

/** Judges rows of text under a mapping; null while the mapping is not finished. */
export function judgeRows(
  rows: readonly (readonly string[])[],
  header: readonly string[],
  draft: MappingDraft,
  decimalMark: DecimalMark,
): JudgedRow[] | null {
  const at = (name: string | null) => (name === null ? -1 : header.indexOf(name));
  const [ra, dec, radial] = [at(draft.ra), at(draft.dec), at(draft.radialColumn)];
  if (ra === -1 || dec === -1 || radial === -1) return null;
  const cleaner = new RowCleaner({
    cells: header.length,
    ra,
    dec,
    radial,
    radialKind: draft.radialKind,
    weight: at(draft.weight),
    decimalMark,
  });
  return rows.map((row) => {
    const reason = cleaner.judge(row);
    return { reason: reason === null ? null : reasonText(reason), blamedCell: cleaner.blamedCell };
  });
}
