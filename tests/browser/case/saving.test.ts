import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { retype, settled } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const energyOf = (page: Page) => page.getByLabel('Kinetic energy, lab');

async function saveNote(page: Page, note: string): Promise<void> {
  await page.keyboard.press('ControlOrMeta+s');
  await page.getByRole('dialog').waitFor();
  await page.keyboard.type(note);
  await page.keyboard.press('ControlOrMeta+s');
}

test('saved, reloaded, edited in two tabs, and the stale save resolved field by field', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Two tabs');
  const visitor = await stage.visitor(account);
  const { page, context, goTo } = visitor;
  visitor.console.expect(/412/);
  await goTo(`/cases/${id}`);
  await settled(page);

  await retype(page, energyOf(page), '150 eV');
  await saveNote(page, 'a little faster');
  await page.getByText(/version 2, saved/).waitFor();
  await page.reload();
  await settled(page);
  expect(await energyOf(page).inputValue()).toBe('150 eV');

  const second = await context.newPage();
  await second.goto(`/cases/${id}`);
  await settled(second);

  await retype(page, energyOf(page), '200 eV');
  await page.getByRole('radio', { name: 'relativistic', exact: true }).check();
  await saveNote(page, 'first tab');
  await page.getByText(/version 3, saved/).waitFor();

  await retype(second, energyOf(second), '300 eV');
  await second.getByLabel('Charge of the centre (e)').fill('2');
  await saveNote(second, 'second tab');
  const dialog = second.getByRole('dialog', { name: /Version 3 was saved meanwhile/ });
  await dialog.waitFor();
  const energy = dialog.getByRole('group', { name: /^Energy/ });
  expect(await energy.textContent()).toMatch(/changed by both.*150 eV.*300 eV.*200 eV/s);
  const save = dialog.getByRole('button', { name: 'Save version 4' });
  expect(await save.isDisabled()).toBe(true);
  await energy.getByLabel(/Keep mine/).check();
  await save.click();
  await second.getByText(/version 4, saved/).waitFor();
  await dialog.waitFor({ state: 'detached' });

  // What only one side had changed is there without being asked for.
  expect(await energyOf(second).inputValue()).toBe('300 eV');
  expect(await second.getByLabel('Charge of the centre (e)').inputValue()).toBe('2');
  expect(await second.getByRole('radio', { name: 'relativistic', exact: true }).isChecked()).toBe(
    true,
  );
  await second.getByRole('link', { name: 'Record' }).click();
  const versions = second.getByRole('region', { name: 'Versions' });
  await versions.getByText('second tab').waitFor();
  expect(await versions.getByRole('listitem').count()).toBe(4);
  const changes = second.getByRole('region', { name: 'Differences' });
  await changes.getByText('200 eV').waitFor();
  expect(await changes.textContent()).toMatch(/Energy.*200 eV.*300 eV/s);
  await second.close();
});

test('an older version is shown as it was, and restored as a new one', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Restored');
  const { page, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}`);
  await settled(page);
  await retype(page, energyOf(page), '1 keV');
  await saveNote(page, 'ten times');
  await page.getByText(/version 2, saved/).waitFor();
  const computedNow = page.getByText(/figures of version 1 are those tallybarn \S+ gave/);
  expect(await computedNow.count()).toBe(0);

  await goTo(`/cases/${id}/versions/1`);
  await page.getByText('Version 1, as it was saved.').waitFor();
  // The aids are not part of what was saved, and say so.
  expect(await computedNow.textContent()).toMatch(/computed now from its inputs/);
  expect(await energyOf(page).inputValue()).toBe('100 eV');
  expect(await energyOf(page).isDisabled()).toBe(true);
  await page.getByRole('button', { name: 'Restore as new version' }).click();
  await page.waitForURL(new RegExp(`/cases/${id}$`));
  await page.getByText('unsaved changes', { exact: true }).waitFor();
  expect(await energyOf(page).inputValue()).toBe('100 eV');
  await saveNote(page, 'back');
  await page.getByText(/version 3, saved/).waitFor();
});

test('withdrawing asks for a reason and leaves the case on record', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Withdrawn');
  const { page, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}?section=record`);
  await page.getByRole('button', { name: /Withdraw version 1/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Reason').fill('Wrong target');
  await dialog.getByRole('button', { name: 'Withdraw version 1' }).click();
  await page.getByRole('region', { name: 'Versions' }).getByText('Withdrawn').waitFor();
});

test('a duplicate is a new case with the work as it stands, saved or not', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Original', { tags: ['carbon'] });
  const { page, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}`);
  await settled(page);
  await retype(page, energyOf(page), '321 eV');
  await page.getByRole('button', { name: 'Duplicate' }).click();
  await page.waitForURL(/\/cases\/new\?draft=/);
  await page.getByRole('heading', { name: 'Copy of Original' }).waitFor();
  expect(await energyOf(page).inputValue()).toBe('321 eV');
  await page.reload();
  await page.getByRole('heading', { name: 'Copy of Original' }).waitFor();
  await page.goBack();
  await page.getByRole('heading', { name: 'Original', exact: true }).waitFor();
  expect(await energyOf(page).inputValue()).toBe('321 eV');
});
