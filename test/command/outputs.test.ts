import { existsSync, linkSync, mkdirSync, readdirSync, readFileSync, symlinkSync } from 'node:fs';
import { dirname } from 'node:path';
import { beforeEach, describe, expect, it } from 'vitest';
import { OutputFile } from '../../main/command/writeOutput.ts';
import { conewright, testFolder } from './capture.ts';

const folder = testFolder();
const catalogue = 'ra,dec,z\n150,2,0.1\n150.5,2.5,0.2\n151,3,0.3\n151,3,-1\n';
const region = ['--region', 'box:149,155,1,5'];
const a = folder.path('a.csv');
const out = folder.path('out.csv');
const aside = folder.path('aside.csv');

beforeEach(() => void folder.write('a.csv', catalogue));

/** Wrong use: exit 2, one sentence, the catalogue untouched and nothing half written. */
async function refused(sentence: RegExp, ...argv: string[]) {
  const { code, out: printed, err } = await conewright(...argv);
  expect(err).toMatch(sentence);
  expect(err.trimEnd().split('\n')).toHaveLength(1);
  expect([code, printed]).toEqual([2, '']);
  expect(readFileSync(a, 'utf8')).toBe(catalogue);
  expect(readdirSync(dirname(a)).filter((name) => name.endsWith('-part'))).toEqual([]);
}

describe('an output never takes the place of an input or of another output', () => {
  it('by its own name', async () => {
    await refused(/same file as one which is read/, 'shells', a, '--set-aside', a, '--overwrite');
    await refused(/same file as one which is read/, 'coordinates', a, '-o', a, '--overwrite');
    await refused(/same file as one that --output writes/, 'coordinates', a, '-o', out, '--set-aside', out);
    expect(existsSync(out)).toBe(false);
  });

  it('by a link, a second name, or a way round', async () => {
    const [soft, hard, round] = ['soft.csv', 'hard.csv', 'round'].map(folder.path) as [
      string,
      string,
      string,
    ];
    symlinkSync(a, soft);
    linkSync(a, hard);
    symlinkSync(dirname(a), round);
    for (const name of [soft, hard, `${round}/a.csv`])
      await refused(/same file as one which is read/, 'coordinates', a, '-o', name, '--overwrite');
    await refused(
      /same file as one that --output writes/,
      ...['coordinates', a, '-o', out, '--set-aside', `${round}/out.csv`],
    );
  });

  it('nor of the polygon that the region is read from', async () => {
    const polygon = folder.write('polygon.txt', '149 1\n155 1\n155 5\n149 5\n');
    await refused(
      /same file as one which is read/,
      ...['shells', a, '--region', `polygon:${polygon}`, '--set-aside', polygon, '--overwrite'],
    );
  });
});

describe('what an output may be', () => {
  it('is no folder and no device', async () => {
    mkdirSync(folder.path('folder'));
    for (const name of [folder.path('folder'), ...(process.platform === 'win32' ? [] : ['/dev/null'])])
      await refused(/is no regular file/, 'coordinates', a, '-o', name, '--overwrite');
  });

  it('may be a link, which stays one: the file that it leads to is written, there or not yet', async () => {
    const target = folder.write('target.csv', 'old');
    const [link, ahead] = [folder.path('link.csv'), folder.path('ahead.csv')];
    symlinkSync(target, link);
    symlinkSync('made.csv', ahead);
    expect((await conewright('coordinates', a, '-o', link, '--overwrite')).code).toBe(0);
    expect((await conewright('coordinates', a, '-o', ahead)).code).toBe(0);
    const written = readFileSync(target, 'utf8');
    expect(written).toContain('comovingMpc');
    expect(readFileSync(folder.path('made.csv'), 'utf8')).toBe(written);
    expect(readFileSync(link, 'utf8')).toBe(written);
  });
});

describe('wrong use is told before the catalogue is read and anything is written', () => {
  it.each<[string, string[], RegExp]>([
    ['edges', ['--edges', '0.3,0.2'], /must increase/],
    ['a range', ['--z-range', '0.3,0.2'], /must increase/],
    ['no shells', ['--shells', 'count:0'], /0 shells/],
    ['P0', ['--p0', '0'], /P0 is 0/],
    ['formats', ['--json', '--csv'], /choose one format/],
    ['a cut', ['--cut', 'z:3..1'], /cut/i],
    ['the column map', ['--columns', 'ra'], /column map/i],
    ['beyond the antipode', ['--omega-de', '1.65', '--edges', '1,20'], /beyond the antipode/],
  ])('%s', async (_, options, sentence) => {
    // The catalogue that is not there would be told instead, were it looked for first.
    const absent = folder.path('absent.csv');
    await refused(sentence, 'shells', absent, ...region, '--set-aside', aside, ...options);
    expect(existsSync(aside)).toBe(false);
  });

  it('an output that exists', async () => {
    const mine = folder.write('mine.csv', 'mine');
    await refused(/exists already/, 'coordinates', folder.path('absent.csv'), '-o', mine);
    await refused(/exists already/, ...['coordinates', a, '-o', out, '--set-aside', mine]);
    expect(readFileSync(mine, 'utf8')).toBe('mine');
    expect(existsSync(out)).toBe(false);
  });
});

it('an output that comes to exist while it is made is not replaced', async () => {
  const late = folder.path('late.csv');
  const file = await OutputFile.begin(late, { overwrite: false });
  file.addText('ours');
  folder.write('late.csv', 'theirs');
  await expect(file.finish()).rejects.toThrow(/exists already/);
  await file.abandon();
  expect(readFileSync(late, 'utf8')).toBe('theirs');
});

it('text is on the disk as it is added, not held until the end', async () => {
  const file = await OutputFile.begin(folder.path('long.csv'), { overwrite: false });
  const line = `${'x'.repeat(99)}\n`;
  for (let i = 0; i < 10_000; i++) file.addText(line);
  const part = readdirSync(dirname(a)).find((name) => name.endsWith('-part'))!;
  // At most the 64 KiB held before a write are missing of the million bytes.
  expect(readFileSync(folder.path(part)).length).toBeGreaterThan(1_000_000 - 65_536 - 100);
  await file.finish();
  expect(readFileSync(folder.path('long.csv'), 'utf8')).toBe(line.repeat(10_000));
});

describe('the columns that were used', () => {
  it('stand in what is printed, with how a velocity becomes a redshift', async () => {
    const path = folder.write('cz.csv', 'RA,DEC,cz\n150,2,3000\n151,3,6000\n');
    const said = /Columns: right ascension in degrees from RA;.*z = cz\/c.*from cz/;
    expect((await conewright('shells', path, ...region)).out.replaceAll(/\s+/g, ' ')).toMatch(said);
    const cz = folder.path('cz-out.csv');
    expect((await conewright('coordinates', path, '-o', cz)).err).toMatch(said);
  });
});
