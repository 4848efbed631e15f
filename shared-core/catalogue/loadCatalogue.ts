import type { Catalogue, ColumnMapping, Cut, SetAsideReason, SetAsideRow } from './catalogue.ts';
import { RowCleaner } from './cleaning.ts';
import type { ReadWatch } from './formats/delimited/byteStream.ts';
import type { Delimiter } from './formats/delimited/delimiter.ts';
import { type DelimitedTable, isBlank, openTable } from './formats/delimited/table.ts';
import { KeptRows } from './keptRows.ts';
import { keptText } from './keptText.ts';
import { columnNamed, resolveMapping } from './mapping.ts';
import { parseNumber } from './numbers.ts';
import { type Contains, checkCuts, cutText, OUTSIDE_REGION, STAYS, whyLeftOut } from './selection.ts';
import type { ColumnChoice } from './spellings.ts';
import { Tally } from './tally.ts';

/** How a catalogue is to be read. */
export interface LoadOptions extends ReadWatch {
  /** Found from the file's head when not given. */
  readonly delimiter?: Delimiter | undefined;
  /** A whole mapping, or the parts that are known (parseColumnMap); the header's spelling decides the rest. */
  readonly mapping?: ColumnChoice | undefined;
  /** Further columns to keep as numbers; those of the cuts are needed here only to select again afterwards. */
  readonly extras?: readonly string[] | undefined;
  readonly contains?: Contains | undefined;
  readonly cuts?: readonly Cut[] | undefined;
  /** Called for each row set aside, in file order. */
  readonly onSetAside?: ((row: SetAsideRow) => void) | undefined;
  /** Called for each row kept, in file order: for writing them out again without holding their text. */
  readonly onKept?: ((row: KeptRow) => void) | undefined;
}

/** A row that is used, as it was understood. */
export interface KeptRow {
  readonly line: number;
  /** Text of the id column; null where none is mapped. */
  readonly id: string | null;
  readonly raDeg: number;
  readonly decDeg: number;
  readonly redshift: number;
}

export interface LoadedCatalogue {
  readonly catalogue: Catalogue;
  readonly header: readonly string[];
  readonly mapping: ColumnMapping;
  readonly delimiter: Delimiter;
}

/**
 * Reads a catalogue from the bytes of a CSV or TSV file (or gzip of one). Memory is that of the numbers kept and of
 * the longest row, whatever the size of the file.
 *
 * Every row is either kept or set aside with a reason: account.rowsRead = kept + setAside. Blank lines, and comment
 * lines before the header, are no rows. A header alone gives a catalogue of no rows.
 *
 * Throws Refusal for what is no table, for columns that are not there (see resolveMapping) and for cuts the wrong way
 * round; Cancelled when the signal was raised; whatever the source throws is passed on.
 */
export async function loadCatalogue(
  bytes: AsyncIterable<Uint8Array>,
  options: LoadOptions = {},
): Promise<LoadedCatalogue> {
  const table = await openTable(bytes, options);
  try {
    const mapping = resolveMapping(table.header, options.mapping);
    const catalogue = await readRows(table, mapping, options);
    return { catalogue, header: table.header, mapping, delimiter: table.delimiter };
  } finally {
    await table.close();
  }
}

async function readRows(
  table: DelimitedTable,
  mapping: ColumnMapping,
  options: LoadOptions,
): Promise<Catalogue> {
  const { header, delimiter } = table;
  const cellOf = (name: string) => header.indexOf(columnNamed(header, name));
  const contains = options.contains ?? null;
  const cuts = options.cuts ?? [];
  checkCuts(cuts);
  const cutCells = cuts.map((cut) => cellOf(cut.column));
  const cutValues = new Float64Array(cuts.length);
  const cleaner = new RowCleaner({
    cells: header.length,
    ra: cellOf(mapping.ra),
    dec: cellOf(mapping.dec),
    radial: cellOf(mapping.radial.column),
    radialKind: mapping.radial.kind,
    weight: mapping.weight === null ? -1 : cellOf(mapping.weight),
  });
  const kept = new KeptRows(header, mapping, options.extras ?? []);
  const tally = new Tally();
  const { onSetAside, onKept } = options;
  const idCell = mapping.id === null ? -1 : cellOf(mapping.id);
  const setAside = (line: number, reason: SetAsideReason, column: string | null, text: string | null) => {
    tally.setAside(reason);
    onSetAside?.({ line, reason, column, text });
  };

  for await (const { rows, lines } of table.records) {
    for (let i = 0; i < rows.length; i++) {
      const row = rows[i]!;
      const reason = cleaner.judge(row);
      if (reason !== null) {
        if (isBlank(row)) continue;
        const cell = cleaner.blamedCell;
        const text = onSetAside && keptText(cell === -1 ? row.join(delimiter) : row[cell]!);
        setAside(lines[i]!, reason, header[cell] ?? null, text ?? null);
        continue;
      }
      for (let k = 0; k < cutCells.length; k++) cutValues[k] = parseNumber(row[cutCells[k]!]!);
      const left = whyLeftOut(cleaner.raDeg, cleaner.decDeg, contains, cuts, cutValues);
      if (left === STAYS) {
        tally.keep();
        kept.add(lines[i]!, cleaner, row);
        onKept?.({
          line: lines[i]!,
          id: idCell === -1 ? null : row[idCell]!.trim(),
          raDeg: cleaner.raDeg,
          decDeg: cleaner.decDeg,
          redshift: cleaner.redshift,
        });
      } else if (left === OUTSIDE_REGION) {
        setAside(lines[i]!, 'outsideRegion', null, null);
      } else {
        setAside(lines[i]!, 'outsideCuts', cuts[left]!.column, cutText(cutValues[left]!));
      }
    }
  }
  return kept.catalogue(tally);
}
