/** Work that stopped because somebody asked for it: no fault, nothing to explain. Hosts end quietly. */
export class Cancelled extends Error {
  override readonly name = 'Cancelled';

  constructor() {
    super('The work was cancelled.');
  }
}

/** A flag that another hand may raise; an AbortSignal fits. */
export interface CancelSignal {
  readonly aborted: boolean;
}

/** Throws Cancelled once the flag is up. To be asked between blocks of work. */
export function throwIfCancelled(signal: CancelSignal | undefined): void {
  if (signal?.aborted) throw new Cancelled();
}
