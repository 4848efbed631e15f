import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';

const TURN = new URL('../../main/launch/turn.mjs', import.meta.url).href;
let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'conewright-turn-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

/** A process that takes the turn, notes that it has it, and gives it back a moment later. */
function taker(name: string) {
  const script = `
    import { appendFileSync } from 'node:fs';
    import { takeTurn } from ${JSON.stringify(TURN)};
    const give = takeTurn('work.turn', () => console.log('waits'));
    appendFileSync('log', '${name} in\\n');
    Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 150);
    appendFileSync('log', '${name} out\\n');
    give();`;
  return spawn(process.execPath, ['--input-type=module', '-e', script], { cwd: folder, stdio: 'ignore' });
}

it('has one process at work at a time, and the turn back at the end', async () => {
  const ends = ['a', 'b', 'c'].map((name) => once(taker(name), 'exit'));
  for (const end of ends) expect((await end)[0]).toBe(0);
  const lines = readFileSync(join(folder, 'log'), 'utf8').trim().split('\n');
  expect(lines).toHaveLength(6);
  for (let i = 0; i < 6; i += 2) {
    const [name] = lines[i]!.split(' ');
    expect(lines.slice(i, i + 2)).toEqual([`${name} in`, `${name} out`]);
  }
  expect(existsSync(join(folder, 'work.turn'))).toBe(false);
});

it('takes the turn of a process that has ended', async () => {
  const gone = spawn(process.execPath, ['-e', '']);
  await once(gone, 'exit');
  writeFileSync(join(folder, 'work.turn'), String(gone.pid));
  expect((await once(taker('a'), 'exit'))[0]).toBe(0);
});
