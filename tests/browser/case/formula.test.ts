import type { Locator, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { readoutText, retype, settled } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const term = (page: Page): Locator => page.getByRole('group', { name: 'Interaction term' });
const formula = (page: Page): Locator => term(page).getByRole('textbox', { name: 'V(r), formula' });
const parameter = (page: Page, name: string): Locator =>
  term(page)
    .getByRole('group', { name: 'Parameters of the formula' })
    .getByLabel(name, { exact: true });

/** The browser notes every refusal of a formula that is not finished yet. */
const REFUSED = /422 .*\/api\/estimates/;

async function newFormula(): Promise<Page> {
  const { page, goTo, console } = await stage.visitor('theorist');
  console.expect(REFUSED);
  await goTo('/cases/new');
  await settled(page);
  await term(page).getByLabel('Form', { exact: true }).selectOption('expression');
  await settled(page);
  return page;
}

test('a formula is typed, its parameters appear, the curve follows, and undo goes back', async () => {
  const page = await newFormula();
  const before = await readoutText(page);
  await retype(page, formula(page), 'V0*exp(-r/b)/(1 + exp(-r/b))');
  await retype(page, parameter(page, 'V0'), '-10 eV');
  await retype(page, parameter(page, 'b'), '80 pm');
  await settled(page);
  expect(await readoutText(page)).not.toBe(before);
  expect(await term(page).getByText('length', { exact: true }).count()).toBe(1);
  const drawn = term(page).getByRole('img', { name: /^The formula: V from/ });
  await drawn.waitFor();
  const shape = await drawn.getAttribute('aria-label');

  // A pause begins a new step of undo.
  await page.waitForTimeout(1600);
  await retype(page, parameter(page, 'b'), '160 pm');
  await settled(page);
  await expect.poll(() => drawn.getAttribute('aria-label')).not.toBe(shape);
  // What was typed stays as it was typed, and one step back brings the last of it.
  expect(await parameter(page, 'b').inputValue()).toBe('160 pm');
  await formula(page).focus();
  await page.keyboard.press('ControlOrMeta+z');
  await settled(page);
  await expect.poll(() => drawn.getAttribute('aria-label')).toBe(shape);
});

test('a fault is told in words beside the formula, with the character it speaks of', async () => {
  const page = await newFormula();
  await retype(page, formula(page), 'V0*exp(-r)');
  await term(page)
    .getByText(/Character 9: exp takes a plain number/)
    .waitFor();
  expect(await term(page).locator('mark').textContent()).toBe('r');
  expect(await formula(page).getAttribute('aria-invalid')).toBe('true');
  await retype(page, formula(page), 'V0*exp(-r/a');
  await term(page)
    .getByText(/Character 7: this parenthesis is not closed/)
    .waitFor();
  await retype(page, formula(page), 'f(x) = x');
  await term(page)
    .getByText(/nothing is assigned, defined or tested/)
    .waitFor();
  await retype(page, formula(page), 'V0*exp(-r/a)');
  await settled(page);
  expect(await term(page).locator('mark').count()).toBe(0);
});

test('a name that left the formula keeps its value until it is removed', async () => {
  const page = await newFormula();
  await retype(page, parameter(page, 'a'), '2 angstrom');
  await retype(page, formula(page), 'V0*exp(-r/c)');
  await settled(page);
  await term(page).getByText('not in the formula').waitFor();
  await term(page).getByRole('button', { name: 'Remove the parameter a' }).click();
  expect(await term(page).getByText('not in the formula').count()).toBe(0);
  await retype(page, parameter(page, 'c'), '3 seconds');
  await term(page)
    .getByText(/energies and lengths/)
    .waitFor();
  await retype(page, parameter(page, 'c'), '3 angstrom');
  await settled(page);
});

test('a formula that is refused, and the whole page with the figures of before: no violation in any view', async () => {
  const page = await newFormula();
  await retype(page, formula(page), 'V0*exp(-r)');
  await term(page).locator('mark').waitFor();
  // The fault is spoken of in full, and the figures are those of the last sound inputs.
  await page.getByText('the figures below are those of the last sound inputs').waitFor();
  await expectSoundInEveryView(page);
});

test('a formula, a table, and the dialog that reads it: no violation in any view', async () => {
  const page = await newFormula();
  await expectSoundInEveryView(page);
  await term(page).getByLabel('Form', { exact: true }).selectOption('tabulated');
  await settled(page);
  await page.getByRole('button', { name: /the table …/ }).click();
  const rows = page.getByRole('textbox', { name: /^Rows of r and V/ });
  await rows.fill('r V\n0 -10\n1 oops\n2 -1\n1.5 -2');
  await page.getByText(/Line 3: “oops”/).waitFor();
  await expectSoundInEveryView(page);
  await rows.fill('r/pm V/eV\n0 -10\n50 -6\n100 -2\n150 -0.5\n200 -0.1');
  await page.getByText('5 rows read.', { exact: false }).waitFor();
  await page.getByRole('dialog').getByRole('img').waitFor();
  await expectSoundInEveryView(page);
});
