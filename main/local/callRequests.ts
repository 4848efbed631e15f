import { createHash } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { z } from '../../shared-core/base/schema.ts';
import type { Reply } from '../../shared-core/bridge/calls.ts';
import { joinFrame, splitFrame } from '../../shared-core/bridge/frame.ts';
import { idSchema, LARGEST_STUDY_BYTES } from '../../shared-core/bridge/messages.ts';
import type { Desk } from '../files/desk.ts';
import { PAGE_HEADERS } from '../files/pageHeaders.ts';
import type { PageAnswer } from '../files/pageRequests.ts';
import { readBody } from './requestBody.ts';

// A frame is a head, which is far smaller than this, and a study at most.
const LARGEST_FRAME_BYTES = LARGEST_STUDY_BYTES + 1024 * 1024;

const headSchema = z.strictObject({ windowId: idSchema, call: z.string(), argument: z.unknown() });

/** Answers one call: a frame comes, a frame goes back. */
export async function answerCallRequest(request: IncomingMessage, desk: Desk): Promise<PageAnswer> {
  let reply: Reply;
  try {
    const { head, rest } = splitFrame(await readBody(request, LARGEST_FRAME_BYTES));
    const { windowId, call, argument } = readHead(head);
    reply = await desk.answer(windowId, 'page', call, argument, rest);
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    reply = { refused: error.message, refusedKind: error.kind };
  }
  const { bytes, ...head } = { bytes: null, ...reply };
  const frame = joinFrame(new TextEncoder().encode(JSON.stringify(head)), bytes);
  const headers = {
    ...PAGE_HEADERS,
    'content-type': 'application/octet-stream',
    'content-length': String(frame.length),
  };
  return { status: 200, headers, body: frame };
}

/** The SHA-256 of what a page sends, for a picked file whose path the browser keeps to itself; nothing is stored. */
export async function answerFingerprint(request: IncomingMessage): Promise<PageAnswer> {
  const hash = createHash('sha256');
  let sizeBytes = 0;
  for await (const piece of request as AsyncIterable<Buffer>) {
    hash.update(piece);
    sizeBytes += piece.length;
  }
  const body = JSON.stringify({ sizeBytes, sha256: hash.digest('hex') });
  return { status: 200, headers: { ...PAGE_HEADERS, 'content-type': 'application/json' }, body };
}

function readHead(bytes: Uint8Array): z.infer<typeof headSchema> {
  try {
    return headSchema.parse(JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)));
  } catch {
    throw new Refusal('The window sent a message that its host does not understand: load it again.', 'use');
  }
}
