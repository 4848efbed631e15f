import { describe, expect, it } from 'vitest';
import { allEngineMaths, engineMaths } from './engineMaths.mjs';

describe('the rule that numbers do not depend on the engine', () => {
  it('holds over shared-core', () => {
    expect(allEngineMaths()).toEqual([]);
  });

  it.each([
    ['const a = Math.exp(1);', /x\.ts:1 uses Math\.exp, .*import it from shared-core\/numerics\/elementary/],
    ['\nconst a = (b: number) => b ** 2;', /x\.ts:2 uses \*\*, .*square, cube, powerOf or pow/],
    ['let a = 2; a **= 3;', /uses \*\*=/],
    ['const { sin } = Math;', /uses Math as a whole/],
    ["const a = Math['cos'](1);", /uses Math as a whole/],
    ['const a = [1, 2].map(Math.tanh);', /uses Math\.tanh/],
  ])('refuses %s', (code, sentence) => {
    expect(engineMaths('shared-core/sky/x.ts', code)).toEqual([expect.stringMatching(sentence)]);
  });

  it('leaves alone what is exact everywhere', () => {
    const code = 'const a = Math.sqrt(2) * Math.PI + Math.imul(3, 4); // not Math.exp, not 2 ** 3';
    expect(engineMaths('shared-core/sky/x.ts', code)).toEqual([]);
  });
});
