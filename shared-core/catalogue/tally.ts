import type { RowAccount, SetAsideReason } from './catalogue.ts';

/** Counts rows as they are judged; the account it gives always has rowsRead = kept + setAside. */
export class Tally {
  #kept = 0;
  #setAside = 0;
  #decimalCommas: number;
  readonly #reasons: Partial<Record<SetAsideReason, number>>;

  /** `before`: rows already set aside by an earlier pass, which stay so. */
  constructor(
    before: Pick<RowAccount, 'setAside' | 'reasons' | 'decimalCommas'> = { setAside: 0, reasons: {} },
  ) {
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
      ...(this.#decimalCommas === 0 ? {} : { decimalCommas: this.#decimalCommas }),
    };
  }
}
