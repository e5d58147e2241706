import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { readoutText, settled, tabTo } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('a Woods-Saxon case is built, watched and saved by keyboard alone', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  const yukawa = await readoutText(page);
  const term = page.getByRole('group', { name: 'Interaction term' });

  await tabTo(page, page.getByLabel('Particle', { exact: true }));
  await page.keyboard.type('neutron');
  const energy = page.getByLabel('Kinetic energy, lab');
  await tabTo(page, energy);
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('14 MeV');

  await tabTo(page, term.getByLabel('Form', { exact: true }));
  await page.keyboard.type('Woods');
  for (const [label, text] of [
    [/^Strength/, '-40 MeV'],
    [/^Radius/, '3.2 fm'],
    [/^Diffuseness/, '0.6 fm'],
  ] as const) {
    await tabTo(page, term.getByLabel(label).and(page.locator('input')).first());
    await page.keyboard.press('ControlOrMeta+a');
    await page.keyboard.type(text);
  }
  await settled(page);
  const woodsSaxon = await readoutText(page);
  expect(woodsSaxon).not.toBe(yukawa);

  // One more keystroke in the radius, and the curve answers.
  await tabTo(
    page,
    term
      .getByLabel(/radius/i)
      .and(page.locator('input'))
      .first(),
  );
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type('3.3 fm');
  await settled(page);
  expect(await readoutText(page)).not.toBe(woodsSaxon);

  await page.keyboard.press('ControlOrMeta+s');
  const dialog = page.getByRole('dialog', { name: 'Save as a new case' });
  await dialog.waitFor();
  await page.keyboard.type('Neutrons on a smooth well');
  await page.keyboard.press('Enter');
  await page.waitForURL(/\/cases\/[0-9a-f-]{36}$/);
  await page.getByText(/Case \d+ · version 1/).waitFor();
  expect(await page.locator('h1').textContent()).toBe('Neutrons on a smooth well');
});

test('a station of the beam line opens its inputs, and the crosshair follows the arrow keys', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  const line = page.getByRole('list', { name: 'Beam line' });
  await tabTo(page, line.getByRole('button', { name: /^Detectors/ }));
  await page.keyboard.press('Enter');
  const group = page.getByRole('button', { name: 'Detectors', exact: true });
  expect(await group.evaluate((element) => element === document.activeElement)).toBe(true);
  expect(await line.getByRole('button', { name: /^Detectors/ }).getAttribute('aria-current')).toBe(
    'true',
  );

  const crosshair = page.getByRole('slider', { name: 'Crosshair' });
  await crosshair.focus();
  const before = await readoutText(page);
  await page.keyboard.press('ArrowRight');
  expect(await readoutText(page)).not.toBe(before);
  expect(await crosshair.getAttribute('aria-valuetext')).toMatch(/^θ = 61°, dσ\/dΩ = 0\.00/);
});
