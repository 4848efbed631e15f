import { describe, expect, it } from 'vitest';
import { parseColumnMap } from '../../../shared-core/catalogue/columnMap.ts';
import { describeMapping, resolveMapping, suggestMapping } from '../../../shared-core/catalogue/mapping.ts';
import { ROLES, SPELLINGS } from '../../../shared-core/catalogue/spellings.ts';
import { refusalOf } from './support.ts';

describe('suggestMapping', () => {
  // Spellings as they are met in published tables: common practice, no source.
  it.each([
    [['ra', 'dec', 'z']],
    [['RA', 'DEC', 'Z']],
    [['_RAJ2000', '_DEJ2000', 'redshift']],
    [['RA (deg)', 'Dec (deg)', 'z_spec']],
    [['ra_deg', 'dec_deg', 'zspec']],
    [['ALPHA_J2000', 'DELTA_J2000', 'Z_BEST']],
    [['RAdeg', 'DEdeg', 'zhelio']],
    [['Right Ascension', 'Declination', 'Redshift']],
    [['alpha', 'de', 'z_phot']],
  ])('finds position and redshift in %j', (header) => {
    expect(suggestMapping(['n', ...header])).toEqual({
      ra: header[0],
      dec: header[1],
      radial: { column: header[2], kind: 'redshift' },
    });
  });

  it.each(['cz', 'V', 'vel', 'Velocity', 'v_helio', 'cz [km/s]', 'RV'])(
    'finds the velocity column %s',
    (name) => {
      expect(suggestMapping(['RA', 'DEC', name]).radial).toEqual({ column: name, kind: 'czKmS' });
    },
  );

  it('finds weight, magnitude and name', () => {
    expect(suggestMapping(['ObjID', 'Mag', 'W'])).toEqual({ id: 'ObjID', magnitude: 'Mag', weight: 'W' });
  });

  it('prefers a redshift to a velocity, and a spectroscopic redshift to another', () => {
    expect(suggestMapping(['cz', 'z']).radial).toEqual({ column: 'z', kind: 'redshift' });
    expect(suggestMapping(['z_phot', 'z', 'z_spec']).radial).toEqual({ column: 'z_spec', kind: 'redshift' });
  });

  it('takes no magnitude for a redshift or a velocity', () => {
    expect(suggestMapping(['u', 'g', 'r', 'i', 'z']).radial).toBeUndefined();
    expect(suggestMapping(['u', 'g', 'r', 'i', 'z', 'redshift']).radial?.column).toBe('redshift');
    expect(suggestMapping(['B', 'V']).radial).toBeUndefined();
  });

  it('knows every spelling of its list, in one part only', () => {
    const all = ROLES.flatMap((role) => SPELLINGS[role]);
    expect(new Set(all).size).toBe(all.length);
    for (const spelling of all) expect(Object.keys(suggestMapping([spelling])), spelling).toHaveLength(1);
  });
});

describe('parseColumnMap', () => {
  it('reads keys in any order and case, and leaves out what is not named', () => {
    expect(parseColumnMap('ra=RA,dec=DEC,cz=V,mag=Mag')).toEqual({
      ra: 'RA',
      dec: 'DEC',
      radial: { column: 'V', kind: 'czKmS' },
      magnitude: 'Mag',
    });
    expect(parseColumnMap(' Z = my z , ID=n')).toEqual({
      radial: { column: 'my z', kind: 'redshift' },
      id: 'n',
    });
  });

  it('lets a name hold commas and equals signs', () => {
    expect(parseColumnMap('ra=alpha, J2000,dec=a=b')).toEqual({ ra: 'alpha, J2000', dec: 'a=b' });
  });

  it('reads a part without a name as none', () => {
    expect(parseColumnMap('weight=,mag=,id=')).toEqual({ weight: null, magnitude: null, id: null });
  });

  it.each([
    ['', /entry "".*KEY=COLUMN/],
    ['RA', /entry "RA".*ra, dec, z, cz, weight, mag, id/],
    ['ra=A,redshift=B', /entry "redshift=B"/],
    ['ra=A,ra=B', /names ra twice/],
    ['z=A,cz=B', /both z and cz/],
    ['dec=,ra=A', /no column for dec/],
  ])('refuses %j as wrong use', async (text, sentence) => {
    const refusal = await refusalOf(() => parseColumnMap(text));
    expect(refusal.message).toMatch(sentence);
    expect(refusal.kind).toBe('use');
  });
});

describe('resolveMapping', () => {
  const header = ['Name', 'RA', 'DEC', 'V', 'z', 'Mag', 'w'];

  it('takes what was chosen and the suggestion for the rest, with names as in the header', () => {
    expect(resolveMapping(header, parseColumnMap('cz=v,weight='))).toEqual({
      ra: 'RA',
      dec: 'DEC',
      radial: { column: 'V', kind: 'czKmS' },
      weight: null,
      magnitude: 'Mag',
      id: 'Name',
    });
  });

  it('prefers a name that is exactly so to one that differs in case', () => {
    expect(resolveMapping(['ra', 'RA', 'dec', 'z'], { ra: 'RA' }).ra).toBe('RA');
  });

  it('names the missing column, those there are and a near spelling', async () => {
    const refusal = await refusalOf(() => resolveMapping(header, { dec: 'DECL' }));
    expect(refusal.message).toBe(
      'The file has no column "DECL" (wanted as declination); its columns are Name, RA, DEC, V, z, Mag, w: did you mean "DEC"?',
    );
    expect(refusal.kind).toBe('use');
    expect((await refusalOf(() => resolveMapping(header, { ra: 'elsewhere' }))).message).toMatch(
      /: name one of these\.$/,
    );
  });

  it('says which parts no column was recognised as', async () => {
    const refusal = await refusalOf(() => resolveMapping(['a', 'b', 'dec']));
    expect(refusal.message).toMatch(
      /^No column was recognised as right ascension \(ra\) nor as redshift \(z, or cz in km\/s\) among a, b, dec/,
    );
    expect(refusal.kind).toBe('input');
  });

  it('says so when the columns are not separated', async () => {
    const refusal = await refusalOf(() => resolveMapping(['ra dec z']));
    expect(refusal.message).toMatch(
      /^The first line, "ra dec z", is a single column.*commas, tabs, semicolons or bars/,
    );
  });

  it('lists no more than thirty of many columns', async () => {
    const many = Array.from({ length: 2000 }, (_, i) => `c${i}`);
    const refusal = await refusalOf(() =>
      resolveMapping(many, { ra: 'nowhere', dec: 'c1', radial: { column: 'c2', kind: 'redshift' } }),
    );
    expect(refusal.message).toMatch(/c29 and 1970 more/);
    expect(refusal.message.length).toBeLessThan(400);
  });

  it('refuses one column in two parts', async () => {
    const refusal = await refusalOf(() => resolveMapping(header, { ra: 'RA', dec: 'ra' }));
    expect(refusal.message).toMatch(/^The column "RA" is named for two of/);
    expect(refusal.kind).toBe('use');
  });
});

describe('describeMapping', () => {
  it('says how a velocity becomes a redshift and what stands in for a weight', () => {
    const text = describeMapping(resolveMapping(['RA', 'DEC', 'V', 'Mag']));
    expect(text).toBe(
      'right ascension in degrees from RA; declination in degrees from DEC; velocity cz in km/s, read as z = cz/c (the optical convention), from V; every galaxy with weight 1; magnitude from Mag',
    );
  });
});
