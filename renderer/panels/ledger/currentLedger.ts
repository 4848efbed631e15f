import type { Table } from '../../../shared-core/report/table.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import type { App } from '../../state/app.ts';
import { regionFootprint } from '../regionReady.ts';
import { ledgerTable } from './ledgerTable.ts';

/** The ledger of the app as it stands now. */
export function currentLedgerTable({ studyState, engine, derived }: App): Table<ShellStatistics> {
  const study = studyState.study.value;
  const selected = engine.selected.value;
  return ledgerTable({
    study,
    shells: derived.shells.value,
    units: derived.units.value,
    cosmology: derived.cosmology.value,
    account: selected?.account ?? null,
    footprint: selected?.footprint ?? (study.region === null ? null : regionFootprint(study.region)),
  });
}
