import { useComputed } from '@preact/signals';
import { useEffect, useRef } from 'preact/hooks';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import { type App, useApp } from '../../state/app.ts';
import { focusSoon } from '../../ui/focusSoon.ts';
import { ShellMark } from '../ShellMark.tsx';
import { edgeTold, MOVE_EDGE_ID } from '../sheet/sheetLayout.ts';
import type { LedgerColumn } from './ledgerColumns.ts';

/** One shell's numbers, or (index null) those of one shell from the first edge to the last. */
export function LedgerRow(props: {
  readonly index: number | null;
  readonly shell: ShellStatistics;
  readonly columns: readonly LedgerColumn[];
  /** How each quantity's column is written, by key. */
  readonly texts: ReadonlyMap<string, (shell: ShellStatistics) => string>;
  readonly reachable: boolean;
}) {
  const { index, shell, columns, texts, reachable } = props;
  const app = useApp();
  const { view } = app;
  const selected = useComputed(() => view.selectedShell.value === index).value;
  const hovered = useComputed(() => index !== null && view.hoveredShell.value === index).value;

  const row = useRef<HTMLTableRowElement>(null);
  // Chosen in the cone or the strip, the row may lie out of sight.
  useEffect(() => {
    if (selected && index !== null) row.current?.scrollIntoView({ block: 'nearest' });
  }, [selected]);

  const onClick = (event: MouseEvent): void => {
    const number = (event.target as HTMLElement).closest<HTMLElement>('[data-quantity]');
    if (selected && number !== null) view.explained.value = number.dataset.quantity ?? null;
    view.selectedShell.value = index;
  };
  const onDblClick = (event: MouseEvent): void => {
    const number = (event.target as HTMLElement).closest<HTMLElement>('.ledger-edge');
    if (number !== null) typeEdge(app, index, number.dataset.quantity!);
  };
  return (
    <tr
      ref={row}
      class={hovered ? 'ledger-row hovered' : 'ledger-row'}
      data-shell={index ?? 'all'}
      aria-selected={selected}
      tabIndex={reachable ? 0 : -1}
      onClick={onClick}
      onDblClick={onDblClick}
      onFocus={() => void (view.hoveredShell.value = index)}
      onBlur={() => void (view.hoveredShell.value = null)}
      onPointerEnter={() => void (view.hoveredShell.value = index)}
      onPointerLeave={() => void (view.hoveredShell.value = null)}
    >
      <th scope="row" class="ledger-number">
        {index === null ? (
          <span title="One shell from the first edge to the last: not the sum of the rows.">all</span>
        ) : (
          <ShellMark index={index} />
        )}
      </th>
      {columns.map((column) => (
        <td key={column.quantities[0]!.key}>
          {column.quantities.map((q) => {
            const text = texts.get(q.key)?.(shell);
            return edgeTold(q.key, index, 0) === null ? (
              <span
                key={q.key}
                class="ledger-value"
                data-quantity={q.key}
                {...(selected ? { title: `${q.meaning} Press for the explanation.` } : {})}
              >
                {text}
              </span>
            ) : (
              <button
                key={q.key}
                type="button"
                tabIndex={-1}
                class="ledger-value ledger-edge"
                data-quantity={q.key}
                aria-label={`${q.title} ${text}: type another place`}
                title={`${q.meaning} Double-click, or Enter, to type another place.`}
              >
                {text}
              </button>
            );
          })}
        </td>
      ))}
    </tr>
  );
}

/** Opens the explanation of an edge's number, at the field that moves the edge. */
export function typeEdge({ view }: App, shell: number | null, quantityKey: string): void {
  view.selectedShell.value = shell;
  view.explained.value = quantityKey;
  focusSoon(MOVE_EDGE_ID);
}
