import { readdirSync, readFileSync, utimesSync, writeFileSync } from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { UnsavedWorks } from '../../main/files/unsavedWork.ts';
import { temporaryFolder } from './testHost.ts';

const bytesOf = (text: string) => new TextEncoder().encode(text);
const workId = 'work-0123456789';

describe('unsaved work of other programs', () => {
  let root: ReturnType<typeof temporaryFolder>;
  const living = new Set<string>();
  const works = (pid?: number, windows = living) =>
    new UnsavedWorks(root.folder, join(root.folder, 'locks'), windows, pid);
  const file = (ending: string) => join(root.folder, 'unsaved', workId + ending);
  const age = (ending: string, seconds: number) => {
    const then = new Date(Date.now() - seconds * 1000);
    utimesSync(file(ending), then, then);
  };
  const offered = async () => (await works().list()).map((work) => work.workId);

  beforeEach(() => {
    root = temporaryFolder();
  });
  afterEach(() => root.remove());

  it('is not offered while that program lives, and is offered at once when it was killed', async () => {
    // The process that started this one lives as long as it does.
    await works(process.ppid).keep(workId, 'Deep', bytesOf('x'), 'window-1');
    expect(await offered()).toEqual([]);
    // 2^22 is the largest process number of Linux (proc(5), pid_max): no process has the one above.
    await works(2 ** 22 + 1, new Set(['window-1'])).keep(
      'other-0123456789',
      'Deep',
      bytesOf('y'),
      'window-1',
    );
    expect(await offered()).toEqual(['other-0123456789']);
  });

  it('is offered when its process number has gone to another program, which does not say that it lives', async () => {
    await works(process.ppid).keep(workId, 'Deep', bytesOf('x'), 'window-1');
    age('.about.json', 60);
    expect(await offered()).toEqual([workId]);
  });

  it('is not offered while its program says that it lives', async () => {
    const theirs = works(process.ppid, new Set(['window-1']));
    await theirs.keep(workId, 'Deep', bytesOf('x'), 'window-1');
    age('.about.json', 60);
    await theirs.beat();
    expect(await offered()).toEqual([]);
  });

  it('of a killed program with the number that this one has now is offered', async () => {
    await works(process.pid, new Set(['window-1'])).keep(workId, 'Deep', bytesOf('x'), 'window-1');
    expect(await offered()).toEqual([workId]);
  });

  it('on another machine of a shared home folder is judged by its time alone', async () => {
    await works(process.pid).keep(workId, 'Deep', bytesOf('x'), 'window-1');
    const about = JSON.parse(readFileSync(file('.about.json'), 'utf8'));
    about.owner.host = `not-${hostname()}`;
    writeFileSync(file('.about.json'), JSON.stringify(about));
    expect(await offered()).toEqual([]);
    age('.about.json', 60);
    expect(await offered()).toEqual([workId]);
  });

  it('is offered without a title when its note is lost or broken', async () => {
    await works(process.ppid).keep(workId, 'Deep', bytesOf('x'), 'window-1');
    writeFileSync(file('.about.json'), '{"version":1,"tit');
    expect(await works().list()).toEqual([{ workId, title: '', sizeBytes: 1, keptMs: expect.any(Number) }]);
    expect(Buffer.from(await works().take(workId, 'window-2')).toString()).toBe('x');
  });

  it('leaves foreign files in its folder alone, and lists none of them', async () => {
    await works(2 ** 22 + 1).keep(workId, 'Deep', bytesOf('x'), 'window-1');
    writeFileSync(join(root.folder, 'unsaved', 'notes.txt'), 'mine');
    writeFileSync(join(root.folder, 'unsaved', 'not an id.study.json'), 'mine');
    expect(await offered()).toEqual([workId]);
    await works().drop(workId, 'window-2');
    expect(readdirSync(join(root.folder, 'unsaved')).sort()).toEqual(['not an id.study.json', 'notes.txt']);
  });

  it('lists the newest first', async () => {
    for (const [index, id] of ['first-01234567', 'second-01234567'].entries()) {
      await works(2 ** 22 + 1).keep(id, id, bytesOf(id), 'window-1');
      const then = new Date(2026, 0, index + 1);
      utimesSync(join(root.folder, 'unsaved', `${id}.study.json`), then, then);
    }
    expect(await offered()).toEqual(['second-01234567', 'first-01234567']);
  });
});
