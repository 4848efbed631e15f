import { createHash } from 'node:crypto';
import { mkdirSync, readdirSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { bytesOf, catalogue, type Stage, textOf } from './contractStage.ts';
import { DroppedFile } from './desktopTestHost.ts';

/** What the user gives and gets: files chosen, sources found, exports. */
export function describeFiles(stage: Stage): void {
  describe('choosing files', () => {
    it('opens what the user picks', async () => {
      stage.host.user.picks = [stage.inFolder('field.csv')];
      const [file] = await stage.bridge.chooseFiles('catalogue');
      expect(file).toMatchObject({ name: 'field.csv', sizeBytes: 31 });
      const response = file!.path === null ? await fetch(file!.url) : await stage.host.load(file!.url);
      expect(await response.text()).toBe(catalogue);
      stage.bridge.releaseFile(file!);
    });

    it('answers none when the user gives up', async () => {
      expect(await stage.bridge.chooseFiles('study')).toEqual([]);
    });

    it('opens what the user drops', async () => {
      const dropped = new DroppedFile(stage.inFolder('field.csv'), bytesOf(catalogue));
      const [file] = await stage.bridge.adoptDropped([dropped]);
      expect(file).toMatchObject({ name: 'field.csv', sizeBytes: 31 });
    });

    it('tells the fingerprint of a file', async () => {
      // FIPS 180-4, example of SHA-256 for "abc" (csrc.nist.gov, Secure Hashing example values).
      const abc = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';
      writeFileSync(stage.inFolder('abc.csv'), 'abc');
      stage.host.user.picks = [stage.inFolder('abc.csv')];
      const [file] = await stage.bridge.chooseFiles('catalogue');
      expect(await stage.bridge.fingerprint(file!)).toMatchObject({ sizeBytes: 3, sha256: abc });
      const named = await stage.bridge.fingerprint(stage.launched('field.csv'));
      expect(named.sha256).toBe(createHash('sha256').update(catalogue).digest('hex'));
    });
  });

  describe('the source of a study', () => {
    const reference = (name: string, path: string | null = null) => ({
      name,
      path,
      sizeBytes: null,
      studyId: stage.launched('deep.study.json').id,
    });

    it('is found beside the study by its bare name', async () => {
      writeFileSync(stage.inFolder('beside.csv'), 'x');
      expect(await stage.bridge.locateSource(reference('beside.csv'))).toMatchObject({
        path: stage.inFolder('beside.csv'),
      });
    });

    it('is found where the user gave that very file before', async () => {
      const source = { ...reference('field.csv', stage.inFolder('field.csv')), studyId: null };
      expect(await stage.bridge.locateSource(source)).toMatchObject({ path: stage.inFolder('field.csv') });
    });

    it('of two is the one of the remembered size', async () => {
      const elsewhere = join(stage.rootFolder, 'given');
      mkdirSync(elsewhere);
      writeFileSync(join(elsewhere, 'empty.csv'), 'not empty');
      stage.host.user.picks = [join(elsewhere, 'empty.csv')];
      const path = stage.launched('field.csv').path;
      expect(
        await stage.bridge.locateSource({ ...reference('empty.csv', path), sizeBytes: 31 }),
      ).toMatchObject({
        path,
      });
      expect(
        await stage.bridge.locateSource({ ...reference('empty.csv', path), sizeBytes: 0 }),
      ).toMatchObject({
        path: stage.inFolder('empty.csv'),
      });
    });

    it('is not read from anywhere else, whatever a study says', async () => {
      const secret = join(stage.rootFolder, 'secret.txt');
      symlinkSync(secret, stage.inFolder('link.csv'));
      writeFileSync(stage.inFolder('.hidden.csv'), 'x');
      mkdirSync(stage.inFolder('folder.csv'));
      for (const source of [
        reference('secret.txt', secret),
        reference('../secret.txt'),
        reference('..\\secret.txt'),
        reference(secret),
        reference('link.csv'),
        reference('.hidden.csv'),
        reference('folder.csv'),
        reference('..'),
        reference(''),
        reference('field.csv', `${stage.host.folder}/../secret.txt`),
        { ...reference('secret.txt', secret), studyId: null },
        { ...reference('beside.csv'), studyId: '0123456789abcdef' },
      ]) {
        const found = await stage.bridge.locateSource(source);
        expect([source, found?.path ?? null]).toEqual([
          source,
          found === null ? null : stage.inFolder('field.csv'),
        ]);
      }
    });
  });

  describe('exporting', () => {
    it('writes a file whole', async () => {
      const outcome = await stage.bridge.exportFile('ledger.csv', 'text/csv', bytesOf('z,n\n'));
      expect(outcome).toMatchObject({ name: 'ledger.csv' });
      expect(textOf((await stage.host.exported('ledger.csv'))!)).toBe('z,n\n');
    });

    it('writes pieces, also larger than one message', async () => {
      const large = new Uint8Array(9 * 1024 * 1024).map((_, index) => index % 251);
      async function* pieces() {
        yield bytesOf('head');
        yield large;
        yield new Uint8Array(0);
      }
      await stage.bridge.exportFile('cone.png', 'image/png', pieces());
      const written = (await stage.host.exported('cone.png'))!;
      expect(written.length).toBe(4 + large.length);
      expect(Buffer.from(written.subarray(4)).equals(Buffer.from(large))).toBe(true);
    });

    it('that is cancelled leaves nothing, and the file before it as it was', async () => {
      await stage.bridge.exportFile('cone.png', 'image/png', bytesOf('old'));
      async function* cancelled() {
        yield bytesOf('half');
        throw new Refusal('cancelled');
      }
      await expect(stage.bridge.exportFile('cone.png', 'image/png', cancelled())).rejects.toThrow(
        'cancelled',
      );
      expect(textOf((await stage.host.exported('cone.png'))!)).toBe('old');
      expect(readdirSync(stage.host.folder).filter((name) => name.startsWith('.'))).toEqual([]);
    });
  });
}
