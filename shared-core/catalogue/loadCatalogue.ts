import type { Catalogue, ColumnMapping, Cut, SetAsideRow } from './catalogue.ts';
import type { ReadWatch } from './formats/delimited/byteStream.ts';
import type { Delimiter } from './formats/delimited/delimiter.ts';
import { openTable } from './formats/delimited/openTable.ts';
import { resolveMapping } from './mapping.ts';
import { type KeptRow, RowIntake } from './rowIntake.ts';
import { type Contains, checkCuts } from './selection.ts';
import type { ColumnChoice } from './spellings.ts';

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
  /** Called for each row kept, in file order, with its name where the mapping has an id column. */
  readonly onKept?: ((row: KeptRow) => void) | undefined;
}

export type { KeptRow };

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
  const { contains = null, cuts = [], extras = [], onSetAside, onKept } = options;
  checkCuts(cuts);
  const table = await openTable(bytes, options);
  try {
    const { header, delimiter } = table;
    const mapping = resolveMapping(header, options.mapping);
    const intake = new RowIntake(table, mapping, {
      choice: { contains, cuts },
      extras,
      onSetAside,
      onKept,
    });
    await table.numbers(intake.wanted, intake.required, intake);
    return { catalogue: intake.catalogue(), header, mapping, delimiter };
  } finally {
    await table.close();
  }
}
