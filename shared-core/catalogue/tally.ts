import type { RowAccount, SetAsideReason } from './catalogue.ts';

/** Counts rows as they are judged; the account it gives always has rowsRead = kept + setAside. */
export class Tally {
  #kept = 0;
  #setAside = 0;
  readonly #reasons: Partial<Record<SetAsideReason, number>>;

  /** `before`: rows already set aside by an earlier pass, which stay so. */
  constructor(before: Pick<RowAccount, 'setAside' | 'reasons'> = { setAside: 0, reasons: {} }) {
    this.#setAside = before.setAside;
    this.#reasons = { ...before.reasons };
  }

  keep(): void {
    this.#kept++;
  }

  setAside(reason: SetAsideReason): void {
    this.#setAside++;
    this.#reasons[reason] = (this.#reasons[reason] ?? 0) + 1;
  }

  account(repeatedPositions: number): RowAccount {
    return {
      rowsRead: this.#kept + this.#setAside,
      kept: this.#kept,
      setAside: this.#setAside,
      reasons: { ...this.#reasons },
      repeatedPositions,
    };
  }
}
