import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { readoutText, settled } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('the correction of McKinley and Feshbach: offered to relativistic leptons, applied, refused at its place', async () => {
  const { page, goTo, console } = await stage.visitor('experimentalist');
  console.expect(/422 .*\/api\/estimates/);
  await goTo('/cases/new');
  await settled(page);
  const box = page.getByRole('checkbox', { name: 'Correction of McKinley and Feshbach' });
  expect(await box.count()).toBe(0);

  await page.getByLabel('Kinetic energy, lab').fill('1 MeV');
  await page.getByRole('radio', { name: 'relativistic', exact: true }).check();
  await box.waitFor();
  // The Yukawa potential is not that of a charge.
  await box.check();
  await page
    .getByText(/cannot be applied: .*yukawa term is not the potential of a charge/)
    .waitFor();

  const term = page.getByRole('group', { name: 'Interaction term' });
  await term.getByLabel('Form', { exact: true }).selectOption('screenedCoulomb');
  await page.getByLabel(/^Charge of the centre/).fill('13');
  await settled(page);
  const corrected = await readoutText(page);
  await page.getByText(/with the correction of McKinley and Feshbach/).waitFor();
  await page
    .getByRole('link', { name: 'Golden rule' })
    .or(page.getByRole('tab', { name: 'Golden rule' }))
    .first()
    .click();
  const after = page.getByRole('region', { name: 'Factors after the golden rule' });
  await after.getByText('spin of the lepton (Mott), recoil included').waitFor();
  await after.getByText('correction of McKinley and Feshbach').waitFor();
  await page.goBack();
  await settled(page);
  await box.uncheck();
  await settled(page);
  expect(await readoutText(page)).not.toBe(corrected);
});
