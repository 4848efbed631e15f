import { useComputed } from '@preact/signals';
import { useApp } from '../../state/app.ts';
import { Menu } from '../../ui/Menu.tsx';
import { copyLedger, exportLedger, LEDGER_COPIES, LEDGER_FORMATS } from '../ledger/ledgerFormats.ts';
import { PictureBench } from '../picture/PictureBench.tsx';
import { pictureShown } from '../picture/pictureShown.ts';

/** The picture by way of its bench; the ledger to a file or to the clipboard. */
export function ExportMenu() {
  const app = useApp();
  const empty = useComputed(() => app.derived.shells.value.length === 0).value;
  return (
    <>
      <Menu
        label="Export"
        buttonId="export-menu"
        title={
          empty
            ? 'Export the picture; there are no shells for a ledger yet, or the catalogue is still being read'
            : 'Export picture or ledger'
        }
        entries={[
          { kind: 'item', label: 'Picture or film…', hint: 'P', run: () => void (pictureShown.value = true) },
          {
            kind: 'group',
            label: 'Ledger to a file',
            entries: LEDGER_FORMATS.map((format) => ({
              kind: 'item',
              label: format.label,
              hint: format.hint,
              disabled: empty,
              run: () => void exportLedger(app, format),
            })),
          },
          {
            kind: 'group',
            label: 'Ledger to the clipboard',
            entries: LEDGER_COPIES.map(({ key, label, hint }) => ({
              kind: 'item',
              label,
              hint,
              disabled: empty,
              run: () => void copyLedger(app, key),
            })),
          },
        ]}
      />
      {pictureShown.value ? <PictureBench onClose={() => void (pictureShown.value = false)} /> : null}
    </>
  );
}
