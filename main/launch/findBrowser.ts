import { accessSync, constants, realpathSync } from 'node:fs';
import { posix, win32 } from 'node:path';
import type { Machine } from '../files/userFolder.ts';

/** Looks at the disk; passed in, so that a test on one system covers all of them. */
export interface BrowserDisk {
  isExecutable(path: string): boolean;
  realPath(path: string): string;
}

const systemDisk: BrowserDisk = {
  isExecutable(path) {
    try {
      accessSync(path, process.platform === 'win32' ? constants.F_OK : constants.X_OK);
      return true;
    } catch {
      return false;
    }
  },
  realPath(path) {
    try {
      return realpathSync(path);
    } catch {
      return path;
    }
  },
};

export interface FoundBrowser {
  path: string;
  /** Ubuntu's packaged kind, which may write only below ~/snap. */
  isSnap: boolean;
}

const ON_PATH = [
  'google-chrome-stable',
  'google-chrome',
  'chromium',
  'chromium-browser',
  'microsoft-edge-stable',
  'microsoft-edge',
];

const IN_APPLICATIONS = [
  'Google Chrome.app/Contents/MacOS/Google Chrome',
  'Chromium.app/Contents/MacOS/Chromium',
  'Microsoft Edge.app/Contents/MacOS/Microsoft Edge',
];

const IN_PROGRAM_FILES = [
  'Google\\Chrome\\Application\\chrome.exe',
  'Chromium\\Application\\chrome.exe',
  'Microsoft\\Edge\\Application\\msedge.exe',
];

/**
 * An installed Chromium, Chrome or Edge, which can show a page as a window of its own; null when there is none.
 * CHROME_PATH, where it names a program, is taken before any other.
 */
export function findBrowser(machine: Machine, disk: BrowserDisk = systemDisk): FoundBrowser | null {
  const path = candidates(machine).find((candidate) => disk.isExecutable(candidate));
  if (path === undefined) return null;
  const isSnap = path.startsWith('/snap/') || disk.realPath(path) === '/usr/bin/snap';
  return { path, isSnap };
}

function candidates({ platform, env, homeFolder }: Machine): string[] {
  const named = env.CHROME_PATH ? [env.CHROME_PATH] : [];
  if (platform === 'win32') {
    const folders = [env.PROGRAMFILES, env['PROGRAMFILES(X86)'], env.LOCALAPPDATA].filter((folder) => folder);
    return [
      ...named,
      ...IN_PROGRAM_FILES.flatMap((name) => folders.map((folder) => win32.join(folder!, name))),
    ];
  }
  if (platform === 'darwin') {
    const folders = ['/Applications', posix.join(homeFolder, 'Applications')];
    return [
      ...named,
      ...IN_APPLICATIONS.flatMap((name) => folders.map((folder) => posix.join(folder, name))),
    ];
  }
  // Only absolute folders of PATH: a relative one would find whatever lies in the current folder.
  const folders = (env.PATH ?? '').split(':').filter((folder) => folder.startsWith('/'));
  const onPath = ON_PATH.flatMap((name) => folders.map((folder) => posix.join(folder, name)));
  return [...named, ...onPath, '/snap/bin/chromium'];
}

/** True when a window can be shown: always on macOS and Windows; on others when X11 or Wayland says where. */
export function hasDisplay({ platform, env }: Pick<Machine, 'platform' | 'env'>): boolean {
  if (platform === 'win32' || platform === 'darwin') return true;
  return Boolean(env.DISPLAY || env.WAYLAND_DISPLAY);
}
