import { useComputed, useSignal } from '@preact/signals';
import { useState } from 'preact/hooks';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { edgesOf } from '../../shared-core/shells/edges.ts';
import { setEdges } from '../../shared-core/study/edits.ts';
import { useApp } from '../state/app.ts';
import { IconButton } from '../ui/IconButton.tsx';
import { Menu } from '../ui/Menu.tsx';
import { LedgerTable } from './ledger/LedgerTable.tsx';
import { NARROW_LEDGER } from './ledger/ledgerColumns.ts';
import { copyLedger, LEDGER_COPIES } from './ledger/ledgerFormats.ts';
import type { LedgerOrder } from './ledger/sortShells.ts';
import { WideLedger } from './ledger/WideLedger.tsx';
import { whyWithheld } from './notAtHand.ts';
import { ShellSheet } from './sheet/ShellSheet.tsx';
import './panels.css';
import './ledger/ledger.css';
import './sheet/sheet.css';

/** What the shells are worth: the ledger, and the sheet of the chosen shell. */
export function WorthPanel() {
  const app = useApp();
  const withheld = useComputed(() => whyWithheld(app)).value;
  const [wide, setWide] = useState(false);
  const order = useSignal<LedgerOrder | null>(null);
  const count = useComputed(() => app.derived.shells.value.length).value;
  const toSheet = (): void => document.getElementById('sheet-title')?.focus();
  return (
    <div class="worth-panel">
      <section class="ledger-part" aria-labelledby="ledger-title">
        <header class="part-head">
          <h2 id="ledger-title">Shell ledger</h2>
          <Menu
            label="Copy the ledger"
            title={withheld ?? 'Copy the ledger'}
            disabled={withheld !== null}
            entries={LEDGER_COPIES.map(({ key, label, hint }) => ({
              kind: 'item',
              label,
              hint,
              run: () => void copyLedger(app, key),
            }))}
          >
            Copy
          </Menu>
          <IconButton
            icon="widen"
            label="Whole ledger"
            pressed={wide}
            disabled={count === 0}
            onClick={() => setWide(!wide)}
          />
        </header>
        {count === 0 ? (
          <NoShells />
        ) : (
          <div class="ledger-scroll">
            <LedgerTable label="Shell ledger" columns={NARROW_LEDGER} order={order} onEnter={toSheet} />
          </div>
        )}
      </section>
      <ShellSheet />
      {wide && count > 0 ? (
        <WideLedger order={order} onEnter={toSheet} onClose={() => setWide(false)} />
      ) : null}
    </div>
  );
}

const FIRST_SHELLS = 5;

/** What to do when there is nothing to show yet. */
function NoShells() {
  const { studyState, derived, notices } = useApp();
  const { edges } = studyState.study.value;
  const sample = derived.sample.value;
  if (derived.trouble.value !== null) return <p class="empty">{derived.trouble.value}</p>;
  if (edges.length >= 2)
    return (
      <p class="empty">
        The shells need a piece of sky to have a volume: set a region, or open a catalogue to estimate one.
      </p>
    );
  const propose = (): void => {
    try {
      const scheme = { kind: 'redshift', shells: FIRST_SHELLS, zMin: null, zMax: null } as const;
      studyState.perform(setEdges(edgesOf(scheme, sample, derived.cosmology.value), 'Cut into five shells'));
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      notices.tell(error.message);
    }
  };
  return (
    <div class="empty">
      <p>No shells yet. Place their edges in the depth strip below the cone.</p>
      {sample.count === 0 ? null : (
        <button type="button" class="button" onClick={propose}>
          Cut into five of equal redshift
        </button>
      )}
    </div>
  );
}
