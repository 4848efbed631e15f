import { Refusal } from '../../shared-core/base/refusal.ts';

/** A sentence for any error: memory that ran short is told as such, a defect of ours as one. */
export function sentenceOf(error: unknown): string {
  if (error instanceof Refusal) return error.message;
  const short = error instanceof RangeError && !/call stack/i.test(error.message);
  if (short || (error instanceof Error && error.name === 'DataCloneError'))
    return 'Memory ran short while working on the catalogue: close other programs, or cut the file to the columns and rows you need.';
  return `Something in Conewright failed (${error instanceof Error ? error.message : String(error)}); what you made is kept. Please report it.`;
}
