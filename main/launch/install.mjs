// Installs the packages of package-lock.json when they are not there yet. Needs nothing but Node's built-ins.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { takeTurn } from './turn.mjs';

export const root = fileURLToPath(new URL('../..', import.meta.url));
const oldestNode = { major: 20, minor: 19 };

function refuseOldNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  const tooOld = major < oldestNode.major || (major === oldestNode.major && minor < oldestNode.minor);
  if (!tooOld) return;
  console.error(
    `Node ${process.versions.node} came, ${oldestNode.major}.${oldestNode.minor} or newer is needed: install a newer Node.`,
  );
  process.exit(1);
}

/** Returns once node_modules holds what the lock file names; ends the process with a sentence when it cannot. */
export function install() {
  refuseOldNode();
  const lock = createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');
  const stamp = join(root, 'node_modules', '.conewright-installed');
  const isThere = () => existsSync(stamp) && readFileSync(stamp, 'utf8') === lock;
  if (isThere()) return;
  const giveBack = takeTurn(join(root, 'build', 'packages.turn'), () =>
    console.error('conewright: another start is installing packages, waiting for it ...'),
  );
  // Also where npm fails and the process ends.
  process.on('exit', giveBack);
  if (!isThere()) installAll(stamp, lock);
  giveBack();
  process.off('exit', giveBack);
}

/**
 * @param {string} stamp
 * @param {string} lock
 */
function installAll(stamp, lock) {
  console.error('conewright: installing packages (once, about a minute) ...');
  const npm = process.platform === 'win32' ? 'npm.cmd' : 'npm';
  const run = spawnSync(npm, ['ci', '--no-audit', '--no-fund', '--loglevel=error'], {
    cwd: root,
    stdio: ['ignore', 2, 2],
    shell: process.platform === 'win32',
  });
  if (run.status !== 0) {
    console.error(
      `conewright: the packages could not be installed (npm ci ended with ${run.status ?? run.error?.message}); see above, then run the command again.`,
    );
    process.exit(1);
  }
  writeFileSync(stamp, lock);
}
