import { useLayoutEffect, useRef } from 'preact/hooks';
import { type ShownUnits, shownColumn, shownUnit, shownValue } from '../../../shared-core/report/quantity.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import { useApp } from '../../state/app.ts';
import { shellQuantity } from './explain.ts';

/** A number that opens its explanation. */
export function SheetNumber(props: {
  readonly quantityKey: string;
  readonly shell: ShellStatistics;
  /** All rows of the ledger: the number is written as in its column there. */
  readonly column: readonly ShellStatistics[];
  readonly units: ShownUnits;
  readonly allDigits: boolean;
}) {
  const { quantityKey, shell, column, units, allDigits } = props;
  const { view, engine } = useApp();
  const { explained } = view;
  const ref = useRef<HTMLButtonElement>(null);
  const quantity = shellQuantity(quantityKey, engine.selected.value === null)!;
  const open = explained.value === quantityKey;
  // Opened from the ledger, the explanation may lie below the fold.
  useLayoutEffect(() => {
    if (open) ref.current?.closest('.sheet-row')?.scrollIntoView({ block: 'nearest' });
  }, [open]);
  const value = shownValue(quantity, shell, units);
  const text = allDigits && value !== null ? String(value) : shownColumn(quantity, column, units)(shell);
  const unit = shownUnit(quantity, units);
  return (
    <button
      ref={ref}
      type="button"
      class="sheet-number"
      data-quantity={quantityKey}
      aria-expanded={open}
      aria-label={`${quantity.title} ${value === null ? 'none' : text}${unit === '' ? '' : ` ${unit}`}: explanation`}
      title={quantity.meaning}
      onClick={() => void (explained.value = open ? null : quantityKey)}
    >
      {text}
    </button>
  );
}
