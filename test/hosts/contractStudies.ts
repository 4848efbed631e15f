import { readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { bytesOf, catalogue, type Stage, textOf } from './contractStage.ts';

/** Studies: read, saved, in two windows, recent, and kept while unsaved. */
export function describeStudies(stage: Stage): void {
  describe('a study', () => {
    const readLaunched = async (window: Bridge) =>
      window.readStudy(window.launch.files.find((file) => file.name === 'deep.study.json')!);

    it('is read with its stamp, saved over itself, and saved again', async () => {
      const study = await readLaunched(stage.bridge);
      expect(textOf(study.bytes)).toBe('{"version":1}');
      const target = study.target!;
      expect(target).toMatchObject({
        name: 'deep.study.json',
        folder: stage.host.folder,
        existing: study.stamp,
      });
      const first = await stage.bridge.saveStudy(target.id, bytesOf('{"version":2}'), study.stamp);
      if (first.kind !== 'saved') throw new Error(`answered ${first.kind}`);
      expect(readFileSync(stage.inFolder('deep.study.json'), 'utf8')).toBe('{"version":2}');
      const second = await stage.bridge.saveStudy(target.id, bytesOf('{"version":3}'), first.stamp);
      expect(second.kind).toBe('saved');
      expect(readFileSync(stage.inFolder('deep.study.json'), 'utf8')).toBe('{"version":3}');
      expect(readdirSync(stage.host.folder).filter((name) => name.includes('part'))).toEqual([]);
    });

    it('picked without a path is found again in the save folder, by name and contents', async () => {
      stage.host.user.picks = [stage.inFolder('deep.study.json')];
      const [file] = await stage.bridge.chooseFiles('study');
      const study = await stage.bridge.readStudy(file!);
      expect(textOf(study.bytes)).toBe('{"version":1}');
      expect(study.target).toMatchObject({ name: 'deep.study.json', folder: stage.host.folder });
    });

    it('is saved under a new name, and answered as it stands', async () => {
      stage.host.user.saveName = 'wide field';
      const target = (await stage.bridge.chooseSaveTarget('study', null))!;
      expect(target).toMatchObject({
        name: 'wide field.study.json',
        folder: stage.host.folder,
        existing: null,
      });
      const outcome = await stage.bridge.saveStudy(target.id, bytesOf('new'), target.existing);
      expect(outcome).toMatchObject({ kind: 'saved', stamp: { sizeBytes: 3 } });
      expect(readFileSync(stage.inFolder('wide field.study.json'), 'utf8')).toBe('new');
    });

    it('is not saved when the user gives up the name', async () => {
      expect(await stage.bridge.chooseSaveTarget('study', null)).toBeNull();
    });

    it('replaces another file only when the user agrees', async () => {
      stage.host.user.saveName = 'deep';
      stage.host.user.mayReplace = false;
      expect(await stage.bridge.chooseSaveTarget('study', null)).toBeNull();
      expect(stage.host.user.asked).toContain('replace deep.study.json');
      stage.host.user.saveName = 'deep';
      stage.host.user.mayReplace = true;
      const target = (await stage.bridge.chooseSaveTarget('study', null))!;
      expect(await stage.bridge.saveStudy(target.id, bytesOf('over'), target.existing)).toMatchObject({
        kind: 'saved',
      });
      expect(readFileSync(stage.inFolder('deep.study.json'), 'utf8')).toBe('over');
    });

    it('in two windows: the second to save is told, and nothing is lost', async () => {
      const other = await stage.host.openWindow();
      const here = await readLaunched(stage.bridge);
      const there = await readLaunched(other);
      await stage.bridge.saveStudy(here.target!.id, bytesOf('from here'), here.stamp);
      const outcome = await other.saveStudy(there.target!.id, bytesOf('from there'), there.stamp);
      if (outcome.kind !== 'conflict') throw new Error(`answered ${outcome.kind}`);
      expect(outcome.sentence).toMatch(
        /^deep\.study\.json was not saved: another window or program changed it/,
      );
      expect(readFileSync(stage.inFolder('deep.study.json'), 'utf8')).toBe('from here');
      // Saving over it all the same is the user's choice, by the stamp that was found.
      const again = await other.saveStudy(there.target!.id, bytesOf('from there'), outcome.found);
      expect(again.kind).toBe('saved');
      expect(readFileSync(stage.inFolder('deep.study.json'), 'utf8')).toBe('from there');
    });

    it('does not replace a file that came under the chosen name meanwhile', async () => {
      stage.host.user.saveName = 'fresh';
      const target = (await stage.bridge.chooseSaveTarget('study', null))!;
      writeFileSync(stage.inFolder('fresh.study.json'), 'of another');
      const outcome = await stage.bridge.saveStudy(target.id, bytesOf('mine'), target.existing);
      expect(outcome).toMatchObject({ kind: 'conflict', found: { sizeBytes: 10 } });
      expect(readFileSync(stage.inFolder('fresh.study.json'), 'utf8')).toBe('of another');
    });

    it('is written anew when its file was removed meanwhile', async () => {
      const study = await readLaunched(stage.bridge);
      rmSync(stage.inFolder('deep.study.json'));
      expect(await stage.bridge.saveStudy(study.target!.id, study.bytes, study.stamp)).toMatchObject({
        kind: 'saved',
      });
      expect(readFileSync(stage.inFolder('deep.study.json'), 'utf8')).toBe('{"version":1}');
    });

    it('whose folder is gone is told in a sentence', async () => {
      const study = await readLaunched(stage.bridge);
      rmSync(stage.host.folder, { recursive: true });
      const outcome = await stage.bridge.saveStudy(study.target!.id, study.bytes, study.stamp);
      expect(outcome).toMatchObject({
        kind: 'failed',
        sentence: expect.stringMatching(/folder .* is not there/),
      });
    });

    it('cannot be saved over a file that was opened for reading', async () => {
      const save = stage.bridge.saveStudy(stage.launched('field.csv').id, bytesOf('x'), null);
      await expect(save).rejects.toThrow(/opened for reading only/);
      expect(readFileSync(stage.inFolder('field.csv'), 'utf8')).toBe(catalogue);
    });

    it('of an unknown id is refused in a sentence', async () => {
      await expect(stage.bridge.saveStudy('0123456789abcdef', bytesOf('x'), null)).rejects.toThrow(
        /open it again/,
      );
      await expect(
        stage.bridge.readStudy({ ...stage.launched('field.csv'), id: '0123456789abcdef' }),
      ).rejects.toThrow(Refusal);
    });

    it('above the largest size is refused before it is sent', async () => {
      const study = await readLaunched(stage.bridge);
      const large = new Uint8Array(64 * 1024 * 1024 + 1);
      await expect(stage.bridge.saveStudy(study.target!.id, large, study.stamp)).rejects.toThrow(
        /at most 64 MB/,
      );
    });
  });

  describe('recent studies', () => {
    it('lists what was opened and saved, newest first, opens and forgets them', async () => {
      stage.host.user.saveName = 'second';
      const target = (await stage.bridge.chooseSaveTarget('study', null))!;
      await stage.bridge.saveStudy(target.id, bytesOf('2'), null);
      const recent = await stage.bridge.recentStudies();
      expect(recent.map(({ name, found }) => ({ name, found }))).toEqual([
        { name: 'second.study.json', found: true },
        { name: 'deep.study.json', found: true },
      ]);
      const file = await stage.bridge.openRecent(recent[0]!.id);
      expect(textOf((await stage.bridge.readStudy(file)).bytes)).toBe('2');

      rmSync(stage.inFolder('deep.study.json'));
      const after = await stage.bridge.recentStudies();
      expect(after.find(({ name }) => name === 'deep.study.json')).toMatchObject({ found: false });
      const gone = after.find(({ name }) => name === 'deep.study.json')!;
      await expect(stage.bridge.openRecent(gone.id)).rejects.toThrow(
        /^deep\.study\.json could not be opened: .*not there/,
      );
      await stage.bridge.forgetRecent(gone.id);
      expect((await stage.bridge.recentStudies()).map(({ name }) => name)).toEqual(['second.study.json']);
      await expect(stage.bridge.openRecent(gone.id)).rejects.toThrow(/not in the list/);
    });
  });

  describe('unsaved work', () => {
    const workId = 'work-0123456789';

    it('is offered once its window is gone, to one window, and not while it lives', async () => {
      const other = await stage.host.openWindow();
      await stage.bridge.keepUnsaved(workId, 'Deep field', bytesOf('first'));
      await stage.bridge.keepUnsaved(workId, 'Deep field', bytesOf('second'));
      expect(await stage.bridge.listUnsaved()).toEqual([]);
      expect(await other.listUnsaved()).toEqual([]);
      await expect(other.takeUnsaved(workId)).rejects.toThrow(/open in another window/);
      await expect(other.dropUnsaved(workId)).rejects.toThrow(/open in another window/);
      await expect(other.keepUnsaved(workId, '', bytesOf('x'))).rejects.toThrow(/open in another window/);

      await stage.host.closeWindow(stage.bridge);
      const third = await stage.host.openWindow();
      expect(await other.listUnsaved()).toEqual([
        { workId, title: 'Deep field', sizeBytes: 6, keptMs: expect.any(Number) },
      ]);
      // Looking at it before choosing leaves it to whoever takes it.
      expect(textOf(await third.lookAtUnsaved(workId))).toBe('second');
      expect(await third.listUnsaved()).toHaveLength(1);
      expect(textOf(await other.takeUnsaved(workId))).toBe('second');
      expect(await third.listUnsaved()).toEqual([]);
      await expect(third.takeUnsaved(workId)).rejects.toThrow(/open in another window/);
      await other.dropUnsaved(workId);
      await stage.host.closeWindow(other);
      expect(await third.listUnsaved()).toEqual([]);
    });

    it('is kept where only the user can read it', async () => {
      await stage.bridge.keepUnsaved(workId, 'Deep field', bytesOf('first'));
      const path = join(stage.host.userFolder, 'unsaved', `${workId}.study.json`);
      expect(readFileSync(path, 'utf8')).toBe('first');
      if (process.platform !== 'win32') expect(statSync(path).mode & 0o777).toBe(0o600);
    });

    it('under a name that would lead elsewhere is refused', async () => {
      for (const id of ['../../secret', 'a/b-0123456789', '', 'x'.repeat(65)])
        await expect(stage.bridge.keepUnsaved(id, '', bytesOf('x'))).rejects.toThrow(/does not fit/);
    });
  });

  it('takes the state of the window', async () => {
    await expect(
      stage.bridge.setWindowState({ title: 'deep field *', unsaved: true }),
    ).resolves.toBeUndefined();
  });
}
