import { useComputed } from '@preact/signals';
import { useApp } from '../../state/app.ts';
import { Menu } from '../../ui/Menu.tsx';
import { copyLedger, exportLedger, LEDGER_COPIES, LEDGER_FORMATS } from '../ledger/ledgerFormats.ts';
import { whyWithheld } from '../notAtHand.ts';
import { PictureBench } from '../picture/PictureBench.tsx';
import { pictureShown } from '../picture/pictureShown.ts';

/** The picture by way of its bench; the ledger to a file or to the clipboard. */
export function ExportMenu() {
  const app = useApp();
  const withheld = useComputed(() => whyWithheld(app)).value;
  return (
    <>
      <Menu
        label="Export"
        buttonId="export-menu"
        title={withheld === null ? 'Export picture or ledger' : `No ledger to export: ${withheld}`}
        entries={[
          { kind: 'item', label: 'Picture or film…', hint: 'P', run: () => void (pictureShown.value = true) },
          {
            kind: 'group',
            label: 'Ledger to a file',
            entries: LEDGER_FORMATS.map((format) => ({
              kind: 'item',
              label: format.label,
              hint: format.hint,
              disabled: withheld !== null,
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
              disabled: withheld !== null,
              run: () => void copyLedger(app, key),
            })),
          },
        ]}
      />
      {pictureShown.value ? <PictureBench onClose={() => void (pictureShown.value = false)} /> : null}
    </>
  );
}
