import { readdirSync, statSync } from 'node:fs';
import { extname, join, sep } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';

const TYPES: Readonly<Record<string, string>> = {
  '.css': 'text/css; charset=utf-8',
  '.html': 'text/html; charset=utf-8',
  '.ico': 'image/x-icon',
  '.jpg': 'image/jpeg',
  '.js': 'text/javascript; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.mjs': 'text/javascript; charset=utf-8',
  '.png': 'image/png',
  '.svg': 'image/svg+xml; charset=utf-8',
  '.txt': 'text/plain; charset=utf-8',
  '.wasm': 'application/wasm',
  '.webmanifest': 'application/manifest+json; charset=utf-8',
  '.woff2': 'font/woff2',
};

export interface WindowFile {
  path: string;
  type: string;
}

/**
 * The files of the built window by the path they are asked for ("index.html", "assets/x.js"). Only what is listed
 * here at the start is ever served, so no request can lead out of the folder. Throws Refusal when it is not built.
 */
export function windowFiles(folder: string): ReadonlyMap<string, WindowFile> {
  const files = new Map<string, WindowFile>();
  let names: string[];
  try {
    names = readdirSync(folder, { recursive: true, encoding: 'utf8' });
  } catch {
    names = [];
  }
  for (const name of names) {
    const type = TYPES[extname(name).toLowerCase()];
    const path = join(folder, name);
    if (type !== undefined && statSync(path).isFile()) files.set(name.split(sep).join('/'), { path, type });
  }
  if (!files.has('index.html'))
    throw new Refusal(
      `The window is not built (no index.html in ${folder}): run npm start, which builds it.`,
    );
  return files;
}
