import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { TEST_PASSWORD } from '#tests/support/factories.ts';
import { retype, settled } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const energyOf = (page: Page) => page.getByLabel('Kinetic energy, lab');

test('unsaved work, half-typed texts among it, survives a reload and can be discarded', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Kept');
  const { page, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}`);
  await settled(page);
  await retype(page, energyOf(page), '250 eV');
  await page.getByLabel('Charge of the centre (e)').fill('1.5');
  await page.reload();
  await page.getByText(/Restored unsaved changes from \d\d:\d\d/).waitFor();
  expect(await energyOf(page).inputValue()).toBe('250 eV');
  const charge = page.getByLabel('Charge of the centre (e)');
  expect(await charge.inputValue()).toBe('1.5');
  await page.getByText('The charge must be a whole number.').first().waitFor();

  await page.getByRole('button', { name: 'Discard' }).click();
  expect(await energyOf(page).inputValue()).toBe('100 eV');
  expect(await charge.inputValue()).toBe('0');
  await page.reload();
  await settled(page);
  expect(await page.getByText(/Restored unsaved/).count()).toBe(0);
});

test('another tab is offered the work and does not lose its own', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Offered');
  const { page, context, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}`);
  await settled(page);
  await retype(page, energyOf(page), '250 eV');
  const second = await context.newPage();
  await second.goto(`/cases/${id}`);
  await settled(second);
  expect(await energyOf(second).inputValue()).toBe('100 eV');
  await second.getByRole('button', { name: 'Take them over' }).click();
  expect(await energyOf(second).inputValue()).toBe('250 eV');
  await second.getByLabel('Undo (Ctrl+Z)').click();
  expect(await energyOf(second).inputValue()).toBe('100 eV');
});

test('undo and redo walk field by field, by key and by button', async () => {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/cases/new');
  await settled(page);
  await retype(page, energyOf(page), '500 eV');
  await page.getByLabel('Charge of the centre (e)').fill('3');
  await page.keyboard.press('ControlOrMeta+z');
  expect(await page.getByLabel('Charge of the centre (e)').inputValue()).toBe('0');
  expect(await energyOf(page).inputValue()).toBe('500 eV');
  await page.keyboard.press('ControlOrMeta+z');
  expect(await energyOf(page).inputValue()).toBe('100 eV');
  await page.keyboard.press('ControlOrMeta+Shift+z');
  expect(await energyOf(page).inputValue()).toBe('500 eV');
  await page.getByLabel('Redo (Ctrl+Shift+Z)').click();
  expect(await page.getByLabel('Charge of the centre (e)').inputValue()).toBe('3');
  expect(await page.getByLabel('Redo (Ctrl+Shift+Z)').isDisabled()).toBe(true);
});

test('a text that is no energy is named beside its field, on the line and in the summary, and the last figures stay', async () => {
  const visitor = await stage.visitor('theorist');
  const { page, goTo } = visitor;
  await goTo('/cases/new');
  await settled(page);
  await retype(page, energyOf(page), '10 kilo');
  await page.getByText('One input needs mending', { exact: false }).waitFor();
  expect(await energyOf(page).getAttribute('aria-invalid')).toBe('true');
  const line = page.getByRole('list', { name: 'Beam line' });
  expect(await line.getByRole('button', { name: /^Beam/ }).textContent()).toMatch(/energy unit/);
  // "1 keV" was valid on the way: its figures are still those shown.
  expect(await page.getByRole('button', { name: /^Elastic σ/ }).count()).toBe(1);
  await retype(page, energyOf(page), '10 keV');
  await page.getByText('One input needs mending', { exact: false }).waitFor({ state: 'detached' });
});

test('what only the server can refuse stands beside its field', async () => {
  const visitor = await stage.visitor('theorist');
  const { page, goTo } = visitor;
  visitor.console.expect(/422/);
  await goTo('/cases/new');
  await settled(page);
  await page.getByLabel('Kind of target').selectOption('nuclide');
  const nuclide = page.getByRole('textbox', { name: 'Nuclide', exact: true });
  await nuclide.fill('Xx-12');
  await page.getByText('One input needs mending', { exact: false }).waitFor();
  expect(await nuclide.getAttribute('aria-invalid')).toBe('true');
  await nuclide.fill('ca40');
  await page.getByText('One input needs mending', { exact: false }).waitFor({ state: 'detached' });
  await settled(page);
});

test('a session that ends while typing is regained over the page, and the save goes on', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Regained');
  const visitor = await stage.visitor(account);
  visitor.console.expect(/401/);
  const { page, context, goTo } = visitor;
  await goTo(`/cases/${id}`);
  await settled(page);
  await context.clearCookies();
  await retype(page, energyOf(page), '777 eV');
  const dialog = page.getByRole('dialog', { name: 'Sign in again' });
  await dialog.waitFor();
  await dialog.getByLabel('Password').fill(TEST_PASSWORD);
  await page.keyboard.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  expect(await energyOf(page).inputValue()).toBe('777 eV');
  await settled(page);
  await page.keyboard.press('ControlOrMeta+s');
  await page.getByRole('dialog', { name: 'Save version 2' }).waitFor();
  await page.keyboard.press('ControlOrMeta+s');
  await page.getByText(/version 2, saved/).waitFor();
});
