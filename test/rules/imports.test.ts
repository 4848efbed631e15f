import { describe, expect, it } from 'vitest';
import { allBreaches, breaches } from './imports.mjs';

describe('the import rule', () => {
  it('holds over the whole tree', () => {
    expect(allBreaches()).toEqual([]);
  });

  it.each([
    [
      'shared-core/cosmology/x.ts',
      "import '../shells/sample.ts';",
      /cosmology may not know shared-core\/shells/,
    ],
    [
      'shared-core/sky/x.ts',
      "export * from '../catalogue/catalogue.ts';",
      /sky may not know shared-core\/catalogue/,
    ],
    [
      'shared-core/shells/x.ts',
      "import type { A } from '../../renderer/cone/types.ts';",
      /may not know renderer\/cone/,
    ],
    ['shared-core/base/x.ts', "import { readFileSync } from 'node:fs';", /only main and test run in Node/],
    [
      'renderer/panels/x.tsx',
      "const x = () => import('../../main/files/desk.ts');",
      /may not know main\/files/,
    ],
    [
      'renderer/panels/x.tsx',
      "import * as THREE from 'three';",
      /the package three, which renderer may not use/,
    ],
    ['main/command/x.ts', "import '../../renderer/state/app.ts';", /may not know renderer\/state/],
    [
      'renderer/engine/x.ts',
      "new Worker(new URL('../panels/HeadBar.tsx', import.meta.url));",
      /may not know renderer/,
    ],
    ['somewhere/x.ts', '', /lies in no layer/],
  ])('refuses %s: %s', (path, code, sentence) => {
    expect(breaches(path, code)).toEqual([expect.stringMatching(sentence)]);
  });

  it('names the cure, and leaves allowed imports alone', () => {
    expect(breaches('shared-core/cosmology/x.ts', "import '../shells/sample.ts';")[0]).toMatch(
      /Move what both sides need/,
    );
    expect(breaches('shared-core/shells/x.ts', "import '../cosmology/cosmology.ts';")).toEqual([]);
    expect(breaches('renderer/cone/x.ts', "import 'three';")).toEqual([]);
  });
});
