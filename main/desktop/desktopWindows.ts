import type { HostEvent, WindowState } from '../../shared-core/bridge/messages.ts';
import type { CloseState } from './closing.ts';

/** What the host does to one window on the screen; thin around Electron's BrowserWindow. */
export interface Screen {
  setTitle(title: string, unsaved: boolean): void;
  send(event: HostEvent): void;
  /** Closes without asking again. */
  destroy(): void;
}

interface DesktopWindow extends CloseState {
  screen: Screen;
  launchPaths: string[];
  /** The id that the page in it gave itself; a page that was loaded again has another. */
  windowId: string | null;
}

interface Desk {
  windowOpened(windowId: string): void;
  windowClosed(windowId: string): Promise<void>;
}

/** The desktop's windows, by the number of their web contents; holds no Electron object. */
export class DesktopWindows {
  readonly #windows = new Map<number, DesktopWindow>();
  #desk: Desk | null = null;

  /** Set once, when the desk stands; the desk itself needs the windows. */
  attach(desk: Desk): void {
    this.#desk = desk;
  }

  add(contentsId: number, screen: Screen, launchPaths: string[]): void {
    const closing = { unsaved: false, asked: false, agreed: false };
    this.#windows.set(contentsId, { screen, launchPaths, windowId: null, ...closing });
  }

  /** True when the page belongs to a known window. A new page in it takes the place of the one before. */
  async recognise(contentsId: number, windowId: string): Promise<boolean> {
    const window = this.#windows.get(contentsId);
    if (window === undefined) return false;
    if (window.windowId === windowId) return true;
    const elsewhere = [...this.#windows.values()].some((other) => other.windowId === windowId);
    if (elsewhere) return false;
    await this.pageGone(contentsId);
    window.windowId = windowId;
    this.#desk?.windowOpened(windowId);
    return true;
  }

  /** The page died or is loaded again: what it held is free, and nothing is known of its state. */
  async pageGone(contentsId: number): Promise<void> {
    const window = this.#windows.get(contentsId);
    if (window === undefined) return;
    const { windowId } = window;
    Object.assign(window, { windowId: null, unsaved: false, asked: false });
    if (windowId !== null) await this.#desk?.windowClosed(windowId);
  }

  async remove(contentsId: number): Promise<void> {
    await this.pageGone(contentsId);
    this.#windows.delete(contentsId);
  }

  /** The same files again for a page that was loaded again. */
  launchPaths(windowId: string): string[] {
    return this.#find(windowId)?.[1].launchPaths ?? [];
  }

  contentsIdOf(windowId: string): number | null {
    return this.#find(windowId)?.[0] ?? null;
  }

  closeState(contentsId: number): CloseState {
    return this.#windows.get(contentsId) ?? { unsaved: false, asked: false, agreed: true };
  }

  setState(windowId: string, { title, unsaved }: WindowState): void {
    const window = this.#find(windowId)?.[1];
    if (window === undefined) return;
    window.unsaved = unsaved;
    window.screen.setTitle(title, unsaved);
  }

  askPage(contentsId: number): void {
    const window = this.#windows.get(contentsId);
    if (window === undefined) return;
    window.asked = true;
    window.screen.send({ kind: 'closeRequest' });
  }

  /** The page's or the user's answer. Closing goes through only for a window that was asked. */
  answerClose(contentsId: number | null, close: boolean): void {
    const window = contentsId === null ? undefined : this.#windows.get(contentsId);
    if (window === undefined || !window.asked) return;
    window.asked = false;
    if (!close) return;
    window.agreed = true;
    window.screen.destroy();
  }

  #find(windowId: string): [number, DesktopWindow] | undefined {
    return [...this.#windows].find(([, window]) => window.windowId === windowId);
  }
}
