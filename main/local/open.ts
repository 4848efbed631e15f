import { type ChildProcess, spawn } from 'node:child_process';
import type { Machine } from '../files/userFolder.ts';

/**
 * Arguments with which an installed browser shows one page as a window of its own. --enable-unsafe-swiftshader only
 * permits WebGL in software where no graphics card can draw it. As root Chromium needs --no-sandbox, and --test-type
 * takes away the bar that warns of it.
 */
export function browserArguments(address: string, profileFolder: string, isRoot: boolean): string[] {
  return [
    `--app=${address}`,
    `--user-data-dir=${profileFolder}`,
    '--window-size=1440,900',
    '--no-first-run',
    '--no-default-browser-check',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
    '--enable-unsafe-swiftshader',
    ...(isRoot ? ['--no-sandbox', '--test-type'] : []),
  ];
}

/** Starts the browser; what it prints is of no use to the user. */
export function startBrowser(path: string, args: string[]): ChildProcess {
  return spawn(path, args, { stdio: 'ignore' });
}

/** The system's own command that opens an address in the default browser; no shell reads the address. */
export function defaultBrowserCommand(
  { platform, env }: Pick<Machine, 'platform' | 'env'>,
  address: string,
): { path: string; args: string[] } {
  if (platform === 'darwin') return { path: '/usr/bin/open', args: [address] };
  if (platform === 'win32') {
    const system = env.SYSTEMROOT ?? 'C:\\Windows';
    return { path: `${system}\\System32\\rundll32.exe`, args: ['url.dll,FileProtocolHandler', address] };
  }
  return { path: 'xdg-open', args: [address] };
}

/** Opens the default browser; false when the system has no way to. */
export async function openDefaultBrowser(
  machine: Pick<Machine, 'platform' | 'env'>,
  address: string,
): Promise<boolean> {
  const { path, args } = defaultBrowserCommand(machine, address);
  const child = spawn(path, args, { stdio: 'ignore', detached: true });
  return await new Promise((resolve) => {
    // An opener that is still running after a moment is the browser itself, or waits for it.
    const timer = setTimeout(() => resolve(true), 3000);
    const finish = (opened: boolean) => {
      clearTimeout(timer);
      child.unref();
      resolve(opened);
    };
    child.once('error', () => finish(false));
    child.once('exit', (code) => finish(code === 0));
  });
}
