import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { drop } from '../../files.ts';
import { expect, ready } from '../../window.ts';
import { DIALOG, press, pressEscape, rename, saveAs } from '../acts.ts';
import type { Walk } from '../view.ts';

let folder = '';
const saved = () => join(folder, 'mine.study.json');
const question = (title: RegExp) => (page: Page) => page.getByRole('dialog', { name: title });
const notice = (sentence: RegExp) => (page: Page) => page.locator('.notices').getByText(sentence);

/** Names, saving, leaving: what the window says and asks. */
export const questions: Walk = {
  name: 'questions',
  async open(desk, look) {
    folder = desk.folder;
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'a name is needed',
      within: '.notices, .head',
      reach: (page) => rename(page, ''),
      shows: notice(/needs a name: the old one was kept/),
    },
    {
      name: 'the name to save under',
      within: DIALOG,
      async reach(page) {
        await rename(page, 'mine');
        await page.keyboard.press('Control+s');
      },
      shows: question(/^Save the study/),
      leave: pressEscape,
    },
    {
      name: 'before leaving',
      within: DIALOG,
      reach: press('Control+n'),
      shows: question(/has changes that are not saved/),
      leave: pressEscape,
    },
    {
      name: 'a file of that name exists',
      within: DIALOG,
      async reach(page) {
        writeFileSync(saved(), '{}');
        await saveAs(page, 'mine');
      },
      shows: question(/exists already/),
      leave: (page) => page.getByRole('button', { name: 'Replace', exact: true }).click(),
    },
    {
      name: 'changed by somebody else',
      within: DIALOG,
      async reach(page) {
        await expect(page.getByText('not saved', { exact: true })).toHaveCount(0);
        writeFileSync(saved(), readFileSync(saved(), 'utf8').replace('"mine"', '"theirs"'));
        await rename(page, 'mine again');
        await page.keyboard.press('Control+s');
      },
      shows: question(/changed by somebody else/),
      leave: (page) => page.getByRole('button', { name: 'Replace it with mine' }).click(),
    },
    {
      name: 'it holds a study of another catalogue',
      within: DIALOG,
      async reach(page) {
        await expect(page.getByText('not saved', { exact: true })).toHaveCount(0);
        await drop(page, 'other.csv', 'ra,dec,z\n150,2,0.5\n151,3,0.6\n152,2.5,0.7\n');
        await expect(page.locator('.engine-line')).toHaveText(/^3 kept/);
        await page.keyboard.press('Control+s');
      },
      shows: question(/holds a study of another catalogue/),
      leave: pressEscape,
    },
    {
      name: 'the catalogue is not within the study',
      within: '.notices',
      reach: (page) => saveAs(page, 'apart'),
      shows: notice(/is not within the study/),
    },
    {
      name: 'a study that cannot be opened',
      within: '.notices',
      reach: (page) => drop(page, 'newer.study.json', '{"format":"something else"}'),
      shows: notice(/is not a study/),
    },
  ],
};
