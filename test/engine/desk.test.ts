import { describe, expect, it } from 'vitest';
import { EngineDesk } from '../../renderer/engine/desk.ts';
import type { EngineEvent, Wanted } from '../../renderer/engine/protocol.ts';
import { regionTrouble } from '../../renderer/engine/regionReady.ts';
import { sharedSample } from '../../renderer/engine/sharedSample.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { sortSample } from '../../shared-core/shells/sample.ts';
import { emptyStudy } from '../../shared-core/study/document.ts';

const rows = Array.from(
  { length: 500 },
  (_, i) =>
    `${150 + (i % 23) / 5},${2 + (i % 17) / 5},${(0.1 + ((i * 37) % 500) / 1000).toFixed(4)},${15 + (i % 7)}`,
);
const FILES: Record<string, string> = {
  'blob:a': `ra,dec,z,mag\n${rows.join('\n')}\nbad,1,0.5,15\n`,
  'blob:broken': 'nothing here that is a table of galaxies\n1\n',
  'blob:one': 'ra,dec,z\n10,10,0.5\n',
  'blob:twice':
    'id,ra,dec,z\na,10,10,0.05\nb,11,10,0.6\nc,10,10,0.7\n" d, ",10,10,0.5\nc2,x,10,0.7\n=e,11,10,0.2\n',
  'blob:none': 'ra,dec,z\n',
  'blob:stalled': 'ra,dec,z\n',
  'blob:same-z': 'ra,dec,z\n10,10,0.5\n11,10,0.5\n12,10,0.5\n',
};

function deskOf() {
  const events: EngineEvent[] = [];
  const disk = { asleep: false };
  const desk = new EngineDesk({
    emit: (event) => events.push(event),
    openUrl: async (url, signal) =>
      disk.asleep || url === 'blob:stalled' ? stalled(signal!) : bytes(FILES[url]!),
    floats: (length) => new Float32Array(length),
    share: (sample) => sample,
    breathe: () => new Promise((resume) => setTimeout(resume, 0)),
  });
  const last = <K extends EngineEvent['kind']>(kind: K) =>
    events.filter((e): e is Extract<EngineEvent, { kind: K }> => e.kind === kind).at(-1);
  return { desk, disk, events, last };
}

async function* bytes(text: string): AsyncIterable<Uint8Array> {
  const all = new TextEncoder().encode(text);
  for (let i = 0; i < all.length; i += 1000) yield all.subarray(i, i + 1000);
}

/** A file of which nothing comes, until the reading is given up. */
function stalled(signal: AbortSignal): Promise<never> {
  return new Promise((_, reject) => signal.addEventListener('abort', () => reject(new Error('aborted'))));
}

const source = (url: string) => ({ kind: 'url', url, name: url, sizeBytes: FILES[url]!.length }) as const;
const wanted: Wanted = {
  source: source('blob:a'),
  mapping: null,
  cuts: [],
  region: null,
  cosmology: emptyStudy().cosmology,
  density: false,
  columns: [],
};

describe('the engine does what the study asks, and nothing twice', () => {
  it('loads, selects and measures, sorted by redshift', async () => {
    const { desk, last } = deskOf();
    await desk.want(wanted);
    expect(last('loaded')!.loaded).toMatchObject({
      header: ['ra', 'dec', 'z', 'mag'],
      sizeBytes: FILES['blob:a']!.length,
    });
    const { account, sample, footprint, magnitude } = last('selected')!.selected!;
    expect(account).toMatchObject({ rowsRead: 501, kept: 500, setAside: 1, reasons: { notANumber: 1 } });
    expect([...sample.redshift]).toEqual([...sample.redshift].sort((a, b) => a - b));
    expect(footprint!.origin).toBe('estimated');
    expect(magnitude).toHaveLength(500);
    const { comovingMpc } = last('background')!.background!;
    expect([...comovingMpc]).toEqual([...comovingMpc].sort((a, b) => a - b));
    expect(desk.row(0)).toMatchObject({ redshift: 0.1, line: 2 });
  });

  it('a file whose reading is given up, even while nothing comes of it, leaves everything as it was', async () => {
    const { desk, events, last } = deskOf();
    await desk.want(wanted, 1);
    const before = events.length;
    const reading = desk.want({ ...wanted, source: source('blob:stalled') }, 2);
    await new Promise((resume) => setTimeout(resume, 0));
    expect(last('progress')).toMatchObject({ stage: 'load' });
    await desk.want(wanted, 3);
    await reading;
    expect(desk.runs).toEqual({ load: 2, select: 1, background: 1, density: 1, columns: 1 });
    expect(events.slice(before).map((e) => e.kind)).toEqual(['progress', 'idle']);
    expect(last('idle')!.serial).toBe(3);
    expect(desk.row(0)).toMatchObject({ redshift: 0.1, line: 2 });
  });

  it('makes the region ready while a file is still being read, once, and in a plan without a catalogue', async () => {
    const { desk, events, last } = deskOf();
    const region = { parts: [{ kind: 'cap', raDeg: 152, decDeg: 4, radiusDeg: 2 }], holes: [] } as const;
    // A cap of radius r covers 2 pi (1 - cos r) steradians.
    const areaDeg2 = 2 * Math.PI * (1 - Math.cos(Math.PI / 90)) * (180 / Math.PI) ** 2;
    const reading = desk.want({ ...wanted, source: source('blob:stalled') }, 1);
    await new Promise((resume) => setTimeout(resume, 0));
    void desk.want({ ...wanted, source: source('blob:stalled'), region }, 2);
    expect(last('region')!.region!.areaDeg2).toBeCloseTo(areaDeg2, 9);
    expect(last('region')!.region!.fields).toHaveLength(1);
    expect(last('selected')).toBeUndefined();
    await desk.want({ ...wanted, source: null, region: structuredClone(region) }, 3);
    await reading;
    expect(last('selected')!.selected).toBeNull();
    expect(events.filter((e) => e.kind === 'region' && e.region !== null)).toHaveLength(1);
    await desk.want(wanted, 4);
    expect(last('region')!.region).toBeNull();
  });

  it('tells a region that cannot be, with or without a catalogue, and goes on with the next', async () => {
    const { desk, last } = deskOf();
    const nowhere = { parts: [{ kind: 'cap', raDeg: 152, decDeg: 4, radiusDeg: 0 }], holes: [] } as const;
    for (const from of [wanted.source, null]) {
      await desk.want({ ...wanted, source: from, region: nowhere }, 1);
      expect(last('region')!.region).toBeNull();
      expect(last('failed')).toMatchObject({ stage: 'select', sentence: expect.stringContaining('radius') });
    }
    await desk.want(wanted, 2);
    expect(last('selected')!.selected!.account.kept).toBe(500);
    expect(regionTrouble([nowhere])).toBe(last('failed')!.sentence);
    expect(regionTrouble([])).toBeNull();
  });

  it('reading a file goes on while what does not concern it changes', async () => {
    const { desk, last } = deskOf();
    const reading = desk.want(wanted);
    await desk.want({ ...wanted, cosmology: { ...findPublishedSet('wmap9').parameters } }, 2);
    await reading;
    expect(desk.runs.load).toBe(1);
    expect(last('selected')!.selected!.account.kept).toBe(500);
  });

  it('a new cosmology, region or cut redoes what depends on it and nothing else', async () => {
    const { desk } = deskOf();
    await desk.want(wanted);
    expect(desk.runs).toEqual({ load: 1, select: 1, background: 1, density: 1, columns: 1 });
    await desk.want({ ...wanted });
    expect(desk.runs).toEqual({ load: 1, select: 1, background: 1, density: 1, columns: 1 });
    const other = { ...wanted, cosmology: { ...findPublishedSet('wmap9').parameters } };
    await desk.want(other);
    expect(desk.runs).toEqual({ load: 1, select: 1, background: 2, density: 2, columns: 1 });
    const boxed = {
      ...other,
      region: { parts: [{ kind: 'cap', raDeg: 152, decDeg: 4, radiusDeg: 2 }], holes: [] },
    } as const;
    await desk.want(boxed);
    expect(desk.runs).toEqual({ load: 1, select: 2, background: 3, density: 3, columns: 2 });
    await desk.want({ ...boxed, density: true });
    expect(desk.runs).toEqual({ load: 1, select: 2, background: 3, density: 4, columns: 2 });
    // A cut on a column that is not in memory reads the file again; new limits of the same cut do not.
    await desk.want({ ...boxed, cuts: [{ column: 'mag', min: null, max: 18 }] });
    expect(desk.runs.load).toBe(2);
    await desk.want({ ...boxed, cuts: [{ column: 'mag', min: null, max: 17 }] });
    expect(desk.runs).toMatchObject({ load: 2, select: 4 });
  });

  it('reads a column to colour by in a pass of its own, and redoes nothing else for it', async () => {
    const { desk, last } = deskOf();
    await desk.want(wanted);
    await desk.want({ ...wanted, columns: ['mag'] });
    expect(desk.runs).toEqual({ load: 1, select: 1, background: 1, density: 1, columns: 2 });
    const [mag] = last('columns')!.columns;
    expect(mag!.column).toBe('mag');
    expect(mag!.values).toEqual(last('selected')!.selected!.magnitude);
    expect(desk.row(3).extras).toEqual([['mag', desk.row(3).magnitude]]);
    // Another selection takes its values from memory.
    const region = { parts: [{ kind: 'cap', raDeg: 152, decDeg: 4, radiusDeg: 2 }], holes: [] } as const;
    await desk.want({ ...wanted, region, columns: ['mag', 'ra'] });
    const { selected } = last('selected')!;
    const [magnitudes, ra] = last('columns')!.columns;
    expect(magnitudes!.values).toEqual(selected!.magnitude);
    expect(ra!.values).toEqual(selected!.raDeg);
    expect(desk.runs).toMatchObject({ load: 1, select: 2, background: 2 });
    await desk.want({ ...wanted, region, columns: ['colour'] });
    expect(last('failed')).toMatchObject({ stage: 'columns' });
    expect(last('failed')!.sentence).toMatch(/colour/);
    expect(last('selected')!.selected).toBe(selected);
  });

  it('another choice ends the reading of a column, also while nothing comes of it', async () => {
    const { desk, disk, last } = deskOf();
    await desk.want(wanted);
    disk.asleep = true;
    const reading = desk.want({ ...wanted, columns: ['mag'] }, 2);
    await new Promise((resume) => setTimeout(resume, 0));
    expect(last('progress')).toMatchObject({ stage: 'columns' });
    await desk.want(wanted, 3);
    await reading;
    expect(last('idle')!.serial).toBe(3);
    expect(last('failed')).toBeUndefined();
  });

  it('does not colour by a column of a file that has changed, though its rows are as many', async () => {
    const { desk, last } = deskOf();
    const was = FILES['blob:one']!;
    try {
      await desk.want({ ...wanted, source: source('blob:one') });
      FILES['blob:one'] = was.replace('0.5', '0.7');
      await desk.want({ ...wanted, source: source('blob:one'), columns: ['z'] });
      expect(last('columns')!.columns).toEqual([]);
      expect(last('failed')).toMatchObject({ stage: 'columns' });
      expect(last('failed')!.sentence).toBe(
        "The catalogue's file has changed since it was read: read it again.",
      );
    } finally {
      FILES['blob:one'] = was;
    }
  });

  it('reads columns also where distances fail, which they do not need', async () => {
    const { desk, events, last } = deskOf();
    await desk.want({
      ...wanted,
      cosmology: { ...wanted.cosmology, h0KmSMpc: -70 },
      density: true,
      columns: ['mag'],
    });
    expect(events.filter((e) => e.kind === 'failed')).toMatchObject([{ stage: 'background' }]);
    expect(last('columns')!.columns).toMatchObject([{ column: 'mag' }]);
    await desk.want({ ...wanted, density: true, columns: ['mag'] });
    expect(desk.runs).toEqual({ load: 1, select: 1, background: 2, density: 1, columns: 1 });
  });

  it('finds the name of a row where a column has names', async () => {
    const { desk } = deskOf();
    expect(await desk.name(2)).toBeNull();
    await desk.want(wanted);
    expect(await desk.name(2)).toBeNull();
    const mapping = {
      ra: 'ra',
      dec: 'dec',
      radial: { column: 'z', kind: 'redshift' },
      weight: null,
    } as const;
    await desk.want({ ...wanted, mapping: { ...mapping, magnitude: null, id: 'mag' } });
    expect(await desk.name(desk.row(0).line)).toBe('15');
  });

  it('drops work for a wish that is out of date', async () => {
    const { desk, events, last } = deskOf();
    const first = desk.want(wanted);
    void desk.want({ ...wanted, source: source('blob:one') });
    await first;
    expect(last('selected')!.selected!.account.rowsRead).toBe(1);
    expect(events.filter((e) => e.kind === 'selected')).toHaveLength(1);
    expect(events.filter((e) => e.kind === 'failed')).toHaveLength(0);
  });

  it('a file that is no catalogue gives a sentence, and the next one works', async () => {
    const { desk, last } = deskOf();
    await desk.want({ ...wanted, source: source('blob:broken') });
    expect(last('failed')).toMatchObject({ stage: 'load' });
    expect(last('failed')!.sentence.length).toBeGreaterThan(20);
    await desk.want(wanted);
    expect(last('selected')!.selected!.account.kept).toBe(500);
  });

  it('a catalogue of one row, of none, and all at one redshift', async () => {
    const { desk, last } = deskOf();
    await desk.want({ ...wanted, source: source('blob:one') });
    expect(last('selected')!.selected).toMatchObject({ account: { kept: 1 }, sample: { count: 1 } });
    await desk.want({ ...wanted, source: source('blob:none') });
    expect(last('selected')!.selected).toMatchObject({
      account: { rowsRead: 0 },
      footprint: null,
      sample: { count: 0 },
    });
    await desk.want({ ...wanted, source: source('blob:same-z') });
    expect(last('selected')!.selected!.sample.count).toBe(3);
    await desk.want({ ...wanted, source: null });
    expect(last('selected')!.selected).toBeNull();
    expect(() => desk.row(0)).toThrow(/not loaded any more/);
  });

  it('lists what was set aside under region and cuts, as the command does', async () => {
    const { desk } = deskOf();
    await desk.want({ ...wanted, cuts: [{ column: 'mag', min: null, max: 15 }] });
    const text = (await desk.setAsideList()).join('');
    const lines = text.trimEnd().split('\r\n');
    expect(lines[0]).toBe('line,reason,column,text,name,explanation');
    expect(lines.filter((l) => l.includes('outsideCuts'))).toHaveLength(500 - Math.ceil(500 / 7));
    expect(lines.at(-1)).toMatch(/^502,notANumber,ra,bad,,The row is set aside as one with a value/);
  });
});

describe('the list of repeated positions', () => {
  it('has line, name, position and the line repeated, among the galaxies that are in', async () => {
    const { desk, last } = deskOf();
    const twice = { ...wanted, source: source('blob:twice') };
    await desk.want(twice);
    expect((await desk.repeatsList()).join('')).toBe(
      'line,name,ra_deg,dec_deg,repeats_line\r\n4,c,10,10,2\r\n5,"d,",10,10,2\r\n7,\'=e,11,10,3\r\n',
    );
    // Without the row of line 2, what repeated it repeats the next that did.
    await desk.want({ ...twice, cuts: [{ column: 'z', min: 0.1, max: null }] });
    expect((await desk.repeatsList()).join('').split('\r\n').slice(1)).toEqual([
      '5,"d,",10,10,4',
      "7,'=e,11,10,3",
      '',
    ]);
    expect(last('selected')!.selected!.account).toMatchObject({ rowsRead: 6, kept: 4, repeatedPositions: 2 });
  });

  it('is refused while other galaxies are being read', async () => {
    const { desk } = deskOf();
    await desk.want(wanted);
    const wanting = desk.want({ ...wanted, source: source('blob:twice') });
    await expect(desk.repeatsList()).rejects.toThrow(/being read: ask for their list again/);
    await wanting;
  });
});

describe('a wish taken back before it was done', () => {
  it.each([
    ['region', { region: { parts: [{ kind: 'cap', raDeg: 152, decDeg: 4, radiusDeg: 1 }], holes: [] } }],
    ['source', { source: source('blob:one') }],
    ['cosmology', { cosmology: { ...findPublishedSet('wmap9').parameters } }],
  ] as const)('%s there and back leaves every result in place', async (_, change) => {
    const { desk, events, last } = deskOf();
    await desk.want(wanted);
    const running = desk.want({ ...wanted, ...change });
    while (
      !events.slice(-1).some((e) => e.kind === 'progress' || e.kind === 'selected' || e.kind === 'background')
    )
      await new Promise((resume) => setTimeout(resume, 0));
    await desk.want(wanted);
    await running;
    expect(last('loaded')!.loaded!.account.kept).toBe(500);
    expect(last('selected')!.selected!.sample.count).toBe(500);
    expect(last('background')!.background!.comovingMpc).toHaveLength(500);
    // The background belongs to the selection that came last.
    const order = events.map((e) => e.kind);
    expect(order.lastIndexOf('background')).toBeGreaterThan(order.lastIndexOf('selected'));
    expect(desk.row(0).redshift).toBe(0.1);
  });
});

describe('a sample in shared memory', () => {
  it('is the same sample, to the last digit', () => {
    const redshift = Float64Array.of(0.3, 0.1, 0.2);
    for (const weight of [null, Float64Array.of(1, 2, 0.5)]) {
      const sample = sortSample(redshift, weight);
      const shared = sharedSample(sample);
      expect(shared).toEqual(sample);
      expect(shared.redshift.buffer).toBeInstanceOf(SharedArrayBuffer);
    }
  });
});
