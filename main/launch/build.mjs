// Builds what is stale: a part's stamp is a hash of the names, sizes and contents of the sources it is made from.
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './install.mjs';
import { takeTurn } from './turn.mjs';

/**
 * @typedef {object} Part
 * @property {string} words  what is being built, for the person who waits
 * @property {string[]} sources
 * @property {string} config  the bundler's config file
 */

/** @type {Record<'command' | 'window' | 'local' | 'desktop', Part>} */
const parts = {
  command: { words: 'the command', sources: ['main', 'shared-core'], config: 'main/launch/command.vite.ts' },
  window: { words: 'the window', sources: ['renderer', 'shared-core'], config: 'renderer/window.vite.ts' },
  local: { words: 'the local host', sources: ['main', 'shared-core'], config: 'main/local/local.vite.ts' },
  desktop: {
    words: 'the desktop host',
    sources: ['main', 'shared-core'],
    config: 'main/desktop/desktop.vite.ts',
  },
};

/** @param {string[]} folders */
function fingerprint(folders) {
  const hash = createHash('sha256').update(readFileSync(join(root, 'package-lock.json')));
  for (const folder of folders) {
    const names = readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' }).sort();
    for (const name of names) {
      const path = join(root, folder, name);
      if (statSync(path).isFile()) hash.update(`${name}\0`).update(readFileSync(path));
    }
  }
  return hash.digest('hex');
}

/**
 * Brings the parts up to date; says in a line what it builds, and nothing when nothing is stale.
 * @param {(keyof typeof parts)[]} wanted
 */
export async function build(wanted) {
  for (const name of wanted) {
    if (isFresh(name)) continue;
    const { words, config } = parts[name];
    const giveBack = takeTurn(join(root, 'build', `${name}.turn`), () =>
      console.error(`conewright: another start is building ${words}, waiting for it ...`),
    );
    try {
      if (isFresh(name)) continue;
      console.error(`conewright: building ${words} ...`);
      // Taken before: a source that changes meanwhile is built anew by the next start.
      const print = fingerprint(parts[name].sources);
      const { build: bundle } = await import('vite');
      await bundle({
        configFile: join(root, config),
        root: join(root, folderOf(config)),
        logLevel: 'error',
      });
      writeFileSync(stampOf(name), print);
    } finally {
      giveBack();
    }
  }
}

/** @param {keyof typeof parts} name */
const stampOf = (name) => join(root, 'build', `${name}.stamp`);

/** @param {keyof typeof parts} name */
function isFresh(name) {
  const stamp = stampOf(name);
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === fingerprint(parts[name].sources);
}

/** @param {string} path */
function folderOf(path) {
  return path.slice(0, path.lastIndexOf('/'));
}
