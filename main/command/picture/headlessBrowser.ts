import { spawn } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { FoundBrowser } from '../../launch/findBrowser.ts';

/**
 * Arguments with which an installed browser works on one page without a window. No graphics card is used, so that the
 * same picture comes out on every machine.
 */
export function headlessArguments(address: string, profileFolder: string, isRoot: boolean): string[] {
  return [
    '--headless=new',
    `--user-data-dir=${profileFolder}`,
    '--disable-gpu',
    '--no-first-run',
    '--no-default-browser-check',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
    '--disable-extensions',
    '--disable-background-timer-throttling',
    '--disable-renderer-backgrounding',
    ...(isRoot ? ['--no-sandbox'] : []),
    address,
  ];
}

export interface HeadlessBrowser {
  /** Kept when the browser has ended, by itself or stopped; with the reason where it could not start. */
  readonly ended: Promise<string | null>;
  stop(): Promise<void>;
}

/** Starts a browser with a fresh profile of its own, which is removed again. */
export async function startHeadless(
  { path, isSnap }: FoundBrowser,
  address: string,
): Promise<HeadlessBrowser> {
  // The packaged kind may write only below its own folder.
  const parent = isSnap ? join(process.env.HOME ?? tmpdir(), 'snap') : tmpdir();
  const profile = await mkdtemp(join(parent, 'conewright-picture-'));
  const child = spawn(path, headlessArguments(address, profile, process.getuid?.() === 0), {
    stdio: 'ignore',
  });
  const ended = new Promise<string | null>((resolve) => {
    child.once('error', (error) => resolve(error.message));
    child.once('exit', () => resolve(null));
  });
  return {
    ended,
    async stop() {
      child.kill();
      const force = setTimeout(() => child.kill('SIGKILL'), 3000);
      await ended;
      clearTimeout(force);
      await rm(profile, { recursive: true, force: true, maxRetries: 5, retryDelay: 100 }).catch(
        () => undefined,
      );
    },
  };
}
