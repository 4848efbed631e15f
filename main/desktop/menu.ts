import type { MenuItemConstructorOptions } from 'electron';
import type { MenuCommand } from '../../shared-core/bridge/messages.ts';

/**
 * The application's menu. Its own items send a command to the window in front; the window handles the keys itself, in
 * both hosts alike, so the menu only shows them (macOS takes them from the menu always).
 */
export function menuModel(
  platform: NodeJS.Platform,
  send: (command: MenuCommand) => void,
): MenuItemConstructorOptions[] {
  const item = (label: string, accelerator: string, command: MenuCommand): MenuItemConstructorOptions => ({
    label,
    accelerator,
    registerAccelerator: platform === 'darwin',
    click: () => send(command),
  });
  const line: MenuItemConstructorOptions = { type: 'separator' };
  const file: MenuItemConstructorOptions = {
    label: '&File',
    submenu: [
      item('New study', 'CommandOrControl+N', 'new'),
      item('Open ...', 'CommandOrControl+O', 'open'),
      line,
      item('Save', 'CommandOrControl+S', 'save'),
      item('Save as ...', 'CommandOrControl+Shift+S', 'saveAs'),
      item('Export ...', 'CommandOrControl+E', 'export'),
      line,
      platform === 'darwin' ? { role: 'close' } : { role: 'quit' },
    ],
  };
  const edit: MenuItemConstructorOptions = {
    label: '&Edit',
    submenu: [
      item('Undo', 'CommandOrControl+Z', 'undo'),
      item('Redo', platform === 'win32' ? 'Control+Y' : 'CommandOrControl+Shift+Z', 'redo'),
      line,
      { role: 'cut' },
      { role: 'copy' },
      { role: 'paste' },
      { role: 'selectAll' },
    ],
  };
  const view: MenuItemConstructorOptions = {
    label: '&View',
    submenu: [
      { role: 'resetZoom' },
      { role: 'zoomIn' },
      { role: 'zoomOut' },
      line,
      { role: 'togglefullscreen' },
      { role: 'toggleDevTools' },
    ],
  };
  return platform === 'darwin'
    ? [{ role: 'appMenu' }, file, edit, view, { role: 'windowMenu' }]
    : [file, edit, view];
}
