import { LEDGER_QUANTITIES } from '../../../shared-core/report/ledgerQuantities.ts';
import { asCsv, asEcsv, asLatex, asText } from '../../../shared-core/report/table.ts';
import type { App } from '../../state/app.ts';
import { copyText } from '../../ui/clipboard.ts';
import { whyWithheld } from '../notAtHand.ts';
import { currentLedgerFacts, currentLedgerTable } from './currentLedger.ts';
import { asTsv, ledgerJson } from './ledgerTable.ts';

/** The forms in which the ledger leaves the program. */
export const LEDGER_FORMATS = [
  { key: 'csv', label: 'CSV', hint: 'every digit, rows alone', suffix: '.csv', mimeType: 'text/csv' },
  { key: 'ecsv', label: 'ECSV', hint: 'with units and notes', suffix: '.ecsv', mimeType: 'text/plain' },
  { key: 'latex', label: 'LaTeX', hint: "the ledger's columns", suffix: '.tex', mimeType: 'text/x-tex' },
  { key: 'latex-all', label: 'LaTeX, all', hint: 'every column', suffix: '.tex', mimeType: 'text/x-tex' },
  { key: 'json', label: 'JSON', hint: 'every digit', suffix: '.json', mimeType: 'application/json' },
  { key: 'text', label: 'Text', hint: 'aligned, rounded', suffix: '.txt', mimeType: 'text/plain' },
] as const;
export type LedgerFormat = (typeof LEDGER_FORMATS)[number];

/** Writes the ledger to a file that the person names. */
export async function exportLedger(app: App, format: LedgerFormat): Promise<void> {
  if (refused(app)) return;
  const text = ledgerText(app, format.key);
  const name = `${app.studyState.study.value.name} shells${format.suffix}`;
  await app.files.exportFile(name, format.mimeType, new TextEncoder().encode(text));
}

/** The forms in which it goes to the clipboard. */
export const LEDGER_COPIES = [
  { key: 'tabs', label: 'With tabs', hint: 'every digit' },
  { key: 'text', label: 'Aligned text', hint: 'rounded' },
  { key: 'latex', label: 'LaTeX', hint: "the ledger's columns" },
  { key: 'latex-all', label: 'LaTeX, all', hint: 'every column' },
] as const;
type LedgerCopy = (typeof LEDGER_COPIES)[number]['key'];

/** Puts the ledger on the clipboard: tabs and every digit for a spreadsheet, or aligned and rounded for reading. */
export async function copyLedger(app: App, as: LedgerCopy): Promise<void> {
  if (refused(app)) return;
  const table = currentLedgerTable(app);
  const text = as === 'tabs' ? asTsv(table) : ledgerText(app, as);
  const done = await copyText(text);
  app.notices.tell(
    done
      ? `The ledger of ${table.rows.length} ${table.rows.length === 1 ? 'shell' : 'shells'} is on the clipboard.`
      : 'The browser did not let the ledger onto the clipboard: export it to a file instead.',
    { tone: done ? 'fact' : 'problem' },
  );
}

/** Cuts and region are the study's at once, its galaxies a moment later: between, the notes would not be of the numbers. */
function refused(app: App): boolean {
  const why = whyWithheld(app);
  if (why !== null) app.notices.tell(why);
  return why !== null;
}

function ledgerText(app: App, key: LedgerFormat['key']): string {
  const table = currentLedgerTable(app);
  switch (key) {
    case 'csv':
      return asCsv(table);
    case 'ecsv':
      return asEcsv(table);
    case 'latex':
      return asLatex({
        ...table,
        // In a plan some of them have no number.
        quantities: LEDGER_QUANTITIES.map(({ key }) => table.quantities.find((q) => q.key === key)!),
      });
    case 'latex-all':
      return asLatex(table);
    case 'text':
      return asText(table);
    case 'json':
      return `${JSON.stringify(ledgerJson(currentLedgerFacts(app)), null, 2)}\n`;
  }
}
