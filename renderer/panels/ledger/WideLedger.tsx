import type { Signal } from '@preact/signals';
import { useLayoutEffect, useRef } from 'preact/hooks';
import { useApp } from '../../state/app.ts';
import { IconButton } from '../../ui/IconButton.tsx';
import { whyWithheld } from '../notAtHand.ts';
import { currentLedgerTable } from './currentLedger.ts';
import { LedgerTable } from './LedgerTable.tsx';
import { WHOLE_LEDGER } from './ledgerColumns.ts';
import { exportLedger, LEDGER_FORMATS } from './ledgerFormats.ts';
import type { LedgerOrder } from './sortShells.ts';

/**
 * Every number of every shell, laid over the cone. The depth strip and the sheet stay in reach: edges can be dragged
 * while the whole ledger is watched.
 */
export function WideLedger(props: {
  readonly order: Signal<LedgerOrder | null>;
  readonly onEnter: () => void;
  readonly onClose: () => void;
}) {
  const { order, onEnter, onClose } = props;
  const app = useApp();
  const withheld = whyWithheld(app);
  const ref = useRef<HTMLDivElement>(null);
  useLayoutEffect(() => {
    const before = document.activeElement;
    const stage = document.querySelector('.centre > .stage') ?? document.body;
    const cover = (): void => {
      const { left, top, width, height } = stage.getBoundingClientRect();
      const style = ref.current?.style;
      if (style === undefined) return;
      style.left = `${left}px`;
      style.top = `${top}px`;
      style.width = `${width}px`;
      style.height = `${height}px`;
    };
    // In the top layer: the panel that it belongs to is laid out by itself, and would hold and clip it.
    ref.current?.showPopover();
    cover();
    const watch = new ResizeObserver(cover);
    watch.observe(stage);
    watch.observe(document.body);
    ref.current?.querySelector<HTMLElement>('[aria-label=Close]')?.focus();
    return () => {
      watch.disconnect();
      if (before instanceof HTMLElement) before.focus();
    };
  }, []);
  return (
    <div
      ref={ref}
      class="wide-ledger"
      role="dialog"
      popover="manual"
      tabIndex={-1}
      aria-labelledby="wide-ledger-title"
      onKeyDown={(e) => {
        if (e.key === 'Escape') onClose();
      }}
    >
      <header class="part-head">
        <h2 id="wide-ledger-title">Whole ledger</h2>
        <span class="head-label" id="wide-export">
          Export
        </span>
        {LEDGER_FORMATS.map((format) => (
          <button
            key={format.key}
            type="button"
            class="button quiet-button"
            aria-label={`Export as ${format.label}`}
            title={withheld ?? format.hint}
            disabled={withheld !== null}
            onClick={() => void exportLedger(app, format)}
          >
            {format.label}
          </button>
        ))}
        <IconButton icon="close" label="Close" detail="Escape" onClick={onClose} />
      </header>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a part that scrolls must be reachable by keyboard */}
      <section class="ledger-scroll" tabIndex={0} aria-label="Numbers of every shell">
        <LedgerTable label="Whole ledger" columns={WHOLE_LEDGER} order={order} onEnter={onEnter} />
        <ul class="ledger-notes" aria-label="Notes">
          {currentLedgerTable(app).notes.map((note) => (
            <li key={note}>{note}</li>
          ))}
        </ul>
      </section>
    </div>
  );
}
