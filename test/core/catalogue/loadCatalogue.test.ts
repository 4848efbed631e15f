import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { Cancelled } from '../../../shared-core/base/cancelled.ts';
import { SET_ASIDE_REASONS } from '../../../shared-core/catalogue/catalogue.ts';
import { DECIMAL_POINTS } from '../../../shared-core/catalogue/formats/delimited/decimals.ts';
import { loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';
import { inPieces, load, refusalOf, utf8, utf16 } from './support.ts';

const plain = 'id,RA,DEC,z,w,mag\n1,10.5,-20.25,0.5,1.5,18.1\n2,350,45,1e-3,0,NA\n3,0,90,2,2,x\n';

describe('loadCatalogue', () => {
  it('gives the kept rows in file order, with their lines', async () => {
    const { catalogue, mapping, delimiter, header } = await load(plain);
    expect([...catalogue.raDeg]).toEqual([10.5, 350, 0]);
    expect([...catalogue.decDeg]).toEqual([-20.25, 45, 90]);
    expect([...catalogue.redshift]).toEqual([0.5, 0.001, 2]);
    expect([...catalogue.weight!]).toEqual([1.5, 0, 2]);
    expect([...catalogue.magnitude!]).toEqual([18.1, Number.NaN, Number.NaN]);
    expect([...catalogue.line]).toEqual([2, 3, 4]);
    expect(catalogue.account).toEqual({
      rowsRead: 3,
      kept: 3,
      setAside: 0,
      reasons: {},
      repeatedPositions: 0,
      decimals: DECIMAL_POINTS,
    });
    expect(mapping.radial).toEqual({ column: 'z', kind: 'redshift' });
    expect(delimiter).toBe(',');
    expect(header).toEqual(['id', 'RA', 'DEC', 'z', 'w', 'mag']);
  });

  it('has no weights and magnitudes where there are no such columns', async () => {
    const { catalogue } = await load('ra,dec,z\n1,2,0.1\n');
    expect(catalogue.weight).toBeNull();
    expect(catalogue.magnitude).toBeNull();
  });

  it('reads a velocity in km/s as z = v/c', async () => {
    // c by definition of the metre; so v = c/10 is z = 0.1 in the optical convention.
    const { catalogue, setAside } = await load('ra,dec,cz\n1,2,29979.2458\n1,2,-75\n');
    expect(catalogue.redshift[0]).toBeCloseTo(0.1, 15);
    expect(setAside).toEqual([{ line: 3, reason: 'redshiftNotAboveZero', column: 'cz', text: '-75' }]);
  });

  it('gives each reason with the cell at fault, the first that fits in the order of the reasons', async () => {
    const rows = [
      '1,2,0.1',
      '1,2,0.1,1,9',
      ',2,0.1,1',
      'abc,NA,0.1,1',
      '12h30m,2,0.1,1',
      '1,2,nan,1',
      '1,inf,0.1,1',
      '1,2,1e400,1',
      '361,2,0.1,1',
      '-0.5,-91,0.1,1',
      '1,-91,0.1,1',
      '1,2,-0.1,1',
      '1,2,0,1',
      '1,2,2000,1',
      '1,2,0.1,-1',
      '1,2,0.1,none',
      '1,2,0.1,heavy',
      '1,2,0.1,1',
    ];
    const { catalogue, setAside } = await load(`ra,dec,z,w\n${rows.join('\n')}`);
    const told = setAside.map(({ line, reason, column, text }) => [line, reason, column, text]);
    expect(told).toEqual([
      [2, 'wrongFieldCount', null, '1,2,0.1'],
      [3, 'wrongFieldCount', null, '1,2,0.1,1,9'],
      [4, 'missingValue', 'ra', ''],
      [5, 'missingValue', 'dec', 'NA'],
      [6, 'notANumber', 'ra', '12h30m'],
      [7, 'notANumber', 'z', 'nan'],
      [8, 'notANumber', 'dec', 'inf'],
      [9, 'notANumber', 'z', '1e400'],
      [10, 'raOutOfRange', 'ra', '361'],
      [11, 'raOutOfRange', 'ra', '-0.5'],
      [12, 'decOutOfRange', 'dec', '-91'],
      [13, 'redshiftNotAboveZero', 'z', '-0.1'],
      [14, 'redshiftNotAboveZero', 'z', '0'],
      [15, 'redshiftTooLarge', 'z', '2000'],
      [16, 'weightNegative', 'w', '-1'],
      [17, 'missingValue', 'w', 'none'],
      [18, 'notANumber', 'w', 'heavy'],
    ]);
    expect(catalogue.account.kept).toBe(1);
    expect(catalogue.account.reasons).toEqual({
      wrongFieldCount: 2,
      missingValue: 3,
      notANumber: 5,
      raOutOfRange: 2,
      decOutOfRange: 1,
      redshiftNotAboveZero: 2,
      redshiftTooLarge: 1,
      weightNegative: 1,
    });
  });

  it('keeps the ends of the ranges: RA 0 and 360, the poles, z 1100, weight 0', async () => {
    const { catalogue } = await load('ra,dec,z,w\n0,-90,1100,0\n360,90,1e-300,1\n');
    expect(catalogue.account.kept).toBe(2);
  });

  it('asks the region before the cuts, and the cuts only of usable rows', async () => {
    const text = 'ra,dec,z,mag\n10,0,0.5,17\n200,0,0.5,99\n10,0,0.5,23\n10,0,0.5,?\n10,0,-1,23\n';
    const { catalogue, setAside } = await load(text, {
      contains: (raDeg) => raDeg < 180,
      cuts: [
        { column: 'z', min: null, max: 1 },
        { column: 'MAG', min: 16, max: 20 },
      ],
    });
    expect(catalogue.account.kept).toBe(1);
    expect(setAside).toEqual([
      { line: 3, reason: 'outsideRegion', column: null, text: null },
      { line: 4, reason: 'outsideCuts', column: 'MAG', text: '23' },
      { line: 5, reason: 'outsideCuts', column: 'MAG', text: null },
      { line: 6, reason: 'redshiftNotAboveZero', column: 'z', text: '-1' },
    ]);
  });

  it('lets a cut without bounds pass everything, and keeps rows on the bounds', async () => {
    const text = 'ra,dec,z,m\n1,2,0.5,x\n1,3,0.5,20\n1,4,0.5,16\n';
    expect((await load(text, { cuts: [{ column: 'm', min: null, max: null }] })).catalogue.account.kept).toBe(
      3,
    );
    expect((await load(text, { cuts: [{ column: 'm', min: 16, max: 20 }] })).catalogue.account.kept).toBe(2);
  });

  it('keeps further columns as numbers, one array a column', async () => {
    const { catalogue } = await load(plain, { extras: ['ID', 'mag', 'w'] });
    expect([...catalogue.extras.keys()]).toEqual(['id', 'mag', 'w']);
    expect([...catalogue.extras.get('id')!]).toEqual([1, 2, 3]);
    expect(catalogue.extras.get('mag')).toBe(catalogue.magnitude);
    expect(catalogue.extras.get('w')).toBe(catalogue.weight);
    const byVelocity = (await load('ra,dec,V\n1,2,3000\n', { extras: ['V'] })).catalogue;
    expect(byVelocity.extras.get('V')![0]).toBe(3000);
  });

  it('counts rows that repeat the position of an earlier kept row, and keeps them', async () => {
    const { catalogue } = await load(
      'ra,dec,z\n1,2,0.1\n1,2,0.2\n1,2.5,0.1\n1.0,2e0,0.3\n0,0,1\n-0,-0,1\n1,2.5,-1\n',
    );
    expect(catalogue.account).toMatchObject({ kept: 6, repeatedPositions: 3 });
  });

  it('reads a header alone as a catalogue of no rows', async () => {
    for (const text of ['ra,dec,z', 'ra,dec,z\n', 'ra,dec,z\r\n\r\n\n']) {
      const { catalogue } = await load(text);
      expect(catalogue.account).toEqual({
        rowsRead: 0,
        kept: 0,
        setAside: 0,
        reasons: {},
        repeatedPositions: 0,
        decimals: DECIMAL_POINTS,
      });
      expect(catalogue.raDeg).toHaveLength(0);
    }
  });

  it('does not take blank lines for rows', async () => {
    const { catalogue, setAside } = await load('ra,dec,z\n\n1,2,0.1\n   \n\r\n1,3,0.1\n\n');
    expect(catalogue.account).toMatchObject({ rowsRead: 2, kept: 2 });
    expect([...catalogue.line]).toEqual([3, 6]);
    expect(setAside).toEqual([]);
  });

  it('gives the same from every encoding, packing and line break', async () => {
    const reference = (await load(plain)).catalogue;
    const variants: Uint8Array[] = [
      utf8(`\ufeff${plain}`),
      utf8(plain.replaceAll('\n', '\r\n')),
      utf8(plain.replaceAll('\n', '\r')),
      utf8(plain.replaceAll(',', '\t')),
      utf8(plain.replaceAll(',', ';')),
      utf8(plain.replaceAll(',', ' | ')),
      utf8(plain.replaceAll(/[^,\n]+/g, '"$&"')),
      utf16(plain, 'le'),
      utf16(plain, 'be'),
      new Uint8Array(gzipSync(plain)),
      new Uint8Array(gzipSync(utf16(plain, 'le'))),
      new Uint8Array(Buffer.concat([gzipSync(plain.slice(0, 30)), gzipSync(plain.slice(30))])),
    ];
    for (const bytes of variants) expect((await load(bytes)).catalogue).toEqual(reference);
  });

  it('gives what PapaParse and Number give for a file of many blocks, some of it quoted', async () => {
    const random = createRandom(3);
    const rows = Array.from({ length: 12_000 }, (_, i) => {
      const isQuoted = i % 3000 < 1000;
      const name = isQuoted ? `"galaxy ""${i}"",\n${'é'.repeat(i % 7)}"` : `galaxy ${i}`;
      return `${name},${360 * random.uniform()},${180 * random.uniform() - 90},${3 * random.uniform()},${random.uniform().toExponential()}`;
    });
    const text = `name,ra,dec,z,mag\r\n${rows.join('\r\n')}\r\n`;
    const expected = Papa.parse<string[]>(text, {
      delimiter: ',',
      newline: '\r\n',
      skipEmptyLines: true,
    }).data.slice(1);
    for (const bytes of [utf8(text), utf16(text, 'be'), new Uint8Array(gzipSync(text))]) {
      const { catalogue, setAside } = await load(bytes, { extras: ['name'] }, [40_000, 1, 77_777]);
      expect(setAside).toEqual([]);
      expect(catalogue.account.kept).toBe(12_000);
      expect(catalogue.raDeg.findIndex((value, i) => value !== Number(expected[i]![1]))).toBe(-1);
      expect(catalogue.magnitude!.findIndex((value, i) => value !== Number(expected[i]![4]))).toBe(-1);
      const breaks = (row: string[]) => row[0]!.split('\n').length - 1;
      const lines = expected.map((_, i) => i + 2);
      for (let i = 1, extra = 0; i < lines.length; i++) lines[i]! += extra += breaks(expected[i - 1]!);
      expect(catalogue.line.findIndex((line, i) => line !== lines[i])).toBe(-1);
      expect(catalogue.extras.get('name')!.every(Number.isNaN)).toBe(true);
    }
  });

  it('says that a quoted file is broken only where it is, and loses no row of the rest', async () => {
    const { catalogue, setAside } = await load(
      'name,ra,dec,z\n"M 31" group,10,41,0.1\n"a"b,c,1,2,0.1\n"x",5,6,0.2\n',
    );
    expect([...catalogue.line]).toEqual([2, 4]);
    expect(setAside).toEqual([{ line: 3, reason: 'wrongFieldCount', column: null, text: '"a"b,c,1,2,0.1' }]);
  });

  it('keeps no more of a long cell than its beginning', async () => {
    const { setAside } = await load(`ra,dec,z\n1,2,${'9'.repeat(5000)}\n`);
    expect(setAside[0]!.text).toBe(`${'9'.repeat(200)}…`);
  });

  it('stops when cancelled, before and while it reads', async () => {
    const work = (signal: { aborted: boolean }) =>
      loadCatalogue(inPieces(utf8(plain.repeat(1000)), [100]), {
        signal,
        onProgress: (bytesRead) => {
          if (bytesRead > 5000) signal.aborted = true;
        },
      });
    await expect(work({ aborted: true })).rejects.toThrow(Cancelled);
    await expect(work({ aborted: false })).rejects.toThrow(Cancelled);
  });

  it('passes on what the source throws, and lets go of the source when it refuses', async () => {
    let isReleased = false;
    async function* failing() {
      yield utf8('ra,dec,z\n');
      throw new Error('the disk is gone');
    }
    async function* endless() {
      try {
        for (;;) yield utf8('a,b,c\n');
      } finally {
        isReleased = true;
      }
    }
    await expect(loadCatalogue(failing())).rejects.toThrow('the disk is gone');
    expect((await refusalOf(() => loadCatalogue(endless()))).message).toMatch(/No column was recognised/);
    expect(isReleased).toBe(true);
  });

  it.each([
    [{ cuts: [{ column: 'mug', min: 1, max: 2 }] }, /no column "mug".*did you mean "mag"\?/],
    [{ cuts: [{ column: 'mag', min: 2, max: 1 }] }, /cut on "mag" keeps from 2 to 1.*swap them/],
    [{ cuts: [{ column: 'mag', min: Number.NaN, max: 1 }] }, /cut on "mag" has a bound that is not a number/],
    [{ extras: ['colour'] }, /no column "colour"/],
    [{ mapping: { ra: 'RA2' } }, /no column "RA2" \(wanted as right ascension\).*did you mean "RA"\?/],
  ])('refuses %j as wrong use', async (options, sentence) => {
    const refusal = await refusalOf(() => load(plain, options));
    expect(refusal.message).toMatch(sentence);
    expect(refusal.kind).toBe('use');
  });

  it('accounts for every row of garbage, the same however the bytes are cut', async () => {
    const cell = fc.oneof(
      fc.double({ min: -100, max: 400, noNaN: true }).map(String),
      fc.constantFrom(
        '',
        'NA',
        'nan',
        'inf',
        '1e400',
        '12h30m',
        '"quoted"',
        '"with, comma"',
        '"two\nlines"',
        '"a"b',
        '0',
        '-1',
      ),
      fc.string({ unit: fc.constantFrom('1', '2', '.', '-', 'e', ' ', ',', 'ü', '\r'), maxLength: 5 }),
    );
    const file = fc.array(fc.array(cell, { minLength: 1, maxLength: 5 }), { maxLength: 40 });
    const sizes = fc
      .array(fc.nat(50), { minLength: 1, maxLength: 6 })
      .filter((all) => all.some((size) => size > 0));
    await fc.assert(
      fc.asyncProperty(file, sizes, fc.boolean(), async (rows, cuts, isPacked) => {
        const text = `ra,dec,z,w\n${rows.map((row) => row.join(',')).join('\n')}`;
        const bytes = isPacked ? new Uint8Array(gzipSync(text)) : utf8(text);
        const whole = await load(utf8(text));
        const { account } = whole.catalogue;
        expect(account.rowsRead).toBe(account.kept + account.setAside);
        expect(account.kept).toBe(whole.catalogue.raDeg.length);
        expect(whole.setAside).toHaveLength(account.setAside);
        const byReason = SET_ASIDE_REASONS.map((reason) => account.reasons[reason] ?? 0);
        expect(byReason.reduce((sum, count) => sum + count, 0)).toBe(account.setAside);
        const lines = [...whole.catalogue.line, ...whole.setAside.map((row) => row.line)];
        expect(new Set(lines).size).toBe(account.rowsRead);
        expect(await load(bytes, {}, cuts)).toEqual(whole);
      }),
      { numRuns: 300 },
    );
  });
});
