import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { homedir } from 'node:os';
import { join } from 'node:path';
import { checkLaunchPaths, launchPaths, saveFolderFor } from '../files/launchPaths.ts';
import { type Machine, userFolder } from '../files/userFolder.ts';
import { type FoundBrowser, findBrowser } from '../launch/findBrowser.ts';
import { type BrowserProfile, takeBrowserProfile } from './browserProfile.ts';
import { browserArguments, openDefaultBrowser, startBrowser } from './open.ts';
import { type LocalServer, startLocalServer } from './server.ts';

export interface LocalOptions {
  /** The built window. */
  windowFolder: string;
  /** Files named on the command line; relative ones lie below baseFolder. */
  files: readonly string[];
  /** False only prints the address. */
  open: boolean;
  /** Receives one line at a time for the user's terminal. */
  print(line: string): void;
  /** The folder that the user started the program in. */
  baseFolder: string;
  /** The program's own folder, where studies are not saved. */
  programFolder: string;
  machine?: Machine;
}

export interface RunningLocal {
  /** With its token: not for a command line, which others can read. */
  address: string;
  /** The host has ended: the browser's window was closed, or `stop` was called. */
  closed: Promise<void>;
  stop(): Promise<void>;
}

/**
 * Serves the window on the loopback address and shows it in an installed browser. Ends with the browser's window
 * where it has one of its own, else when the caller stops it (Ctrl-C). Throws Refusal for a file that cannot be
 * opened or a window that is not built.
 */
export async function runLocal(options: LocalOptions): Promise<RunningLocal> {
  const machine = options.machine ?? { platform: process.platform, env: process.env, homeFolder: homedir() };
  const own = userFolder(machine);
  const paths = launchPaths(options.files, options.baseFolder);
  await checkLaunchPaths(paths);
  const browser = options.open ? findBrowser(machine) : null;
  const profile =
    browser === null
      ? null
      : await takeBrowserProfile(profileParent(browser, own, machine), join(own, 'locks'));
  const { baseFolder, programFolder } = options;
  const saveFolder = await saveFolderFor(paths, {
    baseFolder,
    programFolder,
    homeFolder: machine.homeFolder,
  });
  let server: LocalServer;
  try {
    server = await startLocalServer({
      windowFolder: options.windowFolder,
      userFolder: own,
      saveFolder,
      launchPaths: paths,
      port: profile?.lastPort ?? 0,
      warn: options.print,
    });
  } catch (error) {
    profile?.release();
    throw error;
  }

  let end = () => {};
  const closed = new Promise<void>((resolve) => {
    end = resolve;
  });
  let stopping: Promise<void> | null = null;
  let child: ChildProcess | null = null;
  const stop = () => {
    child?.kill();
    stopping ??= server.close().finally(() => {
      profile?.release();
      end();
    });
    return stopping;
  };

  options.print(`Studies are saved in ${saveFolder}`);
  if (!options.open)
    options.print(`Open ${server.address} in a browser on this machine; Ctrl-C ends the program.`);
  else if (browser !== null && profile !== null)
    child = await showInBrowser(browser, profile, server, options.print, stop);
  else if (await openDefaultBrowser(machine, server.addressForOneUse()))
    options.print(
      `The window is in your default browser (or open ${server.address}); Ctrl-C ends the program.`,
    );
  else
    options.print(`No browser was found: open ${server.address} in one yourself; Ctrl-C ends the program.`);
  return { address: server.address, closed, stop };
}

async function showInBrowser(
  browser: FoundBrowser,
  profile: BrowserProfile,
  server: LocalServer,
  print: (line: string) => void,
  stop: () => Promise<void>,
): Promise<ChildProcess> {
  profile.rememberPort(server.port);
  const args = browserArguments(server.addressForOneUse(), profile.folder, process.getuid?.() === 0);
  const child = startBrowser(browser.path, args);
  const yourself = `open ${server.address} in a browser yourself; Ctrl-C ends the program.`;
  child.once('exit', (code, signal) => {
    profile.release();
    if (!server.wasVisited())
      return print(`${browser.path} ended (${signal ?? code}) before it showed the window: ${yourself}`);
    // The user may have opened the address in another browser as well: that window is not taken away.
    if (server.livingWindows() === 0) void stop();
    else server.onLastWindowGone(() => void stop());
  });
  try {
    await once(child, 'spawn');
    profile.hold(child.pid ?? process.pid);
  } catch (error) {
    profile.release();
    print(`${browser.path} did not start (${error instanceof Error ? error.message : error}): ${yourself}`);
  }
  return child;
}

function profileParent({ isSnap }: FoundBrowser, own: string, { homeFolder }: Machine): string {
  return isSnap ? join(homeFolder, 'snap', 'chromium', 'common', 'conewright') : own;
}
