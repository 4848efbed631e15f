// The desktop host: Electron's events tied to the plain functions beside this file, which decide.
import { homedir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { app, BrowserWindow, ipcMain, Menu, protocol, screen, session } from 'electron';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { MenuCommand } from '../../shared-core/bridge/messages.ts';
import { createDesk, type Desk } from '../files/desk.ts';
import { userFolder } from '../files/userFolder.ts';
import { windowFiles } from '../files/windowFiles.ts';
import { handedOverFiles, namedFiles } from './arguments.ts';
import { CHANNELS } from './channels.ts';
import { afterPageDied, closeDecision } from './closing.ts';
import { receiveCalls } from './desktopCalls.ts';
import { createDialogs, mayCloseUnsaved, tellError } from './desktopDialogs.ts';
import { DesktopWindows } from './desktopWindows.ts';
import { menuModel } from './menu.ts';
import { SCHEME, WINDOW_ORIGIN, WINDOW_URL } from './place.ts';
import { mayForceSandbox, navigationAllowed, permissionAllowed, requestAllowed } from './rules.ts';
import { answerScheme, SCHEME_PRIVILEGES } from './scheme.ts';
import { windowOptions } from './windowOptions.ts';

const here = fileURLToPath(new URL('.', import.meta.url));
const ownFolder = userFolder({ platform: process.platform, env: process.env, homeFolder: homedir() });
const windows = new DesktopWindows();
const named = namedFiles(process.argv, process.defaultApp === true, process.env.INIT_CWD ?? process.cwd());
const openedBySystem: string[] = [];

app.setName('Conewright');
app.setPath('userData', join(ownFolder, 'desktop'));
if (mayForceSandbox(app.commandLine.hasSwitch('no-sandbox'))) app.enableSandbox();
protocol.registerSchemesAsPrivileged([{ scheme: SCHEME, privileges: SCHEME_PRIVILEGES }]);
app.on('open-file', (event, path) => {
  event.preventDefault();
  if (app.isReady()) openWindow([path]);
  else openedBySystem.push(path);
});

if (app.requestSingleInstanceLock({ paths: named })) {
  app.whenReady().then(start, fail);
} else {
  // The running program opens the window; this one has handed its files over.
  app.quit();
}

function start(): void {
  try {
    const desk = startDesk();
    limitSession(desk);
    Menu.setApplicationMenu(Menu.buildFromTemplate(menuModel(process.platform, sendToFront)));
    receiveCalls(ipcMain, desk, windows);
    app.on('second-instance', (_event, _argv, _folder, data) => openWindow(handedOverFiles(data)));
    app.on('window-all-closed', () => app.quit());
    app.on('will-quit', () => desk.close());
    openWindow([...named, ...openedBySystem]);
  } catch (error) {
    fail(error);
  }
}

function startDesk(): Desk {
  const desk = createDesk({
    hostKind: 'desktop',
    userFolder: ownFolder,
    saveFolder: null,
    urlOf: (id) => `${WINDOW_ORIGIN}/files/${id}`,
    dialogs: createDialogs((windowId) => browserWindow(windows.contentsIdOf(windowId))),
    windows: {
      setState: (windowId, state) => windows.setState(windowId, state),
      answerClose: (windowId, close) => windows.answerClose(windows.contentsIdOf(windowId), close),
    },
    launchPaths: (windowId) => windows.launchPaths(windowId),
    warn: (sentence) => console.error(`conewright: ${sentence}`),
  });
  windows.attach(desk);
  return desk;
}

function limitSession(desk: Desk): void {
  const files = windowFiles(join(here, '..', 'window'));
  const own = session.defaultSession;
  protocol.handle(SCHEME, (request) => answerScheme(request, files, desk.handles));
  own.webRequest.onBeforeRequest(({ url }, callback) => callback({ cancel: !requestAllowed(url) }));
  own.setPermissionRequestHandler((_contents, permission, callback, details) =>
    callback(permissionAllowed(permission, details.requestingUrl, details.isMainFrame)),
  );
  own.setPermissionCheckHandler((_contents, permission, origin, details) =>
    permissionAllowed(permission, details.requestingUrl ?? origin, details.isMainFrame),
  );
  own.setDevicePermissionHandler(() => false);
  own.on('will-download', (event) => event.preventDefault());
  app.on('web-contents-created', (_event, contents) => {
    contents.on('will-frame-navigate', (event) => {
      if (!navigationAllowed(event.url)) event.preventDefault();
    });
    contents.on('will-redirect', (event) => event.preventDefault());
    contents.on('will-attach-webview', (event) => event.preventDefault());
    contents.setWindowOpenHandler(() => ({ action: 'deny' }));
  });
}

function openWindow(launchPaths: string[]): void {
  const options = windowOptions(join(here, 'preload.cjs'), screen.getPrimaryDisplay().workAreaSize);
  const window = new BrowserWindow(options);
  const contents = window.webContents;
  const { id } = contents;
  const died: number[] = [];
  const screenOf = {
    setTitle(title: string, unsaved: boolean) {
      window.setTitle(title);
      window.setDocumentEdited(unsaved);
    },
    send: (event: unknown) => contents.send(CHANNELS.event, event),
    destroy: () => window.destroy(),
  };
  windows.add(id, screenOf, launchPaths);
  window.once('ready-to-show', () => window.show());
  window.on('close', (event) => {
    const decision = closeDecision(windows.closeState(id));
    if (decision === 'close') return;
    event.preventDefault();
    if (decision === 'askPage') windows.askPage(id);
    else void mayCloseUnsaved(window).then((close) => close && windows.answerClose(id, true));
  });
  window.on('closed', () => void windows.remove(id));
  contents.on('render-process-gone', (_event, { reason }) => {
    const next = afterPageDied(reason, died, Date.now());
    died.push(Date.now());
    void windows.pageGone(id);
    if (next === 'load') contents.reload();
    else if (next === 'giveUp')
      tellError('The window stopped working several times. Start the program again.');
  });
  window.loadURL(WINDOW_URL).catch(fail);
}

function sendToFront(command: MenuCommand): void {
  BrowserWindow.getFocusedWindow()?.webContents.send(CHANNELS.event, { kind: 'command', command });
}

function browserWindow(contentsId: number | null): BrowserWindow | null {
  return BrowserWindow.getAllWindows().find(({ webContents }) => webContents.id === contentsId) ?? null;
}

function fail(error: unknown): void {
  const sentence = error instanceof Refusal ? error.message : `The window could not start: ${String(error)}`;
  console.error(`conewright: ${sentence}`);
  app.exit(1);
}
