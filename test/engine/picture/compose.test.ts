import { beforeAll, describe, expect, it } from 'vitest';
import { composePicture, describePicture } from '../../../renderer/picture/composePicture.ts';
import { colourRemark, type PictureFacts, pictureNumbers } from '../../../renderer/picture/numbers.ts';
import type { Scene, TextItem } from '../../../renderer/picture/scene.ts';
import { textWidth } from '../../../renderer/picture/text/measure.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { PICTURE_STYLES, PICTURE_VIEWS } from '../../../shared-core/picture/options.ts';
import { UNNAMED } from '../../../shared-core/study/document.ts';
import { changeLook } from '../../../shared-core/study/edits.ts';
import { factsOf, STUDY, small } from './facts.ts';

let facts: PictureFacts;
beforeAll(async () => {
  facts = await factsOf();
});

const texts = (scene: Scene): TextItem[] => scene.items.filter((item) => item.kind === 'text');

/** Every number of every item, the galaxies aside. */
function numbersOf(scene: Scene): number[] {
  return scene.items.flatMap((item) => {
    if (item.kind === 'points') return [];
    if (item.kind === 'path') return item.runs.flatMap((run) => Array.from(run));
    return [item.x, item.y];
  });
}

function inside(scene: Scene, { text, x, y, anchor, size, bold, angle }: TextItem): boolean {
  const width = textWidth(text, size, bold ? 700 : 400);
  const from = anchor === 'middle' ? -width / 2 : anchor === 'end' ? -width : 0;
  return [from, from + width].every((along) => {
    const [px, py] = [x + along * Math.cos(angle), y + along * Math.sin(angle)];
    return px >= 0 && px <= scene.width && py >= 0 && py <= scene.height;
  });
}

describe.each(PICTURE_VIEWS)('view %s', (view) => {
  it.each([
    [480, 300],
    [300, 300],
    [270, 480],
  ])('at %i x %i has its galaxies, finite places, and all text on the paper', (widthPx, heightPx) => {
    for (const style of PICTURE_STYLES) {
      const scene = composePicture(small({ view, style, widthPx, heightPx, credit: 'Ostrewick' }), facts);
      expect(numbersOf(scene).every(Number.isFinite)).toBe(true);
      expect(texts(scene).filter((item) => !inside(scene, item))).toEqual([]);
      const shown = scene.points.x.filter((x, i) => x >= 0 && x <= scene.width && scene.points.y[i]! >= 0);
      expect(shown.length).toBeGreaterThan(500);
      // A unit is a thousandth of the geometric mean of the sides, whatever the shape.
      expect(scene.width * scene.height).toBeCloseTo(1e6, 3);
    }
  });

  it('is the same from the same options and facts', () => {
    const options = small({ view });
    expect(composePicture(options, facts)).toEqual(composePicture(options, facts));
  });

  it('leaves rulers and shells out when told', () => {
    const bare = composePicture(small({ view, rulers: false, shells: false }), facts);
    const full = composePicture(small({ view }), facts);
    expect(bare.items.length).toBeLessThan(full.items.length / 2);
    expect(texts(bare).some((item) => item.text === 'shells, z')).toBe(false);
  });

  it('is drawn for a plan without galaxies, and for a shell that holds none', () => {
    const plan = { ...facts, selected: null, background: null };
    const drawn = composePicture(small({ view }), plan);
    expect(drawn.points.count).toBe(0);
    // Its shells are told by their distances alone.
    expect(describePicture(drawn)).not.toContain('no galaxies,');
    expect(describePicture(drawn)).toMatch(/Shell [^:]+: comoving distance/);
    const unnamed = composePicture(small({ view }), { ...plan, study: { ...STUDY, name: UNNAMED } });
    expect(texts(unnamed).some((item) => item.text === UNNAMED)).toBe(false);
    expect(texts(drawn).some((item) => item.text === STUDY.name)).toBe(true);
    const empty = { ...facts, study: { ...STUDY, edges: [2.5, 3, 3.5] } };
    expect(describePicture(composePicture(small({ view }), empty))).toContain(
      'Shell 2.5 ≤ z < 3: no galaxies',
    );
    expect(describePicture(composePicture(small({ view }), empty))).toContain('Shell 3 ≤ z ≤ 3.5: ');
  });

  it('is told in words with the lengths of the study', () => {
    const words = (perH: boolean) => {
      const study = { ...STUDY, look: { ...STUDY.look, perH } };
      return describePicture(composePicture(small({ view }), { ...facts, study }));
    };
    const { h } = createCosmology(STUDY.cosmology);
    const distance = (perH: boolean) =>
      Number(/comoving distance ([\d.]+) to [\d.]+ (Mpc(?:\/h)?)\./.exec(words(perH))![1]);
    expect(words(true)).not.toMatch(/ Mpc[^/]/);
    expect(words(false)).not.toContain('Mpc/h');
    // Half of the last digit of each, 0.05.
    expect(Math.abs(distance(true) - h * distance(false))).toBeLessThan(0.1);
  });
});

it('refuses to draw nothing, and colours without values', () => {
  const nothing = {
    ...facts,
    study: { ...STUDY, region: null, edges: [] },
    selected: null,
    background: null,
  };
  expect(() => composePicture(small(), nothing)).toThrow(/nothing to draw/);
  const noMagnitudes = { ...facts, selected: { ...facts.selected!, magnitude: null } };
  expect(() => composePicture(small({ colourBy: 'magnitude' }), noMagnitudes)).toThrow(
    /coloured by magnitude/,
  );
  // The study's own wish is no option that came: the picture is drawn, and what became of the wish is told.
  const own = changeLook('Colour', { colourBy: 'magnitude' }).apply(STUDY);
  const remarked = { ...noMagnitudes, study: own };
  expect(colourRemark(small(), remarked)).toMatch(/by redshift, since .* no values for magnitude/);
  expect(pictureNumbers(small(), remarked).colours.legend!.title).toBe('redshift');
  expect(colourRemark(small(), { ...facts, study: own })).toBeNull();
  expect(colourRemark(small({ colourBy: 'shell' }), remarked)).toBeNull();
});

it('keeps a label of 500 characters and one from right to left on the paper, and whole in the description', () => {
  const place = { raDeg: 212, decDeg: 12, redshift: 1 };
  const long = 'a cluster with a very long name '.repeat(16).slice(0, 500);
  const hebrew = 'צביר גלקסיות';
  const scene = composePicture(
    small({
      labels: [
        { ...place, text: long },
        { ...place, redshift: 1.5, text: hebrew },
      ],
    }),
    facts,
  );
  expect(texts(scene).filter((item) => !inside(scene, item))).toEqual([]);
  expect(texts(scene).some((item) => item.text.endsWith('…'))).toBe(true);
  expect(texts(scene).some((item) => item.text === hebrew)).toBe(true);
  expect(describePicture(scene)).toContain(long);
  const titled = composePicture(small({ title: long, caption: long.repeat(4) }), facts);
  expect(texts(titled).filter((item) => !inside(titled, item))).toEqual([]);
  expect(titled.metadata.title).toBe(long);
});

it('says in the offered caption what a reader must know', () => {
  const words = texts(composePicture(small({ view: 'wedge' }), facts))
    .map((item) => item.text)
    .join(' ');
  expect(words).toContain('Wedge of declination +9° to +15°');
  expect(words).toContain('Planck 2018');
  expect(words).toMatch(/Area 203\.1 deg²/);
  expect(words).toMatch(/3\u202f?000 galaxies/);
});

it('says of a whole sky that it is one, and from where it is seen', () => {
  const selected = {
    ...facts.selected!,
    footprint: { ...facts.selected!.footprint!, fields: [], rings: [] },
  };
  const sky = { ...facts, study: { ...STUDY, region: null, edges: [] }, selected };
  const words = describePicture(composePicture(small(), sky));
  expect(words).toMatch(/^Cone diagram: a survey of the whole sky seen around the observer, depth outward\./);
  expect(describePicture(composePicture(small(), facts))).toMatch(/a survey of 3 fields seen from the side/);
});

it('sets the wedge by its numbers: radius by distance, angle by right ascension', () => {
  const scene = composePicture(
    small({ view: 'wedge', slab: { kind: 'declination', decMinDeg: 7, decMaxDeg: 17 } }),
    facts,
  );
  const { x, y } = scene.points;
  const { raDeg } = facts.selected!;
  const { comovingMpc } = facts.background!;
  const rows = Array.from(x.keys()).filter((i) => !Number.isNaN(x[i]!));
  // Two galaxies fix scale and turn for all others: their tip is where radius is nothing.
  const tip = tipOf(rows.map((i) => [x[i]!, y[i]!, comovingMpc[i]!]));
  const angles = rows.map((i) => Math.atan2(tip[1] - y[i]!, x[i]! - tip[0]));
  const scales = rows.map((i) => Math.hypot(x[i]! - tip[0], y[i]! - tip[1]) / comovingMpc[i]!);
  const perDegree = (angles[0]! - angles[1]!) / (raDeg[rows[0]!]! - raDeg[rows[1]!]!);
  for (const [k, i] of rows.entries()) {
    // Places are 32-bit floats of some hundred units.
    expect(scales[k]! / scales[0]!).toBeCloseTo(1, 4);
    expect(angles[k]! - angles[0]!).toBeCloseTo(perDegree * (raDeg[i]! - raDeg[rows[0]!]!), 3);
  }
});

/** The point from which distances on paper are most nearly in one ratio to the given ones, by a search downhill. */
function tipOf(rows: readonly (readonly [number, number, number])[]): [number, number] {
  let best: [number, number] = [300, 300];
  let step = 400;
  const spread = ([a, b]: readonly [number, number]): number => {
    const ratios = rows.slice(0, 200).map(([x, y, d]) => Math.hypot(x - a, y - b) / d);
    const mean = ratios.reduce((sum, r) => sum + r, 0) / ratios.length;
    return ratios.reduce((sum, r) => sum + (r / mean - 1) ** 2, 0);
  };
  while (step > 1e-4) {
    const around = [
      best,
      [best[0] + step, best[1]],
      [best[0] - step, best[1]],
      [best[0], best[1] + step],
      [best[0], best[1] - step],
    ] as [number, number][];
    const next = around.reduce((a, b) => (spread(b) < spread(a) ? b : a));
    if (next === best) step /= 2;
    best = next;
  }
  return best;
}

it('moves light at 45 degrees in the light-cone diagram', () => {
  const scene = composePicture(small({ view: 'light-cone' }), facts);
  const horizonMpc = createCosmology(STUDY.cosmology).particleHorizonMpc();
  const shown = texts(scene).find((item) => item.text.startsWith('particle horizon'));
  expect(shown!.text).toBe(`particle horizon, ${horizonMpc.toFixed(0)} Mpc`);
  const edges = scene.items.find(
    (item) => item.kind === 'path' && item.runs[0]!.length === 6 && item.stroke?.width === 1.1,
  );
  const [x1, y1, x2, y2] = edges?.kind === 'path' ? edges.runs[0]! : [];
  // The outline of a cone tilted by 0.13 is steeper by less than one part in a hundred.
  expect(Math.abs(Math.abs((x2! - x1!) / (y2! - y1!)) - 1)).toBeLessThan(0.01);
});

it('ends at the depth asked for, says what lies beyond, and spreads the colours over what is shown', () => {
  const options = small({ depthRedshift: 1, shells: false });
  const scene = composePicture(options, facts);
  const beyond = facts.selected!.sample.redshift.filter((z) => z > 1).length;
  expect(scene.points.x.filter((x) => !Number.isNaN(x))).toHaveLength(scene.points.count - beyond);
  const words = texts(scene).map((item) => item.text);
  expect(words.join(' ')).toContain(
    `${String(beyond).replace(/(?=\d{3}$)/, '\u202f')} lie beyond the depth shown`,
  );
  expect(words).toContain('1.00');
  expect(() => composePicture(small({ depthRedshift: 1 }), facts)).toThrow(
    /within the shells, which reach to 2/,
  );
});
