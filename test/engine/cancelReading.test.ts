import { expect, it } from 'vitest';
import { createApp } from '../../renderer/state/app.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { change } from '../../shared-core/study/edits.ts';
import { deskWorker } from './deskWorker.ts';

const FILE = 'ra,dec,z,zphot\n150,3,0.5,0.6\n151,3,0.7,0.8\n';
const MAPPING = {
  ra: 'ra',
  dec: 'dec',
  radial: { column: 'zphot', kind: 'redshift' },
  weight: null,
  magnitude: null,
  id: null,
} as const;

/** The window's state; files come at once until the disk sleeps, and then not before they are given up. */
function appWith() {
  const disk = { asleep: false, asked: 0 };
  async function* bytes(signal?: AbortSignal): AsyncIterable<Uint8Array> {
    disk.asked++;
    if (disk.asleep)
      await new Promise((_, reject) => signal?.addEventListener('abort', () => reject(new Error('aborted'))));
    yield new TextEncoder().encode(FILE);
  }
  const bridge = {
    hostKind: 'local',
    launch: { files: [], troubles: [] },
    recentStudies: async () => [],
    listUnsaved: async () => [],
    keepUnsaved: async () => undefined,
    dropUnsaved: async () => undefined,
    setWindowState: async () => undefined,
    onCloseRequest: () => () => undefined,
    onHostLost: () => () => undefined,
  } as unknown as Bridge;
  const makeWorker = deskWorker(async (_, signal) => bytes(signal));
  const app = createApp(bridge, { theme: 'dark', makeWorker });
  const open = (name: string) =>
    app.files.openFiles([{ id: name, name, sizeBytes: FILE.length, modifiedMs: 0, path: null, url: name }]);
  return { app, disk, open };
}

it('a file read again for other columns, and given up, stays open with the columns of before', async () => {
  const { app, disk, open } = appWith();
  const { studyState, engine } = app;
  await open('a.csv');
  await expect.poll(() => engine.selected.value?.sample.redshift[0]).toBe(0.5);
  await expect.poll(() => engine.progress.value).toBeNull();
  studyState.perform(change('Name it', { name: 'mine' }));
  const before = studyState.study.value;
  disk.asleep = true;
  studyState.perform(change('Choose columns', { mapping: MAPPING }));
  studyState.perform(change('Meanwhile', { name: 'other' }));
  await expect.poll(() => engine.progress.value?.stage).toBe('load');
  expect(app.cancelReading()).toBe(true);
  expect(studyState.study.value).toBe(before);
  await expect.poll(() => engine.progress.value).toBeNull();
  expect(engine.selected.value?.sample.redshift[0]).toBe(0.5);
  expect(disk.asked).toBe(2);
  expect(app.notices.list.value.at(-1)?.sentence).toMatch(/cancelled: everything is as it was before/);
});

it('another file given up leaves the one of before', async () => {
  const { app, disk, open } = appWith();
  await open('a.csv');
  await expect.poll(() => app.engine.progress.value === null && app.engine.fresh.value).toBe(true);
  const before = app.studyState.study.value;
  disk.asleep = true;
  await open('b.csv');
  await expect.poll(() => app.engine.progress.value?.stage).toBe('load');
  expect(app.cancelReading()).toBe(true);
  expect(app.studyState.study.value).toBe(before);
  expect(app.studyState.study.value.source).toMatchObject({ name: 'a.csv' });
});
