import { describe, expect, it } from 'vitest';
import { handedOverFiles, namedFiles } from '../../main/desktop/arguments.ts';
import { afterPageDied, CLOSE_DIALOG, closeDecision } from '../../main/desktop/closing.ts';
import {
  openDialog,
  replaceDialog,
  saveExportDialog,
  saveStudyDialog,
} from '../../main/desktop/dialogChoices.ts';
import { menuModel } from '../../main/desktop/menu.ts';
import { originOf } from '../../main/desktop/place.ts';
import { answerScheme } from '../../main/desktop/scheme.ts';
import { windowOptions } from '../../main/desktop/windowOptions.ts';
import { type MenuCommand, menuCommandSchema, purposeSchema } from '../../shared-core/bridge/messages.ts';

describe('the arguments of the desktop program', () => {
  it('are files after the program, without switches', () => {
    expect(namedFiles(['electron', 'main.js', 'a.csv', '/b/c.csv'], true, '/home/ada')).toEqual([
      '/home/ada/a.csv',
      '/b/c.csv',
    ]);
    expect(
      namedFiles(['electron', '--inspect=0', '--no-sandbox', 'main.js', '--', 'a.csv'], true, '/x'),
    ).toEqual(['/x/a.csv']);
    expect(namedFiles(['conewright', 'a.csv'], false, '/x')).toEqual(['/x/a.csv']);
    expect(namedFiles(['conewright', '--', '--odd.csv', '--'], false, '/x')).toEqual([
      '/x/--odd.csv',
      '/x/--',
    ]);
    expect(namedFiles(['electron', 'main.js'], true, '/x')).toEqual([]);
    expect(namedFiles([], true, '/x')).toEqual([]);
  });

  it('of a second start are believed only in their own form', () => {
    expect(handedOverFiles({ paths: ['/a.csv'] })).toEqual(['/a.csv']);
    for (const data of [
      undefined,
      null,
      'x',
      {},
      { paths: 'x' },
      { paths: [1] },
      { paths: [''] },
      { paths: ['a\0b'] },
    ])
      expect(handedOverFiles(data)).toEqual([]);
    expect(handedOverFiles({ paths: ['relative.csv', '/a.csv'] })).toEqual(['/a.csv']);
  });
});

describe('closing a window', () => {
  it('asks only where something would be lost', () => {
    const state = { unsaved: false, asked: false, agreed: false };
    expect(closeDecision(state)).toBe('close');
    expect(closeDecision({ ...state, unsaved: true })).toBe('askPage');
    expect(closeDecision({ ...state, unsaved: true, asked: true })).toBe('askUser');
    expect(closeDecision({ ...state, unsaved: true, agreed: true })).toBe('close');
  });

  it('keeps the window unless the user chooses otherwise', () => {
    expect(CLOSE_DIALOG.buttons[CLOSE_DIALOG.cancelId]).toBe('Keep the window');
    expect(CLOSE_DIALOG.defaultId).toBe(CLOSE_DIALOG.cancelId);
    expect(replaceDialog('x').buttons[replaceDialog('x').cancelId]).toBe('Keep it');
  });

  it('loads a page that died again, but not for ever', () => {
    expect(afterPageDied('clean-exit', [], 0)).toBe('nothing');
    expect(afterPageDied('crashed', [], 0)).toBe('load');
    expect(afterPageDied('oom', [1000, 2000], 3000)).toBe('load');
    expect(afterPageDied('oom', [1000, 2000, 3000], 4000)).toBe('giveUp');
    expect(afterPageDied('oom', [1000, 2000, 3000], 100_000)).toBe('load');
  });
});

describe('the menu', () => {
  const commandsOf = (platform: NodeJS.Platform) => {
    const sent: MenuCommand[] = [];
    const items = menuModel(platform, (command) => void sent.push(command)).flatMap(({ submenu }) =>
      Array.isArray(submenu) ? submenu : [],
    );
    for (const { click } of items) (click as (() => void) | undefined)?.();
    return { sent, items };
  };

  it.each(['linux', 'darwin', 'win32'] as const)('offers every command on %s', (platform) => {
    const { sent, items } = commandsOf(platform);
    expect([...sent].sort()).toEqual([...menuCommandSchema.options].sort());
    const keys = items.flatMap(({ accelerator }) => accelerator ?? []);
    expect(new Set(keys).size).toBe(keys.length);
    // Elsewhere the page itself takes the keys; a menu that took them too would act twice.
    for (const { click, registerAccelerator } of items)
      if (click) expect(registerAccelerator).toBe(platform === 'darwin');
  });

  it('has on macOS what its users expect there', () => {
    expect(menuModel('darwin', () => undefined)[0]).toEqual({ role: 'appMenu' });
    expect(menuModel('linux', () => undefined).some(({ role }) => role === 'appMenu')).toBe(false);
  });
});

describe('dialogs', () => {
  it('let several files be chosen only for a catalogue, and any file', () => {
    for (const purpose of purposeSchema.options) {
      const { properties, filters } = openDialog(purpose);
      expect(properties?.includes('multiSelections')).toBe(purpose === 'catalogue');
      expect(filters?.at(-1)).toEqual({ name: 'All files', extensions: ['*'] });
    }
  });

  it('suggest harmless names', () => {
    expect(saveStudyDialog('deep field').defaultPath).toBe('deep field.study.json');
    expect(saveStudyDialog('deep.study.json').defaultPath).toBe('deep.study.json');
    expect(saveStudyDialog('../../etc/x').defaultPath).toBe('-..-etc-x.study.json');
    expect(saveStudyDialog('').defaultPath).toBe('study.study.json');
    expect(saveExportDialog('../cone.png')).toMatchObject({
      defaultPath: '-cone.png',
      filters: [{ name: 'PNG', extensions: ['png'] }, {}],
    });
    expect(saveExportDialog('/').defaultPath).toBe('-');
    for (const dialog of [saveStudyDialog('x'), saveExportDialog('x')])
      expect(dialog.properties).toContain('showOverwriteConfirmation');
  });
});

describe('the window', () => {
  it('fits on a small screen', () => {
    expect(windowOptions('p', { width: 1024, height: 700 })).toMatchObject({
      width: 1024,
      height: 700,
      show: false,
    });
    expect(windowOptions('p', { width: 3840, height: 2160 })).toMatchObject({ width: 1440, height: 900 });
  });

  it('tells origins by a parser, not by a beginning', () => {
    expect(originOf('conewright://window/index.html')).toBe('conewright://window');
    expect(originOf('conewright://window@evil/')).not.toBe('conewright://window');
    expect(originOf('nonsense')).toBeNull();
  });

  it('is not answered for another site', async () => {
    const ask = (url: string, initiatorOrigin: string | null) =>
      answerScheme({ method: 'GET', url, headers: new Headers(), initiatorOrigin }, new Map(), {
        find: () => undefined,
      });
    expect((await ask('conewright://window/index.html', 'https://example.com')).status).toBe(403);
    expect((await ask('conewright://window/index.html', 'null')).status).toBe(403);
    expect((await ask('conewright://other/index.html', null)).status).toBe(403);
    expect((await ask('conewright://window/index.html', null)).status).toBe(404);
  });
});
