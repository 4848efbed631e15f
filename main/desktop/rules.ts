import { originOf, WINDOW_ORIGIN, WINDOW_URL } from './place.ts';

/*
 * What the window may do, item by item of Electron's published checklist ("Security", docs/tutorial/security.md):
 *
 *  1 only secure content ............... own scheme only: requestAllowed
 *  2 no Node in the page ............... windowOptions: nodeIntegration off, in workers and subframes too
 *  3 context isolation ................. windowOptions
 *  4 process sandbox ................... windowOptions, and app.enableSandbox in main.ts
 *  5 permission requests ............... permissionAllowed, devices refused
 *  6 webSecurity stays on .............. windowOptions
 *  7 content security policy ........... pageHeaders.ts, on every answer of scheme.ts
 *  8 no insecure content ............... windowOptions
 *  9, 10 no experimental features ...... windowOptions; no blink features are named
 * 11, 12 webviews ...................... windowOptions: no webview tag; attaching is prevented in main.ts
 * 13 navigation ........................ navigationAllowed
 * 14 new windows ....................... all denied in main.ts
 * 15 shell.openExternal ................ not used at all
 * 16 a current Electron ................ package.json names the exact version
 * 17 sender of every message ........... senderAllowed
 * 18 no file:// ........................ own scheme; requestAllowed refuses file:
 * 19 fuses ............................. set when a program is packaged; this one runs from its package unpackaged
 * 20 no Electron API for the page ...... preloadApi.ts hands over three functions, never ipcRenderer
 */

/** Whether the window may load an address at all: its own place, and what the page itself made (blob, data). */
export function requestAllowed(address: string): boolean {
  if (originOf(address) === WINDOW_ORIGIN) return true;
  const { protocol } = URL.canParse(address) ? new URL(address) : { protocol: '' };
  if (protocol === 'blob:') return originOf(address.slice('blob:'.length)) === WINDOW_ORIGIN;
  return protocol === 'data:' || protocol === 'devtools:';
}

/** Whether the window may become another page: only itself, loaded again. */
export function navigationAllowed(address: string): boolean {
  return address === WINDOW_URL;
}

/**
 * Whether the page gets a permission. All are refused but writing text to the clipboard by its own main frame, which
 * copying the ledger needs.
 */
export function permissionAllowed(permission: string, address: string, isMainFrame: boolean): boolean {
  return permission === 'clipboard-sanitized-write' && isMainFrame && originOf(address) === WINDOW_ORIGIN;
}

/** The part of Electron's event that tells who sent a message. */
export interface SenderEvent {
  readonly senderFrame: { readonly url: string; readonly parent: unknown } | null;
}

/** Whether a message comes from the main frame of our own page. A frame that is gone cannot be told, and is refused. */
export function senderAllowed({ senderFrame }: SenderEvent): boolean {
  return senderFrame !== null && senderFrame.parent === null && originOf(senderFrame.url) === WINDOW_ORIGIN;
}

/**
 * Whether to force the process sandbox on for everything. Not where the program was started without it (as root, in a
 * container): forcing it would take that switch back, and no window could start.
 */
export function mayForceSandbox(startedWithoutSandbox: boolean): boolean {
  return !startedWithoutSandbox;
}
