import { existsSync, readFileSync, statSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { conewright, testFolder } from './capture.ts';

const folder = testFolder();

describe('distances', () => {
  const FLAT = ['--h0', '70', '--omega-m', '0.3', '--tcmb', '0'];

  it('prints published numbers: flat Om 0.3, H0 70 at z 0.5, 1, 3 (computed, Hogg 1999 formulas)', async () => {
    const { code, out, err } = await conewright('distances', '--z', '0.5,1,3', ...FLAT, '--json');
    expect([code, err]).toEqual([0, '']);
    const rows = JSON.parse(out);
    const close = (actual: number, expected: number) =>
      expect(Math.abs(actual / expected - 1)).toBeLessThan(1e-8);
    for (const [i, [comoving, luminosity, angular, lookback, volumeGpc3]] of [
      [1888.625396, 2832.938094, 1259.083597, 5.040637929, 28.21799064],
      [3303.828806, 6607.657612, 1651.914403, 7.715337004, 151.0571253],
      [6355.685436, 25422.741745, 1588.921359, 11.354456756, 1075.414264],
    ].entries()) {
      const row = rows[i];
      close(row.comovingMpc, comoving!);
      close(row.luminosityMpc, luminosity!);
      close(row.angularDiameterMpc, angular!);
      close(row.lookbackGyr, lookback!);
      close(row.comovingVolumeMpc3, volumeGpc3! * 1e9);
    }
  });

  it('takes a named set, and single parameters in its place', async () => {
    const json = async (...more: string[]) =>
      JSON.parse((await conewright('distances', '--z', '1', '--json', ...more)).out)[0];
    const planck = createCosmology(findPublishedSet('planck2018').parameters);
    expect((await json()).comovingMpc).toBe(planck.comovingMpc(1));
    expect((await json('--cosmology', 'planck2018')).comovingMpc).toBe(planck.comovingMpc(1));
    const own = createCosmology({ ...findPublishedSet('wmap9').parameters, w0: -0.9, wa: 0.2 });
    expect((await json('--cosmology', 'wmap9', '--w0', '-0.9', '--wa', '0.2')).ageGyr).toBe(own.ageGyr(1));
    const open = createCosmology({ ...findPublishedSet('flat70').parameters, omegaDe0: 0 });
    expect((await json(...FLAT, '--omega-de', '0')).transverseComovingMpc).toBe(
      open.transverseComovingMpc(1),
    );
  });

  it('--tcmb 0 leaves out radiation and neutrinos of the named set', async () => {
    const { parameters } = findPublishedSet('planck2018');
    const bare = createCosmology({ ...parameters, tCmbK: 0, neutrinoMassesEv: [] });
    const { out } = await conewright('distances', '--z', '1', '--tcmb', '0', '--json');
    expect(JSON.parse(out)[0].comovingMpc).toBe(bare.comovingMpc(1));
    expect(bare.omegaNu0 + bare.omegaGamma0).toBe(0);
  });

  it('prints a readable table with the cosmology under it, and h-units on request', async () => {
    const { out } = await conewright('distances', '--z', '0.5', ...FLAT);
    expect(out).toContain('1888.625');
    expect(out).toContain('own parameters: flat, H0 70 km/s/Mpc, Omega_m 0.3');
    const perH = await conewright('distances', '--z', '0.5', ...FLAT, '--h-units');
    expect(perH.out).toContain('Mpc/h');
    expect(perH.out).toContain((1888.625396 * 0.7).toFixed(3));
  });
});

describe('shells', () => {
  const rows = Array.from(
    { length: 300 },
    (_, i) =>
      `${(150 + (i % 17) / 3).toFixed(4)},${(2 + (i % 13) / 4).toFixed(4)},${(0.1 + i / 1000).toFixed(4)}`,
  );
  const file = () => folder.write('sample.csv', `ra,dec,z\n${rows.join('\n')}\n`);
  const REGION = ['--region', 'box:149,156,1,6'];

  it('answers in JSON with everything a script needs', async () => {
    const { out } = await conewright('shells', file(), ...REGION, '--edges', '0.1,0.2,0.4', '--json');
    const result = JSON.parse(out);
    expect(result).toMatchObject({
      catalogue: { rowsRead: 300, kept: 300, setAside: 0, reasons: {} },
      region: { estimated: false },
      p0Mpc3PerH3: 10_000,
      cosmology: { name: 'planck2018', h0KmSMpc: 67.66 },
    });
    expect(result.shells.map((s: { count: number }) => s.count)).toEqual([100, 200]);
    for (const key of 'zMin zMax count weightedCount zMean zMedian zEffective comovingMinMpc comovingMaxMpc lookbackMinGyr lookbackMaxGyr volumeMpc3 densityPerMpc3 densityErrorPerMpc3 effectiveVolumeMpc3 effectiveVolumeUniformMpc3'.split(
      ' ',
    ))
      expect(result.shells[0][key], key).toBeTypeOf('number');
  });

  it('does not depend on the order of the rows', async () => {
    const command = (path: string) => conewright('shells', path, ...REGION, '--shells', 'count:4', '--json');
    const shuffled = folder.write('shuffled.csv', `ra,dec,z\n${[...rows].reverse().join('\n')}\n`);
    expect((await command(shuffled)).out).toBe((await command(file())).out);
  });

  it('calls an area without a region an estimate, with its cell size', async () => {
    const { out } = await conewright('shells', file(), '--edges', '0.1,0.4');
    expect(out).toMatch(/ESTIMATE from \d+ occupied equal-area cells of [\d.]+ deg\^2 \(HEALPix Nside \d+\)/);
    const json = JSON.parse((await conewright('shells', file(), '--edges', '0.1,0.4', '--json')).out);
    expect(json.region.estimated).toBe(true);
    expect(json.region.cellAreaDeg2).toBeGreaterThan(0);
  });

  it('joins regions, leaves out holes, cuts on columns and maps names', async () => {
    const path = folder.write(
      'named.csv',
      `RIGHT,DOWN,V,Mag\n${rows.map((r, i) => `${r.split(',').slice(0, 2).join(',')},${Number(r.split(',')[2]) * 299792.458},${15 + (i % 5)}`).join('\n')}\n`,
    );
    const columns = ['--columns', 'ra=RIGHT,dec=DOWN,cz=V,mag=Mag'];
    const json = async (...more: string[]) =>
      JSON.parse(
        (await conewright('shells', path, ...columns, ...more, '--edges', '0.05,0.5', '--json')).out,
      );
    const whole = await json(...REGION);
    const halves = await json('--region', 'box:149,153,1,6', '--region', 'box:153,156,1,6');
    expect(halves.region.areaDeg2).toBeCloseTo(whole.region.areaDeg2, 9);
    expect(halves.catalogue.kept).toBe(300);
    const holed = await json(...REGION, '--hole', 'cap:152,3,1');
    expect(holed.region.areaDeg2).toBeCloseTo(whole.region.areaDeg2 - 3.1415129057, 8);
    expect(holed.catalogue.setAside).toBe(holed.catalogue.reasons.outsideRegion);
    const bright = await json(...REGION, '--cut', 'Mag:..16.5');
    expect(bright.catalogue).toMatchObject({ kept: 120, reasons: { outsideCuts: 180 } });
    expect(bright).toMatchObject({ cuts: [{ min: null }], region: { parts: [{ kind: 'box' }], holes: [] } });
  });

  it('prints CSV, ECSV and LaTeX', async () => {
    const command = async (...format: string[]) =>
      (await conewright('shells', file(), ...REGION, '--edges', '0.1,0.2,0.4', ...format)).out;
    expect((await command('--csv')).split('\r\n')).toHaveLength(4);
    expect(await command('--ecsv')).toMatch(/^# %ECSV 1\.0\n# ---\n/);
    expect(await command('--latex')).toContain('\\begin{tabular}{rrrrrrrrrrr}');
    expect(await command('--latex', '--all-columns')).toContain(`\\begin{tabular}{${'r'.repeat(20)}}`);
    expect((await conewright('shells', file(), '--csv', '--all-columns')).err).toMatch(/without --latex/);
  });
});

describe('coordinates', () => {
  it('writes comoving positions on stated axes, and keeps ids', async () => {
    const path = folder.write('ids.csv', 'id,ra,dec,z\na,0,0,0.5\nb,90,0,0.5\n=1+1,0,90,0.5\nd,0,0,-1\n');
    const out = folder.path('xyz.csv');
    const { code, err } = await conewright('coordinates', path, '-o', out, '--cosmology', 'flat70');
    expect(code).toBe(0);
    expect(err).toContain('4 read = 3 kept + 1 set aside');
    const [head, ...body] = readFileSync(out, 'utf8').trimEnd().split('\n');
    expect(head).toBe('line,id,raDeg,decDeg,redshift,comovingMpc,xMpc,yMpc,zMpc,lookbackGyr,ageGyr');
    const numbers = body.map((l) => l.split(','));
    expect(numbers[2]![1]).toBe("'=1+1");
    // D_C(0.5) 1888.625396, lookback 5.040637929, age today 13.466983947: computed, check values of a flat universe.
    for (const [i, axis] of [
      [0, 6],
      [1, 7],
      [2, 8],
    ] as const) {
      expect(Number(numbers[i]![axis])).toBeCloseTo(1888.625396, 5);
      expect(Number(numbers[i]![9])).toBeCloseTo(5.040637929, 8);
      expect(Number(numbers[i]![10])).toBeCloseTo(13.466983947 - 5.040637929, 8);
    }
    expect(Number(numbers[0]![8])).toBe(0);
  });

  it('leaves no half file behind when the catalogue turns out to be unusable', async () => {
    const out = folder.path('never.csv');
    const { code } = await conewright(
      'coordinates',
      folder.write('quote.csv', 'ra,dec,z\n1,1,0.5\n"1,1,0.5\n'),
      '-o',
      out,
    );
    expect(code).toBe(1);
    expect(existsSync(out)).toBe(false);
  });
});

describe('demo', () => {
  it('writes the invented survey and its tables, and says the same as `shells` on its catalogue', async () => {
    const target = folder.path('demo');
    const demo = await conewright('demo', '-o', target);
    expect(demo.code).toBe(0);
    expect(demo.out).toContain('(invented)');
    const regionOptions = readFileSync(`${target}/region.txt`, 'utf8').trim().split(/\s+/);
    const edges = JSON.parse(readFileSync(`${target}/shells.json`, 'utf8')).shells.flatMap(
      (s: { zMin: number; zMax: number }) => [s.zMin, s.zMax],
    );
    const again = await conewright(
      'shells',
      `${target}/catalogue.csv`,
      ...regionOptions,
      '--edges',
      [...new Set(edges)].join(','),
      '--json',
    );
    const [a, b] = [JSON.parse(again.out), JSON.parse(readFileSync(`${target}/shells.json`, 'utf8'))];
    expect(a.shells).toEqual(b.shells);
    expect(a.catalogue).toEqual(b.catalogue);
    // Again: the same files, nothing to do.
    const before = statSync(`${target}/catalogue.csv`).mtimeMs;
    expect((await conewright('demo', '-o', target)).code).toBe(0);
    expect(statSync(`${target}/catalogue.csv`).mtimeMs).toBe(before);
  });
});

describe('help', () => {
  it.each(['distances', 'shells', 'coordinates', 'demo'])(
    '%s explains itself with an example, exit 0',
    async (verb) => {
      const { code, out } = await conewright(verb, '--help');
      expect(code).toBe(0);
      expect(out).toMatch(/Example:\n\s+npm run -s conewright -- /);
    },
  );
});
