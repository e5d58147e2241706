import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { readFile } from 'node:fs/promises';
import type { Page } from 'playwright-core';
import { expectAccessible, expectNoSidewaysScroll } from '#tests/browser/support/accessibility.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const PAGES = [
  '/reference',
  '/reference/forms',
  '/reference/forms/woodsSaxon',
  '/reference/forms/contact',
  '/reference/species',
  '/reference/nuclides?element=Ca',
  '/reference/nuclides/Ca-40',
  '/reference/elements?q=c',
  '/reference/neutron-lengths?caution=contradiction',
  '/reference/materials',
];
const VIEWS = (['light', 'dark'] as const).flatMap((theme) =>
  ([1440, 390] as const).map((width) => ({ theme, width })),
);

describe.each(VIEWS)('in $theme at $width px', (view) => {
  test('no page of the Reference has a violation or scrolls sideways', async () => {
    const { page, goTo } = await stage.visitor('theorist', view);
    for (const path of PAGES) {
      await goTo(path);
      await page.waitForLoadState('networkidle');
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
    }
  });
});

test('every page fits a screen of 360 px', async () => {
  const { page, goTo } = await stage.visitor('theorist', { width: 390 });
  await page.setViewportSize({ width: 360, height: 740 });
  for (const path of PAGES) {
    await goTo(path);
    await page.waitForLoadState('networkidle');
    await expectNoSidewaysScroll(page);
  }
});

const firstRow = (page: Page) => page.getByRole('row').nth(1);

test('a table is searched, sorted and paged in the address, and says where it is from', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/reference/nuclides');
  await page.getByText('1–50 of', { exact: false }).waitFor();
  expect(await page.getByText('AME2012').first().isVisible()).toBe(true);
  await page.getByRole('searchbox', { name: 'Search the nuclides' }).fill('calcium');
  await page.waitForURL(/q=calcium/);
  await expect.poll(() => firstRow(page).textContent()).toContain('Ca-40');
  await page
    .getByRole('columnheader', { name: /In nature/ })
    .getByRole('link')
    .click();
  await page.waitForURL(/sort=-abundance/);
  const heading = page.getByRole('columnheader', { name: /In nature/ });
  await expect.poll(() => heading.getAttribute('aria-sort')).toBe('descending');
  await page.reload();
  await expect.poll(() => firstRow(page).textContent()).toContain('96.941');
  await goTo('/reference/nuclides?page=2&sort=nonsense&occurrence=lost');
  await page.getByText('51–100 of', { exact: false }).waitFor();
});

test('numbers stand on their decimal points', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/reference/neutron-lengths?q=calcium');
  await page.getByRole('table').waitFor();
  const column = await page.locator('tbody tr td:nth-of-type(1)').allInnerTexts();
  const places = column.filter((text) => text.includes('.')).map((text) => text.indexOf('.'));
  expect(places.length).toBeGreaterThan(3);
  expect(new Set(places).size).toBe(1);
});

test.each([1440, 390] as const)('cautions are said in words at %i px', async (width) => {
  const { page, goTo } = await stage.visitor('experimentalist', { width });
  const seen = (words: RegExp) => page.getByText(words).filter({ visible: true }).first();
  await goTo('/reference/neutron-lengths');
  await page.getByLabel('Cautions', { exact: true }).selectOption('resonant');
  await page.waitForURL(/caution=resonant/);
  await seen(/absorption does not follow 1\/v/).waitFor();
  await goTo('/reference/neutron-lengths?q=O-17');
  const words = seen(/4π\|b\|² gives 3\.941 b/);
  await words.waitFor();
  const box = await words.boundingBox();
  expect((box?.x ?? Infinity) + (box?.width ?? 0)).toBeLessThanOrEqual(width);
});

test('a file holds names, a row of units and every row that fits', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/reference/neutron-lengths?q=nickel');
  await page.getByRole('table').waitFor();
  const saved = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Export CSV' }).click();
  const file = await saved;
  expect(file.suggestedFilename()).toBe('neutron-lengths.csv');
  const text = await readFile(await file.path(), 'utf8');
  const [names = '', units = '', ...rows] = text.replace('\ufeff', '').trim().split('\r\n');
  expect(names.split(',').slice(0, 3)).toEqual([
    'Nucleus',
    'bound coherent length',
    'standard uncertainty of bound coherent length',
  ]);
  expect(units.split(',').slice(0, 3)).toEqual(['', 'fm', 'fm']);
  expect(rows.find((row) => row.startsWith('Ni,'))).toMatch(/^Ni,10\.3,0\.1,/);
});

test('a row is copied with its units', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/reference/species?q=proton');
  await page.getByRole('button', { name: 'Copy Proton' }).click();
  await page.getByText('Proton copied with its units.').waitFor();
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  expect(copied).toContain('rest energy 938.27208943(29) MeV');
});

test.each([
  ['/reference/forms/gaussian', 'Use in a case', 'Gaussian'],
  ['/reference/species?q=muon-', 'Use Muon (−) in a case', 'Muons (−) on carbon'],
  ['/reference/nuclides?q=Ca-40', 'Use Ca-40 in a case', 'Alpha particles on Ca-40'],
  ['/reference/neutron-lengths?q=Ni-58', 'Use Ni-58 in a case', 'Slow neutrons on Ni-58'],
  [
    '/reference/materials?q=graphite',
    'Use Graphite in a case',
    'Alpha particles on C-12, for graphite',
  ],
])('%s leads into a case that is computed', async (path, link, title) => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo(path);
  await page.getByRole('link', { name: link }).first().click();
  await page.getByRole('heading', { name: title, level: 1 }).waitFor();
  await page.getByRole('figure', { name: /Differential cross section/ }).waitFor();
});

test('an entry that is not there is refused in words', async () => {
  const visitor = await stage.visitor('experimentalist');
  visitor.console.expect(/422|404/);
  const { page, goTo } = visitor;
  await goTo('/cases/new?nuclide=ca40');
  await page.getByText('write Ca-40', { exact: false }).waitFor();
  await goTo('/reference/nuclides/Ca-400');
  await page.getByRole('heading', { name: 'Not found', level: 1 }).waitFor();
  await goTo('/reference/nuclides?q=qqq');
  await page.getByText('No nuclides fit “qqq”.').waitFor();
  await page.getByRole('link', { name: 'Show all nuclides' }).click();
  await page.getByText('1–50 of', { exact: false }).waitFor();
});

test('an administrator reads the tables and is offered no case', async () => {
  const { page, goTo } = await stage.visitor('administrator');
  await goTo('/reference/nuclides/Ca-40');
  await page.getByRole('heading', { name: 'Mass and spin' }).waitFor();
  expect(await page.getByRole('link', { name: /Use/ }).count()).toBe(0);
});
