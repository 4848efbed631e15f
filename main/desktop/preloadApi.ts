import { CHANNELS } from './channels.ts';

/** The parts of Electron that the preload script uses; passed in for the test. */
export interface PreloadParts {
  invoke(channel: string, message: unknown): Promise<unknown>;
  listen(channel: string, listener: (message: unknown) => void): void;
  /** Throws for anything but a real File; answers '' for one that the page made itself. */
  pathOf(file: unknown): string;
}

/** What the page finds as window.conewright: three functions and nothing of Electron. */
export interface PreloadApi {
  call(message: unknown): Promise<unknown>;
  /** Opens files that the user dropped. Their paths are read here: a page cannot name one. */
  dropped(windowId: unknown, files: unknown): Promise<unknown>;
  onEvent(listener: (event: unknown) => void): void;
}

export function createPreloadApi({ invoke, listen, pathOf }: PreloadParts): PreloadApi {
  return {
    call: (message) => invoke(CHANNELS.call, message),
    dropped(windowId, files) {
      const paths = (Array.isArray(files) ? files : []).map(pathOf).filter((path) => path !== '');
      return invoke(CHANNELS.dropped, { windowId, call: 'openDropped', argument: { paths }, bytes: null });
    },
    onEvent: (listener) => listen(CHANNELS.event, (message) => listener(message)),
  };
}
