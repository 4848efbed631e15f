import type { Command } from 'commander';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { asCsv, asEcsv, asLatex, asText, type Table } from '../../shared-core/report/table.ts';

export interface OutputOptions {
  json?: true;
  csv?: true;
  ecsv?: true;
  latex?: true;
  hUnits?: true;
}

/** The options that choose how a result is printed; the numbers are the same in each. */
export function addOutputOptions(command: Command): Command {
  return command
    .option('--json', 'print JSON, every digit')
    .option('--csv', 'print CSV, every digit')
    .option('--ecsv', 'print ECSV, every digit, with units and meanings')
    .option('--latex', 'print a LaTeX tabular, rounded as on screen')
    .option('--h-units', 'lengths in Mpc/h instead of Mpc');
}

/** The format asked for; null for text. @throws Refusal ('use') for two at once */
export function formatOf(options: OutputOptions): 'json' | 'csv' | 'ecsv' | 'latex' | null {
  const chosen = (['json', 'csv', 'ecsv', 'latex'] as const).filter((name) => options[name]);
  if (chosen.length > 1)
    throw new Refusal(
      `${chosen.map((n) => `--${n}`).join(' and ')} came together: choose one format.`,
      'use',
    );
  return chosen[0] ?? null;
}

/** The result as text in the format asked for; `json` builds the JSON value. */
export function render<Row>(table: Table<Row>, options: OutputOptions, json: () => unknown): string {
  switch (formatOf(options)) {
    case 'json':
      return `${JSON.stringify(json(), null, 2)}\n`;
    case 'csv':
      return asCsv(table);
    case 'ecsv':
      return asEcsv(table);
    case 'latex':
      return asLatex(table);
    default:
      return asText(table, process.stdout.isTTY ? Math.max(60, process.stdout.columns ?? 100) : 100);
  }
}
