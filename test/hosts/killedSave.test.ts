import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import { pathToFileURL } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { saveAtomically } from '../../main/files/atomicSave.ts';
import { bundleForNode } from './bundle.ts';
import { temporaryFolder } from './testHost.ts';

const ROUNDS = 30;
// Large enough that a write takes several pages and a kill can fall into the middle of it.
const SIZES = [700_000, 1_300_000] as const;

describe('a save that is killed', () => {
  const root = temporaryFolder();
  let saver: string;

  beforeAll(async () => {
    const bundle = await bundleForNode('main/files/atomicSave.ts', root.folder);
    saver = join(root.folder, 'saver.mjs');
    writeFileSync(
      saver,
      `import { saveAtomically } from ${JSON.stringify(pathToFileURL(bundle).href)};
const [path, lockFolder] = process.argv.slice(2);
process.stdout.write('ready');
for (let n = 0; ; n++) {
  const bytes = new Uint8Array([${SIZES.join(', ')}][n % 2]).fill(65 + (n % 2));
  const outcome = await saveAtomically(path, bytes, { lockFolder, expected: 'any' });
  if (outcome.kind !== 'saved') throw new Error(JSON.stringify(outcome));
  process.stdout.write('.');
}
`,
    );
  });
  afterAll(() => root.remove());

  it('leaves the old file or a new one, whole, and its leftovers go with the next save', async () => {
    const folder = join(root.folder, 'studies');
    const lockFolder = join(root.folder, 'locks');
    mkdirSync(folder);
    const path = join(folder, 'deep.study.json');
    writeFileSync(path, 'old');
    const seen = new Set<string>();
    for (let round = 0; round < ROUNDS; round++) {
      const child = spawn(process.execPath, [saver, path, lockFolder], {
        stdio: ['ignore', 'pipe', 'inherit'],
      });
      // A busy machine may take any time for a save: the kill falls a moment after the first, second or third began.
      await toldOf(child.stdout, round % 3);
      await new Promise((resolve) => setTimeout(resolve, Math.random() * 15));
      child.kill('SIGKILL');
      const [code, signal] = await once(child, 'exit');
      expect([code, signal]).toEqual([null, 'SIGKILL']);

      const bytes = readFileSync(path);
      const letter = bytes[0]!;
      const whole = { 111: 3, 65: SIZES[0], 66: SIZES[1] }[letter];
      expect([letter, bytes.length]).toEqual([letter, whole]);
      if (letter !== 111) expect(bytes.every((byte) => byte === letter)).toBe(true);
      seen.add(`${letter}`);
      expect(readdirSync(folder).length).toBeLessThanOrEqual(2);
    }
    // A save of the same target removes what the kills left, and is not held up by their locks.
    const outcome = await saveAtomically(path, new TextEncoder().encode('after'), {
      lockFolder,
      expected: 'any',
    });
    expect(outcome.kind).toBe('saved');
    expect(readdirSync(folder)).toEqual(['deep.study.json']);
    expect(readFileSync(path, 'utf8')).toBe('after');
    // The kills fell before something was saved and after it.
    expect(seen.size).toBeGreaterThan(1);
  });
});

/** Waits until the saver is ready and has told of so many saves. */
async function toldOf(stdout: Readable, saves: number): Promise<void> {
  let told = '';
  for await (const part of stdout.iterator({ destroyOnReturn: false })) {
    told += String(part);
    if (told.length >= 'ready'.length + saves) return;
  }
}
