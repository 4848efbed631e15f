import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { basename, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { DroppedFile } from './desktopTestHost.ts';
import { pageHeaderNames, type TestHost, type TestHostOptions, temporaryFolder } from './testHost.ts';

const bytesOf = (text: string) => new TextEncoder().encode(text);
const textOf = (bytes: Uint8Array) => new TextDecoder().decode(bytes);
const catalogue = 'ra,dec,z\n10,20,0.50\n11,21,0.60\n';

/** Everything that both hosts must do alike, run over a host of either kind. */
export function describeHost(open: (options: TestHostOptions) => Promise<TestHost>): void {
  let root: ReturnType<typeof temporaryFolder>;
  let host: TestHost;
  let bridge: Bridge;
  const inFolder = (name: string) => join(host.folder, name);

  beforeEach(async () => {
    root = temporaryFolder();
    const folder = join(root.folder, 'studies');
    const windowFolder = join(root.folder, 'window');
    mkdirSync(join(windowFolder, 'assets'), { recursive: true });
    mkdirSync(folder);
    writeFileSync(join(windowFolder, 'index.html'), '<!doctype html><title>window</title>');
    writeFileSync(join(windowFolder, 'assets', 'app.js'), 'export {};');
    writeFileSync(join(folder, 'field.csv'), catalogue);
    writeFileSync(join(folder, 'empty.csv'), '');
    writeFileSync(join(folder, 'deep.study.json'), '{"version":1}');
    writeFileSync(join(root.folder, 'secret.txt'), 'not for windows');
    host = await open({
      folder,
      userFolder: join(root.folder, 'own'),
      windowFolder,
      launchPaths: [
        join(folder, 'field.csv'),
        join(folder, 'empty.csv'),
        join(folder, 'deep.study.json'),
        join(folder, 'missing.csv'),
      ],
    });
    bridge = await host.openWindow();
  });

  afterEach(async () => {
    await host.close();
    root.remove();
  });

  const launched = (name: string) => bridge.launch.files.find((file) => file.name === name)!;

  describe('files named on the command line', () => {
    it('are described, and one that is not there is told in a sentence', () => {
      expect(bridge.hostKind).toBe(host.kind);
      expect(bridge.launch.files.map(({ name, sizeBytes, path }) => ({ name, sizeBytes, path }))).toEqual([
        { name: 'field.csv', sizeBytes: catalogue.length, path: inFolder('field.csv') },
        { name: 'empty.csv', sizeBytes: 0, path: inFolder('empty.csv') },
        { name: 'deep.study.json', sizeBytes: 13, path: inFolder('deep.study.json') },
      ]);
      expect(bridge.launch.troubles).toEqual([
        expect.stringMatching(/^missing\.csv could not be opened: .*\.$/),
      ]);
    });

    it('are the same for a second window', async () => {
      const second = await host.openWindow();
      expect(second.launch.files.map((file) => file.name)).toEqual([
        'field.csv',
        'empty.csv',
        'deep.study.json',
      ]);
    });
  });

  describe('the address of a file', () => {
    const load = (range?: string, name = 'field.csv', method = 'GET') =>
      host.load(launched(name).url, { method, headers: range === undefined ? {} : { range } });

    it('streams the whole file', async () => {
      const response = await load();
      expect(response.status).toBe(200);
      expect(response.headers.get('content-length')).toBe(String(catalogue.length));
      expect(response.headers.get('accept-ranges')).toBe('bytes');
      expect(await response.text()).toBe(catalogue);
    });

    // Ranges as RFC 9110, section 14.1.2, describes them.
    it.each([
      ['bytes=0-2', 'ra,', 'bytes 0-2/31'],
      ['bytes=3-', catalogue.slice(3), 'bytes 3-30/31'],
      ['bytes=-4', catalogue.slice(-4), 'bytes 27-30/31'],
      ['bytes=-1000', catalogue, 'bytes 0-30/31'],
      ['bytes=30-1000', '\n', 'bytes 30-30/31'],
    ])('answers %s in part', async (range, text, contentRange) => {
      expect(catalogue.length).toBe(31);
      const response = await load(range);
      expect(response.status).toBe(206);
      expect(response.headers.get('content-range')).toBe(contentRange);
      expect(response.headers.get('content-length')).toBe(String(text.length));
      expect(await response.text()).toBe(text);
    });

    it.each(['bytes=31-', 'bytes=1000-2000', 'bytes=-0'])('says that %s lies outside', async (range) => {
      const response = await load(range);
      expect(response.status).toBe(416);
      expect(response.headers.get('content-range')).toBe('bytes */31');
      expect(await response.text()).toBe('');
    });

    it.each(['bytes=0-1,4-5', 'bytes=5-2', 'bytes=', 'bytes=-', 'lines=0-1', 'bytes=a-b'])(
      'answers %s, no single range, with the whole file',
      async (range) => {
        const response = await load(range);
        expect(response.status).toBe(200);
        expect(await response.text()).toBe(catalogue);
      },
    );

    it('answers an empty file, and no range of it', async () => {
      const whole = await load(undefined, 'empty.csv');
      expect([whole.status, whole.headers.get('content-length'), await whole.text()]).toEqual([200, '0', '']);
      expect((await load('bytes=0-', 'empty.csv')).status).toBe(416);
    });

    it('answers HEAD without contents', async () => {
      const response = await load(undefined, 'field.csv', 'HEAD');
      expect([response.status, response.headers.get('content-length')]).toEqual([200, '31']);
      expect(await response.text()).toBe('');
    });

    it('answers a part only of the contents that a reader began with', async () => {
      const etag = (await load()).headers.get('etag')!;
      const part = (ifRange: string) =>
        host.load(launched('field.csv').url, { headers: { range: 'bytes=0-1', 'if-range': ifRange } });
      expect((await part(etag)).status).toBe(206);
      writeFileSync(inFolder('field.csv'), `${catalogue}12,22,0.7\n`);
      expect((await part(etag)).status).toBe(200);
    });

    it('says so when the file is gone', async () => {
      rmSync(inFolder('field.csv'));
      const response = await load();
      expect(response.status).toBe(410);
      expect(await response.text()).toMatch(/not there any more/);
    });
  });

  describe("the window's own place", () => {
    it('answers the page and its parts, every answer with the headers that isolate it', async () => {
      const answers = [
        ['', 200],
        ['index.html', 200],
        ['assets/app.js', 200],
        ['assets', 404],
        ['assets/', 404],
        ['nothing.html', 404],
        ['files/0123456789abcdef', 404],
        ['files/', 404],
      ] as const;
      for (const [path, status] of answers) {
        const response = await host.load(host.windowUrl(path));
        expect([path, response.status]).toEqual([path, status]);
        for (const name of pageHeaderNames)
          expect([path, name, response.headers.has(name)]).toEqual([path, name, true]);
        expect(response.headers.get('cross-origin-opener-policy')).toBe('same-origin');
        expect(response.headers.get('cross-origin-embedder-policy')).toBe('require-corp');
        await response.body?.cancel();
      }
    });

    it.each([
      '..%2fsecret.txt',
      '..%2f..%2fsecret.txt',
      '%2e%2e/secret.txt',
      'assets/..%2f..%2fsecret.txt',
      'assets/..%5c..%5csecret.txt',
      'files/..%2f..%2fsecret.txt',
      '%2fetc%2fpasswd',
      'index.html%00.js',
    ])('does not lead out of itself by %s', async (path) => {
      const response = await host.load(host.windowUrl(path));
      expect(response.status).toBe(404);
      expect(await response.text()).not.toMatch(/not for windows|root:/);
    });

    it('changes nothing by other methods', async () => {
      const response = await host.load(host.windowUrl('index.html'), { method: 'DELETE' });
      expect(response.status).toBe(405);
    });
  });

  describe('choosing files', () => {
    it('opens what the user picks', async () => {
      host.user.picks = [inFolder('field.csv')];
      const [file] = await bridge.chooseFiles('catalogue');
      expect(file).toMatchObject({ name: 'field.csv', sizeBytes: 31 });
      const response = file!.path === null ? await fetch(file!.url) : await host.load(file!.url);
      expect(await response.text()).toBe(catalogue);
      bridge.releaseFile(file!);
    });

    it('answers none when the user gives up', async () => {
      expect(await bridge.chooseFiles('study')).toEqual([]);
    });

    it('opens what the user drops', async () => {
      const dropped = new DroppedFile(inFolder('field.csv'), bytesOf(catalogue));
      const [file] = await bridge.adoptDropped([dropped]);
      expect(file).toMatchObject({ name: 'field.csv', sizeBytes: 31 });
    });

    it('tells the fingerprint of a file', async () => {
      // FIPS 180-4, example of SHA-256 for "abc" (csrc.nist.gov, Secure Hashing example values).
      const abc = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';
      writeFileSync(inFolder('abc.csv'), 'abc');
      host.user.picks = [inFolder('abc.csv')];
      const [file] = await bridge.chooseFiles('catalogue');
      expect(await bridge.fingerprint(file!)).toMatchObject({ sizeBytes: 3, sha256: abc });
      const named = await bridge.fingerprint(launched('field.csv'));
      expect(named.sha256).toBe(createHash('sha256').update(catalogue).digest('hex'));
    });
  });

  describe('a study', () => {
    const readLaunched = async (window: Bridge) =>
      window.readStudy(window.launch.files.find((file) => file.name === 'deep.study.json')!);

    it('is read with its stamp, saved over itself, and saved again', async () => {
      const study = await readLaunched(bridge);
      expect(textOf(study.bytes)).toBe('{"version":1}');
      const target = study.target!;
      expect(target).toMatchObject({ name: 'deep.study.json', folder: host.folder, existing: study.stamp });
      const first = await bridge.saveStudy(target.id, bytesOf('{"version":2}'), study.stamp);
      if (first.kind !== 'saved') throw new Error(`answered ${first.kind}`);
      expect(readFileSync(inFolder('deep.study.json'), 'utf8')).toBe('{"version":2}');
      const second = await bridge.saveStudy(target.id, bytesOf('{"version":3}'), first.stamp);
      expect(second.kind).toBe('saved');
      expect(readFileSync(inFolder('deep.study.json'), 'utf8')).toBe('{"version":3}');
      expect(readdirSync(host.folder).filter((name) => name.includes('part'))).toEqual([]);
    });

    it('picked without a path is found again in the save folder, by name and contents', async () => {
      host.user.picks = [inFolder('deep.study.json')];
      const [file] = await bridge.chooseFiles('study');
      const study = await bridge.readStudy(file!);
      expect(textOf(study.bytes)).toBe('{"version":1}');
      expect(study.target).toMatchObject({ name: 'deep.study.json', folder: host.folder });
    });

    it('is saved under a new name, and answered as it stands', async () => {
      host.user.saveName = 'wide field';
      const target = (await bridge.chooseSaveTarget('study', null))!;
      expect(target).toMatchObject({ name: 'wide field.study.json', folder: host.folder, existing: null });
      const outcome = await bridge.saveStudy(target.id, bytesOf('new'), target.existing);
      expect(outcome).toMatchObject({ kind: 'saved', stamp: { sizeBytes: 3 } });
      expect(readFileSync(inFolder('wide field.study.json'), 'utf8')).toBe('new');
    });

    it('is not saved when the user gives up the name', async () => {
      expect(await bridge.chooseSaveTarget('study', null)).toBeNull();
    });

    it('replaces another file only when the user agrees', async () => {
      host.user.saveName = 'deep';
      host.user.mayReplace = false;
      expect(await bridge.chooseSaveTarget('study', null)).toBeNull();
      expect(host.user.asked).toContain('replace deep.study.json');
      host.user.saveName = 'deep';
      host.user.mayReplace = true;
      const target = (await bridge.chooseSaveTarget('study', null))!;
      expect(await bridge.saveStudy(target.id, bytesOf('over'), target.existing)).toMatchObject({
        kind: 'saved',
      });
      expect(readFileSync(inFolder('deep.study.json'), 'utf8')).toBe('over');
    });

    it('in two windows: the second to save is told, and nothing is lost', async () => {
      const other = await host.openWindow();
      const here = await readLaunched(bridge);
      const there = await readLaunched(other);
      await bridge.saveStudy(here.target!.id, bytesOf('from here'), here.stamp);
      const outcome = await other.saveStudy(there.target!.id, bytesOf('from there'), there.stamp);
      if (outcome.kind !== 'conflict') throw new Error(`answered ${outcome.kind}`);
      expect(outcome.sentence).toMatch(
        /^deep\.study\.json was not saved: another window or program changed it/,
      );
      expect(readFileSync(inFolder('deep.study.json'), 'utf8')).toBe('from here');
      // Saving over it all the same is the user's choice, by the stamp that was found.
      const again = await other.saveStudy(there.target!.id, bytesOf('from there'), outcome.found);
      expect(again.kind).toBe('saved');
      expect(readFileSync(inFolder('deep.study.json'), 'utf8')).toBe('from there');
    });

    it('does not replace a file that came under the chosen name meanwhile', async () => {
      host.user.saveName = 'fresh';
      const target = (await bridge.chooseSaveTarget('study', null))!;
      writeFileSync(inFolder('fresh.study.json'), 'of another');
      const outcome = await bridge.saveStudy(target.id, bytesOf('mine'), target.existing);
      expect(outcome).toMatchObject({ kind: 'conflict', found: { sizeBytes: 10 } });
      expect(readFileSync(inFolder('fresh.study.json'), 'utf8')).toBe('of another');
    });

    it('is written anew when its file was removed meanwhile', async () => {
      const study = await readLaunched(bridge);
      rmSync(inFolder('deep.study.json'));
      expect(await bridge.saveStudy(study.target!.id, study.bytes, study.stamp)).toMatchObject({
        kind: 'saved',
      });
      expect(readFileSync(inFolder('deep.study.json'), 'utf8')).toBe('{"version":1}');
    });

    it('whose folder is gone is told in a sentence', async () => {
      const study = await readLaunched(bridge);
      rmSync(host.folder, { recursive: true });
      const outcome = await bridge.saveStudy(study.target!.id, study.bytes, study.stamp);
      expect(outcome).toMatchObject({
        kind: 'failed',
        sentence: expect.stringMatching(/folder .* is not there/),
      });
    });

    it('cannot be saved over a file that was opened for reading', async () => {
      const save = bridge.saveStudy(launched('field.csv').id, bytesOf('x'), null);
      await expect(save).rejects.toThrow(/opened for reading only/);
      expect(readFileSync(inFolder('field.csv'), 'utf8')).toBe(catalogue);
    });

    it('of an unknown id is refused in a sentence', async () => {
      await expect(bridge.saveStudy('0123456789abcdef', bytesOf('x'), null)).rejects.toThrow(/open it again/);
      await expect(bridge.readStudy({ ...launched('field.csv'), id: '0123456789abcdef' })).rejects.toThrow(
        Refusal,
      );
    });

    it('above the largest size is refused before it is sent', async () => {
      const study = await readLaunched(bridge);
      const large = new Uint8Array(64 * 1024 * 1024 + 1);
      await expect(bridge.saveStudy(study.target!.id, large, study.stamp)).rejects.toThrow(/at most 64 MB/);
    });
  });

  describe('the source of a study', () => {
    const reference = (name: string, path: string | null = null) => ({
      name,
      path,
      sizeBytes: null,
      studyId: launched('deep.study.json').id,
    });

    it('is found beside the study by its bare name', async () => {
      writeFileSync(inFolder('beside.csv'), 'x');
      expect(await bridge.locateSource(reference('beside.csv'))).toMatchObject({
        path: inFolder('beside.csv'),
      });
    });

    it('is found where the user gave that very file before', async () => {
      const source = { ...reference('field.csv', inFolder('field.csv')), studyId: null };
      expect(await bridge.locateSource(source)).toMatchObject({ path: inFolder('field.csv') });
    });

    it('of two is the one of the remembered size', async () => {
      const elsewhere = join(root.folder, 'given');
      mkdirSync(elsewhere);
      writeFileSync(join(elsewhere, 'empty.csv'), 'not empty');
      host.user.picks = [join(elsewhere, 'empty.csv')];
      const path = launched('field.csv').path;
      expect(await bridge.locateSource({ ...reference('empty.csv', path), sizeBytes: 31 })).toMatchObject({
        path,
      });
      expect(await bridge.locateSource({ ...reference('empty.csv', path), sizeBytes: 0 })).toMatchObject({
        path: inFolder('empty.csv'),
      });
    });

    it('is not read from anywhere else, whatever a study says', async () => {
      const secret = join(root.folder, 'secret.txt');
      symlinkSync(secret, inFolder('link.csv'));
      writeFileSync(inFolder('.hidden.csv'), 'x');
      mkdirSync(inFolder('folder.csv'));
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
        reference('field.csv', `${host.folder}/../secret.txt`),
        { ...reference('secret.txt', secret), studyId: null },
        { ...reference('beside.csv'), studyId: '0123456789abcdef' },
      ]) {
        const found = await bridge.locateSource(source);
        expect([source, found?.path ?? null]).toEqual([
          source,
          found === null ? null : inFolder('field.csv'),
        ]);
      }
    });
  });

  describe('recent studies', () => {
    it('lists what was opened and saved, newest first, opens and forgets them', async () => {
      host.user.saveName = 'second';
      const target = (await bridge.chooseSaveTarget('study', null))!;
      await bridge.saveStudy(target.id, bytesOf('2'), null);
      const recent = await bridge.recentStudies();
      expect(recent.map(({ name, found }) => ({ name, found }))).toEqual([
        { name: 'second.study.json', found: true },
        { name: 'deep.study.json', found: true },
      ]);
      const file = await bridge.openRecent(recent[0]!.id);
      expect(textOf((await bridge.readStudy(file)).bytes)).toBe('2');

      rmSync(inFolder('deep.study.json'));
      const after = await bridge.recentStudies();
      expect(after.find(({ name }) => name === 'deep.study.json')).toMatchObject({ found: false });
      const gone = after.find(({ name }) => name === 'deep.study.json')!;
      await expect(bridge.openRecent(gone.id)).rejects.toThrow(
        /^deep\.study\.json could not be opened: .*not there/,
      );
      await bridge.forgetRecent(gone.id);
      expect((await bridge.recentStudies()).map(({ name }) => name)).toEqual(['second.study.json']);
      await expect(bridge.openRecent(gone.id)).rejects.toThrow(/not in the list/);
    });
  });

  describe('unsaved work', () => {
    const workId = 'work-0123456789';

    it('is offered once its window is gone, to one window, and not while it lives', async () => {
      const other = await host.openWindow();
      await bridge.keepUnsaved(workId, 'Deep field', bytesOf('first'));
      await bridge.keepUnsaved(workId, 'Deep field', bytesOf('second'));
      expect(await bridge.listUnsaved()).toEqual([]);
      expect(await other.listUnsaved()).toEqual([]);
      await expect(other.takeUnsaved(workId)).rejects.toThrow(/open in another window/);
      await expect(other.dropUnsaved(workId)).rejects.toThrow(/open in another window/);
      await expect(other.keepUnsaved(workId, '', bytesOf('x'))).rejects.toThrow(/open in another window/);

      await host.closeWindow(bridge);
      const third = await host.openWindow();
      expect(await other.listUnsaved()).toEqual([
        { workId, title: 'Deep field', sizeBytes: 6, keptMs: expect.any(Number) },
      ]);
      expect(textOf(await other.takeUnsaved(workId))).toBe('second');
      expect(await third.listUnsaved()).toEqual([]);
      await expect(third.takeUnsaved(workId)).rejects.toThrow(/open in another window/);
      await other.dropUnsaved(workId);
      await host.closeWindow(other);
      expect(await third.listUnsaved()).toEqual([]);
    });

    it('is kept where only the user can read it', async () => {
      await bridge.keepUnsaved(workId, 'Deep field', bytesOf('first'));
      const path = join(host.userFolder, 'unsaved', `${workId}.study.json`);
      expect(readFileSync(path, 'utf8')).toBe('first');
      if (process.platform !== 'win32') expect(statSync(path).mode & 0o777).toBe(0o600);
    });

    it('under a name that would lead elsewhere is refused', async () => {
      for (const id of ['../../secret', 'a/b-0123456789', '', 'x'.repeat(65)])
        await expect(bridge.keepUnsaved(id, '', bytesOf('x'))).rejects.toThrow(/does not fit/);
    });
  });

  describe('exporting', () => {
    it('writes a file whole', async () => {
      const outcome = await bridge.exportFile('ledger.csv', 'text/csv', bytesOf('z,n\n'));
      expect(outcome).toMatchObject({ name: 'ledger.csv' });
      expect(textOf((await host.exported('ledger.csv'))!)).toBe('z,n\n');
    });

    it('writes pieces, also larger than one message', async () => {
      const large = new Uint8Array(9 * 1024 * 1024).map((_, index) => index % 251);
      async function* pieces() {
        yield bytesOf('head');
        yield large;
        yield new Uint8Array(0);
      }
      await bridge.exportFile('cone.png', 'image/png', pieces());
      const written = (await host.exported('cone.png'))!;
      expect(written.length).toBe(4 + large.length);
      expect(Buffer.from(written.subarray(4)).equals(Buffer.from(large))).toBe(true);
    });

    it('that is cancelled leaves nothing, and the file before it as it was', async () => {
      await bridge.exportFile('cone.png', 'image/png', bytesOf('old'));
      async function* cancelled() {
        yield bytesOf('half');
        throw new Refusal('cancelled');
      }
      await expect(bridge.exportFile('cone.png', 'image/png', cancelled())).rejects.toThrow('cancelled');
      expect(textOf((await host.exported('cone.png'))!)).toBe('old');
      expect(readdirSync(host.folder).filter((name) => name.startsWith('.'))).toEqual([]);
    });
  });

  it('takes the state of the window', async () => {
    await expect(bridge.setWindowState({ title: 'deep field *', unsaved: true })).resolves.toBeUndefined();
    expect(existsSync(join(host.folder, basename('deep field *')))).toBe(false);
  });
}
