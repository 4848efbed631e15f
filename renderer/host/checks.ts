import { Refusal } from '../../shared-core/base/refusal.ts';
import { CALLS, type CallName } from '../../shared-core/bridge/calls.ts';

/** Throws Refusal before a message is sent that the host would refuse for its size. */
export function checkSize(call: CallName, bytes: Uint8Array | null): void {
  const most = CALLS[call].bytes;
  if (bytes !== null && bytes.length > most)
    throw new Refusal(
      `The study takes ${Math.ceil(bytes.length / 2 ** 20)} MB, at most ${most / 2 ** 20} MB can be saved: remove a large region outline or note from it.`,
    );
}

/** A random id that no other window has. */
export function randomId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
