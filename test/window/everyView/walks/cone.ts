import type { Page } from '@playwright/test';
import { ready } from '../../window.ts';
import { clickButton, press, pressEscape } from '../acts.ts';
import type { View, Walk } from '../view.ts';

const VIEWS: readonly (readonly [key: string, label: string])[] = [
  ['2', 'Down'],
  ['3', 'Behind'],
  ['4', 'Whole'],
  ['5', 'Around'],
  ['6', 'Parallel'],
  ['1', 'Side-on'],
];
const chosen = (label: string) => (page: Page) =>
  page.locator('.stage-bar .segment:has(input:checked)', { hasText: label });
const reading = (name: string, unit: string): View => ({
  name: `radius as ${name}`,
  within: '.centre',
  reach: press('r'),
  shows: (page) => page.locator('.strip-axis-names [aria-pressed=true]', { hasText: unit }),
});
const colour = (value: string, legend: string): View => ({
  name: `coloured by ${value}`,
  within: '.stage',
  reach: (page) => page.getByLabel('colour', { exact: true }).selectOption({ label: value }),
  shows: (page) => page.locator(`.stage-legend[title^="${legend}"]`),
});

/** The cone of the demo: every view, reading of the radius and colouring. */
export const cone: Walk = {
  name: 'cone',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    { name: 'first start', within: 'body', shows: (page) => page.locator('.stage-cone canvas').first() },
    ...VIEWS.map(
      ([key, label]): View => ({
        name: label.toLowerCase(),
        within: '.stage',
        reach: press(key),
        shows: chosen(label),
      }),
    ),
    reading('redshift', 'z'),
    reading('lookback time', 'Gyr'),
    {
      name: 'around by lookback time',
      within: '.stage',
      reach: press('5'),
      shows: chosen('Around'),
      leave: press('1'),
    },
    reading('comoving distance', 'Mpc'),
    {
      name: 'lengths over h',
      within: '.centre',
      reach: press('h'),
      shows: (page) => page.locator('.strip-axis-names [aria-pressed=true]', { hasText: 'Mpc/h' }),
      leave: press('h'),
    },
    {
      name: 'the next field, widened by hand',
      within: '.stage',
      async reach(page) {
        await page.keyboard.press('f');
        await page.locator('.stage-sideways input').fill('12');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.locator('.stage-bar').getByText('field 2 of 3'),
    },
    colour('lookback time', 'lookback time'),
    {
      name: 'coloured by shell',
      within: '.stage',
      reach: (page) => page.getByLabel('colour', { exact: true }).selectOption('shell'),
      shows: (page) => page.locator('.stage-bar'),
    },
    colour('magnitude', 'magnitude'),
    colour('local density', 'local density'),
    colour('colour', 'colour'),
    {
      name: 'light',
      within: '.popover:popover-open',
      reach: clickButton('Light'),
      shows: (page) => page.getByRole('slider', { name: 'Exposure' }),
      leave: pressEscape,
    },
  ],
};
