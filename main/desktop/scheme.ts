import { Readable } from 'node:stream';
import type { FileHandles } from '../files/fileHandles.ts';
import { answerPage, type PageAnswer, plainAnswer } from '../files/pageRequests.ts';
import type { WindowFile } from '../files/windowFiles.ts';
import { originOf, WINDOW_ORIGIN } from './place.ts';

/** The privileges of the window's scheme: a real origin, secure, fetchable, streamed; none that weakens a rule. */
export const SCHEME_PRIVILEGES = {
  standard: true,
  secure: true,
  supportFetchAPI: true,
  stream: true,
  codeCache: true,
  bypassCSP: false,
  allowServiceWorkers: false,
  corsEnabled: false,
  allowExtensions: false,
} as const;

/** The part of a request that the answer depends on; Electron's is one. `initiatorOrigin` is absent for the browser. */
export interface SchemeRequest {
  readonly method: string;
  readonly url: string;
  readonly headers: { get(name: string): string | null };
  readonly initiatorOrigin?: string | null;
}

/** Answers a request to the window's own scheme; every answer, also a refusal, carries the page's headers. */
export async function answerScheme(
  request: SchemeRequest,
  windowFiles: ReadonlyMap<string, WindowFile>,
  handles: Pick<FileHandles, 'find'>,
): Promise<Response> {
  const initiator = request.initiatorOrigin ?? null;
  if (originOf(request.url) !== WINDOW_ORIGIN || (initiator !== null && initiator !== WINDOW_ORIGIN))
    return toResponse(plainAnswer(403, 'Refused: asked for by another site.'));
  const { pathname } = new URL(request.url);
  const { method, headers } = request;
  const asked = {
    method,
    path: pathname.slice(1),
    range: headers.get('range'),
    ifRange: headers.get('if-range'),
  };
  return toResponse(await answerPage(asked, windowFiles, handles));
}

function toResponse({ status, headers, body }: PageAnswer): Response {
  const content = body instanceof Readable ? (Readable.toWeb(body) as ReadableStream<Uint8Array>) : body;
  return new Response(content as ConstructorParameters<typeof Response>[0], { status, headers });
}
