import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { emptyStudy, writeStudy } from '../../../../shared-core/study/document.ts';
import type { Study } from '../../../../shared-core/study/schema.ts';
import { expect } from '../../window.ts';
import type { Walk } from '../view.ts';

const GONE = {
  kind: 'file',
  name: 'gone.csv',
  path: '/nowhere/gone.csv',
  sizeBytes: 90_000,
  sha256: null,
} as const;
const BOX = { kind: 'box', raMinDeg: 190, raMaxDeg: 210, decMinDeg: -38, decMaxDeg: -26 } as const;

function study(folder: string, parts: Partial<Study>): string {
  writeFileSync(
    join(folder, 'apart.study.json'),
    writeStudy({ ...emptyStudy('Apart'), source: GONE, edges: [0.1, 0.2, 0.3, 0.5], ...parts }),
  );
  return 'apart.study.json';
}

/** A study whose catalogue is not there: with a region and without one. */
export const notAtHand: Walk = {
  name: 'not-at-hand',
  async open(desk, look) {
    return desk.open({ ...look, files: [study(desk.folder, { region: { parts: [BOX], holes: [] } })] });
  },
  views: [
    { name: 'shells without galaxies', within: 'body', shows: (page) => page.locator('.stage-missing') },
  ],
};

/** The same in a universe that closes in front of the shells. */
export const beyondTheAntipode: Walk = {
  name: 'beyond-the-antipode',
  async open(desk, look) {
    const { cosmology } = emptyStudy();
    const page = await desk.open({
      ...look,
      files: [
        study(desk.folder, {
          source: null,
          region: { parts: [BOX], holes: [] },
          edges: [0.5, 1, 3, 20],
          cosmology: { ...cosmology, omegaM0: 0.3, omegaDe0: 1.6 },
          cosmologySet: null,
        }),
      ],
    });
    await expect(page.locator('.stage-cone canvas').first()).toBeVisible();
    // The demo's three fields stand until the study's own region is ready.
    await expect(page.locator('.engine-line')).toHaveText('no catalogue');
    return page;
  },
  views: [
    {
      name: 'shells that cannot be measured',
      within: 'body',
      shows: (page) => page.locator('.worth').getByText(/antipode/),
    },
  ],
};
