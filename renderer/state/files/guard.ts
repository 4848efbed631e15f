import type { Notices } from '../notices.ts';

/** Runs what a button does; a Refusal, or anything else that went wrong, becomes a sentence and `otherwise`. */
export type Guarded = <T>(work: () => Promise<T>, otherwise: T) => Promise<T>;

export function guard(notices: Notices): Guarded {
  return async (work, otherwise) => {
    try {
      return await work();
    } catch (error) {
      notices.tell(error instanceof Error ? error.message : String(error));
      return otherwise;
    }
  };
}
