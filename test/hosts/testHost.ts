import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { PAGE_HEADERS } from '../../main/files/pageHeaders.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';

/** What the user does when the program asks; the contract test plays the user in both hosts. */
export interface PlayedUser {
  /** Files to pick next, as paths; empty gives up. */
  picks: string[];
  /** The study name to give next; null gives up. */
  saveName: string | null;
  mayReplace: boolean;
  /** Questions that were asked, in order. */
  asked: string[];
}

export interface TestHost {
  readonly kind: 'desktop' | 'local';
  /** Where the program was started, and where the local host saves. */
  readonly folder: string;
  readonly userFolder: string;
  readonly user: PlayedUser;
  openWindow(): Promise<Bridge>;
  closeWindow(bridge: Bridge): Promise<void>;
  /** Loads an address as the page would. */
  load(url: string, init?: { method?: string; headers?: Record<string, string> }): Promise<Response>;
  /** The address of something in the window's own place. */
  windowUrl(path: string): string;
  /** What an export left: its contents by name, wherever this host puts it. */
  exported(name: string): Promise<Uint8Array | null>;
  close(): Promise<void>;
}

export interface TestHostOptions {
  folder: string;
  userFolder: string;
  windowFolder: string;
  launchPaths: string[];
}

export const pageHeaderNames = Object.keys(PAGE_HEADERS);

/** A new empty folder that is removed by the answered function. */
export function temporaryFolder(): { folder: string; remove(): void } {
  const folder = mkdtempSync(join(tmpdir(), 'conewright-test-'));
  return { folder, remove: () => rmSync(folder, { recursive: true, force: true }) };
}

export function playedUser(): PlayedUser {
  return { picks: [], saveName: null, mayReplace: true, asked: [] };
}
