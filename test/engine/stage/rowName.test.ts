import { signal } from '@preact/signals';
import { expect, it } from 'vitest';
import type { GalaxyRow, Loaded } from '../../../renderer/engine/protocol.ts';
import { followRowName } from '../../../renderer/stage/useRowName.ts';
import type { App } from '../../../renderer/state/app.ts';

const at = (line: number) => ({ line }) as GalaxyRow;
const file = (id: string | null = 'id') => ({ mapping: { id } }) as Loaded;
const settle = () => new Promise((resume) => setTimeout(resume, 0));

/** A galaxy picked in a file; names come when the test says so. */
function picked() {
  const asked: { line: number; answer: (name: string | null) => void }[] = [];
  const loaded = signal<Loaded | null>(file());
  const pickedGalaxies = signal<readonly number[]>([0]);
  const row = signal<GalaxyRow | null>(at(7));
  const client = {
    name: (line: number) => new Promise<string | null>((answer) => void asked.push({ line, answer })),
  };
  const app = { engine: { loaded, client }, view: { pickedGalaxies } } as unknown as App;
  return { asked, loaded, pickedGalaxies, row, ...followRowName(app, row) };
}

it("a galaxy's name is of its own file, also where the next file has a row on the same line", async () => {
  const { asked, loaded, name } = picked();
  asked[0]!.answer('NGC 1');
  await settle();
  expect(name.value).toBe('NGC 1');
  loaded.value = file();
  // The row of the other file has another name, which is looked up; meanwhile it has none.
  expect(name.value).toBeNull();
  expect(asked.map(({ line }) => line)).toEqual([7, 7]);
  asked[1]!.answer('UGC 2');
  await settle();
  expect(name.value).toBe('UGC 2');
});

it('an answer that comes after another file was opened, or another galaxy picked, is not shown', async () => {
  const { asked, loaded, row, name } = picked();
  row.value = at(8);
  asked[0]!.answer('of line 7');
  await settle();
  expect(name.value).toBeNull();
  loaded.value = file(null);
  asked[1]!.answer('of line 8');
  await settle();
  expect(name.value).toBeNull();
  // A file without a column of names is not asked.
  expect(asked).toHaveLength(2);
});

it('is looked up once, for picked galaxies alone, and no more after its end', async () => {
  const { asked, pickedGalaxies, row, stop } = picked();
  asked[0]!.answer(null);
  await settle();
  pickedGalaxies.value = [0, 3];
  pickedGalaxies.value = [];
  row.value = at(9);
  expect(asked).toHaveLength(1);
  stop();
  pickedGalaxies.value = [1];
  expect(asked).toHaveLength(1);
});
