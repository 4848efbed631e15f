import { spawn } from 'node:child_process';
import { accessSync, constants, readFileSync } from 'node:fs';
import { isAbsolute, join, normalize, sep } from 'node:path';

export interface ElectronProbe {
  /** The program that can be started, or null. */
  binary: string | null;
  /** Why it is null, or where it was found; completes "Electron: ...". */
  reason: string;
}

type Env = Readonly<Record<string, string | undefined>>;

/**
 * Looks for Electron's program without loading the package, which would begin to download it: `path.txt` in the
 * package names the program within `dist`; ELECTRON_OVERRIDE_DIST_PATH names another `dist`.
 */
export function electronProbe(packageFolder: string, env: Env = process.env): ElectronProbe {
  let name: string;
  try {
    name = readFileSync(join(packageFolder, 'path.txt'), 'utf8').trim();
  } catch {
    if (!env.ELECTRON_OVERRIDE_DIST_PATH) return { binary: null, reason: 'its program is not downloaded' };
    name = defaultName();
  }
  if (name === '' || isAbsolute(name) || normalize(name).startsWith(`..${sep}`))
    return { binary: null, reason: 'its path.txt names no program' };
  const binary = join(env.ELECTRON_OVERRIDE_DIST_PATH || join(packageFolder, 'dist'), name);
  try {
    accessSync(binary, process.platform === 'win32' ? constants.F_OK : constants.X_OK);
    return { binary, reason: binary };
  } catch {
    return { binary: null, reason: `its program is not at ${binary}` };
  }
}

function defaultName(): string {
  if (process.platform === 'win32') return 'electron.exe';
  return process.platform === 'darwin' ? join('Electron.app', 'Contents', 'MacOS', 'Electron') : 'electron';
}

/**
 * Lets the package's own installer download the program (it checks the checksum), for at most `limitMs`. What the
 * installer prints is kept back: the answer's `reason` is its last plain line.
 */
export async function fetchElectron(
  packageFolder: string,
  { limitMs = 300_000, env = process.env }: { limitMs?: number; env?: Env } = {},
): Promise<ElectronProbe> {
  const there = electronProbe(packageFolder, env);
  if (there.binary !== null) return there;
  const child = spawn(process.execPath, [join(packageFolder, 'install.js')], {
    env: { ...env } as NodeJS.ProcessEnv,
    stdio: ['ignore', 'ignore', 'pipe'],
  });
  let said = '';
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    said = (said + text).slice(-8192);
  });
  const ended = await new Promise<string | null>((resolve) => {
    const timer = setTimeout(() => {
      child.kill('SIGKILL');
      resolve(`its download took longer than ${Math.round(limitMs / 1000)} s`);
    }, limitMs);
    const finish = (reason: string | null) => {
      clearTimeout(timer);
      resolve(reason);
    };
    child.once('error', (error) => finish(`its installer did not start (${error.message})`));
    child.once('close', (code) => finish(code === 0 ? null : `its download failed (${plainReason(said)})`));
  });
  return ended === null ? electronProbe(packageFolder, env) : { binary: null, reason: ended };
}

/** The message in what Node prints for an error, without the stack below it. */
function plainReason(said: string): string {
  const lines = said.split('\n').map((line) => line.trim());
  const message =
    lines.find((line) => /^(\w*Error|\w*Exception)\b.*:/.test(line)) ?? lines.find((line) => line !== '');
  return (message ?? 'no reason given').replace(/^\w*Error: /, '').slice(0, 160);
}

/** Arguments with which Electron's program shows the desktop host. As root it cannot start its sandbox. */
export function electronArguments(entry: string, files: readonly string[], isRoot: boolean): string[] {
  return [...(isRoot ? ['--no-sandbox'] : []), entry, '--', ...files];
}
