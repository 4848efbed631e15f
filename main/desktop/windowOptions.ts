import type { BrowserWindowConstructorOptions } from 'electron';

/** Options of every window. What is Electron's default already is written out, so that a test holds it. */
export function windowOptions(
  preload: string,
  workArea: { width: number; height: number },
): BrowserWindowConstructorOptions {
  return {
    width: Math.min(1440, workArea.width),
    height: Math.min(900, workArea.height),
    minWidth: 640,
    minHeight: 480,
    title: 'Conewright',
    show: false,
    backgroundColor: '#101318',
    autoHideMenuBar: true,
    webPreferences: {
      preload,
      sandbox: true,
      contextIsolation: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      webSecurity: true,
      allowRunningInsecureContent: false,
      experimentalFeatures: false,
      webviewTag: false,
      navigateOnDragDrop: false,
      safeDialogs: true,
      spellcheck: false,
    },
  };
}
