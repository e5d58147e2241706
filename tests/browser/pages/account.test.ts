import request from 'supertest';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('a token is made, shown once, works for a script, and is revoked', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/account');
  await page.getByRole('button', { name: 'New token' }).click();
  await page.getByLabel('Name').fill('energy sweep');
  await page.getByLabel('It may').selectOption('read');
  await page.getByRole('button', { name: 'Make the token' }).click();
  const secret = await page.getByRole('textbox', { name: 'Token' }).inputValue();
  await page.getByRole('button', { name: 'Copy' }).click();
  await page.getByText('Copied.').waitFor();
  expect(await page.evaluate(() => navigator.clipboard.readText())).toBe(secret);
  await page.getByRole('button', { name: 'I have copied it' }).click();
  await page.getByText('energy sweep').waitFor();
  expect(await page.content()).not.toContain(secret);

  const ask = () =>
    request(stage.app.url).get('/api/cases').set('Authorization', `Bearer ${secret}`);
  await ask().expect(200);
  await page.getByRole('button', { name: 'Revoke energy sweep' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Revoke' }).click();
  await page.getByText('No tokens.').waitFor();
  await ask().expect(401);
});

test('the password is changed; the wrong current one is refused beside its field', async () => {
  const person = await makeAccount(stage.app.em());
  const visitor = await stage.visitor(person);
  visitor.console.expect(/422 .*\/api\/auth\/password/);
  const { page, goTo } = visitor;
  await goTo('/account');
  const change = async (current: string, again: string) => {
    await page.getByLabel('Current password').fill(current);
    await page.getByLabel('New password', { exact: true }).fill('another long password');
    await page.getByLabel('New password again').fill(again);
    await page.getByRole('button', { name: 'Change password' }).click();
  };
  await change(TEST_PASSWORD, 'another long passwort');
  await page.getByText('This is not the same as the new password; type it again.').waitFor();
  await change('not my password', 'another long password');
  await page.getByText('This is not your current password.').waitFor();
  expect(await page.getByLabel('Current password').getAttribute('aria-invalid')).toBe('true');
  await change(TEST_PASSWORD, 'another long password');
  await page.getByText('Your password is changed.').waitFor();
  await stage.app
    .anonymous()
    .post('/api/auth/sign-in')
    .send({ email: person.email, password: 'another long password' })
    .expect(200);
});

test('a chosen theme is shown before anything else and survives a reload', async () => {
  const { page, goTo } = await stage.visitor('theorist', { theme: 'light' });
  await goTo('/account');
  const paper = () =>
    page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  const lightPaper = await paper();
  await page.getByRole('main').getByRole('radio', { name: 'Dark' }).check();
  await expect.poll(paper).not.toBe(lightPaper);
  const darkPaper = await paper();
  await page.reload({ waitUntil: 'commit' });
  await page.locator('#root').waitFor({ state: 'attached' });
  expect(await paper()).toBe(darkPaper);
});
