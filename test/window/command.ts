import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const script = fileURLToPath(new URL('../../main/launch/conewright.mjs', import.meta.url));

/** The command as a person runs it, from a folder. @throws when it does not end with 0 */
export function conewright(folder: string, ...argv: string[]): Promise<{ out: string }> {
  return conewrightIn(folder, {}, ...argv);
}

/** The same with more said in the environment. */
export async function conewrightIn(
  folder: string,
  env: Readonly<Record<string, string>>,
  ...argv: string[]
): Promise<{ out: string }> {
  const run = spawnSync(process.execPath, [script, ...argv], {
    cwd: folder,
    env: { ...process.env, INIT_CWD: folder, ...env },
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  if (run.status !== 0) throw new Error(`the command ended with ${run.status}: ${run.stderr}`);
  return { out: run.stdout };
}
