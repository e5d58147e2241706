import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('an administrator creates an account, and its owner signs in', async () => {
  const { page, goTo } = await stage.visitor('administrator');
  await goTo('/people');
  await page.getByRole('button', { name: 'New account' }).click();
  const dialog = page.getByRole('dialog', { name: 'New account' });
  await dialog.getByLabel('Name').fill('Ash Marsh');
  await dialog.getByLabel('E-mail').fill('ash.marsh@example.org');
  await dialog.getByLabel('Role').selectOption('theorist');
  await dialog.getByLabel('First password').fill('too short');
  await dialog.getByRole('button', { name: 'Create the account' }).click();
  await dialog.getByText('A password needs at least 12 characters.').waitFor();
  await dialog.getByLabel('First password').fill('a first password');
  await dialog.getByRole('button', { name: 'Create the account' }).click();
  await dialog.waitFor({ state: 'detached' });
  await page.getByRole('row', { name: /Ash Marsh/ }).waitFor();

  const ash = await stage.visitor();
  await ash.goTo('/sign-in');
  await ash.page.getByLabel('E-mail').fill('Ash.Marsh@example.org');
  await ash.page.getByLabel('Password').fill('a first password');
  await ash.page.getByRole('button', { name: 'Sign in' }).click();
  await ash.page.getByRole('heading', { name: 'Desk', level: 1 }).waitFor();
  await ash.page.getByRole('banner').getByText('Theorist').waitFor();
});

test('a taken address is refused beside the form, and nothing typed is lost', async () => {
  await makeAccount(stage.app.em(), { email: 'taken@example.org' });
  const visitor = await stage.visitor('administrator');
  visitor.console.expect(/409 \(Conflict\).*\/api\/users/);
  const { page, goTo } = visitor;
  await goTo('/people');
  await page.getByRole('button', { name: 'New account' }).click();
  await page.getByLabel('Name').fill('Second Person');
  await page.getByLabel('E-mail').fill('taken@example.org');
  await page.getByLabel('First password').fill('a first password');
  await page.getByRole('button', { name: 'Create the account' }).click();
  const dialog = page.getByRole('dialog');
  await dialog
    .getByText(/taken@example\.org|address/i)
    .first()
    .waitFor();
  expect(await dialog.getByLabel('Name').inputValue()).toBe('Second Person');
});

test('a deactivated person can no longer sign in, and is let in again', async () => {
  const leaver = await makeAccount(stage.app.em(), { name: 'Leaver Person' });
  const { page, goTo } = await stage.visitor('administrator');
  await goTo('/people?q=leaver');
  await page.getByRole('button', { name: 'Deactivate Leaver Person' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Deactivate' }).click();
  await page.getByRole('row', { name: /Leaver Person.*Deactivated/ }).waitFor();

  const tries = await stage.visitor();
  tries.console.expect(/401 \(Unauthorized\).*\/api\/auth\/sign-in/);
  await tries.goTo('/sign-in');
  await tries.page.getByLabel('E-mail').fill(leaver.email);
  await tries.page.getByLabel('Password').fill(TEST_PASSWORD);
  await tries.page.getByRole('button', { name: 'Sign in' }).click();
  await tries.page.getByText('Not signed in.').waitFor();

  await page.getByRole('button', { name: 'Activate Leaver Person' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Activate' }).click();
  await page.getByRole('row', { name: /Leaver Person.*Active/ }).waitFor();
  await tries.page.getByRole('button', { name: 'Sign in' }).click();
  await tries.page.getByRole('heading', { name: 'Desk', level: 1 }).waitFor();
});

test('a role is changed, and the menu of its owner follows', async () => {
  const riser = await makeAccount(stage.app.em(), { name: 'Riser Person' });
  const { page, goTo } = await stage.visitor('administrator');
  await goTo('/people?q=riser');
  await page.getByRole('button', { name: 'Change Riser Person' }).click();
  await page.getByLabel('Role').selectOption('administrator');
  await page.getByRole('button', { name: 'Save' }).click();
  await page.getByRole('row', { name: /Riser Person.*Administrator/ }).waitFor();
  const own = await stage.visitor(riser);
  await own.goTo('/');
  await own.page.getByRole('link', { name: 'People' }).waitFor();
});

test('others are told whom to ask', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/people');
  await page.getByText('Accounts are kept by administrators.').waitFor();
});
