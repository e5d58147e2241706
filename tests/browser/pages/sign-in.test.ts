import { hash } from 'bcryptjs';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import type { Account } from '#server/modules/users/account.entity.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';

let stage: Stage;
let person: Account;
beforeAll(async () => {
  stage = await openStage();
  person = await makeAccount(stage.app.em(), { name: 'Rowan Field' });
  await saveCase(await stage.app.signedIn(person), 'Neutrons on a foil');
  await makeAccount(stage.app.em(), {
    email: 'theorist@lowmoor.example',
    role: 'theorist',
    demo: true,
    passwordHash: await hash('lowmoor-demo', 4),
  });
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('a stranger signs in and comes to the address they asked for', async () => {
  const { page, goTo } = await stage.visitor();
  await goTo('/cases?q=foil');
  expect(new URL(page.url()).pathname).toBe('/sign-in');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill(TEST_PASSWORD);
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { name: 'Cases', level: 1 }).waitFor();
  expect(new URL(page.url()).search).toBe('?q=foil');
  await page.getByRole('link', { name: 'Neutrons on a foil' }).waitFor();
  expect(await page.title()).toBe('Cases · Tallybarn');
});

test('a wrong password is refused in words, and what was typed stays', async () => {
  const visitor = await stage.visitor();
  visitor.console.expect(/401 \(Unauthorized\).*\/api\/auth\/sign-in/);
  const { page, goTo } = visitor;
  await goTo('/sign-in');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill('not the password at all');
  await page.getByRole('button', { name: 'Sign in' }).click();
  const alert = page.getByRole('alert');
  await alert.waitFor();
  expect(await alert.textContent()).toMatch(/Not signed in\..*password/s);
  expect(await page.getByLabel('E-mail').inputValue()).toBe(person.email);
});

test('empty fields are named before anything is sent', async () => {
  const { page, goTo } = await stage.visitor();
  await goTo('/sign-in');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByText('Type your e-mail address.').waitFor();
  const email = page.getByLabel('E-mail');
  expect(await email.getAttribute('aria-invalid')).toBe('true');
  expect(await email.evaluate((element) => element === document.activeElement)).toBe(true);
});

const FORGED = [
  'https://elsewhere.example/cases',
  '//elsewhere.example',
  '/\\elsewhere.example',
  'javascript:alert(1)',
  'http://',
  '/sign-in',
];
test.each(FORGED)('the forged return address %s leads to the desk', async (next) => {
  const { page, goTo } = await stage.visitor(person);
  await goTo(`/sign-in?next=${encodeURIComponent(next)}`);
  await page.getByRole('heading', { name: 'Desk', level: 1 }).waitFor();
  expect(new URL(page.url()).href).toBe(`${stage.app.url}/`);
});

test('a demo account is filled in by one click', async () => {
  const { page, goTo } = await stage.visitor();
  await goTo('/sign-in');
  await page.getByRole('button', { name: /^Theorist/ }).click();
  expect(await page.getByLabel('E-mail').inputValue()).toBe('theorist@lowmoor.example');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: 'Desk', level: 1 }).waitFor();
});

test('a lost session is regained over the page, at the same address', async () => {
  const visitor = await stage.visitor(person);
  visitor.console.expect(/401 \(Unauthorized\).*\/api\//);
  const { page, context, goTo } = visitor;
  await goTo('/cases');
  await page.getByRole('link', { name: 'Neutrons on a foil' }).waitFor();
  await context.clearCookies();
  await page.getByLabel('Search the cases').fill('foil');
  const dialog = page.getByRole('dialog', { name: 'Sign in again' });
  await dialog.waitFor();
  expect(await dialog.getByLabel('E-mail').inputValue()).toBe(person.email);
  await dialog.getByLabel('Password').fill(TEST_PASSWORD);
  await page.keyboard.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  await page.getByRole('link', { name: 'Neutrons on a foil' }).waitFor();
  expect(new URL(page.url()).search).toBe('?q=foil');
});

test('signing out in one tab asks the other to sign in again, and keeps what stands there', async () => {
  const visitor = await stage.visitor(person);
  visitor.console.expect(/401 \(Unauthorized\).*\/api\//);
  const { page, context, goTo } = visitor;
  await goTo('/account');
  await page.getByLabel('Current password').fill('half typed');
  await context.clearCookies();
  await page.clock.install();
  await page.clock.fastForward(120_000);
  await page.evaluate(() => window.dispatchEvent(new Event('visibilitychange')));
  const dialog = page.getByRole('dialog', { name: 'Sign in again' });
  await dialog.waitFor();
  await dialog.getByLabel('Password').fill(TEST_PASSWORD);
  await page.keyboard.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  expect(await page.getByLabel('Current password').inputValue()).toBe('half typed');
});

test('declining leaves the page as it is and says what is not possible', async () => {
  const visitor = await stage.visitor(person);
  visitor.console.expect(/401 \(Unauthorized\).*\/api\//);
  const { page, context, goTo } = visitor;
  await goTo('/cases');
  await page.getByRole('link', { name: 'Neutrons on a foil' }).waitFor();
  await context.clearCookies();
  await page.getByLabel('Search the cases').fill('foil');
  await page.getByRole('dialog', { name: 'Sign in again' }).waitFor();
  await page.keyboard.press('Escape');
  await page.getByText('You are signed out.').waitFor();
  expect(await page.getByLabel('Search the cases').inputValue()).toBe('foil');
  await page.getByRole('button', { name: 'Sign in again' }).click();
  const dialog = page.getByRole('dialog', { name: 'Sign in again' });
  await dialog.getByLabel('Password').fill(TEST_PASSWORD);
  await page.keyboard.press('Enter');
  await page.getByRole('link', { name: 'Neutrons on a foil' }).waitFor();
});

test('signing out offers to clear unsaved work of this computer', async () => {
  const { page, goTo } = await stage.visitor(person);
  await goTo('/');
  const key = `tallybarn.draft.${person.id}.case:new`;
  const draft = { title: 'Half a case', href: '/cases/new', savedAt: new Date().toISOString() };
  await page.evaluate(([name, value]) => localStorage.setItem(name, value), [
    key,
    JSON.stringify({ ...draft, value: {} }),
  ] as const);
  await page.getByRole('button', { name: 'Sign out' }).click();
  const dialog = page.getByRole('dialog', { name: 'Unsaved work on this computer' });
  await dialog.getByText('Half a case').waitFor();
  await dialog.getByRole('button', { name: 'Clear and sign out' }).click();
  await page.getByRole('heading', { name: 'Sign in', level: 1 }).waitFor();
  expect(await page.evaluate((name) => localStorage.getItem(name), key)).toBeNull();
});
