import type { RowAccount, SetAsideReason } from './catalogue.ts';
import type { Decimals } from './formats/delimited/decimals.ts';

/** Counts rows as they are judged; the account it gives always has rowsRead = kept + setAside. */
export class Tally {
  #kept = 0;
  #setAside = 0;
  #decimalCommas: number;
  readonly #decimals: Decimals;
  readonly #reasons: Partial<Record<SetAsideReason, number>>;

  /** `before`: rows already set aside by an earlier pass, which stay so, and how the file's numbers are read. */
  constructor(before: Pick<RowAccount, 'setAside' | 'reasons' | 'decimalCommas' | 'decimals'>) {
    this.#decimals = before.decimals;
    this.#setAside = before.setAside;
    this.#decimalCommas = before.decimalCommas ?? 0;
    this.#reasons = { ...before.reasons };
  }

  keep(): void {
    this.#kept++;
  }

  setAside(reason: SetAsideReason): void {
    this.#setAside++;
    this.#reasons[reason] = (this.#reasons[reason] ?? 0) + 1;
  }

  /** Notes that a row set aside has a number with a decimal comma. */
  decimalComma(): void {
    this.#decimalCommas++;
  }

  account(repeatedPositions: number): RowAccount {
    return {
      rowsRead: this.#kept + this.#setAside,
      kept: this.#kept,
      setAside: this.#setAside,
      reasons: { ...this.#reasons },
      repeatedPositions,
      decimals: this.#decimals,
      ...(this.#decimalCommas === 0 ? {} : { decimalCommas: this.#decimalCommas }),
    };
  }
}
