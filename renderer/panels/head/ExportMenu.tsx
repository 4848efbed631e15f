import { useComputed } from '@preact/signals';
import { useApp } from '../../state/app.ts';
import { Menu, type MenuEntry } from '../../ui/Menu.tsx';
import { copyLedger, exportLedger, LEDGER_FORMATS } from '../ledger/ledgerFormats.ts';

/** The ledger to a file or to the clipboard. */
export function ExportMenu() {
  const app = useApp();
  const empty = useComputed(() => app.derived.shells.value.length === 0).value;
  const copy = (label: string, hint: string, as: Parameters<typeof copyLedger>[1]) =>
    ({ kind: 'item', label, hint, run: () => void copyLedger(app, as) }) satisfies MenuEntry;
  return (
    <Menu
      label="Export"
      buttonId="export-menu"
      disabled={empty}
      title={empty ? 'There are no shells to export yet' : 'Export the shell ledger'}
      entries={[
        {
          kind: 'group',
          label: 'Ledger to a file',
          entries: LEDGER_FORMATS.map((format) => ({
            kind: 'item',
            label: format.label,
            hint: format.hint,
            run: () => void exportLedger(app, format),
          })),
        },
        {
          kind: 'group',
          label: 'Ledger to the clipboard',
          entries: [
            copy('With tabs', 'every digit', 'tabs'),
            copy('Aligned text', 'rounded', 'aligned'),
            copy('LaTeX tabular', 'rounded', 'latex'),
          ],
        },
      ]}
    />
  );
}
