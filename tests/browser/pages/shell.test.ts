import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import type { Page } from 'playwright-core';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const focused = (page: Page) =>
  page.evaluate(() => document.activeElement?.id || document.activeElement?.textContent || '');

test('the first Tab offers to skip to the page', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/cases');
  await page.keyboard.press('Tab');
  expect(await focused(page)).toBe('Skip to the page');
  await page.keyboard.press('Enter');
  expect(await focused(page)).toBe('main');
});

test('walking to another page brings the focus to its heading', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/');
  await page.getByRole('link', { name: 'Account' }).click();
  await page.getByRole('heading', { name: 'Account', level: 1 }).waitFor();
  await expect.poll(() => focused(page)).toBe('Account');
  expect(await page.title()).toBe('Account · Tallybarn');
});

test('/ leads to the search of the top bar, ? shows the keys, and both can be switched off', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/cases');
  await page.locator('body').press('/');
  await expect.poll(() => focused(page)).toBe('header-search');
  await page.keyboard.type('?n/');
  expect(await page.locator('#header-search').inputValue()).toBe('?n/');
  await page.getByRole('heading', { name: 'Cases', level: 1 }).click();
  await page.keyboard.press('?');
  const dialog = page.getByRole('dialog', { name: 'Keys' });
  await dialog.getByRole('checkbox').uncheck();
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'detached' });
  await page.locator('body').press('?');
  await page.locator('body').press('n');
  expect(await page.getByRole('dialog').count()).toBe(0);
  expect(new URL(page.url()).pathname).toBe('/cases');
});

test('the menu of a narrow screen holds the focus and gives it back', async () => {
  const { page, goTo } = await stage.visitor('theorist', { width: 390 });
  await goTo('/');
  const button = page.getByRole('button', { name: 'Menu', exact: true });
  await button.click();
  const menu = page.getByRole('dialog', { name: 'Menu' });
  await menu.waitFor();
  for (let n = 0; n < 12; n += 1) {
    await page.keyboard.press('Tab');
    const inside = await menu.evaluate((element) => element.contains(document.activeElement));
    expect(inside).toBe(true);
  }
  await page.keyboard.press('Escape');
  await menu.waitFor({ state: 'detached' });
  expect(await button.evaluate((element) => element === document.activeElement)).toBe(true);
  await button.click();
  await menu.getByRole('link', { name: 'Cases' }).click();
  await page.getByRole('heading', { name: 'Cases', level: 1 }).waitFor();
  expect(await menu.count()).toBe(0);
});

test('a part of the page that does not arrive is reported in words, and the rooms stay', async () => {
  const visitor = await stage.visitor('theorist');
  visitor.console.expect(/Failed to (load|fetch)|account-page|dynamically imported/);
  const { page, goTo } = visitor;
  await page.route('**/assets/account-page-*.js', (route) => route.abort());
  await goTo('/');
  await page.getByRole('link', { name: 'Account' }).click();
  await page.getByRole('heading', { name: 'This page could not be fetched', level: 1 }).waitFor();
  await page.getByRole('navigation', { name: 'Rooms' }).waitFor();
  await page.unroute('**/assets/account-page-*.js');
  await page.getByRole('button', { name: 'Reload the page' }).click();
  await page.getByRole('heading', { name: 'Account', level: 1 }).waitFor();
});

test('the demo is announced on every page', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/account');
  await page.getByText(/^Demo:/).waitFor();
});
