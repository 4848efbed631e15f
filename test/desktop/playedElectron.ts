import { EventEmitter } from 'node:events';
import { WINDOW_URL } from '../../main/desktop/place.ts';

/** A stand-in for the parts of Electron that main.ts ties together; it records what it is told. */
export class PlayedElectron {
  readonly order: string[] = [];
  readonly windows: PlayedWindow[] = [];
  readonly channels = new Map<string, (event: unknown, message: unknown) => Promise<unknown>>();
  readonly app = Object.assign(new EventEmitter(), {
    commandLine: { hasSwitch: (name: string) => this.switches.has(name) },
    setName: () => undefined,
    setPath: (name: string, path: string) => void this.paths.set(name, path),
    enableSandbox: () => void this.order.push('sandbox'),
    isReady: () => this.order.includes('ready'),
    requestSingleInstanceLock: (data: unknown) => {
      this.handedOver = data;
      return this.isFirst;
    },
    whenReady: async () => void this.order.push('ready'),
    quit: () => void this.order.push('quit'),
    exit: (code: number) => void this.order.push(`exit ${code}`),
  });
  readonly switches = new Set<string>();
  readonly paths = new Map<string, string>();
  handedOver: unknown = null;
  isFirst = true;
  menu: { submenu?: { label?: string; click?: () => void }[] }[] = [];
  dialogAnswer = 0;
  schemeHandler: ((request: unknown) => Promise<Response>) | null = null;
  readonly session = Object.assign(new EventEmitter(), {
    webRequest: { onBeforeRequest: (handler: never) => void (this.beforeRequest = handler) },
    setPermissionRequestHandler: (handler: never) => void (this.permissionRequest = handler),
    setPermissionCheckHandler: (handler: never) => void (this.permissionCheck = handler),
    setDevicePermissionHandler: (handler: () => boolean) => void (this.devices = handler),
  });
  beforeRequest: (details: { url: string }, callback: (answer: { cancel: boolean }) => void) => void = () =>
    undefined;
  permissionRequest: (
    contents: null,
    permission: string,
    callback: (granted: boolean) => void,
    details: object,
  ) => void = () => undefined;
  permissionCheck: (contents: null, permission: string, origin: string, details: object) => boolean = () =>
    true;
  devices: () => boolean = () => true;

  /** What `import ... from 'electron'` gives. */
  module() {
    const played = this;
    class BrowserWindow extends PlayedWindow {
      static getAllWindows = () => played.windows.filter((window) => !window.destroyed);
      static getFocusedWindow = () => BrowserWindow.getAllWindows().at(-1) ?? null;

      constructor(options: unknown) {
        super(options, played.windows.length + 1);
        played.windows.push(this);
        played.app.emit('web-contents-created', {}, this.webContents);
      }
    }
    return {
      app: this.app,
      BrowserWindow,
      ipcMain: { handle: (channel: string, listener: never) => void this.channels.set(channel, listener) },
      Menu: {
        buildFromTemplate: (menu: never) => menu,
        setApplicationMenu: (menu: never) => void (this.menu = menu),
      },
      protocol: {
        registerSchemesAsPrivileged: () => void this.order.push('scheme'),
        handle: (_scheme: string, handler: never) => void (this.schemeHandler = handler),
      },
      screen: { getPrimaryDisplay: () => ({ workAreaSize: { width: 1920, height: 1080 } }) },
      session: { defaultSession: this.session },
      dialog: {
        showMessageBox: async () => ({ response: this.dialogAnswer }),
        showErrorBox: (_title: string, sentence: string) => void this.order.push(sentence),
      },
    };
  }
}

/** A stand-in for a window and its web contents. */
export class PlayedWindow extends EventEmitter {
  destroyed = false;
  title = '';
  readonly loaded: string[] = [];
  readonly sent: unknown[] = [];
  openHandler: () => { action: string } = () => ({ action: 'allow' });
  readonly webContents;

  constructor(
    readonly options: unknown,
    id: number,
  ) {
    super();
    this.webContents = Object.assign(new EventEmitter(), {
      id,
      send: (_channel: string, event: unknown) => void this.sent.push(event),
      reload: () => void this.loaded.push('again'),
      setWindowOpenHandler: (handler: () => { action: string }) => {
        this.openHandler = handler;
      },
    });
  }

  show(): void {}
  setDocumentEdited(): void {}

  setTitle(title: string): void {
    this.title = title;
  }

  async loadURL(url: string): Promise<void> {
    this.loaded.push(url);
  }

  /** As when the user clicks the window's cross. */
  close(): void {
    let prevented = false;
    this.emit('close', { preventDefault: () => void (prevented = true) });
    if (!prevented) this.destroy();
  }

  destroy(): void {
    this.destroyed = true;
    this.emit('closed');
  }

  /** The event of a message from its page. */
  sender() {
    return { sender: { id: this.webContents.id }, senderFrame: { url: WINDOW_URL, parent: null } };
  }
}
