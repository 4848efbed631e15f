import { rmSync, writeFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { catalogue, type Stage } from './contractStage.ts';
import { pageHeaderNames } from './testHost.ts';

/** What a window loads: the files it was started with, their addresses, its own place. */
export function describeLoading(stage: Stage): void {
  describe('files named on the command line', () => {
    it('are described, and one that is not there is told in a sentence', () => {
      expect(stage.bridge.hostKind).toBe(stage.host.kind);
      expect(
        stage.bridge.launch.files.map(({ name, sizeBytes, path }) => ({ name, sizeBytes, path })),
      ).toEqual([
        { name: 'field.csv', sizeBytes: catalogue.length, path: stage.inFolder('field.csv') },
        { name: 'empty.csv', sizeBytes: 0, path: stage.inFolder('empty.csv') },
        { name: 'deep.study.json', sizeBytes: 13, path: stage.inFolder('deep.study.json') },
      ]);
      expect(stage.bridge.launch.troubles).toEqual([
        expect.stringMatching(/^missing\.csv could not be opened: .*\.$/),
      ]);
    });

    it('are the same for a second window', async () => {
      const second = await stage.host.openWindow();
      expect(second.launch.files.map((file) => file.name)).toEqual([
        'field.csv',
        'empty.csv',
        'deep.study.json',
      ]);
    });
  });

  describe('the address of a file', () => {
    const load = (range?: string, name = 'field.csv', method = 'GET') =>
      stage.host.load(stage.launched(name).url, { method, headers: range === undefined ? {} : { range } });

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
        stage.host.load(stage.launched('field.csv').url, {
          headers: { range: 'bytes=0-1', 'if-range': ifRange },
        });
      expect((await part(etag)).status).toBe(206);
      writeFileSync(stage.inFolder('field.csv'), `${catalogue}12,22,0.7\n`);
      expect((await part(etag)).status).toBe(200);
    });

    it('says so when the file is gone', async () => {
      rmSync(stage.inFolder('field.csv'));
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
        const response = await stage.host.load(stage.host.windowUrl(path));
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
      const response = await stage.host.load(stage.host.windowUrl(path));
      expect(response.status).toBe(404);
      expect(await response.text()).not.toMatch(/not for windows|root:/);
    });

    it('changes nothing by other methods', async () => {
      const response = await stage.host.load(stage.host.windowUrl('index.html'), { method: 'DELETE' });
      expect(response.status).toBe(405);
    });
  });
}
