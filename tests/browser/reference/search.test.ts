import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import type { Page } from 'playwright-core';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectAccessible } from '#tests/browser/support/accessibility.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';

let stage: Stage;
let owner: Account;
beforeAll(async () => {
  stage = await openStage();
  const person = await stage.app.person('experimentalist');
  owner = person.account;
  await saveCase(person.agent, 'Calcium target, first try');
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const field = (page: Page) => page.getByRole('combobox', { name: /Search cases/ });
const activeText = (page: Page) =>
  page.evaluate(() => {
    const id = document.activeElement?.getAttribute('aria-activedescendant');
    return id ? document.getElementById(id)?.textContent : null;
  });

test('from / to a nuclide and into a case, by the keyboard alone', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/');
  await page.locator('body').press('/');
  await page.keyboard.type('calcium 40');
  await page.getByRole('option', { name: /Ca-40/ }).waitFor();
  await page.keyboard.press('ArrowDown');
  expect(await activeText(page)).toContain('Ca-40');
  expect(await field(page).getAttribute('aria-expanded')).toBe('true');
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { name: /Ca-40/, level: 1 }).waitFor();
  await page.getByRole('heading', { name: 'Mass and spin' }).waitFor();
  expect(new URL(page.url()).pathname).toBe('/reference/nuclides/Ca-40');
  const use = page.getByRole('link', { name: 'Use in a case' });
  for (let n = 0; n < 20; n += 1) {
    if (await use.evaluate((link) => link === document.activeElement)) break;
    await page.keyboard.press('Tab');
  }
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { name: 'Alpha particles on Ca-40', level: 1 }).waitFor();
});

test('hits come in groups; the arrows walk all of them and back into the field', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/reference');
  await field(page).fill('calcium');
  await page.getByRole('group', { name: 'Cases' }).waitFor();
  const groups = await page.getByRole('listbox').getByRole('group').count();
  expect(groups).toBeGreaterThanOrEqual(3);
  const options = await page.getByRole('option').count();
  await page.keyboard.press('ArrowUp');
  expect(await activeText(page)).toContain(await page.getByRole('option').last().textContent());
  await page.keyboard.press('ArrowDown');
  expect(await activeText(page)).toBeNull();
  for (let n = 0; n < options; n += 1) await page.keyboard.press('ArrowDown');
  expect(await activeText(page)).toContain(await page.getByRole('option').last().textContent());
  await page.keyboard.press('Home');
  expect(await activeText(page)).toContain(await page.getByRole('option').first().textContent());
  await page.getByRole('option', { name: /Calcium target, first try/ }).click();
  await page.getByRole('heading', { name: 'Calcium target, first try', level: 1 }).waitFor();
});

test('Escape closes the list, then leaves the field; the page’s own search is untouched', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases');
  await page.locator('body').press('/');
  await page.keyboard.type('gold');
  await page.getByRole('listbox', { name: 'Found' }).waitFor();
  await page.keyboard.press('Escape');
  await page.getByRole('listbox', { name: 'Found' }).waitFor({ state: 'hidden' });
  expect(await field(page).inputValue()).toBe('gold');
  await page.keyboard.press('Escape');
  expect(await field(page).inputValue()).toBe('');
  expect(await field(page).evaluate((input) => input === document.activeElement)).toBe(false);
  await page.getByLabel('Search the cases').fill('calcium');
  await page.waitForURL(/\/cases\?q=calcium/);
});

test('a group that was cut leads to its list', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/');
  await field(page).fill('tin');
  await page.getByRole('option', { name: /All \d+ nuclides/ }).click();
  await page.getByRole('heading', { name: 'Nuclides', level: 1 }).waitFor();
  expect(new URL(page.url()).searchParams.get('q')).toBe('tin');
});

test('others’ cases are not found; nothing found says so', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/');
  await field(page).fill('calcium');
  await page.getByRole('group', { name: 'Nuclides' }).waitFor();
  expect(await page.getByRole('group', { name: 'Cases' }).count()).toBe(0);
  await field(page).fill('calcium target');
  await page.getByText('Nothing is called “calcium target”.', { exact: false }).waitFor();
  await expectAccessible(page);
});

test('a server that fails is reported in the list', async () => {
  const visitor = await stage.visitor(owner);
  visitor.console.expect(/Failed to load resource/);
  const { page, goTo } = visitor;
  await goTo('/');
  await page.route('**/api/search*', (route) => route.abort());
  await field(page).fill('gold');
  await page.getByText('The server cannot be reached.', { exact: false }).waitFor();
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
  ['dark', 390],
] as const)('open, it has no violation in %s at %i px', async (theme, width) => {
  const { page, goTo } = await stage.visitor(owner, { theme, width });
  await goTo('/');
  if (width === 390) await page.getByRole('button', { name: 'Search', exact: true }).click();
  await field(page).fill('calcium');
  await page.getByRole('option').first().waitFor();
  await page.keyboard.press('ArrowDown');
  await expectAccessible(page);
});

test('on a narrow screen / opens the search over the page, and a hit closes it', async () => {
  const { page, goTo } = await stage.visitor(owner, { width: 390 });
  await goTo('/account');
  await page.locator('body').press('/');
  await page.getByRole('dialog', { name: 'Search' }).waitFor();
  expect(await field(page).evaluate((input) => input === document.activeElement)).toBe(true);
  await page.keyboard.type('graphite');
  await page
    .getByRole('option', { name: /Graphite/ })
    .first()
    .waitFor();
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { name: 'Materials', level: 1 }).waitFor();
  expect(await page.getByRole('dialog').count()).toBe(0);
  await page.locator('body').press('/');
  await page.getByRole('dialog', { name: 'Search' }).waitFor();
  await page.keyboard.press('Escape');
  await page.getByRole('dialog').waitFor({ state: 'detached' });
});
