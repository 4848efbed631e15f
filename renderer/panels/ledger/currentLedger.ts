import type { Table } from '../../../shared-core/report/table.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import type { App } from '../../state/app.ts';
import { type LedgerFacts, ledgerTable } from './ledgerTable.ts';

/** What the ledger of the app is made of as it stands now. */
export function currentLedgerFacts({ studyState, engine, derived }: App): LedgerFacts {
  const study = studyState.study.value;
  const selected = engine.selected.value;
  return {
    study,
    shells: derived.shells.value,
    all: derived.total.value,
    units: derived.units.value,
    cosmology: derived.cosmology.value,
    account: selected?.account ?? null,
    mapping: selected === null ? null : (engine.loaded.value?.mapping ?? null),
    footprint: engine.footprint.value,
  };
}

/** The ledger of the app as it stands now. */
export function currentLedgerTable(app: App): Table<ShellStatistics> {
  return ledgerTable(currentLedgerFacts(app));
}
