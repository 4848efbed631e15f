import { describe, expect, it } from 'vitest';
import { sortDropped } from '../../../renderer/panels/dropped.ts';
import { type KeyPress, keyCommand } from '../../../renderer/panels/keyCommands.ts';
import { countText, fieldText, readNumber, sizeText } from '../../../renderer/ui/numberText.ts';
import { unitText } from '../../../renderer/ui/unitText.ts';

const press = (key: string, more: Partial<KeyPress> = {}): KeyPress => ({
  key,
  ctrlKey: false,
  metaKey: false,
  altKey: false,
  shiftKey: false,
  ...more,
});

describe('keys', () => {
  it('undo and redo with the command key of either kind of machine', () => {
    for (const command of [{ ctrlKey: true }, { metaKey: true }]) {
      expect(keyCommand(press('z', command), false)).toBe('undo');
      expect(keyCommand(press('Z', { ...command, shiftKey: true }), false)).toBe('redo');
      expect(keyCommand(press('y', command), false)).toBe('redo');
      expect(keyCommand(press('s', command), false)).toBe('save');
      expect(keyCommand(press('S', { ...command, shiftKey: true }), false)).toBe('saveAs');
    }
  });

  it('never act on letters while somebody types', () => {
    for (const key of ['h', 'f', 'r', '1', '4', '?', '[', ']', 'Escape'])
      expect(keyCommand(press(key), true)).toBeNull();
    expect(keyCommand(press('z', { ctrlKey: true }), true)).toBeNull();
    expect(keyCommand(press('s', { ctrlKey: true }), true)).toBe('save');
  });

  it('take capitals for letters, and brackets also where they need AltGr', () => {
    expect(keyCommand(press('H', { shiftKey: true }), false)).toBe('toggleH');
    expect(keyCommand(press(']', { ctrlKey: true, altKey: true }), false)).toBe('nextShell');
    expect(keyCommand(press('['), false)).toBe('previousShell');
    expect(keyCommand(press('h', { altKey: true }), false)).toBeNull();
  });

  it('leave the browser what is not ours', () => {
    for (const key of ['c', 'v', 'a', 'f', 'r', '1', '+'])
      expect(keyCommand(press(key, { ctrlKey: true }), false)).toBeNull();
  });

  it('name a view', () => {
    expect(keyCommand(press('1'), false)).toEqual({ view: 'side-on' });
    expect(keyCommand(press('4'), false)).toEqual({ view: 'whole' });
  });

  it('open the picture bench, and leave printing to the browser', () => {
    expect(keyCommand(press('p'), false)).toBe('picture');
    expect(keyCommand(press('p', { ctrlKey: true }), false)).toBeNull();
  });
});

describe('what is dropped', () => {
  it('opens files and tells of folders', () => {
    const { open, sentences } = sortDropped({
      types: ['Files'],
      files: [
        { name: 'a.csv', isFolder: false },
        { name: 'survey', isFolder: true },
        { name: 'b.study.json', isFolder: false },
      ],
    });
    expect(open).toEqual([0, 2]);
    expect(sentences).toEqual([expect.stringMatching(/"survey" is a folder/)]);
  });

  it('says what came when it was no file', () => {
    for (const [types, word] of [
      [['text/plain'], 'text'],
      [['text/plain', 'text/uri-list'], 'a link'],
      [['application/x-thing'], 'something else'],
    ] as const) {
      const { open, sentences } = sortDropped({ types, files: [] });
      expect(open).toEqual([]);
      expect(sentences).toEqual([expect.stringContaining(`is ${word}, not a file`)]);
    }
  });
});

describe('numbers in fields', () => {
  it('are read strictly, with a sentence for what is none', () => {
    expect(readNumber(' 1e4 ', 'P0')).toEqual({ value: 10_000 });
    for (const text of ['', 'abc', '1,5', '0x10', 'Infinity', 'NaN', '1e400'])
      expect(readNumber(text, 'P0')).toEqual({ sentence: expect.stringMatching(/^P0 is .*give a number/) });
  });

  it('show no noise of binary fractions', () => {
    expect(fieldText(0.1 + 0.2)).toBe('0.3');
    expect(fieldText(null)).toBe('');
    expect(fieldText(1e-12)).toBe('1e-12');
  });

  it('count in threes', () => {
    const plain = (count: number) => countText(count).replaceAll('\u202f', '_');
    expect([0, 999, 4215, 60_000, 10_000_000].map(plain)).toEqual([
      '0',
      '999',
      '4_215',
      '60_000',
      '10_000_000',
    ]);
  });

  it('give a size three digits', () => {
    expect([0, 999, 1000, 73_000_000, 5.5e12].map(sizeText)).toEqual([
      '0 bytes',
      '999 bytes',
      '1.00 kB',
      '73.0 MB',
      '5.50 TB',
    ]);
  });

  it('raise the powers of a unit and leave the rest', () => {
    expect(unitText('Mpc^-3')).toBe('Mpc⁻³');
    expect(unitText('(Mpc/h)^3')).toBe('(Mpc/h)³');
    expect(unitText('km/s/Mpc')).toBe('km/s/Mpc');
  });
});
