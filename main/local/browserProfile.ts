import { readFileSync, readlinkSync, unlinkSync, writeFileSync } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { withLock } from '../files/pathLock.ts';
import { isProcessAlive } from '../files/processes.ts';

export interface BrowserProfile {
  folder: string;
  /** The port that this profile's page had last, so that what the browser keeps for the page is found again. */
  lastPort: number;
  rememberPort(port: number): void;
  /** Records the browser that uses it now. */
  hold(pid: number): void;
  release(): void;
}

const HOLDER = 'conewright-holder';
const PORT = 'conewright-port';
const MOST_PROFILES = 50;

/**
 * A profile folder of the browser that no running browser uses: the first free of browser-1, browser-2, ... A browser
 * started on a used one would hand its page to the running browser and end, and the host could not follow it.
 */
export async function takeBrowserProfile(parent: string, lockFolder: string): Promise<BrowserProfile> {
  return await withLock(lockFolder, `profiles ${parent}`, async () => {
    for (let number = 1; ; number++) {
      const folder = join(parent, `browser-${number}`);
      await mkdir(folder, { recursive: true, mode: 0o700 });
      if (number < MOST_PROFILES && isUsed(folder)) continue;
      const profile = profileIn(folder);
      profile.hold(process.pid);
      return profile;
    }
  });
}

function profileIn(folder: string): BrowserProfile {
  const port = Number(readText(join(folder, PORT)));
  return {
    folder,
    lastPort: Number.isInteger(port) && port >= 1024 && port <= 65535 ? port : 0,
    rememberPort: (used) => writeFileSync(join(folder, PORT), String(used), { mode: 0o600 }),
    hold: (pid) => writeFileSync(join(folder, HOLDER), String(pid), { mode: 0o600 }),
    release() {
      try {
        unlinkSync(join(folder, HOLDER));
      } catch {
        // Removed by hand meanwhile: then it is free all the same.
      }
    },
  };
}

function isUsed(folder: string): boolean {
  if (isProcessAlive(Number(readText(join(folder, HOLDER))))) return true;
  // Chromium's own mark on Linux and macOS: a link whose target ends in -PID.
  try {
    return isProcessAlive(Number(/-(\d+)$/.exec(readlinkSync(join(folder, 'SingletonLock')))?.[1]));
  } catch {
    return false;
  }
}

function readText(path: string): string {
  try {
    return readFileSync(path, 'utf8').trim();
  } catch {
    return '';
  }
}
