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
  id = await saveCase(agent, 'A case against another source');
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

// 0.0092794 angstrom²/sr is dσ/dΩ of this case at 60°, 0.8167890 angstrom² its elastic total.
test('by keyboard: 4π too much is named, a stray number is not explained, another kind of unit is refused', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo(`/cases/${id}`);
  await settled(page);
  await tabTo(page, page.locator('summary', { hasText: 'Another source' }));
  await page.keyboard.press('Enter');
  const value = page.getByLabel(/^The other value/).first();
  await tabTo(page, value);
  await retype(page, value, String(4 * Math.PI * 0.0092794));
  await page.getByText('is a total, 4π times the value per steradian').waitFor();
  await expectSoundInEveryView(page);
  await page.setViewportSize({ width: 1440, height: 900 });
  await retype(page, value, String(7.5 * 0.0092794));
  await page.getByText('none of the usual slips gives that').waitFor();
  await retype(page, value, '3 eV');
  await page.getByText(/is not an area unit/).waitFor();
  expect(await page.getByText('times ours').count()).toBe(0);
});

test('the total: a number in bohr² with the label angstrom²', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await goTo(`/cases/${id}`);
  await settled(page);
  await page.locator('summary', { hasText: 'Another source' }).click();
  await page.getByRole('radio', { name: 'elastic total' }).check();
  await page
    .getByLabel(/^The other value/)
    .first()
    .fill(String(0.816789 / 0.28002852));
  await page.getByText(/is a number in a₀² with the label Å²/).waitFor();
});
