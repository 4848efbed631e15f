import { createHash } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { DEFAULT_SEED, type DemoSurvey, makeDemoSurvey } from '../../../shared-core/demo/demoSurvey.ts';
import { BRIGHT_STAR, DEMO_COLUMNS, FIELDS } from '../../../shared-core/demo/scenario.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { separationDeg } from '../../../shared-core/sky/vectors.ts';
import { fieldOf, type ReadDemo, readDemo } from './readDemo.ts';

const sha256 = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');

let survey: DemoSurvey;
let read: Awaited<ReturnType<typeof readDemo>>;
let catalogue: ReadDemo;
/** Field of each kept row. */
let fields: number[];

beforeAll(async () => {
  survey = makeDemoSurvey();
  read = await readDemo([survey.csv]);
  catalogue = read.catalogue;
  fields = [...catalogue.raDeg].map((raDeg, i) => fieldOf(raDeg, catalogue.decDeg[i]!));
});

function range(values: Iterable<number>): [least: number, greatest: number] {
  let least = Number.POSITIVE_INFINITY;
  let greatest = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    least = Math.min(least, value);
    greatest = Math.max(greatest, value);
  }
  return [least, greatest];
}

const inField = (column: Float64Array, wanted: (field: number) => boolean) =>
  [...column].filter((_, i) => wanted(fields[i]!));

describe('the demo survey', () => {
  it('is the same file to the last byte, wherever it is made', () => {
    // Pinned: made alike by Node 20 and by Chromium 156. A change of the model or the cosmology changes it.
    expect(sha256(survey.csv)).toBe('5fad626c8163c72d8fb18a64c1aa2d183131b953ea36b06ec337402d7fe04e99');
    expect(survey.seed).toBe(DEFAULT_SEED);
  });

  it('is another one for another seed, with as many rows of each kind', async () => {
    const other = makeDemoSurvey(DEFAULT_SEED + 1);
    expect(sha256(other.csv)).not.toBe(sha256(survey.csv));
    expect((await readDemo([other.csv])).catalogue.account).toEqual(survey.account);
  });

  it('refuses a seed that is none with a sentence', () => {
    expect(() => makeDemoSurvey(-1)).toThrow(/The seed is -1.* give a whole number/);
  });

  it('says that it is invented, in its name and its description', () => {
    expect(survey.name).toContain('invented');
    expect(survey.description).toContain('invented');
  });

  it('is plain ASCII with the columns that it names, and an id of its own in each row', () => {
    expect(survey.csv).toMatch(/^[\n -~]*$/);
    const lines = survey.csv.split('\n');
    expect(lines.pop()).toBe('');
    expect(lines.shift()).toBe(DEMO_COLUMNS.join(','));
    expect(new Set(lines.map((line) => line.slice(0, line.indexOf(',')))).size).toBe(lines.length);
  });

  it('is accounted for as it says: 60 000 rows kept, the others set aside for each reason', () => {
    expect(catalogue.account).toEqual(survey.account);
    expect(survey.account.kept).toBe(60_000);
    expect(read.setAside.length).toBe(survey.account.setAside);
    // Rows with the same position are one pair each, in the wide field.
    expect(catalogue.account.repeatedPositions).toBe(26);
    expect(survey.account.reasons).toEqual({
      wrongFieldCount: 9,
      missingValue: 52,
      notANumber: 31,
      raOutOfRange: 14,
      decOutOfRange: 7,
      redshiftNotAboveZero: 63,
      redshiftTooLarge: 3,
      weightNegative: 5,
      outsideRegion: 24,
    });
  });
});

describe('its region', () => {
  it('has three parts far apart and a hole, and an area as the shapes give it', () => {
    const rad = Math.PI / 180;
    const box = (20 * (Math.sin(17 * rad) - Math.sin(7 * rad))) / rad;
    const cap = (radiusDeg: number) => (2 * Math.PI * (1 - Math.cos(radiusDeg * rad))) / rad ** 2;
    const areaDeg2 = compileRegion(survey.region).areaDeg2;
    expect(areaDeg2).toBeCloseTo(box + 2 * cap(1.2) - cap(0.65), 8);
    expect(separationDeg(71.5, -38.25, 318.75, 27.5)).toBeGreaterThan(90);
  });

  it('holds galaxies in every field, up to its rim and to the rim of the hole', () => {
    expect(fields.every((field) => field >= 0)).toBe(true);
    const counts = FIELDS.map((_, i) => fields.filter((field) => field === i).length);
    expect(counts[0]).toBeGreaterThan(45_000);
    expect(counts[1]).toBeGreaterThan(3000);
    expect(counts[2]).toBeGreaterThan(3000);
    const wideRa = inField(catalogue.raDeg, (field) => field === 0);
    const wideDec = inField(catalogue.decDeg, (field) => field === 0);
    // 50 000 galaxies leave a few thousandths of a degree at the rim
    expect(range(wideRa)[0]).toBeCloseTo(202, 1);
    expect(range(wideRa)[1]).toBeCloseTo(222, 1);
    expect(range(wideDec)[0]).toBeCloseTo(7, 1);
    expect(range(wideDec)[1]).toBeCloseTo(17, 1);
    const [toStar] = range(
      wideRa.map((raDeg, i) => separationDeg(raDeg, wideDec[i]!, BRIGHT_STAR.raDeg, BRIGHT_STAR.decDeg)),
    );
    expect(toStar).toBeGreaterThan(BRIGHT_STAR.radiusDeg);
    expect(toStar).toBeLessThan(BRIGHT_STAR.radiusDeg + 0.05);
  });

  it('turns away ghosts of the bright star', () => {
    const ghosts = read.setAside.filter((row) => row.reason === 'outsideRegion');
    expect(ghosts.length).toBe(24);
    const lines = survey.csv.split('\n');
    for (const { line } of ghosts) {
      const [, raDeg, decDeg] = lines[line - 1]!.split(',').map(Number);
      expect(separationDeg(raDeg!, decDeg!, BRIGHT_STAR.raDeg, BRIGHT_STAR.decDeg)).toBeLessThan(
        BRIGHT_STAR.radiusDeg,
      );
    }
  });
});

describe('its galaxies', () => {
  it('lie between redshift 0.5 and 2, fewer and fewer beyond the peak', () => {
    const counts = new Float64Array(16);
    const redshifts = inField(catalogue.redshift, (field) => field === 0);
    // The colour selection is soft and velocities scatter: a little beyond either end
    expect(range(redshifts)[0]).toBeGreaterThan(0.48);
    expect(range(redshifts)[1]).toBeLessThan(2.08);
    for (const z of redshifts) {
      const bin = Math.floor((z - 0.5) * 10);
      if (bin >= 0 && bin < 16) counts[bin] = counts[bin]! + 1;
    }
    const peak = counts.indexOf(Math.max(...counts));
    expect(peak).toBeLessThanOrEqual(3);
    // Pairs of bins, for walls and voids of 300 Mpc still show in one of 0.1
    const pairs = Array.from({ length: 7 }, (_, i) => counts[2 + 2 * i]! + counts[3 + 2 * i]!);
    for (let i = 1; i < pairs.length; i++) expect(pairs[i]!).toBeLessThan(pairs[i - 1]!);
    expect(pairs[6]!).toBeLessThan(pairs[0]! / 4);
  });

  it('are as bright as the depth allows, deeper and farther in the small fields', () => {
    const wide = range(inField(catalogue.magnitude!, (field) => field === 0))[1];
    const deep = range(inField(catalogue.magnitude!, (field) => field > 0))[1];
    expect(wide).toBeLessThanOrEqual(21.9);
    expect(wide).toBeGreaterThan(21.89);
    expect(deep).toBeLessThanOrEqual(24);
    expect(deep).toBeGreaterThan(23.98);
    const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / values.length;
    expect(mean(inField(catalogue.redshift, (field) => field > 0))).toBeGreaterThan(
      mean(inField(catalogue.redshift, (field) => field === 0)) + 0.1,
    );
  });

  it('weigh more where and when fewer redshifts were measured', () => {
    const weights = catalogue.weight!;
    expect(range(weights)[0]).toBeGreaterThanOrEqual(1);
    // Worst pointing, faintest galaxy: 1 / (0.72 x 0.7)
    expect(range(weights)[1]).toBeLessThanOrEqual(1.985);
    const mean = (faint: boolean) => {
      const some = [...weights].filter(
        (_, i) => fields[i] === 0 && catalogue.magnitude![i]! > 21.5 === faint,
      );
      return some.reduce((a, b) => a + b, 0) / some.length;
    };
    expect(mean(true)).toBeGreaterThan(mean(false) + 0.1);
  });

  it('come in two colours that part at every redshift', () => {
    const colour = catalogue.extras.get('colour')!;
    let red = 0;
    for (let i = 0; i < colour.length; i++) if (colour[i]! > 0.95 + 0.42 * catalogue.redshift[i]!) red++;
    expect(red / colour.length).toBeGreaterThan(0.3);
    expect(red / colour.length).toBeLessThan(0.75);
  });
});
