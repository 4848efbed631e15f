import { csvCell } from '../base/cell.ts';
import {
  type Quantity,
  type ShownUnits,
  shownColumn,
  shownKey,
  shownUnit,
  shownValue,
  UNITS,
} from './quantity.ts';
import { yamlText, yamlValue } from './yaml.ts';

/** What a table is made of: rows, the quantities to show, the reader's units, and lines that belong to it. */
export interface Table<Row> {
  readonly rows: readonly Row[];
  readonly quantities: readonly Quantity<Row>[];
  readonly units: ShownUnits;
  /** Facts a reader must know: cosmology, region, selection, method. */
  readonly notes: readonly string[];
  /** Rows carry their number, from 1, in a column of this name before all others; without it only text has numbers. */
  readonly numbered?: string;
  /** A row of all rows as one: last in forms for reading, never among the rows that machines read. */
  readonly all?: Row | null;
  /** What repeats the table, as plain values: for ECSV and JSON. */
  readonly meta?: Readonly<Record<string, unknown>>;
}

/** The rows with what stands before them in forms for reading: their numbers, and 'all'. */
export function labelledRows<Row>({ rows, all }: Pick<Table<Row>, 'rows' | 'all'>): [string, Row][] {
  const numbered = rows.map((row, i): [string, Row] => [String(i + 1), row]);
  return all == null ? numbered : [...numbered, ['all', all]];
}

/** Aligned columns for reading, numbers rounded; too many columns go on in further blocks of at most `width`. */
export function asText<Row>(table: Table<Row>, width = 100): string {
  const labelled = labelledRows(table);
  const rows = labelled.map(([, row]) => row);
  const columns = table.quantities.map((q) => {
    const cells = rows.map(shownColumn(q, rows, table.units));
    const head = [q.title, shownUnit(q, table.units)];
    return {
      starts: q.startsBlock === true,
      head,
      cells,
      wide: Math.max(...head.map((t) => t.length), ...cells.map((t) => t.length)),
    };
  });
  const numberWide = Math.max(1, ...labelled.map(([label]) => label.length));
  const whole = columns.reduce((sum, c) => sum + c.wide + 2, numberWide);
  const blocks: (typeof columns)[] = [];
  let room = 0;
  for (const column of columns) {
    const needed = column.wide + 2;
    if (blocks.length === 0 || room < needed || (column.starts && whole > width)) {
      blocks.push([]);
      room = width - numberWide;
    }
    blocks[blocks.length - 1]!.push(column);
    room -= needed;
  }
  const lines: string[] = [];
  for (const block of blocks) {
    if (lines.length > 0) lines.push('');
    const line = (label: string, cell: (c: (typeof block)[number]) => string) =>
      label.padStart(numberWide) + block.map((c) => `  ${cell(c).padStart(c.wide)}`).join('');
    lines.push(line('#', (c) => c.head[0]!));
    if (block.some((c) => c.head[1] !== '')) lines.push(line('', (c) => c.head[1]!).trimEnd());
    for (const [i, [label]] of labelled.entries()) lines.push(line(label, (c) => c.cells[i]!));
  }
  if (table.notes.length > 0) lines.push('', ...table.notes);
  return `${lines.join('\n')}\n`;
}

/** RFC 4180 text, every digit of every number; the header holds the JSON names. Rows alone: the form has no place for notes. */
export function asCsv<Row>(table: Table<Row>): string {
  return `${csvLines(table).join('\r\n')}\r\n`;
}

function csvLines<Row>({ rows, quantities, units, numbered }: Table<Row>): string[] {
  const head = [...(numbered === undefined ? [] : [numbered]), ...quantities.map((q) => shownKey(q, units))];
  const body = rows.map((row, i) =>
    [
      ...(numbered === undefined ? [] : [i + 1]),
      ...quantities.map((q) => shownValue(q, row, units) ?? ''),
    ].join(','),
  );
  return [head.map(csvCell).join(','), ...body];
}

/** Enhanced character-separated values (ECSV 1.0, the astropy project's APE 6): units and meanings travel along. */
export function asEcsv<Row>(table: Table<Row>): string {
  const { quantities, units, notes, numbered, all, meta } = table;
  const header = ['# %ECSV 1.0', '# ---', '# delimiter: ","', '# datatype:'];
  if (numbered !== undefined)
    header.push(
      `# - {name: ${numbered}, datatype: int64, description: "Number of the ${numbered}, from 1."}`,
    );
  for (const q of quantities) {
    const unit = UNITS[q.unit].ecsv[units.perH ? 1 : 0];
    const fields = [`name: ${shownKey(q, units)}`];
    if (unit !== '') fields.push(`unit: ${yamlText(unit)}`);
    fields.push(
      `datatype: ${q.unit === 'count' ? 'int64' : 'float64'}`,
      `description: ${yamlText(`${q.meaning} ${q.formula}`)}`,
    );
    header.push(`# - {${fields.join(', ')}}`);
  }
  const more = { ...meta, ...(all == null ? {} : { all: asObject(table, all) }) };
  if (notes.length > 0) header.push('# meta:', '#   comments:', ...notes.map((n) => `#   - ${yamlText(n)}`));
  else if (Object.keys(more).length > 0) header.push('# meta:');
  for (const [key, value] of Object.entries(more)) header.push(`#   ${key}: ${yamlValue(value)}`);
  header.push('# schema: astropy-2.0');
  return `${[...header, ...csvLines(table)].join('\n')}\n`;
}

/** A LaTeX tabular with the rounded numbers of the text table, notes as comments. */
export function asLatex<Row>(table: Table<Row>): string {
  const { quantities, units, notes, numbered, all } = table;
  const labelled = labelledRows(table);
  const rows = labelled.map(([, row]) => row);
  const columns = quantities.map((q) => shownColumn(q, rows, units));
  const name = (q: Quantity<Row>) => q.latexTitle;
  const unit = (q: Quantity<Row>) => {
    const text = UNITS[q.unit].latex[units.perH ? 1 : 0];
    return text === '' ? '' : `[${text}]`;
  };
  const cell = (text: string) => {
    const [mantissa, power] = text.split('e');
    if (text === '-') return '--';
    return power === undefined ? `$${mantissa}$` : `$${mantissa}\\times10^{${power}}$`;
  };
  const line = (label: string, cells: readonly string[]) =>
    `${(numbered === undefined ? cells : [label, ...cells]).join(' & ')} \\\\`;
  const lines = labelled.map(([label, row]) =>
    line(
      label,
      columns.map((text) => cell(text(row))),
    ),
  );
  return [
    ...notes.map((n) => `% ${n.replaceAll(/\s+/g, ' ')}`),
    `\\begin{tabular}{${'r'.repeat(quantities.length + (numbered === undefined ? 0 : 1))}}`,
    '\\hline',
    line(numbered ?? '', quantities.map(name)),
    line('', quantities.map(unit)),
    '\\hline',
    ...lines.slice(0, table.rows.length),
    ...(all == null ? [] : ['\\hline', ...lines.slice(table.rows.length)]),
    '\\hline',
    '\\end{tabular}',
    '',
  ].join('\n');
}

/** Plain objects with every digit, names as in the CSV header; null where there is no number. */
export function asObjects<Row>(table: Table<Row>): Record<string, number | null>[] {
  const { rows, numbered } = table;
  return rows.map((row, i) => ({
    ...(numbered === undefined ? {} : { [numbered]: i + 1 }),
    ...asObject(table, row),
  }));
}

/** The numbers of one row, likewise. */
export function asObject<Row>(
  { quantities, units }: Pick<Table<Row>, 'quantities' | 'units'>,
  row: Row,
): Record<string, number | null> {
  return Object.fromEntries(quantities.map((q) => [shownKey(q, units), shownValue(q, row, units)]));
}
