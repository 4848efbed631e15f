import { describe, expect, it, vi } from 'vitest';
import { createFileState } from '../../renderer/state/fileState.ts';
import { createNotices } from '../../renderer/state/notices.ts';
import { createStudyState } from '../../renderer/state/studyState.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { emptyStudy, writeStudy } from '../../shared-core/study/document.ts';
import { change, changeLook } from '../../shared-core/study/edits.ts';

const stamp = (n: number) => ({ sizeBytes: n, modifiedMs: n, sha256: String(n).padStart(64, '0') });
const target = (id: string) => ({ id, name: `${id}.study.json`, folder: '/', existing: null });
const text = (bytes: Uint8Array) => JSON.parse(new TextDecoder().decode(bytes)).name as string;

/** A bridge that writes down what it is asked, and saves as slowly as the test likes. */
function deskOf() {
  const log: string[] = [];
  let saves = 0;
  let release = () => {};
  const gate = { slow: false };
  const person = {
    name: 'a',
    other: 'stay' as 'stay' | 'replace' | 'saveAs',
    leave: 'leave' as 'leave' | 'stay',
  };
  const lost = new TextEncoder().encode(writeStudy(emptyStudy('found again')));
  const bridge = {
    hostKind: 'local',
    saveFolder: '/',
    launch: { files: [], troubles: [] },
    chooseSaveTarget: async (suggested: string, openedSha256: string | null) => {
      if (person.name !== 'a')
        log.push(`name ${suggested}, ${openedSha256 === null ? 'none' : 'one'} opened`);
      return target(person.name);
    },
    saveStudy: async (id: string, bytes: Uint8Array, expected: { sizeBytes: number } | null) => {
      log.push(`save ${id} ${text(bytes)} expecting ${expected?.sizeBytes ?? 'nothing'}`);
      if (gate.slow) await new Promise<void>((resume) => (release = resume));
      return { kind: 'saved', stamp: stamp(++saves) };
    },
    recentStudies: async () => [],
    listUnsaved: async () => [{ workId: 'old', title: 'found again', keptMs: 0, sizeBytes: lost.length }],
    keepUnsaved: async (_: string, title: string) => void log.push(`keep ${title}`),
    lookAtUnsaved: async () => lost,
    takeUnsaved: async (id: string) => {
      log.push(`take ${id}`);
      return lost;
    },
    dropUnsaved: async (id: string) => void log.push(id === 'old' ? 'drop old' : 'drop mine'),
    setWindowState: async () => undefined,
    onCloseRequest: () => () => undefined,
  } as unknown as Bridge;
  const notices = createNotices();
  const studyState = createStudyState(emptyStudy('one'), notices);
  const files = createFileState({
    bridge,
    notices,
    studyState,
    askLeave: async () => person.leave,
    askReplace: async () => 'stay',
    askOther: async ({ file, catalogue }) => {
      log.push(`ask ${file} ${catalogue}`);
      return person.other;
    },
  });
  const rename = (name: string) => studyState.perform(change('Rename', { name }));
  return { log, files, studyState, rename, gate, person, release: () => release() };
}
const settle = () => new Promise((resume) => setTimeout(resume, 5));

describe('saving', () => {
  it('two saves in a row expect each other, and an edit made meanwhile stays unsaved', async () => {
    const { log, files, rename, studyState, gate, release } = deskOf();
    rename('first');
    gate.slow = true;
    const first = files.save();
    await settle();
    rename('second');
    const second = files.save();
    await settle();
    expect(log).toEqual(['save a first expecting nothing']);
    release();
    await first;
    await settle();
    expect(studyState.unsaved.value).toBe(true);
    release();
    await second;
    expect(log).toEqual(['save a first expecting nothing', 'save a second expecting 1']);
    expect(studyState.unsaved.value).toBe(false);
  });

  it('a save that ends after another study was opened leaves that study its own place', async () => {
    const { files, rename, gate, release } = deskOf();
    rename('first');
    gate.slow = true;
    const saving = files.save();
    await settle();
    await files.newStudy();
    release();
    await saving;
    expect(files.target.value).toBeNull();
  });
});

const named = (name: string, path: string | null = `/${name}`, sizeBytes = 10) => ({
  id: `id of ${name} ${sizeBytes}`,
  name,
  sizeBytes,
  modifiedMs: 0,
  path,
  url: `blob:${name} ${sizeBytes}`,
});

describe('another catalogue opened in a saved study', () => {
  async function savedThenOther(path?: null) {
    const desk = deskOf();
    await desk.files.openFiles([named('deep.csv', path)]);
    desk.rename('My deep field');
    await desk.files.save();
    await desk.files.openFiles([named('other.csv', path)]);
    desk.log.length = 0;
    return desk;
  }

  it.each([undefined, null])('never goes into its file without a question (path %s)', async (path) => {
    const { log, files, studyState } = await savedThenOther(path);
    expect(studyState.study.value.name).toBe('other');
    expect(await files.save()).toBe(false);
    expect(log).toEqual(['ask a.study.json other.csv']);
    expect(studyState.unsaved.value).toBe(true);
  });

  it('goes under a name of its own, and undo brings back the study that goes into its own file', async () => {
    const { log, files, studyState, person } = await savedThenOther();
    Object.assign(person, { other: 'saveAs', name: 'b' });
    expect(await files.save()).toBe(true);
    await files.save();
    studyState.undo();
    expect(studyState.study.value.name).toBe('My deep field');
    await files.save();
    studyState.redo();
    await files.save();
    expect(log).toEqual([
      'ask a.study.json other.csv',
      'name other, none opened',
      'save b other expecting nothing',
      'save b other expecting 2',
      'save a My deep field expecting 1',
      'save b other expecting 3',
    ]);
  });

  it('taken back before it was saved leaves no trace', async () => {
    const { log, files, studyState } = await savedThenOther();
    studyState.undo();
    await files.save();
    expect(log).toEqual(['save a My deep field expecting 1']);
  });

  it('replaces it where that is chosen, and then it is the other way about', async () => {
    const { log, files, studyState, person } = await savedThenOther();
    person.other = 'replace';
    await files.save();
    await files.save();
    person.other = 'stay';
    studyState.undo();
    await files.save();
    expect(log).toEqual([
      'ask a.study.json other.csv',
      'save a other expecting 1',
      'save a other expecting 2',
      'ask a.study.json deep.csv',
    ]);
  });

  it('is told from its own, pointed at, read or accepted', async () => {
    const { log, files } = deskOf();
    await files.openFiles([named('deep.csv', null)]);
    await files.save();
    files.noteFingerprint('a'.repeat(64));
    await files.save();
    files.acceptChanged({ sizeBytes: 12, sha256: 'c'.repeat(64) });
    await files.save();
    expect(log.filter((line) => line.startsWith('ask'))).toEqual([]);
    await files.openFiles([named('deep.csv', null, 12)]);
    await files.save();
    expect(log.at(-1)).toBe('ask a.study.json deep.csv');
  });

  it('leaves a name that was typed since and is in no file yet', async () => {
    const { files, studyState, rename } = deskOf();
    const name = () => studyState.study.value.name;
    await files.openFiles([named('deep.csv')]);
    expect(name()).toBe('deep');
    await files.openFiles([named('other.csv')]);
    expect(name()).toBe('other');
    rename('Mine');
    await files.openFiles([named('third.csv')]);
    expect(name()).toBe('Mine');
    studyState.undo();
    expect(name()).toBe('Mine');
    studyState.undo();
    studyState.undo();
    expect(name()).toBe('deep');
  });
});

describe('files of one name, as a browser gives them', () => {
  const picked = (url: string, sizeBytes: number) => ({
    id: url,
    name: 'survey.csv',
    sizeBytes,
    modifiedMs: 0,
    path: null,
    url,
  });
  const url = (files: ReturnType<typeof deskOf>['files']) => {
    const source = files.engineSource.value;
    return source?.kind === 'url' ? source.url : null;
  };

  it.each([
    ['another size', 20],
    ['the same size', 10],
  ])('and %s are two files: undo brings the first back, redo the second', async (_, sizeBytes) => {
    const { files, studyState } = deskOf();
    await files.openFiles([picked('blob:first', 10)]);
    files.noteFingerprint('a'.repeat(64));
    expect(url(files)).toBe('blob:first');
    await files.openFiles([picked('blob:second', sizeBytes)]);
    expect(url(files)).toBe('blob:second');
    files.noteFingerprint('b'.repeat(64));
    studyState.undo();
    expect(url(files)).toBe('blob:first');
    expect(studyState.study.value.source).toMatchObject({ sizeBytes: 10, sha256: 'a'.repeat(64) });
    studyState.redo();
    expect(url(files)).toBe('blob:second');
    expect(files.missingSource.value).toBeNull();
  });

  it('a changed file that is accepted is still that file, and so it is after undo', async () => {
    const { files, studyState } = deskOf();
    await files.openFiles([picked('blob:first', 10)]);
    files.noteFingerprint('a'.repeat(64));
    files.acceptChanged({ sizeBytes: 12, sha256: 'c'.repeat(64) });
    expect(url(files)).toBe('blob:first');
    expect(studyState.study.value.source).toMatchObject({ sizeBytes: 12, sha256: 'c'.repeat(64) });
    studyState.undo();
    expect(url(files)).toBe('blob:first');
  });

  it("one's own catalogue is not coloured by a column of the demo's, another one keeps its own", async () => {
    const { files, studyState } = deskOf();
    await files.openDemo();
    const colour = (column: string) => studyState.perform(changeLook('Colour', { colourBy: { column } }));
    colour('made-up');
    await files.openFiles([picked('blob:first', 10)]);
    expect(studyState.study.value.look.colourBy).toBe('redshift');
    studyState.undo();
    expect(studyState.study.value.look.colourBy).toEqual({ column: 'made-up' });
    studyState.redo();
    colour('Mag');
    await files.openFiles([picked('blob:second', 20)]);
    expect(studyState.study.value.look.colourBy).toEqual({ column: 'Mag' });
  });

  it('a catalogue keeps the region and shells of a plan, not those of another catalogue', async () => {
    const { files, studyState } = deskOf();
    const cap = { kind: 'cap' as const, raDeg: 150.1, decDeg: 2.2, radiusDeg: 1.5 };
    const plan = { region: { parts: [cap], holes: [] }, edges: [0.8, 1.2, 1.6] };
    studyState.perform(change('Plan', plan));
    await files.openFiles([picked('blob:first', 10)]);
    expect(studyState.study.value).toMatchObject(plan);
    await files.openFiles([picked('blob:second', 20)]);
    expect(studyState.study.value).toMatchObject({ region: null, edges: [] });
  });

  it('what was open before the present catalogue is known, with all that was done to it', async () => {
    const { files, studyState, rename } = deskOf();
    expect(files.beforeOpening.value).toBeNull();
    await files.openFiles([picked('blob:first', 10)]);
    rename('named');
    const before = studyState.study.value;
    await files.openFiles([picked('blob:second', 20)]);
    rename('meanwhile');
    expect(files.beforeOpening.value).toBe(before);
    studyState.backTo(before);
    expect(studyState.study.value).toBe(before);
    expect(url(files)).toBe('blob:first');
  });
});

describe('work that is not saved', () => {
  it('is kept while changes go on, not only once they stop', async () => {
    vi.useFakeTimers();
    try {
      const { log, rename } = deskOf();
      for (let i = 0; i < 8; i++) {
        rename(`edit ${i}`);
        await vi.advanceTimersByTimeAsync(1000);
      }
      expect(log.filter((l) => l.startsWith('keep'))).not.toEqual([]);
    } finally {
      vi.useRealTimers();
    }
  });

  it('taken up again is kept under the new window before the old copy goes', async () => {
    const { log, files, studyState } = deskOf();
    await files.takeOffered('old');
    expect(studyState.study.value.name).toBe('found again');
    expect(log).toEqual(['take old', 'keep found again', 'drop old']);
    expect(files.offered.value).toEqual([]);
  });

  it('stays on offer to every window while the person stays with what is open', async () => {
    const { log, files, studyState, rename, person } = deskOf();
    rename('mine');
    person.leave = 'stay';
    await files.takeOffered('old');
    expect(studyState.study.value.name).toBe('mine');
    expect(log).toEqual([]);
    expect(files.offered.value.map(({ workId }) => workId)).toEqual(['old']);
    person.leave = 'leave';
    await files.takeOffered('old');
    expect(studyState.study.value.name).toBe('found again');
  });
});
