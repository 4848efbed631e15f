import { contextBridge, ipcRenderer, webUtils } from 'electron';
import { createPreloadApi } from './preloadApi.ts';

const api = createPreloadApi({
  invoke: (channel, message) => ipcRenderer.invoke(channel, message),
  // The event object holds the sender, which is not for the page.
  listen: (channel, listener) =>
    void ipcRenderer.on(channel, (_event, message: unknown) => listener(message)),
  pathOf: (file) => webUtils.getPathForFile(file as Parameters<typeof webUtils.getPathForFile>[0]),
});

contextBridge.exposeInMainWorld('conewright', api);
