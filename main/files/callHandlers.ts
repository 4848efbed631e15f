import type { Answer, Argument, CallName } from '../../shared-core/bridge/calls.ts';

/** Who asked, and the bytes that came along (empty when none). */
interface Caller {
  windowId: string;
  bytes: Uint8Array;
}

/** An answer that has bytes beside it. */
export interface AnswerWithBytes<A> {
  answer: A;
  withBytes: Uint8Array;
}

export type Handler<N extends CallName> = (
  argument: Argument<N>,
  caller: Caller,
) => Promise<Answer<N> | AnswerWithBytes<Answer<N>>>;

export type Calls = { [N in CallName]: Handler<N> };

export function withBytes<A>(answer: A, bytes: Uint8Array): AnswerWithBytes<A> {
  return { answer, withBytes: bytes };
}
