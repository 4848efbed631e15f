// Two starts at once must not install or build over each other: one takes its turn, the other waits and finds it done.
import { mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';

const LOOK_EVERY_MS = 200;
/** A turn without a number yet is being written; after so long whoever took it has ended. */
const UNWRITTEN_MS = 5000;

/**
 * Waits until nobody else has the turn, and takes it.
 * @param {string} path  a file that stands while the turn is taken, with the number of the process that has it
 * @param {() => void} waiting  called once if somebody else has it
 * @returns {() => void} gives the turn back
 */
export function takeTurn(path, waiting) {
  mkdirSync(dirname(path), { recursive: true });
  for (let told = false; ; ) {
    try {
      writeFileSync(path, String(process.pid), { flag: 'wx' });
      return () => rmSync(path, { force: true });
    } catch (error) {
      if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error;
    }
    if (isAbandoned(path)) {
      rmSync(path, { force: true });
      continue;
    }
    if (!told) waiting();
    told = true;
    Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, LOOK_EVERY_MS);
  }
}

/** @param {string} path */
function isAbandoned(path) {
  try {
    const holder = Number(readFileSync(path, 'utf8'));
    if (!(holder > 0)) return Date.now() - statSync(path).mtimeMs > UNWRITTEN_MS;
    process.kill(holder, 0);
    return false;
  } catch (error) {
    // Gone meanwhile is not abandoned: it is tried again. A process of another user is alive.
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'ESRCH';
  }
}
