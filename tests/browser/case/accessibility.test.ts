import { afterAll, afterEach, beforeAll, test } from 'vitest';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { settled } from './case-steps.ts';

let stage: Stage;
let owner: Account;
let id: string;
beforeAll(async () => {
  stage = await openStage();
  const { account, agent } = await stage.app.person('experimentalist');
  owner = account;
  id = await saveCase(agent, 'Every section of a case, with a title of some length', {
    tags: ['forward', 'survey'],
  });
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('a new case with its table of numbers: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases/new');
  await settled(page);
  await page.getByText(/The numbers as a table/).click();
  await page.getByRole('table').waitFor();
  await expectSoundInEveryView(page);
});

test.each(['golden-rule', 'record'])('%s: no violation in any view', async (section) => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo(`/cases/${id}?section=${section}`);
  await page.waitForLoadState('networkidle');
  await expectSoundInEveryView(page);
});

test('an older version: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo(`/cases/${id}/versions/1`);
  await settled(page);
  await expectSoundInEveryView(page);
});

test('a case with faults, and the dialog that saves it: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo(`/cases/${id}`);
  await settled(page);
  await page.getByLabel('Kinetic energy, lab').fill('ten');
  await page.getByText('One input needs mending', { exact: false }).waitFor();
  await expectSoundInEveryView(page);
  await page.getByLabel('Kinetic energy, lab').fill('110 eV');
  await page.keyboard.press('ControlOrMeta+s');
  await page.getByRole('dialog').waitFor();
  await expectSoundInEveryView(page);
});

test('the dialog that files a new case: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases/new');
  await settled(page);
  await page.keyboard.press('ControlOrMeta+s');
  await page.getByRole('dialog').waitFor();
  await expectSoundInEveryView(page);
});

test('the dialog that reads a table, with a faulty line: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo('/cases/new');
  await settled(page);
  await page.getByLabel('Form', { exact: true }).selectOption('tabulated');
  await settled(page);
  await page.getByRole('button', { name: /the table …/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('textbox').fill('r (fm);V (MeV)\n0;-5\n0,5;-4\n1;x\n2;-1\n3;-0,5');
  await dialog.getByText(/Line 4: /).waitFor();
  await expectSoundInEveryView(page);
});
