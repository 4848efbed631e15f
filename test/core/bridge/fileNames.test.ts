import { basename, win32 } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { harmlessFileName, isBareFileName, studyFileName } from '../../../shared-core/bridge/fileNames.ts';

describe('the file name of a study', () => {
  it.each([
    ['deep field', 'deep field.study.json'],
    ['  deep field  ', 'deep field.study.json'],
    ['deep.study.json', 'deep.study.json'],
    ['deep.STUDY.JSON', 'deep.study.json'],
    ['deep.json', 'deep.study.json'],
    ['v1.2', 'v1.2.study.json'],
    ['Ångström α', 'Ångström α.study.json'],
    ['console', 'console.study.json'],
  ])('%s becomes %s', (typed, name) => {
    expect(studyFileName(typed)).toBe(name);
  });

  // Names that Microsoft's "Naming Files, Paths, and Namespaces" keeps, and characters that it forbids.
  it.each(['CON', 'prn', 'Aux', 'nul', 'COM1', 'lpt9', 'com\u00b9', 'con.old', 'nul .x'])(
    '%s is kept for a device',
    (name) => {
      expect(() => studyFileName(name)).toThrow(/kept for a device/);
    },
  );
  it.each(['a/b', '../a', '/etc/a', 'a\\b', 'c:a', 'a*', 'a?', 'a"b', 'a<b', 'a>b', 'a|b'])(
    '%s holds what no name can',
    (name) => {
      expect(() => studyFileName(name)).toThrow(/which a file name cannot/);
    },
  );
  it.each(['a\0b', 'a\nb', 'a\u202egpj.x', 'a\u2028b', 'a\ud800b', '\u2066a'])(
    '%j holds what cannot be seen',
    (name) => {
      expect(() => studyFileName(name)).toThrow(/invisible characters/);
    },
  );
  it.each(['', '   ', '.json', '.study.json'])('"%s" is no name', (name) => {
    expect(() => studyFileName(name)).toThrow(/^No name came/);
  });
  it.each(['.hidden', '..', '.'])('%s would be hidden', (name) => {
    expect(() => studyFileName(name)).toThrow(/begins with a dot/);
  });
  it('is told when it is too long, in bytes', () => {
    expect(studyFileName('x'.repeat(180))).toHaveLength(191);
    expect(() => studyFileName('x'.repeat(181))).toThrow(/181 bytes long, at most 180/);
    // Four bytes each in UTF-8.
    expect(() => studyFileName('\u{1f30c}'.repeat(46))).toThrow(/184 bytes long/);
  });

  it('is refused or stays in its folder, whatever is typed', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 300 }), (typed) => {
        let name: string;
        try {
          name = studyFileName(typed);
        } catch (error) {
          expect(error).toBeInstanceOf(Refusal);
          return;
        }
        expect(basename(name)).toBe(name);
        expect(win32.basename(name)).toBe(name);
        expect(Buffer.byteLength(name)).toBeLessThanOrEqual(191);
        // A name once accepted is accepted again, unchanged.
        expect(studyFileName(name)).toBe(name);
      }),
      { seed: 1 },
    );
  });
});

describe('a name that the program suggests', () => {
  it('is made harmless, whatever it was', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 300 }), (name) => {
        expect(isBareFileName(harmlessFileName(name, 'export'))).toBe(true);
      }),
      { seed: 2 },
    );
    expect(harmlessFileName('cone: z < 2.png', 'export')).toBe('cone- z - 2.png');
    expect(harmlessFileName('', 'export')).toBe('export');
    expect(harmlessFileName('...', 'export')).toBe('export');
    expect(harmlessFileName('con', 'export')).toBe('export');
    expect(harmlessFileName('cone.png', 'export')).toBe('cone.png');
  });
});
