import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { expectAccessible, expectNoSidewaysScroll } from '#tests/browser/support/accessibility.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { retype, settled, tabTo } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const area = (page: Page) => page.getByRole('region', { name: 'Aids' });

async function open(page: Page, title: string): Promise<void> {
  await area(page).locator('summary').filter({ hasText: title }).click();
}

async function figureOf(page: Page, name: RegExp): Promise<number> {
  const label = await page.getByRole('button', { name }).getAttribute('aria-label');
  return Number(/: ([-\d.e+]+) /.exec(label ?? '')?.[1]);
}

const BETWEEN = /^Elastic between the two angles/;

async function between(page: Page): Promise<number> {
  await page.waitForTimeout(300);
  await settled(page);
  return figureOf(page, BETWEEN);
}

describe('elastic between two angles', () => {
  test('is marked on the plot by dragging, and follows arrow keys and typing', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new');
    await settled(page);
    await open(page, 'Between two angles');
    const first = await between(page);
    const from = area(page).getByLabel('From (°)');
    const to = area(page).getByLabel('To (°)');
    const before = [await from.inputValue(), await to.inputValue()];

    const plot = page.getByRole('img', { name: /^Differential cross section/ });
    const box = await plot.boundingBox();
    if (!box) throw new Error('the plot has no box');
    const at = (share: number) => box.x + box.width * share;
    await page.mouse.move(at(0.7), box.y + 120);
    await page.mouse.down();
    await page.mouse.move(at(0.5), box.y + 130, { steps: 6 });
    await page.mouse.move(at(0.3), box.y + 130, { steps: 6 });
    await page.mouse.up();
    const dragged = await between(page);
    const ends = [Number(await from.inputValue()), Number(await to.inputValue())];
    expect(ends.map(String)).not.toEqual(before);
    // Dragged from right to left: the smaller angle is still the first.
    expect(ends[0]).toBeLessThan(ends[1] ?? 0);
    expect(ends.every((end) => Number.isInteger(end))).toBe(true);
    expect(dragged).not.toBe(first);

    await tabTo(page, to);
    await page.keyboard.press('ArrowUp');
    expect(Number(await to.inputValue())).toBe((ends[1] ?? 0) + 1);
    expect(await between(page)).toBeGreaterThan(dragged);

    await retype(page, from, '0');
    await retype(page, to, '180');
    expectRelative(await between(page), await figureOf(page, /^Elastic σ/), 1e-12);
    await retype(page, from, '200');
    await area(page).getByText('From must be at most 180.').waitFor();
  });

  test('of a bare Coulomb potential is finite beyond an angle, and says what halving it does', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new?start=ion');
    await settled(page);
    await page.getByLabel('Form', { exact: true }).selectOption('coulomb');
    await settled(page);
    await open(page, 'Between two angles');
    await retype(page, area(page).getByLabel('To (°)'), '180');
    await retype(page, area(page).getByLabel('From (°)'), '0.1');
    await area(page)
      .getByText(/this is 4\.000 times as much/)
      .waitFor();
    await retype(page, area(page).getByLabel('From (°)'), '0');
    await area(page).getByText('divergent', { exact: true }).waitFor();
  });
});

test('a question mark beside a number opens what it is, by keyboard, and gives the focus back', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/cases/new');
  await settled(page);
  const mark = page.getByRole('button', { name: 'What is Elastic σ?' });
  await tabTo(page, mark);
  await page.keyboard.press('Enter');
  const dialog = page.getByRole('dialog', { name: 'Elastic cross section' });
  await dialog.locator('.katex').first().waitFor();
  for (const fact of ['Unit', 'Frame', 'Approximation', 'Numerical error', 'Source']) {
    await dialog.getByText(fact, { exact: true }).waitFor();
  }
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'detached' });
  // The dialog hands the focus back once it is gone.
  await expect
    .poll(() => mark.evaluate((element) => element === document.activeElement))
    .toBe(true);

  await page.getByRole('button', { name: /^What is dσ\/dΩ here/ }).click();
  const point = page.getByRole('dialog', { name: 'dσ/dΩ at 60°' });
  // The transform with the values of this case in it, and the amplitude it gives.
  await point.locator('annotation', { hasText: '5.12317' }).first().waitFor({ state: 'attached' });
  await point.getByRole('button', { name: 'Copy as LaTeX' }).click();
  const latex = await page.evaluate(() => navigator.clipboard.readText());
  expect(latex).toContain('\\begin{align*}');
  expect(latex).toContain('-0.367015');
});

test('the plot shows the ratio to Rutherford where there are charges, and nowhere else', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  expect(await page.getByRole('group', { name: 'What is drawn' }).count()).toBe(0);
  await goTo('/cases/new?start=ion');
  await settled(page);
  await page.getByRole('radio', { name: 'ratio' }).check();
  await page.getByText(/Divided by Rutherford’s cross section .* Z₁Z₂ = 158/).waitFor();
  await page.getByRole('img', { name: /^Ratio to Rutherford against angle/ }).waitFor();
});

test('the table of kinematics holds the angles of the case and is taken as a file', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new?start=ion');
  await settled(page);
  await open(page, 'Kinematics');
  const table = page.getByRole('region', { name: 'Table of kinematics' });
  await table.waitFor();
  expect(await table.getByRole('row').count()).toBe(1 + 171);
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    area(page).getByRole('button', { name: 'CSV' }).click(),
  ]);
  expect(download.suggestedFilename()).toBe('new-case-kinematics.csv');
});

test('V(r) is taken as CSV, SVG and PNG, and the golden-rule sheet as CSV', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  for (const [item, extension] of [
    ['CSV', 'csv'],
    ['SVG', 'svg'],
    ['PNG', 'png'],
  ] as const) {
    await page.getByRole('button', { name: 'Export V(r)' }).click();
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('menuitem', { name: item }).click(),
    ]);
    expect(download.suggestedFilename()).toBe(`new-case-potential.${extension}`);
  }
  await page.getByRole('link', { name: 'Golden rule' }).click();
  const [sheet] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'CSV' }).click(),
  ]);
  expect(sheet.suggestedFilename()).toBe('new-case-golden-rule.csv');
});

test('a neutron sample: scattering length density, ten-per-cent thickness, and a resonant absorber in words', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new?start=neutron');
  await settled(page);
  await open(page, 'In a material');
  await page.getByLabel('Material', { exact: true }).selectOption('vanadium');
  await page.getByRole('button', { name: /^Ten-per-cent thickness: 2\.8\d+ mm/ }).waitFor();
  await page.getByLabel('Material', { exact: true }).selectOption('water');
  await page.getByText('The numbers below wait for it.').waitFor();
  await page.getByLabel('Atoms the case describes').selectOption('H');
  await page.getByRole('button', { name: /^Scattering length density: -5\.58\d*e-7/ }).waitFor();
  await page.getByLabel('Material', { exact: true }).selectOption('cadmium');
  await area(page)
    .getByText(/Cd absorbs slow neutrons through a resonance/)
    .first()
    .waitFor();
  await page.getByLabel('Absorption of Cd at this wavelength').fill('2530 b');
  await page.getByLabel('Thickness (may be empty)').fill('1 mm');
  await area(page)
    .getByText(/absorption alone 8\.\d+ × 10⁻⁶/)
    .waitFor();
});

test('another source’s value is explained by the usual slip, or said to be unexplained', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await open(page, 'Another source’s value');
  const value = page.getByLabel('The other value, per steradian');
  // 4π times 0.0092794 Å²/sr, typed as a paper may print it.
  await value.fill('0.11661 Å²/sr');
  await area(page)
    .getByText(/is a total, 4π times the value per steradian/)
    .waitFor();
  await value.fill('0.0127 Å²');
  await area(page)
    .getByText(/none of the usual slips gives that/)
    .waitFor();
  await value.fill('0.00928');
  await area(page).getByText('The two values agree.').waitFor();
});

describe('an address that holds the case', () => {
  test('opens it for somebody else, on every section, and keeps their work apart', async () => {
    const one = await stage.visitor('experimentalist');
    await one.goTo('/cases/new?start=ion');
    await settled(one.page);
    await retype(one.page, one.page.getByLabel('Kinetic energy, lab'), '2.25 MeV');
    await settled(one.page);
    await open(one.page, 'Take it along');
    await one.page.getByRole('button', { name: 'Copy the address' }).click();
    await one.page.getByText('The address is copied.').waitFor();
    const address = await one.page.evaluate(() => navigator.clipboard.readText());
    expect(address).toMatch(/\/cases\/new#case1=[\w-]+$/);

    const other = await stage.visitor('theorist');
    await other.page.goto(address);
    await settled(other.page);
    expect(await other.page.locator('h1').textContent()).toBe('Alpha particles on gold');
    const energy = other.page.getByLabel('Kinetic energy, lab');
    expect(await energy.inputValue()).toBe('2.25 MeV');
    await retype(other.page, energy, '3 MeV');
    await settled(other.page);
    await other.page.getByRole('link', { name: 'Golden rule' }).click();
    await other.page.getByRole('heading', { name: /Where the matrix element/ }).waitFor();
    await other.page.reload();
    await other.page.getByRole('heading', { name: /Where the matrix element/ }).waitFor();
    expect(await energy.inputValue()).toBe('3 MeV');
  });

  test('asks who is there first, and comes back to the case', async () => {
    const one = await stage.visitor('experimentalist');
    await one.goTo('/cases/new');
    await settled(one.page);
    await open(one.page, 'Take it along');
    await one.page.getByRole('button', { name: 'Copy the address' }).click();
    const address = await one.page.evaluate(() => navigator.clipboard.readText());
    const nobody = await stage.visitor();
    await nobody.page.goto(address);
    await nobody.page
      .getByRole('heading', { name: /sign in/i })
      .first()
      .waitFor();
    expect(decodeURIComponent(nobody.page.url())).toContain('#case1=');
  });

  test('that was shortened says so', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new#case1=TZFBT8Mw');
    await page.getByText('This address opens no case.').waitFor();
    await page.getByRole('link', { name: 'Begin a new case' }).click();
    await settled(page);
  });
});

const VIEWS = (['light', 'dark'] as const).flatMap((theme) =>
  ([1440, 390] as const).map((width) => ({ theme, width })),
);

describe.each(VIEWS)('in $theme at $width px', (view) => {
  test('every aid is open to everyone', async () => {
    const { page, goTo } = await stage.visitor('experimentalist', view);
    await goTo('/cases/new?start=neutron');
    await settled(page);
    for (const summary of await area(page).locator('summary').all()) await summary.click();
    await page.getByLabel('Material', { exact: true }).selectOption('silicon');
    await page.getByRole('button', { name: /^Scattering length density/ }).waitFor();
    await page.getByLabel('The other value, per steradian').fill('4.5 b');
    await area(page)
      .getByText(/times ours/)
      .waitFor();
    await settled(page);
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
    await page.getByRole('button', { name: 'What is Elastic σ?' }).click();
    await page.getByRole('dialog').locator('.katex').first().waitFor();
    await expectAccessible(page);
  });
});
