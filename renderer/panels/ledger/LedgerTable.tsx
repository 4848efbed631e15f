import type { Signal } from '@preact/signals';
import { shownColumn, shownUnit } from '../../../shared-core/report/quantity.ts';
import { PLAN_QUANTITIES, SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import { useApp } from '../../state/app.ts';
import { Icon } from '../../ui/Icon.tsx';
import { Subscripted } from '../../ui/Subscripted.tsx';
import { unitText } from '../../ui/unitText.ts';
import { LedgerRow, typeEdge } from './LedgerRow.tsx';
import type { LedgerColumn } from './ledgerColumns.ts';
import { type LedgerOrder, nextOrder, sortShells } from './sortShells.ts';

/**
 * The shells as rows. Arrow keys walk and choose; a heading sorts; a number of the chosen row opens its explanation, and
 * the place of an edge, pressed twice or with Enter, the field that moves it.
 */
export function LedgerTable(props: {
  readonly label: string;
  readonly columns: readonly LedgerColumn[];
  readonly order: Signal<LedgerOrder | null>;
  readonly onEnter: () => void;
}) {
  const { label, columns, order, onEnter } = props;
  const app = useApp();
  const { derived, view, engine, files } = app;
  // Until the galaxies are those of the study, its numbers are of something else: shown quiet.
  const reading = !engine.fresh.value && engine.failure.value === null && files.missingSource.value === null;
  const shells = derived.shells.value;
  const total = derived.total.value;
  const column = total === null ? shells : [...shells, total];
  const units = derived.units.value;
  const quantities = engine.selected.value === null ? PLAN_QUANTITIES : SHELL_QUANTITIES;
  const texts = new Map(quantities.map((q) => [q.key, shownColumn(q, column, units)]));
  const rows = sortShells(shells, order.value, quantities);
  // One row can be reached by Tab: the chosen one, or the first.
  const chosen = view.selectedShell.value;
  const reachable = chosen === null || chosen >= shells.length ? (rows[0] ?? null) : chosen;

  const onKeyDown = (event: KeyboardEvent): void => {
    const row = (event.target as HTMLElement).closest<HTMLElement>('tr[data-shell]');
    if (row === null || event.ctrlKey || event.metaKey || event.altKey) return;
    const edge = (event.target as HTMLElement).closest<HTMLElement>('.ledger-edge');
    if (event.key === 'Enter' || event.key === ' ') {
      event.preventDefault();
      if (edge === null) onEnter();
      else typeEdge(app, shellOfRow(row), edge.dataset.quantity!);
      return;
    }
    // Across a row, from the row itself to the places of its edges.
    const across = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
    if (across !== undefined) {
      const stops = [row, ...row.querySelectorAll<HTMLElement>('.ledger-edge')];
      const to = stops[stops.indexOf(edge ?? row) + across];
      if (to === undefined) return;
      event.preventDefault();
      to.focus();
      return;
    }
    const all = [...(row.closest('table')?.querySelectorAll<HTMLElement>('tr[data-shell]') ?? [])];
    const at = all.indexOf(row);
    const next = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: all.length - 1 }[event.key];
    const to = next === undefined ? undefined : all[next];
    if (to === undefined) return;
    event.preventDefault();
    to.focus();
    to.scrollIntoView({ block: 'nearest' });
    view.selectedShell.value = shellOfRow(to);
  };
  return (
    <table
      class="ledger"
      // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: rows are chosen with the arrow keys, which is a grid
      role="grid"
      aria-label={label}
      aria-readonly="true"
      aria-busy={reading}
      onKeyDown={onKeyDown}
    >
      <colgroup>
        <col class="ledger-col-number" />
        {columns.map((column) => (
          <col key={column.quantities[0]!.key} style={{ width: `${column.characters}ch` }} />
        ))}
      </colgroup>
      <thead>
        <tr>
          <th scope="col" class="ledger-corner">
            <span class="unseen">Shell</span>
          </th>
          {columns.map((column) => (
            <Heading key={column.quantities[0]!.key} column={column} order={order} />
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((i) => (
          <LedgerRow
            key={i}
            index={i}
            shell={shells[i]!}
            columns={columns}
            texts={texts}
            reachable={i === reachable}
          />
        ))}
      </tbody>
      {total === null ? null : (
        <tfoot>
          <LedgerRow index={null} shell={total} columns={columns} texts={texts} reachable={false} />
        </tfoot>
      )}
    </table>
  );
}

/** The shell of a row of the ledger; null for the row of all. */
export function shellOfRow(row: HTMLElement): number | null {
  const index = Number(row.dataset.shell);
  return Number.isInteger(index) ? index : null;
}

function Heading({
  column,
  order,
}: {
  readonly column: LedgerColumn;
  readonly order: Signal<LedgerOrder | null>;
}) {
  const units = useApp().derived.units.value;
  const sorted = order.value;
  const direction = column.quantities.some((q) => q.key === sorted?.key) ? sorted!.direction : 'none';
  // Numbers that are read together have the same unit, which then stands once.
  const shared = [...new Set(column.quantities.map((q) => unitText(shownUnit(q, units))))];
  return (
    <th scope="col" aria-sort={direction}>
      {column.quantities.map((q, i) => (
        <button
          key={q.key}
          type="button"
          class="ledger-sort"
          title={`${q.meaning} Press to sort.`}
          onClick={() => void (order.value = nextOrder(sorted, q.key))}
        >
          {sorted?.key === q.key ? <Icon name={sorted.direction === 'ascending' ? 'up' : 'sink'} /> : null}
          <Subscripted text={column.headings?.[i] ?? q.title} />
        </button>
      ))}
      <span class="ledger-unit">{shared.join(', ')}</span>
    </th>
  );
}
