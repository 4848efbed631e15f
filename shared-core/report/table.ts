import { csvCell } from '../base/cell.ts';
import {
  type Quantity,
  type ShownUnits,
  shownKey,
  shownText,
  shownUnit,
  shownValue,
  UNITS,
} from './quantity.ts';

/** What a table is made of: rows, the quantities to show, the reader's units, and lines that belong to it. */
export interface Table<Row> {
  readonly rows: readonly Row[];
  readonly quantities: readonly Quantity<Row>[];
  readonly units: ShownUnits;
  /** Facts a reader must know: cosmology, region, selection, method. */
  readonly notes: readonly string[];
}

/** Aligned columns for reading, numbers rounded; too many columns go on in further blocks of at most `width`. */
export function asText<Row>(table: Table<Row>, width = 100): string {
  const columns = table.quantities.map((q) => {
    const cells = table.rows.map((row) => shownText(q, row, table.units));
    const head = [q.title, shownUnit(q, table.units)];
    return {
      starts: q.startsBlock === true,
      head,
      cells,
      wide: Math.max(...head.map((t) => t.length), ...cells.map((t) => t.length)),
    };
  });
  const numberWide = Math.max(1, String(table.rows.length).length);
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
    for (let i = 0; i < table.rows.length; i++) lines.push(line(String(i + 1), (c) => c.cells[i]!));
  }
  if (table.notes.length > 0) lines.push('', ...table.notes);
  return `${lines.join('\n')}\n`;
}

/** RFC 4180 text, every digit of every number; the header holds the JSON names. */
export function asCsv<Row>({ rows, quantities, units }: Table<Row>): string {
  const head = quantities.map((q) => csvCell(shownKey(q, units))).join(',');
  const body = rows.map((row) => quantities.map((q) => fullDigits(shownValue(q, row, units))).join(','));
  return `${[head, ...body].join('\r\n')}\r\n`;
}

/** Enhanced character-separated values (ECSV 1.0, the astropy project's APE 6): units and meanings travel along. */
export function asEcsv<Row>({ rows, quantities, units, notes }: Table<Row>): string {
  const header = ['# %ECSV 1.0', '# ---', '# delimiter: ","', '# datatype:'];
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
  if (notes.length > 0) header.push('# meta:', '#   comments:', ...notes.map((n) => `#   - ${yamlText(n)}`));
  header.push('# schema: astropy-2.0');
  const head = quantities.map((q) => shownKey(q, units)).join(',');
  const body = rows.map((row) => quantities.map((q) => fullDigits(shownValue(q, row, units))).join(','));
  return `${[...header, head, ...body].join('\n')}\n`;
}

/** A LaTeX tabular with the rounded numbers of the text table, notes as comments. */
export function asLatex<Row>(table: Table<Row>): string {
  const { quantities, units, rows, notes } = table;
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
  return [
    ...notes.map((n) => `% ${n.replaceAll('\n', ' ')}`),
    `\\begin{tabular}{${'r'.repeat(quantities.length)}}`,
    '\\hline',
    `${quantities.map(name).join(' & ')} \\\\`,
    `${quantities.map(unit).join(' & ')} \\\\`,
    '\\hline',
    ...rows.map((row) => `${quantities.map((q) => cell(shownText(q, row, units))).join(' & ')} \\\\`),
    '\\hline',
    '\\end{tabular}',
    '',
  ].join('\n');
}

/** Plain objects with every digit, names as in the CSV header; null where there is no number. */
export function asObjects<Row>({ rows, quantities, units }: Table<Row>): Record<string, number | null>[] {
  return rows.map((row) =>
    Object.fromEntries(quantities.map((q) => [shownKey(q, units), shownValue(q, row, units)])),
  );
}

function fullDigits(value: number | null): string {
  return value === null ? '' : String(value);
}

function yamlText(text: string): string {
  return JSON.stringify(text);
}
