import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach } from 'vitest';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import type { OpenedFile } from '../../shared-core/bridge/messages.ts';
import { type TestHost, type TestHostOptions, temporaryFolder } from './testHost.ts';

export const bytesOf = (text: string) => new TextEncoder().encode(text);
export const textOf = (bytes: Uint8Array) => new TextDecoder().decode(bytes);
export const catalogue = 'ra,dec,z\n10,20,0.50\n11,21,0.60\n';

/** A host of either kind with one window open, new for each test. */
export interface Stage {
  readonly host: TestHost;
  readonly bridge: Bridge;
  /** Holds the folder of studies, and beside it what no window may see. */
  readonly rootFolder: string;
  /** A path in the folder of studies. */
  inFolder(name: string): string;
  /** A file that the program was started with. */
  launched(name: string): OpenedFile;
}

export function setStage(open: (options: TestHostOptions) => Promise<TestHost>): Stage {
  let root: ReturnType<typeof temporaryFolder>;
  let host: TestHost;
  let bridge: Bridge;

  beforeEach(async () => {
    root = temporaryFolder();
    const folder = join(root.folder, 'studies');
    const windowFolder = join(root.folder, 'window');
    mkdirSync(join(windowFolder, 'assets'), { recursive: true });
    mkdirSync(folder);
    writeFileSync(join(windowFolder, 'index.html'), '<!doctype html><title>window</title>');
    writeFileSync(join(windowFolder, 'assets', 'app.js'), 'export {};');
    writeFileSync(join(folder, 'field.csv'), catalogue);
    writeFileSync(join(folder, 'empty.csv'), '');
    writeFileSync(join(folder, 'deep.study.json'), '{"version":1}');
    writeFileSync(join(root.folder, 'secret.txt'), 'not for windows');
    const named = ['field.csv', 'empty.csv', 'deep.study.json', 'missing.csv'];
    const launchPaths = named.map((name) => join(folder, name));
    host = await open({ folder, userFolder: join(root.folder, 'own'), windowFolder, launchPaths });
    bridge = await host.openWindow();
  });
  afterEach(async () => {
    await host.close();
    root.remove();
  });

  return {
    get host() {
      return host;
    },
    get bridge() {
      return bridge;
    },
    get rootFolder() {
      return root.folder;
    },
    inFolder: (name) => join(host.folder, name),
    launched: (name) => bridge.launch.files.find((file) => file.name === name)!,
  };
}
