import { mkdirSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { conewright, testFolder } from './capture.ts';

const folder = testFolder();
const rows = Array.from({ length: 30 }, (_, i) => `${150 + i / 10},${2 + i / 20},${0.1 + i / 100}`);
const good = `ra,dec,z\n${rows.join('\n')}\n`;
const region = ['--region', 'box:149,155,1,5'];

/** One sentence for a person: a single line, no stack trace, and the exit code. */
async function refused(code: number, sentence: RegExp, ...argv: string[]) {
  const outcome = await conewright(...argv);
  expect(outcome.err).toMatch(sentence);
  expect(outcome.code).toBe(code);
  expect(outcome.out).toBe('');
  expect(outcome.err.trimEnd().split('\n')).toHaveLength(1);
  expect(outcome.err).not.toMatch(/\bat .*\.(ts|js):\d+/);
}

describe('files that cannot be used: exit 1 and a sentence', () => {
  it.each<[string, string | Uint8Array, RegExp]>([
    ['empty.csv', '', /empty/i],
    ['header-alone.csv', 'ra,dec,z\n', /header and no rows/],
    ['binary.csv', Uint8Array.from({ length: 4000 }, (_, i) => (i * 7919) & 255), /text|binary/i],
    ['truncated.csv.gz', gzipSync(good).subarray(0, -40), /gzip|ends/i],
    [
      'a-million-columns.csv',
      `${Array.from({ length: 1_000_000 }, (_, i) => `c${i}`).join(',')}\n1\n`,
      /^conewright: Line 1 is longer than/,
    ],
    [
      'many-columns.csv',
      `${Array.from({ length: 20_000 }, (_, i) => `c${i}`).join(',')}\n1\n`,
      /20000 columns/,
    ],
    ['open-quote.csv', `ra,dec,z\n"150,2,0.1\n${rows.join('\n')}\n`, /quote/i],
    ['no-redshift.csv', 'ra,dec,flux\n1,2,3\n', /redshift/i],
    [
      'nothing-usable.csv',
      'ra,dec,z\n12h30m,2,0.5\n361,0,0.5\n1,-91,0.5\n1,1,-0.1\n1,1,NaN\n1,1,inf\n1,1,1e400\n1,1,2000\n1,1\n1,1,1,1\n,,\n',
      /No row of the catalogue can be used/,
    ],
  ])('%s', async (name, content, sentence) => {
    await refused(1, sentence, 'shells', folder.write(name, content), ...region);
  });

  it('no such file, and a folder', async () => {
    await refused(1, /is not there|no file/, 'shells', folder.path('absent.csv'));
    mkdirSync(folder.path('folder'));
    await refused(1, /folder/, 'shells', folder.path('folder'));
  });

  it('a region that holds no row', async () => {
    await refused(
      1,
      /No row of the catalogue can be used.*outside the region/,
      'shells',
      folder.write('good.csv', good),
      '--region',
      'box:10,20,1,5',
    );
  });
});

describe('commands that cannot be understood: exit 2 and a sentence', () => {
  const file = () => folder.write('good.csv', good);

  it.each<[string, string[], RegExp]>([
    ['edges that do not increase', ['--edges', '0.3,0.2'], /must increase/],
    ['one edge', ['--edges', '0.3'], /at least two/],
    ['edges that are no numbers', ['--edges', '0.3,abc'], /"abc" is none/],
    ['P0 of 0', ['--p0', '0'], /P0 is 0/],
    ['a scheme that there is not', ['--shells', 'mass:4'], /expected redshift:N/],
    ['no shells', ['--shells', 'volume:0'], /0 shells/],
    ['edges and a scheme', ['--shells', 'volume:2', '--edges', '0.1,0.2'], /give one of them/],
    ['two formats', ['--json', '--csv'], /choose one format/],
    ['a column that is not there', ['--columns', 'ra=RIGHT'], /RIGHT/],
    ['a column map without sense', ['--columns', 'ra'], /column map/i],
    ['an option that there is not', ['--colour'], /unknown option/],
    ['H0 below 0', ['--h0', '-70'], /-70/],
    ['a cosmology that there is not', ['--cosmology', 'planck1899'], /planck1899/],
    ['flat and dark energy', ['--flat', '--omega-de', '0.7'], /contradict/],
    ['a neutrino mass below 0', ['--mnu', '0,0,-0.06'], /-0.06/],
    ['a cut without sense', ['--cut', 'mag'], /COLUMN:MIN\.\.MAX/],
    ['a hole without a region', ['--hole', 'cap:1,2,3'], /without --region/],
  ])('%s', async (_, options, sentence) => {
    const hasRegion = options.includes('--hole');
    await refused(2, sentence, 'shells', file(), ...(hasRegion ? [] : region), ...options);
  });

  it('a region of no area', async () => {
    await refused(2, /box|area|Dec/i, 'shells', file(), '--region', 'box:149,155,2,2');
    await refused(2, /radius/i, 'shells', file(), '--region', 'cap:149,2,0');
  });

  it('no verb, an unknown verb, a verb without its file, a redshift out of range', async () => {
    await refused(2, /No verb came/);
    await refused(2, /unknown command/, 'cone');
    await refused(2, /missing required argument/, 'shells');
    await refused(2, /required option/, 'distances');
    await refused(2, /Redshift 2000/, 'distances', '--z', '2000');
    await refused(2, /Redshift -0.1/, 'distances', '--z', '-0.1');
  });
});

describe('awkward files that can be used', () => {
  const shells = async (name: string, content: string | Uint8Array, ...more: string[]) => {
    const { code, out, err } = await conewright(
      'shells',
      folder.write(name, content),
      ...region,
      '--edges',
      '0.05,0.25,0.5',
      '--json',
      ...more,
    );
    expect(err).toBe('');
    expect(code).toBe(0);
    return JSON.parse(out);
  };

  it('the same numbers from LF, CRLF, a byte-order mark, UTF-16, semicolons, tabs, quotes and gzip', async () => {
    const plain = await shells('plain.csv', good);
    expect(plain.catalogue).toMatchObject({ rowsRead: 30, kept: 30, setAside: 0 });
    const same = async (name: string, content: string | Uint8Array) => {
      expect((await shells(name, content)).shells, name).toEqual(plain.shells);
    };
    await same('crlf.csv', good.replaceAll('\n', '\r\n'));
    await same('bom.csv', `\uFEFF${good}`);
    await same('utf16le.csv', Buffer.from(`\uFEFF${good}`, 'utf16le'));
    await same('utf16be.csv', Buffer.from(`\uFEFF${good}`, 'utf16le').swap16());
    await same('semicolons.csv', good.replaceAll(',', ';'));
    await same('tabs.tsv', good.replaceAll(',', '\t'));
    await same('quotes.csv', good.replace(/[^,\n]+/g, '"$&"'));
    await same('plain.csv.gz', gzipSync(good));
    await same('members.csv.gz', Buffer.concat([gzipSync(good.slice(0, 100)), gzipSync(good.slice(100))]));
    await same('no-last-newline.csv', good.trimEnd());
  });

  it('every row is kept or set aside with its line and reason, and the list can be written', async () => {
    const bad = `ra,dec,z\n150,2,0.1\n12h30m,2,0.5\n361,0,0.5\n150,-91,0.5\n150,2,-0.1\n150,2,0\n150,2,NaN\n150,2,inf\n150,2,1e400\n150,2,2000\n150,2\n150,2,0.2,9\n,2,0.3\n10,2,0.3\n150,2,0.2\n`;
    const list = folder.path('aside.csv');
    const { catalogue } = await shells('bad.csv', bad, '--set-aside', list);
    expect(catalogue).toMatchObject({
      rowsRead: 15,
      kept: 2,
      setAside: 13,
      repeatedPositions: 1,
      reasons: {
        notANumber: 4,
        raOutOfRange: 1,
        decOutOfRange: 1,
        redshiftNotAboveZero: 2,
        redshiftTooLarge: 1,
        wrongFieldCount: 2,
        missingValue: 1,
        outsideRegion: 1,
      },
    });
    const { readFileSync } = await import('node:fs');
    const lines = readFileSync(list, 'utf8').trimEnd().split('\r\n');
    expect(lines).toHaveLength(14);
    expect(lines.slice(0, 3)).toEqual([
      'line,reason,column,text,name,explanation',
      '3,notANumber,ra,12h30m,,The row is set aside as one with a value that is not a number: ra is 12h30m.',
      '4,raOutOfRange,ra,361,,The row is set aside as one with right ascension outside 0 to 360 degrees: ra is 361.',
    ]);
    // A second run may not take the place of a list that says something else.
    folder.write('aside.csv', 'mine');
    const again = await conewright('shells', folder.path('bad.csv'), ...region, '--set-aside', list);
    expect(again.code).toBe(2);
    expect(again.err).toMatch(/exists already/);
    expect(readFileSync(list, 'utf8')).toBe('mine');
  });

  it('the kept rows that repeat a position can be listed, with the line that each repeats', async () => {
    const rows = 'ra,dec,z,id\n150,2,0.1,a\n151,2,0.1,b\n150,2,0.2,"c, again"\n150,2,x,d\n151.0,2,0.3,\n';
    const list = folder.path('repeats.csv');
    const { catalogue } = await shells('repeats.in.csv', rows, '--repeats', list);
    expect(catalogue).toMatchObject({ rowsRead: 5, kept: 4, setAside: 1, repeatedPositions: 2 });
    const { readFileSync } = await import('node:fs');
    expect(readFileSync(list, 'utf8')).toBe(
      'line,name,ra_deg,dec_deg,repeats_line\r\n4,"c, again",150,2,2\r\n6,,151,2,3\r\n',
    );
    const { code, err } = await conewright('shells', folder.path('repeats.in.csv'), '--repeats', list);
    expect(code).toBe(2);
    expect(err).toMatch(/exists already/);
  });

  it('says of decimal commas what they are and what to do', async () => {
    const path = folder.write('commas.csv', 'ra,dec,z\n"10,5","2,25","0,5"\n"11,5","2,5","0,25"\n');
    const { code, err } = await conewright('shells', path);
    expect(code).toBe(1);
    expect(err).toMatch(/2 of 2 rows have numbers with a comma inside.*write the table again/);
  });

  it('text that a spreadsheet would run is written harmless', async () => {
    const list = folder.path('formula.csv');
    await shells('formula.in.csv', 'ra,dec,z\n150,2,0.1\n"=HYPERLINK(""x"")",2,0.5\n', '--set-aside', list);
    const { readFileSync } = await import('node:fs');
    expect(readFileSync(list, 'utf8')).toContain(`"'=HYPERLINK(""x"")"`);
  });
});
