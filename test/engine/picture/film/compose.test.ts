import { beforeAll, describe, expect, it } from 'vitest';
import { composeFilm } from '../../../../renderer/picture/film/composeFilm.ts';
import { type PictureFacts, pictureNumbers } from '../../../../renderer/picture/numbers.ts';
import type { Scene, TextItem } from '../../../../renderer/picture/scene.ts';
import { FILM_KINDS, filmOptions } from '../../../../shared-core/picture/film.ts';
import { shownText } from '../../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../../shared-core/report/shellQuantities.ts';
import { factsOf, STUDY, small } from '../facts.ts';

let facts: PictureFacts;
beforeAll(async () => {
  facts = await factsOf();
});

const film = (kind: string, more: object = {}) =>
  composeFilm(
    small({ labels: [{ text: 'A cluster', raDeg: 212, decDeg: 11, redshift: 0.8 }] }),
    filmOptions({ kind, seconds: 1, framesPerSecond: 20, ...more }),
    facts,
  );
const texts = ({ items }: Scene): string[] =>
  items.filter((item): item is TextItem => item.kind === 'text').map(({ text }) => text);
/** Texts with their places, but for labels, which go with their galaxies. */
const still = ({ items }: Scene): string[] =>
  items.filter((item): item is TextItem => item.kind === 'text').map(({ text, x, y }) => `${text} ${x} ${y}`);
const bytes = (scene: Scene): string => JSON.stringify({ ...scene, points: hashOf(scene) }, plain);
const hashOf = ({ points }: Scene): string => [points.x, points.y, points.light ?? []].map(String).join(' ');
const plain = (_: string, value: unknown): unknown =>
  value instanceof Float64Array ? Array.from(value) : value;

describe.each(FILM_KINDS)('%s', (kind) => {
  it('has the same frame whenever it is asked for, frames that differ, and words', () => {
    const made = film(kind);
    const third = bytes(made.sceneAt(3));
    expect(bytes(made.sceneAt(9))).not.toBe(third);
    expect(bytes(made.sceneAt(3))).toBe(third);
    expect(bytes(film(kind).sceneAt(3))).toBe(third);
    expect(made.metadata.description).toMatch(/^Film, /);
    expect(made.metadata.fingerprint).toBe('ab'.repeat(32));
    expect(texts(made.sceneAt(0))).toContain('Three fields');
    expect(made.sceneAt(3).background).not.toBeNull();
  });

  it('is drawn for a plan without galaxies', async () => {
    const plan = { ...facts, selected: null, background: null };
    const made = composeFilm(small(), filmOptions({ kind, seconds: 1, framesPerSecond: 10 }), plan);
    expect(made.sceneAt(4).points.count).toBe(0);
    expect(made.sceneAt(4).items.length).toBeGreaterThan(10);
  });
});

describe('turntable', () => {
  it('comes to its first frame one after its last, exactly, while rulers and words hold still', () => {
    const made = film('turntable');
    expect(bytes(made.sceneAt(20))).toBe(bytes(made.sceneAt(0)));
    const label = (text: string) => !text.startsWith('A cluster');
    expect(still(made.sceneAt(7)).filter(label)).toEqual(still(made.sceneAt(0)).filter(label));
    expect(texts(made.sceneAt(0))).toContain('redshift');
  });

  it('keeps every galaxy at its depth', () => {
    const made = film('turntable');
    const [a, b] = [made.sceneAt(0).points, made.sceneAt(5).points];
    let moved = 0;
    for (let i = 0; i < a.count; i++) {
      // Single precision at some 500 units.
      expect(Math.abs(a.x[i]! - b.x[i]!)).toBeLessThan(1e-3);
      if (Math.abs(a.y[i]! - b.y[i]!) > 1) moved++;
    }
    expect(moved).toBeGreaterThan(a.count / 2);
  });

  it('turns a survey of the whole sky about its poles', async () => {
    const sky = { ...STUDY, region: null, edges: [] };
    const whole = { ...(await factsOf(sky)), study: sky };
    const selected = {
      ...whole.selected!,
      footprint: { ...whole.selected!.footprint!, fields: [], rings: [] },
    };
    const made = composeFilm(small(), filmOptions({ kind: 'turntable' }), { ...whole, selected });
    expect(made.offeredCaption).toContain('The sky turns once about its poles.');
    const [a, b] = [made.sceneAt(0).points, made.sceneAt(50).points];
    // The height of a galaxy is its distance from the equator's plane, which turning about the poles keeps.
    for (let i = 0; i < a.count; i++) expect(Math.abs(a.y[i]! - b.y[i]!)).toBeLessThan(1e-3);
    expect(a.x[0]).not.toBeCloseTo(b.x[0]!, 1);
  });
});

describe('fly-along', () => {
  it('takes the camera outward along the line of sight and tells where it is', () => {
    const made = film('fly-along', { seconds: 2 });
    const redshifts = Array.from({ length: 40 }, (_, frame) =>
      Number(
        /^camera at z ([\d.]+)$/.exec(
          texts(made.sceneAt(frame))
            .join('\n')
            .match(/camera.*/)![0],
        )![1],
      ),
    );
    expect(redshifts[0]).toBe(0);
    for (let i = 1; i < 40; i++) expect(redshifts[i]!).toBeGreaterThanOrEqual(redshifts[i - 1]!);
    // It ends where four fifths of the galaxies, sorted by redshift, are behind it, or a little before.
    const z = facts.selected!.sample.redshift;
    expect(redshifts[39]!).toBeGreaterThan(1);
    expect(redshifts[39]!).toBeLessThanOrEqual(z[Math.floor(0.8 * z.length)]! + 5e-4);
    const { x } = made.sceneAt(39).points;
    expect(x.filter((at) => Number.isFinite(at)).length).toBeGreaterThan(20);
  });

  it('goes through the field that is asked for, and refuses one that is not there', () => {
    expect(film('fly-along', { field: 3 }).offeredCaption).toContain('Field 3 of 3.');
    expect(() => film('fly-along', { field: 4 })).toThrow(/has 3 fields: give a number from 1 to 3/);
  });
});

describe('shell by shell', () => {
  it("lights each shell's galaxies in turn and tells its numbers with the ledger's digits", () => {
    const made = film('shell-by-shell', { seconds: 3, framesPerSecond: 20 });
    const { shells, units } = pictureNumbers(small(), facts);
    const z = facts.selected!.sample.redshift;
    for (const [k, shell] of shells.entries()) {
      // The middle of the shell's turn among five with half a turn before and after.
      const scene = made.sceneAt(Math.round((59 * (k + 1)) / 6));
      const { light } = scene.points;
      for (let i = 0; i < z.length; i += 7) {
        const inside = z[i]! >= shell.zMin && z[i]! < shell.zMax;
        expect(light![i]! > 0.9).toBe(inside);
      }
      const words = texts(scene).join('\n');
      for (const key of ['lookbackMinGyr', 'count'])
        expect(words).toContain(shownText(SHELL_QUANTITIES.find((q) => q.key === key)!, shell, units));
      // The last shell has its upper edge too.
      const sign = k === shells.length - 1 ? '≤' : '<';
      expect(words).toContain(
        `${Number(shell.zMin.toFixed(4))} ≤ z ${sign} ${Number(shell.zMax.toFixed(4))}`,
      );
    }
    expect(made.sceneAt(0).points.light!.every((light) => light === 1)).toBe(true);
    // The cone holds still, so its galaxies are placed once; each frame has a light of its own.
    const [a, b] = [made.sceneAt(3).points, made.sceneAt(9).points];
    expect(b.x).toBe(a.x);
    expect(b.y).toBe(a.y);
    expect(b.light).not.toBe(a.light);
  });

  it('is refused where there are no shells', () => {
    const study = { ...facts.study, edges: [] };
    expect(() => composeFilm(small(), filmOptions({ kind: 'shell-by-shell' }), { ...facts, study })).toThrow(
      /needs shells, and the study has none/,
    );
  });
});
