import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { filmWork } from '../../main/command/picture/filmWishes.ts';
import { checkMemory, neededBytes, obtainableBytes } from '../../main/command/picture/memory.ts';
import { filmOptions } from '../../shared-core/picture/film.ts';
import { pictureOptions } from '../../shared-core/picture/options.ts';
import { emptyStudy, writeStudy } from '../../shared-core/study/document.ts';
import { conewright, testFolder } from './capture.ts';

const folder = testFolder();
const out = folder.path('cone.png');
const film = folder.path('cone.webm');

describe('picture refuses before it starts', () => {
  it.each([
    [['-o', folder.path('cone.gif')], /ending \.png, \.svg or \.pdf, or \.webm or \.mp4 for a film/],
    [['-o', film], /a film: say which with --film turntable, fly-along, shell-by-shell/],
    [['-o', film, '--film', 'spin'], /--film is "spin"/],
    [['-o', out, '--film', 'turntable'], /--film is for films: give a name that ends in \.webm or \.mp4/],
    [['-o', out, '--fps', '20'], /--fps is for films/],
    [['-o', film, '--film', 'turntable', '--view', 'sky'], /which has its own: leave --view out/],
    [['-o', film, '--film', 'turntable', '--transparent'], /no clear ground/],
    [['-o', film, '--film', 'turntable', '--field', '2'], /leave it out/],
    [['-o', film, '--film', 'turntable', '--size', '1280x721'], /even sides, such as 722/],
    [['-o', film, '--film', 'turntable', '--size', '8k'], /sides of 64 to 4096/],
    [['-o', film, '--film', 'turntable', '--seconds', '0'], /was to last 0 seconds/],
    [['-o', film, '--film', 'turntable', '--seconds', '600', '--fps', '60'], /36000 frames/],
    [['-o', out, '--size', '0x0'], /sides of 64 to 16384 pixels/],
    [['-o', out, '--size', '1000000x1000000'], /sides of 64 to 16384 pixels/],
    [['-o', out, '--size', 'huge'], /expected WIDTHxHEIGHT/],
    [['-o', out, '--dpi', '0'], /--dpi is 0/],
    [['-o', out, '--view', 'globe'], /at view/],
    [['-o', out, '--style', 'pink'], /at style/],
    [['-o', out, '--dec', '1,2'], /--view wedge/],
    [['-o', out, '--view', 'wedge', '--dec', '1'], /two declinations/],
    [['-o', out, '--view', 'wedge', '--great-circle', '1,2'], /pole and a thickness/],
    [['-o', out, '--view', 'wedge', '--dec', '1,2', '--great-circle', '1,2,3'], /give one of them/],
    [['-o', out, '--label', 'here'], /RA,DEC,Z,TEXT/],
  ])('%j', async (words, sentence) => {
    const { code, err } = await conewright('picture', 'demo', ...words);
    expect(code).toBe(2);
    expect(err).toMatch(sentence);
    expect(err.trim().split('\n')).toHaveLength(1);
  });

  it('a study that is none, or whose catalogue is gone', async () => {
    const none = folder.write('none.study.json', '{"format":"other"}');
    const refused = await conewright('picture', none, '-o', out);
    expect(refused.code).toBe(1);
    expect(refused.err).toMatch(/is not a study/);
    const source = { kind: 'file', name: 'gone.csv', path: null, sizeBytes: 5, sha256: null } as const;
    const gone = folder.write('gone.study.json', writeStudy({ ...emptyStudy('Gone'), source }));
    const { code, err } = await conewright('picture', gone, '-o', out);
    expect(code).toBe(1);
    expect(err).toMatch(/gone\.csv is not beside the study.*--catalogue/);
  });

  it('a picture in the place of its study', async () => {
    const study = folder.write('mine.png', writeStudy(emptyStudy('Mine')));
    const { code, err } = await conewright('picture', study, '-o', study, '--overwrite');
    expect(code).toBe(2);
    expect(err).toMatch(/same file as one which is read/);
    expect(readFileSync(study, 'utf8')).toBe(writeStudy(emptyStudy('Mine')));
  });

  it('of a film how much work it is is said', () => {
    const wanted = filmOptions({ kind: 'turntable', seconds: 2, framesPerSecond: 25 });
    const size = pictureOptions({ widthPx: 1280, heightPx: 720 });
    expect(filmWork(wanted, size, neededBytes(0, size))).toBe(
      '50 frames of 1280 x 720 pixels, with about 0.6 GB of memory.',
    );
  });

  it('memory that will not be enough', () => {
    const refused = () => checkMemory('picture', neededBytes(10e9, null), 4e9);
    expect(refused).toThrow(/picture needs about 40\.5 GB of memory and 4\.0 GB can be had: close other/);
    expect(() => checkMemory('picture', neededBytes(1e6, null), 4e9)).not.toThrow();
    // A film is read like a picture, and its frames come on top: 8.3 million pixels of 110 bytes.
    const size = { widthPx: 3840, heightPx: 2160 };
    expect(neededBytes(0, size) - neededBytes(0, null)).toBe(110 * 3840 * 2160);
    expect(neededBytes(1e9, size) - neededBytes(0, size)).toBeGreaterThan(
      neededBytes(1e9, null) - neededBytes(0, null),
    );
    expect(() => checkMemory('film', neededBytes(500e6, size), 3e9)).toThrow(
      /film needs about .* a smaller size/,
    );
    // macOS calls little free, since it keeps memory that it can give back.
    expect(obtainableBytes('darwin', 0.1e9, 16e9)).toBe(12e9);
    expect(obtainableBytes('linux', 0.1e9, 16e9)).toBe(0.1e9);
  });
});
