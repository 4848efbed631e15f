import { shownColumn, shownUnit } from '../../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../../shared-core/report/shellQuantities.ts';
import { shellRanges } from '../../../../shared-core/report/shellRange.ts';
import type { ShellStatistics } from '../../../../shared-core/shells/shell.ts';
import type { Pen } from '../../../cone/overlay/pen.ts';
import type { PictureNumbers } from '../../numbers.ts';
import { textWidth } from '../../text/measure.ts';
import { writeLeft } from '../../text/writeLeft.ts';

/** Room that the numbers take above the cone. */
export const SHELL_NUMBERS_HEIGHT = 62;
const RANGE_SIZE = 19;
const TITLE_SIZE = 10.5;
const VALUE_SIZE = 13;
const COLUMN_GAP = 26;
/** Powers with letters that every font has. */
const UNIT_WORDS: Readonly<Record<string, string>> = {
  'Mpc^3': 'Mpc³',
  '(Mpc/h)^3': '(Mpc/h)³',
  'Mpc^-3': 'per Mpc³',
  '(h/Mpc)^3': 'per (Mpc/h)³',
};

const byKey = new Map(SHELL_QUANTITIES.map((quantity) => [quantity.key, quantity]));

/** What is told of a shell, in the order of telling: one number, or two as a range. What has no room is left out. */
const COLUMNS: readonly { readonly title: string; readonly keys: readonly string[] }[] = [
  { title: 'lookback time', keys: ['lookbackMinGyr', 'lookbackMaxGyr'] },
  { title: 'galaxies', keys: ['count'] },
  { title: 'comoving distance', keys: ['comovingMinMpc', 'comovingMaxMpc'] },
  { title: 'volume', keys: ['volumeMpc3'] },
  { title: 'number density', keys: ['densityPerMpc3'] },
  { title: 'effective volume', keys: ['effectiveVolumeMpc3'] },
  { title: 'effective redshift', keys: ['zEffective'] },
];

/**
 * Writes the numbers of one shell at the top of the box, with the ledger's own digits. Columns are as wide as any shell
 * needs, so that only digits change from one to the next.
 */
export function shellNumbersWriter({
  shells,
  all,
  units,
}: Pick<PictureNumbers, 'shells' | 'all' | 'units'>): (
  pen: Pen,
  shell: ShellStatistics,
  colour: string,
) => void {
  const column = all === null ? shells : [...shells, all];
  const ranges = shellRanges(shells);
  const range = (shell: ShellStatistics): string => ranges[shells.indexOf(shell)]!;
  const columns = COLUMNS.map(({ title, keys }) => {
    const plain = shownUnit(byKey.get(keys[0]!)!, units);
    const unit = plain === '' ? '' : ` ${UNIT_WORDS[plain] ?? plain}`;
    const texts = keys.map((key) => shownColumn(byKey.get(key)!, column, units));
    const value = (shell: ShellStatistics): string =>
      `${texts.map((text) => text(shell)).join(' – ')}${unit}`;
    const widths = shells.map((shell) => textWidth(value(shell), VALUE_SIZE, 600));
    return { title, value, width: Math.max(textWidth(title, TITLE_SIZE), ...widths) };
  });
  const first = Math.max(...shells.map((shell) => textWidth(range(shell), RANGE_SIZE, 600)));
  return (pen, shell, colour) => {
    writeLeft(pen, range(shell), 0, 34, RANGE_SIZE, colour, 600);
    let x = first + COLUMN_GAP;
    for (const { title, value, width } of columns) {
      if (x + width > pen.width) return;
      writeLeft(pen, title, x, 18, TITLE_SIZE, pen.theme.inkMuted, 400);
      writeLeft(pen, value(shell), x, 36, VALUE_SIZE, pen.theme.ink, 600);
      x += width + COLUMN_GAP;
    }
  };
}
