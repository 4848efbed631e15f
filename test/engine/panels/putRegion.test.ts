import { expect, it } from 'vitest';
import { putRegion } from '../../../renderer/panels/region/putRegion.ts';
import type { App } from '../../../renderer/state/app.ts';
import { createNotices } from '../../../renderer/state/notices.ts';
import { createStudyState } from '../../../renderer/state/studyState.ts';
import type { Region } from '../../../shared-core/sky/region.ts';
import { emptyStudy } from '../../../shared-core/study/document.ts';

const cap = (radiusDeg: number): Region => ({
  parts: [{ kind: 'cap', raDeg: 10, decDeg: 5, radiusDeg }],
  holes: [],
});

/** A study, and an engine that answers when it is told to. */
function deskWith() {
  const studyState = createStudyState(emptyStudy(), createNotices());
  const asked: {
    resolve(why: string | null): void;
    reject(error: Error): void;
  }[] = [];
  const checkRegions = () => new Promise<string | null>((resolve, reject) => asked.push({ resolve, reject }));
  const app = {
    studyState,
    engine: { client: { checkRegions } },
  } as unknown as App;
  return { app, asked, region: () => studyState.study.value.region };
}

it('a region is taken once the engine has found that it can be, and can be taken back', async () => {
  const { app, asked, region } = deskWith();
  const taken = putRegion(app, { from: null, next: cap(1), label: 'Add' });
  expect(region()).toBeNull();
  asked[0]!.resolve(null);
  expect(await taken).toBeNull();
  expect(region()).toEqual(cap(1));
  expect(await putRegion(app, { from: region(), next: null, label: 'Clear' })).toBeNull();
  expect(region()).toBeNull();
  app.studyState.undo();
  expect(region()).toEqual(cap(1));
  // To give a region up nobody is asked.
  expect(asked).toHaveLength(1);
});

it('a region that cannot be, or about which the engine cannot answer, changes nothing and says why', async () => {
  const { app, asked, region } = deskWith();
  const refused = putRegion(app, { from: null, next: cap(200), label: 'Add' });
  asked[0]!.resolve('A cap of 200 deg is none.');
  expect(await refused).toBe('A cap of 200 deg is none.');
  const dead = putRegion(app, { from: null, next: cap(1), label: 'Add' });
  asked[1]!.reject(new Error('It was stopped: ask again.'));
  expect(await dead).toBe('It was stopped: ask again.');
  expect(region()).toBeNull();
});

it('of two that came at once the first is taken, and the second told', async () => {
  const { app, asked, region } = deskWith();
  const edit = { from: null, next: cap(1), label: 'Add' };
  const both = [putRegion(app, edit), putRegion(app, { ...edit, next: cap(2) })];
  for (const { resolve } of asked) resolve(null);
  expect(await Promise.all(both)).toEqual([null, expect.stringMatching(/changed in the meantime: look/)]);
  expect(region()).toEqual(cap(1));
});

it('one that is not wanted any more when the answer comes is not taken', async () => {
  const { app, asked, region } = deskWith();
  const wanted = new AbortController();
  const taken = putRegion(app, { from: null, next: cap(1), label: 'Add' }, wanted.signal);
  wanted.abort();
  asked[0]!.resolve(null);
  expect(await taken).toBeNull();
  expect(region()).toBeNull();
});
