import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { CHANNELS } from '../../main/desktop/channels.ts';
import type { CallEvent } from '../../main/desktop/desktopCalls.ts';
import { WINDOW_URL } from '../../main/desktop/place.ts';
import { createPreloadApi } from '../../main/desktop/preloadApi.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { type DesktopTestHost, openDesktopHost } from '../hosts/desktopTestHost.ts';
import { temporaryFolder } from '../hosts/testHost.ts';

describe('messages to the desktop host', () => {
  let root: ReturnType<typeof temporaryFolder>;
  let host: DesktopTestHost;
  let bridge: Bridge;
  let event: CallEvent;
  const windowId = '0123456789abcdef';

  beforeEach(async () => {
    root = temporaryFolder();
    mkdirSync(join(root.folder, 'window'));
    mkdirSync(join(root.folder, 'studies'));
    writeFileSync(join(root.folder, 'window', 'index.html'), '<!doctype html>');
    writeFileSync(join(root.folder, 'secret.txt'), 'not for windows');
    host = await openDesktopHost({
      folder: join(root.folder, 'studies'),
      userFolder: join(root.folder, 'own'),
      windowFolder: join(root.folder, 'window'),
      launchPaths: [],
    });
    bridge = await host.openWindow();
    event = { sender: { id: host.contentsIdOf(bridge) }, senderFrame: { url: WINDOW_URL, parent: null } };
  });
  afterEach(async () => {
    await host.close();
    root.remove();
  });

  const launch = { windowId, call: 'launch', argument: {}, bytes: null };

  it('are refused from any frame but the main frame of the own page', async () => {
    const foreign: CallEvent['senderFrame'][] = [
      null,
      { url: 'https://example.com/', parent: null },
      { url: WINDOW_URL, parent: {} },
    ];
    for (const senderFrame of foreign)
      expect(await host.invoke(CHANNELS.call, { ...event, senderFrame }, launch)).toEqual({
        refused: expect.stringMatching(/did not come from the window itself/),
        refusedKind: 'use',
      });
  });

  it('are refused from a window that is not known, and from one that takes the id of another', async () => {
    expect(await host.invoke(CHANNELS.call, { ...event, sender: { id: 99 } }, launch)).toMatchObject({
      refused: expect.stringMatching(/a window that is not known/),
    });
    await host.invoke(CHANNELS.call, event, launch);
    const other = await host.openWindow();
    const otherEvent = { ...event, sender: { id: host.contentsIdOf(other) } };
    expect(await host.invoke(CHANNELS.call, otherEvent, launch)).toMatchObject({
      refused: expect.stringMatching(/a window that is not known/),
    });
  });

  it('are refused when they do not fit', async () => {
    const messages: [unknown, RegExp][] = [
      [undefined, /does not understand/],
      [null, /does not understand/],
      ['launch', /does not understand/],
      [{ ...launch, windowId: '../x' }, /does not understand/],
      [{ ...launch, bytes: [1, 2] }, /does not understand/],
      [{ ...launch, extra: 1 }, /does not understand/],
      [{ ...launch, call: 'constructor' }, /no host does/],
      [{ ...launch, argument: { x: 1 } }, /does not fit/],
      [{ ...launch, bytes: new Uint8Array(1) }, /came with 1 bytes/],
    ];
    for (const [message, words] of messages)
      expect(await host.invoke(CHANNELS.call, event, message)).toMatchObject({
        refused: expect.stringMatching(words),
      });
  });

  it('name no path: what only the preload script may ask is refused to the page, and the other way round', async () => {
    const opening = {
      windowId,
      call: 'openDropped',
      argument: { paths: [join(root.folder, 'secret.txt')] },
      bytes: null,
    };
    expect(await host.invoke(CHANNELS.call, event, opening)).toMatchObject({
      refused: expect.stringMatching(/no host does/),
    });
    expect(await host.invoke(CHANNELS.dropped, event, launch)).toMatchObject({
      refused: expect.stringMatching(/no host does/),
    });
  });

  it('carry the paths of real files only', async () => {
    const sent: unknown[] = [];
    const api = createPreloadApi({
      invoke: async (channel, message) => sent.push([channel, message]),
      listen: () => undefined,
      // As webUtils.getPathForFile: throws for what is no File, answers '' for one made by the page.
      pathOf: (file) => {
        if (!(file instanceof File)) throw new TypeError('not a File');
        return file.name === 'dropped.csv' ? '/given/dropped.csv' : '';
      },
    });
    await api.dropped(windowId, [new File([], 'dropped.csv'), new File([], 'made up.csv')]);
    expect(sent).toEqual([
      [
        CHANNELS.dropped,
        { windowId, call: 'openDropped', argument: { paths: ['/given/dropped.csv'] }, bytes: null },
      ],
    ]);
    expect(() => api.dropped(windowId, ['/etc/passwd'])).toThrow(TypeError);
    await api.dropped(windowId, { 0: '/etc/passwd', length: 1 });
    expect(sent[1]).toEqual([
      CHANNELS.dropped,
      { windowId, call: 'openDropped', argument: { paths: [] }, bytes: null },
    ]);
    expect(Object.keys(api).sort()).toEqual(['call', 'dropped', 'onEvent']);
  });

  it('of a page that was loaded again take the place of those before, and its unsaved work is free', async () => {
    await bridge.keepUnsaved('work-01234567', 'Deep', new Uint8Array(1));
    const again = { windowId, call: 'listUnsaved', argument: {}, bytes: null };
    expect(await host.invoke(CHANNELS.call, event, again)).toMatchObject({
      answer: [{ workId: 'work-01234567' }],
    });
  });

  it('from the menu reach the window', async () => {
    const commands: string[] = [];
    const stop = bridge.onMenuCommand((command) => commands.push(command));
    host.send(bridge, { kind: 'command', command: 'save' });
    host.send(bridge, { kind: 'command', command: 'format disk' });
    host.send(bridge, 'nonsense');
    stop();
    host.send(bridge, { kind: 'command', command: 'undo' });
    expect(commands).toEqual(['save']);
  });

  describe('about closing', () => {
    const settle = () => new Promise((resolve) => setTimeout(resolve, 20));
    const askToClose = async () => {
      host.windows.askPage(host.contentsIdOf(bridge));
      await settle();
    };

    it('let a window close that agrees, or has nothing to say', async () => {
      await askToClose();
      expect(host.destroyed).toEqual([host.contentsIdOf(bridge)]);
    });

    it('let a window stay that wants to, or whose asking fails', async () => {
      const stop = bridge.onCloseRequest(async () => 'stay');
      await askToClose();
      expect(host.destroyed).toEqual([]);
      stop();
      bridge.onCloseRequest(() => Promise.reject(new Error('no')));
      await askToClose();
      expect(host.destroyed).toEqual([]);
      expect(host.windows.closeState(host.contentsIdOf(bridge))).toMatchObject({
        asked: false,
        agreed: false,
      });
    });

    it('close nothing that was not asked to close', async () => {
      const answer = { windowId, call: 'answerClose', argument: { close: true }, bytes: null };
      await host.invoke(CHANNELS.call, event, answer);
      expect(host.destroyed).toEqual([]);
    });
  });
});
