import { afterEach, expect, it, vi } from 'vitest';
import { SplatHands } from '../../../renderer/cone/points/software/splatHands.ts';

/** Workers that never answer. */
class SilentWorker {
  onerror: ((event: { message: string }) => void) | null = null;
  postMessage(): void {}
  terminate(): void {}
}

afterEach(() => vi.unstubAllGlobals());

it('tells of workers that fail once, and refuses what is asked of them afterwards', async () => {
  const made: SilentWorker[] = [];
  vi.stubGlobal(
    'Worker',
    class extends SilentWorker {
      constructor() {
        super();
        made.push(this);
      }
    },
  );
  const reasons: string[] = [];
  const hands = new SplatHands(2, (reason) => reasons.push(reason));
  const waiting = hands.ask(0, { kind: 'own', slots: 4, wide: false });
  made[0]!.onerror!({ message: 'out of memory' });
  made[1]!.onerror!({ message: 'out of memory' });
  expect(reasons).toEqual(['out of memory']);
  await expect(waiting).rejects.toThrow(/out of memory/);
  await expect(hands.ask(1, { kind: 'own', slots: 4, wide: false })).rejects.toThrow(/ended/);
});
