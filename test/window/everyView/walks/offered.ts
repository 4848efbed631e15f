import { mkdirSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { emptyStudy, writeStudy } from '../../../../shared-core/study/document.ts';
import { ready } from '../../window.ts';
import { DIALOG } from '../acts.ts';
import type { Walk } from '../view.ts';

/** Work from before that was not saved, one piece of it cut off. */
function keepWork(config: string, pieces: number): void {
  const kept = join(config, 'conewright', 'unsaved');
  mkdirSync(kept, { recursive: true });
  for (let i = 1; i <= pieces; i++) {
    const source = { kind: 'file', name: `field ${i}.csv`, path: null, sizeBytes: 1, sha256: null } as const;
    const study = { ...emptyStudy(`piece ${i}`), source: i === 1 ? null : source, edges: [0.1, 0.2, 0.3] };
    const path = join(kept, `work-00000000${String(i).padStart(2, '0')}`);
    writeFileSync(`${path}.study.json`, i === 2 ? 'cut off' : writeStudy(study));
    writeFileSync(`${path}.about.json`, JSON.stringify({ version: 1, title: `piece ${i}`, owner: null }));
    utimesSync(`${path}.study.json`, 1e9 + i, 1e9 + i);
  }
}

/** Unsaved work from before, offered back. */
export const offered: Walk = {
  name: 'offered',
  async open(desk, look) {
    keepWork(join(desk.folder, 'config'), 11);
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    { name: 'pieces of work', within: '.notices', shows: (page) => page.getByText(/^11 pieces of work/) },
    {
      name: 'the pieces one by one',
      within: DIALOG,
      reach: (page) => page.getByRole('button', { name: 'Look…' }).click(),
      shows: (page) => page.getByText('cannot be read'),
    },
    {
      name: 'before all are forgotten',
      within: DIALOG,
      reach: (page) => page.getByRole('button', { name: 'Forget all' }).click(),
      shows: (page) => page.getByRole('dialog', { name: 'Forget 11 pieces of unsaved work?' }),
    },
  ],
};
