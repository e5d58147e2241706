import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const SOUND = 'Sound up to a deviation of';
const USABLE = 'Usable up to a deviation of';

test('an administrator changes a threshold, sees who changed what, and goes back to the defaults', async () => {
  const { page, goTo } = await stage.visitor('administrator');
  await goTo('/people');
  await page.getByRole('link', { name: 'Settings' }).click();
  await page.getByLabel(SOUND).fill('0.3');
  const change = page.getByRole('button', { name: 'Change the settings' });
  await change.click();
  await page.getByText('“usable” must be above “sound”', { exact: false }).waitFor();
  expect(await page.getByLabel(USABLE).evaluate((field) => field === document.activeElement)).toBe(
    true,
  );
  await page.getByLabel(SOUND).fill('1 %');
  await page.getByLabel('Note: why?', { exact: false }).fill('Stricter for the proposal.');
  await change.click();
  await page.getByText('The settings are changed; they are at version 1.').waitFor();
  expect(await page.getByLabel(SOUND).inputValue()).toBe('0.01');
  await page.getByText('Stricter for the proposal.').waitFor();
  await page.getByText('Sound, deviation').waitFor();
  await expectSoundInEveryView(page);
  await page.setViewportSize({ width: 1440, height: 900 });
  await page.getByRole('button', { name: 'Fill in the defaults' }).click();
  await change.click();
  await page.getByText('they are at version 2.').waitFor();
  await page.getByText('Version 2', { exact: true }).waitFor();
});

test('two administrators at once: the second is shown what the first did, and nothing typed is lost', async () => {
  const first = await stage.visitor('administrator');
  const second = await stage.visitor('administrator');
  await first.goTo('/admin/settings');
  await second.goTo('/admin/settings');
  second.console.expect(/412 \(Precondition Failed\).*\/api\/settings/);
  await second.page.getByLabel(USABLE).fill('0.4');
  await first.page.getByLabel(SOUND).fill('0.05');
  await first.page.getByRole('button', { name: 'Change the settings' }).click();
  await first.page.getByText(/The settings are changed/).waitFor();
  await second.page.getByRole('button', { name: 'Change the settings' }).click();
  await second.page.getByText(/changed the settings after you began/).waitFor();
  expect(await second.page.getByLabel(USABLE).inputValue()).toBe('0.4');
  await second.page.getByRole('button', { name: 'Keep what I typed' }).click();
  await second.page.getByRole('button', { name: 'Change the settings' }).click();
  await second.page.getByText(/The settings are changed/).waitFor();
});

test('everyone else sees the values and whom to ask: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/admin/settings');
  await page.getByText('Settings are changed by administrators.').waitFor();
  expect(await page.getByRole('link', { name: 'Settings' }).count()).toBe(0);
  expect(await page.getByRole('button', { name: 'Change the settings' }).count()).toBe(0);
  await page.waitForLoadState('networkidle');
  await expectSoundInEveryView(page);
});
