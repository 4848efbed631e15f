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
  const bridge = {
    hostKind: 'local',
    saveFolder: '/',
    launch: { files: [], troubles: [] },
    chooseSaveTarget: async () => target('a'),
    saveStudy: async (id: string, bytes: Uint8Array, expected: { sizeBytes: number } | null) => {
      log.push(`save ${id} ${text(bytes)} expecting ${expected?.sizeBytes ?? 'nothing'}`);
      if (gate.slow) await new Promise<void>((resume) => (release = resume));
      return { kind: 'saved', stamp: stamp(++saves) };
    },
    recentStudies: async () => [],
    listUnsaved: async () => [],
    keepUnsaved: async (_: string, title: string) => void log.push(`keep ${title}`),
    takeUnsaved: async () => new TextEncoder().encode(writeStudy(emptyStudy('found again'))),
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
    askLeave: async () => 'leave',
    askReplace: async () => 'stay',
  });
  const rename = (name: string) => studyState.perform(change('Rename', { name }));
  return { log, files, studyState, rename, gate, release: () => release() };
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
    expect(log).toEqual(['keep found again', 'drop old']);
  });
});
