import { effect, signal } from '@preact/signals';
import { describe, expect, it } from 'vitest';
import type { EngineSource } from '../../renderer/engine/protocol.ts';
import { whyNoPicture } from '../../renderer/panels/picture/usePictureFacts.ts';
import type { App } from '../../renderer/state/app.ts';
import { createEngineState } from '../../renderer/state/engineState.ts';
import { createNotices } from '../../renderer/state/notices.ts';
import { createStudyState } from '../../renderer/state/studyState.ts';
import { createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { emptyStudy } from '../../shared-core/study/document.ts';
import { change, changeLook } from '../../shared-core/study/edits.ts';
import type { ColourBy } from '../../shared-core/study/schema.ts';
import { deskWorker } from './deskWorker.ts';

const FILE = `ra,dec,z,mag,name\n${Array.from({ length: 40 }, (_, i) => `${150 + i / 20},3,${0.5 + i / 50},${15 + i},g${i}`).join('\n')}\n`;
/** Rows within a degree of RA 150, Dec 3: dRA cos 3 deg <= 1, so i / 20 <= 1.0014. */
const rowsInside = 21;

async function* bytes(): AsyncIterable<Uint8Array> {
  yield new TextEncoder().encode(FILE);
}

/** The page's state of the engine; `short` of memory when told so. */
function stateOf() {
  const studyState = createStudyState(emptyStudy(), createNotices());
  const source = signal<EngineSource | null>({ kind: 'url', url: 'blob:a', name: 'a.csv', sizeBytes: 1 });
  const memory = { short: false };
  const makeWorker = deskWorker(async () => bytes(), {
    floats: (length) => {
      if (memory.short) throw new RangeError('Array buffer allocation failed');
      return new Float32Array(length);
    },
  });
  const engine = createEngineState(studyState, source, signal<ColourBy | null>(null), makeWorker);
  return { studyState, engine, memory };
}

describe('what the page keeps of the engine', () => {
  it('columns of the galaxies outlast a failure of what does not concern them', async () => {
    const { studyState, engine, memory } = stateOf();
    studyState.perform(changeLook('Colour otherwise', { colourBy: { column: 'mag' } }));
    await expect.poll(() => engine.columns.value.length).toBe(1);
    const [mag] = engine.columns.value;
    memory.short = true;
    const { parameters } = findPublishedSet('wmap9');
    studyState.perform(change('Another cosmology', { cosmology: parameters }));
    await expect.poll(() => engine.failure.value?.stage).toBe('background');
    expect(engine.background.value).toBeNull();
    memory.short = false;
    studyState.undo();
    await expect.poll(() => engine.background.value).not.toBeNull();
    await expect.poll(() => engine.progress.value).toBeNull();
    expect(engine.failure.value).toBeNull();
    expect(engine.columns.value).toEqual([mag]);
  });

  it('a picture is made only of what belongs to the study as it is, from the very edit on', async () => {
    const { studyState, engine } = stateOf();
    const files = { missingSource: signal(null) } as unknown as App['files'];
    const seen: string[] = [];
    const stop = effect(() => {
      if (whyNoPicture({ engine, files }) !== null) return;
      const { region, cosmology } = studyState.study.value;
      const [selected, background] = [engine.selected.value!, engine.background.value!];
      const farthest = background.comovingMpc.at(-1)!;
      const distance = createCosmology(cosmology).comovingMpc(selected.sample.redshift.at(-1)!);
      // Kept as 32-bit numbers: 24 bits, so 6e-8 of each.
      expect(Math.abs(farthest / distance - 1)).toBeLessThan(1e-6);
      seen.push(`${selected.sample.count} ${region === null ? 'everywhere' : 'inside'}`);
    });
    await expect.poll(() => seen.at(-1)).toBe('40 everywhere');
    const region = { parts: [{ kind: 'cap', raDeg: 150, decDeg: 3, radiusDeg: 1 }], holes: [] } as const;
    const inside = `${rowsInside} inside`;
    studyState.perform(change('Observe less', { region }));
    expect(whyNoPicture({ engine, files })).toMatch(/picture follows/);
    await expect.poll(() => seen.at(-1)).toBe(inside);
    const before = seen.length;
    studyState.perform(change('Other distances', { cosmology: findPublishedSet('wmap9').parameters }));
    expect(whyNoPicture({ engine, files })).toMatch(/picture follows/);
    await expect.poll(() => seen.length).toBeGreaterThan(before);
    stop();
    expect([...new Set(seen)]).toEqual(['40 everywhere', inside]);
  });

  it('a given region is the same before and after its galaxies have come', async () => {
    const { studyState, engine } = stateOf();
    const region = { parts: [{ kind: 'cap', raDeg: 150, decDeg: 3, radiusDeg: 5 }], holes: [] } as const;
    studyState.perform(change('Observe a cap', { region }));
    await expect.poll(() => engine.fresh.value && engine.selected.value?.footprint?.origin).toBe('given');
    expect(engine.selected.value!.footprint).toBe(engine.region.value);
    studyState.undo();
    await expect.poll(() => engine.footprint.value?.origin).toBe('estimated');
    expect(engine.region.value).toBeNull();
  });

  it('galaxies never stand beside what belongs to others, between one event and the next either', async () => {
    const { studyState, engine } = stateOf();
    await expect.poll(() => engine.fresh.value).toBe(true);
    const seen: (readonly [number, number | null])[] = [];
    const stop = effect(() => {
      const galaxies = engine.selected.value;
      if (galaxies !== null)
        seen.push([galaxies.sample.count, engine.background.value?.comovingMpc.length ?? null]);
    });
    const region = { parts: [{ kind: 'cap', raDeg: 150, decDeg: 3, radiusDeg: 1 }], holes: [] } as const;
    studyState.perform(change('Observe less', { region }));
    await expect.poll(() => seen.length).toBeGreaterThan(2);
    stop();
    // All with their distances, the fewer without, the fewer with theirs; never all of them without.
    const few = seen.at(-1)![0];
    expect(few).toBeLessThan(40);
    expect(seen).toEqual([
      [40, 40],
      [few, null],
      [few, few],
    ]);
  });

  it('a source that was given up stays so, told, while region and its area follow the study', async () => {
    const { studyState, engine } = stateOf();
    engine.giveUpReading('It was given up.');
    const failure = { stage: 'load', sentence: 'It was given up.' };
    // 2 pi (1 - cos r) sr, in square degrees.
    for (const radiusDeg of [1, 2]) {
      const region = { parts: [{ kind: 'cap', raDeg: 150, decDeg: 3, radiusDeg }], holes: [] } as const;
      studyState.perform(change('Observe', { region }));
      const areaDeg2 = 2 * Math.PI * (1 - Math.cos((radiusDeg * Math.PI) / 180)) * (180 / Math.PI) ** 2;
      await expect.poll(() => engine.footprint.value?.areaDeg2).toBeCloseTo(areaDeg2, 9);
      await expect.poll(() => engine.settled.value).toBe(true);
      expect(engine.failure.value).toEqual(failure);
    }
    const nowhere = { parts: [{ kind: 'cap', raDeg: 150, decDeg: 3, radiusDeg: 200 }], holes: [] } as const;
    studyState.perform(change('Observe nothing', { region: nowhere }));
    await expect.poll(() => engine.failure.value?.stage).toBe('select');
    studyState.perform(change('Observe what there is', { region: null }));
    await expect.poll(() => engine.failure.value).toEqual(failure);
    expect(engine.footprint.value).toBeNull();
    engine.readAgain();
    await expect.poll(() => engine.selected.value?.sample.count).toBe(40);
    expect(engine.failure.value).toBeNull();
  });

  it('what is asked of an engine that is stopped is answered with what to do', async () => {
    const { engine } = stateOf();
    const asked = engine.client.checkRegions([]);
    engine.readAgain();
    await expect(asked).rejects.toThrow(/was stopped before it answered: ask again\.$/);
  });
});
