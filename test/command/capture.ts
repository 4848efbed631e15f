import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { run } from '../../main/command/conewright.ts';

export interface Outcome {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

/** Runs a command line inside this process and gives back what it printed. */
export async function conewright(...argv: string[]): Promise<Outcome> {
  let [out, err] = ['', ''];
  const code = await run(argv, { print: (text) => (out += text), say: (text) => (err += `${text}\n`) });
  return { code, out, err };
}

/** A folder for the files of one test file, taken away afterwards. */
export function testFolder(): {
  path: (name: string) => string;
  write: (name: string, content: string | Uint8Array) => string;
} {
  const folder = mkdtempSync(join(tmpdir(), 'conewright-test-'));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  const path = (name: string) => join(folder, name);
  return {
    path,
    write(name, content) {
      writeFileSync(path(name), content);
      return path(name);
    },
  };
}
