import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import type { Page } from 'playwright-core';
import type { Account } from '#server/modules/users/account.entity.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';

let stage: Stage;
let owner: Account;
let firstCase: string;
beforeAll(async () => {
  stage = await openStage();
  const person = await stage.app.person('experimentalist');
  owner = person.account;
  firstCase = await saveCase(person.agent, 'Carbon film, forward cone', { tags: ['carbon'] });
  await saveCase(person.agent, 'Argon gas, backward angles');
  for (let n = 1; n <= 51; n += 1) await saveCase(person.agent, `Survey point ${n}`);
}, 120_000);
afterAll(() => stage.close());
afterEach(() => stage.settle());

const searchOf = (page: Page) => new URL(page.url()).searchParams;
const rows = (page: Page) => page.getByRole('table').getByRole('row');

test('the search goes into the address and survives a reload', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases');
  await page.getByLabel('Search the cases').fill('carbon film');
  await page.waitForURL(/q=carbon/);
  await expect.poll(() => rows(page).count()).toBe(2);
  await page.reload();
  await page.getByRole('link', { name: /Carbon film, forward cone/ }).waitFor();
  expect(await page.getByLabel('Search the cases').inputValue()).toBe('carbon film');
  expect(await rows(page).count()).toBe(2);
});

test('order, filter, tag and page live in the address too', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases');
  await page.getByRole('columnheader', { name: 'Case' }).getByRole('link').click();
  await page.waitForURL(/sort=title/);
  const heading = page.getByRole('columnheader', { name: 'Case' });
  await expect.poll(() => heading.getAttribute('aria-sort')).toBe('ascending');
  await page.getByRole('link', { name: /Argon gas/ }).waitFor();
  await page.getByRole('link', { name: 'Next page' }).click();
  await page.waitForURL(/page=2/);
  await page.getByText('51–53 of 53 cases').waitFor();
  await page.getByLabel('Status').selectOption('draft');
  await page.waitForURL((url) => !url.searchParams.has('page'));
  expect(searchOf(page).get('status')).toBe('draft');
  expect(searchOf(page).get('sort')).toBe('title');
  await page.getByRole('link', { name: 'carbon', exact: true }).click();
  await expect.poll(() => rows(page).count()).toBe(2);
  await page.goBack();
  await page.getByText('1–50 of 53 cases').waitFor();
});

test('nothing found says so and leads back', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases?q=zirconium');
  await page.getByText('No case fits “zirconium” and the filters.').waitFor();
  await page.getByRole('link', { name: 'Show every case' }).click();
  await page.getByText('1–50 of 53 cases').waitFor();
});

test('an address that makes no sense shows the list as it is', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases?page=-3&sort=colour&status=lost');
  await page.getByText('1–50 of 53 cases').waitFor();
});

test('a person outside the campaign finds neither the case in the list nor at its address', async () => {
  const visitor = await stage.visitor('theorist');
  visitor.console.expect(/404 \(Not Found\).*\/api\/cases\//);
  const { page, goTo } = visitor;
  await goTo('/cases');
  await page.getByText('No case yet.').waitFor();
  await page.goto(`/cases/${firstCase}`);
  await page.getByRole('heading', { name: 'Not found', level: 1 }).waitFor();
});

test('an administrator reads no case and has no room for them', async () => {
  const { page, goTo } = await stage.visitor('administrator');
  await goTo('/');
  await page.getByRole('heading', { name: 'People', level: 1 }).waitFor();
  const rooms = page.getByRole('navigation', { name: 'Rooms' });
  expect(await rooms.getByRole('link', { name: 'Cases' }).count()).toBe(0);
  await goTo('/cases');
  await page.getByText('An administrator reads no case.').waitFor();
});

test('a server that fails is reported in words, and the list comes on a second try', async () => {
  const visitor = await stage.visitor(owner);
  visitor.console.expect(/Failed to load resource/);
  const { page, goTo } = visitor;
  await page.route('**/api/cases?*', (route) => route.abort());
  await goTo('/cases?q=argon');
  await page.getByText('The cases could not be loaded.').waitFor();
  await page.getByText(/The server cannot be reached/).waitFor();
  await page.unroute('**/api/cases?*');
  await page.getByRole('button', { name: 'Try again' }).click();
  await page.getByRole('link', { name: /Argon gas/ }).waitFor();
});
