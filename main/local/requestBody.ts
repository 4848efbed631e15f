import type { IncomingMessage } from 'node:http';
import { Refusal } from '../../shared-core/base/refusal.ts';

/** The whole body of a request. Throws Refusal (use) above `mostBytes`, without reading on. */
export async function readBody(request: IncomingMessage, mostBytes: number): Promise<Uint8Array> {
  const tooLarge = new Refusal(
    `The window sent more than ${mostBytes} bytes at once: nothing was changed.`,
    'use',
  );
  if (Number(request.headers['content-length'] ?? 0) > mostBytes) throw tooLarge;
  const pieces: Buffer[] = [];
  let total = 0;
  for await (const piece of request as AsyncIterable<Buffer>) {
    total += piece.length;
    if (total > mostBytes) throw tooLarge;
    pieces.push(piece);
  }
  return Buffer.concat(pieces, total);
}
