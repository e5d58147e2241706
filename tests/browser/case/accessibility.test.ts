import { afterAll, afterEach, beforeAll, describe, test } from 'vitest';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectAccessible, expectNoSidewaysScroll } from '#tests/browser/support/accessibility.ts';
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

const VIEWS = (['light', 'dark'] as const).flatMap((theme) =>
  ([1440, 390] as const).map((width) => ({ theme, width })),
);

describe.each(VIEWS)('in $theme at $width px', (view) => {
  test('a new case', async () => {
    const { page, goTo } = await stage.visitor(owner, view);
    await goTo('/cases/new');
    await settled(page);
    await page.getByText(/The numbers as a table/).click();
    await page.getByRole('table').waitFor();
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
  });

  test.each(['golden-rule', 'record'])('%s', async (section) => {
    const { page, goTo } = await stage.visitor(owner, view);
    await goTo(`/cases/${id}?section=${section}`);
    await page.waitForLoadState('networkidle');
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
  });

  test('a version, and a case with faults', async () => {
    const { page, goTo } = await stage.visitor(owner, view);
    await goTo(`/cases/${id}/versions/1`);
    await settled(page);
    await expectAccessible(page);
    await goTo(`/cases/${id}`);
    await settled(page);
    await page.getByLabel('Kinetic energy, lab').fill('ten');
    await page.getByText('One input needs mending', { exact: false }).waitFor();
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
  });

  test('the dialogs that save', async () => {
    const { page, goTo } = await stage.visitor(owner, view);
    await goTo('/cases/new');
    await settled(page);
    await page.keyboard.press('ControlOrMeta+s');
    await page.getByRole('dialog').waitFor();
    await expectAccessible(page);
    await goTo(`/cases/${id}`);
    await settled(page);
    await page.getByLabel('Kinetic energy, lab').fill('110 eV');
    await page.keyboard.press('ControlOrMeta+s');
    await page.getByRole('dialog').waitFor();
    await expectAccessible(page);
  });
});
