import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import {
  CALLS,
  checkAnswer,
  checkArgument,
  checkReply,
  isCallName,
} from '../../../shared-core/bridge/calls.ts';
import { joinFrame, splitFrame } from '../../../shared-core/bridge/frame.ts';

describe('the calls of the bridge', () => {
  it('are known by their own names alone', () => {
    for (const name of Object.keys(CALLS)) expect(isCallName(name)).toBe(true);
    for (const name of ['', 'toString', '__proto__', 'constructor', 'hasOwnProperty', 1, null, undefined, {}])
      expect(isCallName(name)).toBe(false);
  });

  it('take what fits, and refuse anything more, less or other in a sentence', () => {
    const stamp = { sizeBytes: 1, modifiedMs: 2, sha256: 'a'.repeat(64) };
    const argument = { targetId: '0123456789', expected: stamp };
    expect(checkArgument('saveStudy', argument, 10)).toEqual(argument);
    const bad: unknown[] = [
      null,
      [],
      {},
      { ...argument, more: 1 },
      { ...argument, targetId: 'short' },
      { ...argument, targetId: '../../etc/passwd' },
      { ...argument, targetId: 'x'.repeat(65) },
      { ...argument, expected: { ...stamp, sizeBytes: -1 } },
      { ...argument, expected: { ...stamp, sizeBytes: 1.5 } },
      { ...argument, expected: { ...stamp, modifiedMs: Number.NaN } },
      { ...argument, expected: { ...stamp, sha256: 'A'.repeat(64) } },
    ];
    for (const value of bad)
      expect(() => checkArgument('saveStudy', value, 0)).toThrow(
        /^What came with saveStudy does not fit.*again\.$/,
      );
    expect(() => checkArgument('launch', {}, 1)).toThrow(/came with 1 bytes, at most 0/);
    expect(() => checkArgument('saveStudy', argument, 64 * 1024 * 1024 + 1)).toThrow(Refusal);
  });

  it('check what a host answers, and pass on what it refuses', () => {
    expect(checkReply('forgetRecent', { answer: {} }, null)).toEqual({ answer: {}, bytes: null });
    expect(() => checkReply('forgetRecent', { refused: 'No.', refusedKind: 'input' }, null)).toThrow('No.');
    for (const reply of [
      null,
      undefined,
      'x',
      {},
      { answer: {}, refused: 'x' },
      { refused: 1, refusedKind: 'input' },
    ])
      expect(() => checkReply('forgetRecent', reply, null)).toThrow(Refusal);
    expect(() => checkAnswer('recentStudies', [{ id: 'x' }])).toThrow(
      /^What recentStudies answered does not fit/,
    );
  });
});

describe('a frame', () => {
  it('gives back what was put in', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 300 }), fc.uint8Array({ maxLength: 300 }), (head, rest) => {
        // Also when the frame is a view that does not begin at the start of its memory.
        const shifted = new Uint8Array([9, 9, 9, ...joinFrame(head, rest)]).subarray(3);
        const split = splitFrame(shifted);
        expect([...split.head]).toEqual([...head]);
        expect([...split.rest]).toEqual([...rest]);
      }),
      { seed: 3 },
    );
  });

  it('that was cut off is refused', () => {
    const frame = joinFrame(new Uint8Array(10), null);
    for (let length = 0; length < frame.length; length++)
      expect(() => splitFrame(frame.subarray(0, length))).toThrow(/cut off/);
  });
});
