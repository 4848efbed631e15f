import { randomBytes } from 'node:crypto';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import {
  PICTURE_PATHS,
  type PictureJob,
  type PictureNews,
  pictureNewsSchema,
} from '../../../shared-core/picture/job.ts';
import { answerPage, type PageAnswer, plainAnswer } from '../../files/pageRequests.ts';
import { windowFiles } from '../../files/windowFiles.ts';
import { sameText } from '../../local/gate.ts';
import { readBody } from '../../local/requestBody.ts';

const MOST_PIECE_BYTES = 4 << 20;
const MOST_NEWS_BYTES = 64 << 10;
const CATALOGUE_ID = 'catalogue';
const PAGE = 'picture.html';

export interface PictureServerOptions {
  readonly windowFolder: string;
  readonly job: Omit<PictureJob, 'catalogue'>;
  /** The file that the page may read; nothing else of the disk is served. */
  readonly catalogue: { readonly path: string; readonly name: string; readonly sizeBytes: number } | null;
  /** Takes a piece of the picture; the page sends the next when the promise is kept. */
  readonly onPiece: (bytes: Uint8Array) => Promise<void>;
  readonly onNews: (news: PictureNews) => void;
}

export interface PictureServer {
  /** Leads to the page once: command lines can be read by others on the machine. */
  readonly address: string;
  close(): Promise<void>;
}

/** Serves one picture's job on the loopback address, to whoever holds the token. @throws Refusal: window not built */
export async function startPictureServer(options: PictureServerOptions): Promise<PictureServer> {
  const files = windowFiles(options.windowFolder);
  const token = randomBytes(24).toString('base64url');
  let entry: string | null = randomBytes(24).toString('base64url');
  const openPath = `/open/${entry}`;
  let host = '';
  const { catalogue } = options;
  const handles = {
    find: (id: string) => (id === CATALOGUE_ID && catalogue !== null ? catalogue.path : undefined),
  };

  async function answer(request: IncomingMessage): Promise<PageAnswer> {
    const { method = '', headers, url = '' } = request;
    // A foreign name that leads here, and a page of another origin, are refused before anything is read.
    if (headers.host !== host) return plainAnswer(421, 'Refused: another Host.');
    if (headers.origin !== undefined && headers.origin !== `http://${host}`)
      return plainAnswer(403, 'Refused: another Origin.');
    const path = url.split(/[?#]/)[0]!;
    if (entry !== null && sameText(path, openPath)) {
      entry = null;
      return plainAnswer(303, 'The page is over there.', { location: `/${token}/${PAGE}` });
    }
    const slash = path.indexOf('/', 1);
    if (slash < 0 || !sameText(path.slice(1, slash), token))
      return plainAnswer(404, 'Nothing is found here.');
    const below = path.slice(slash + 1);
    if (method === 'POST') {
      if (headers.origin === undefined) return plainAnswer(403, 'Refused: no Origin.');
      return await take(request, below);
    }
    if (below === PICTURE_PATHS.job) return jobAnswer();
    return await answerPage(
      { method, path: below, range: headers.range ?? null, ifRange: null },
      files,
      handles,
    );
  }

  function jobAnswer(): PageAnswer {
    const job: PictureJob = {
      ...options.job,
      catalogue:
        catalogue === null
          ? null
          : { url: `./files/${CATALOGUE_ID}`, name: catalogue.name, sizeBytes: catalogue.sizeBytes },
    };
    const answered = plainAnswer(200, '', { 'content-type': 'application/json; charset=utf-8' });
    return { ...answered, body: JSON.stringify(job) };
  }

  async function take(request: IncomingMessage, below: string): Promise<PageAnswer> {
    if (below === PICTURE_PATHS.piece) await options.onPiece(await readBody(request, MOST_PIECE_BYTES));
    else if (below === PICTURE_PATHS.news) {
      const text = Buffer.from(await readBody(request, MOST_NEWS_BYTES)).toString('utf8');
      options.onNews(pictureNewsSchema.parse(JSON.parse(text)));
    } else return plainAnswer(404, 'Nothing is found here.');
    return plainAnswer(200, 'Taken.');
  }

  const server = createServer((request, response) => {
    answer(request)
      .catch(() => plainAnswer(410, 'The picture is not taken any more.'))
      .then((found) => send(response, found))
      .catch(() => response.destroy());
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen({ host: '127.0.0.1', port: 0, exclusive: true }, resolve);
  });
  host = `127.0.0.1:${(server.address() as AddressInfo).port}`;
  return {
    address: `http://${host}${openPath}`,
    async close() {
      server.closeAllConnections();
      await new Promise<void>((resolve) => server.close(() => resolve()));
    },
  };
}

async function send(response: ServerResponse, { status, headers, body }: PageAnswer): Promise<void> {
  response.writeHead(status, headers);
  if (body instanceof Readable) await pipeline(body, response);
  else response.end(body ?? undefined);
}
