import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { retype, settled, tabTo } from './case-steps.ts';

let stage: Stage;
let owner: Account;
let id: string;
beforeAll(async () => {
  stage = await openStage();
  const { account, agent } = await stage.app.person('experimentalist');
  owner = account;
  id = await saveCase(agent, 'A case against its limits');
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const SHOWN = 'Show the limits';

test('by keyboard: every limit of a Yukawa potential holds, and a changed case is asked anew', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo(`/cases/${id}`);
  await settled(page);
  await tabTo(page, page.locator('summary', { hasText: 'Limits' }));
  await page.keyboard.press('Enter');
  await tabTo(page, page.getByRole('button', { name: SHOWN }));
  await page.keyboard.press('Enter');
  const table = page.getByRole('region', { name: 'Limits of the case' });
  await table.waitFor();
  const rows = await table.locator('tbody tr').allInnerTexts();
  expect(rows).toHaveLength(6);
  for (const row of rows) expect(row).toContain('holds');
  // A quarter of dσ/dΩ at 60°: |f| = 2 mu |V0| a³/hbar² over 1 + k²a², with hbar²/2m = 3.80998 eV angstrom².
  const quarter = (10 / 3.8099821 / (1 + 5.12316722 ** 2)) ** 2 / 4;
  const strength = rows.find((row) => /half the strength/i.test(row)) ?? '';
  const values = strength.match(/0\.0\d+/g)?.map(Number) ?? [];
  expect(values).toHaveLength(2);
  for (const value of values) expect(Math.abs(value / quarter - 1)).toBeLessThan(1e-6);
  await expectSoundInEveryView(page);

  await retype(page, page.getByLabel('Kinetic energy, lab'), '200 eV');
  await settled(page);
  expect(await table.count()).toBe(0);
  await page.getByRole('button', { name: 'Show the limits of the changed case' }).click();
  await table.waitFor();
});

test('a limit the server refuses is said in words, the others stand', async () => {
  const { page, goTo, console: lines } = await stage.visitor(owner);
  await goTo(`/cases/${id}`);
  await settled(page);
  await page.route('**/api/estimates', async (route) => {
    if (!(route.request().postData() ?? '').includes('"coulomb"')) return route.continue();
    await route.fulfill({
      status: 422,
      contentType: 'application/problem+json',
      body: JSON.stringify({
        type: 'about:blank',
        title: 'Too much work',
        status: 422,
        code: 'tooMuchWork',
        detail: 'This would take too long.',
      }),
    });
  });
  await page.locator('summary', { hasText: 'Limits' }).click();
  await page.getByRole('button', { name: SHOWN }).click();
  const table = page.getByRole('region', { name: 'Limits of the case' });
  await table.waitFor();
  const rows = await table.locator('tbody tr').allInnerTexts();
  expect(rows[0]).toMatch(/Not shown\.\s+This would take too long\./);
  expect(rows.filter((row) => row.includes('holds'))).toHaveLength(5);
  lines.expect(/422/);
});
