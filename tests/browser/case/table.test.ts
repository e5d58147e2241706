import type { Locator, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { settled, tabTo } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const ROWS = '\ufeffr (fm);V (MeV)\n0;-50\n0,5;-40\n1;-25,5\n2;-3\n3;-0,25\n';

async function chooseTable(page: Page): Promise<void> {
  await page.getByLabel('Form', { exact: true }).selectOption('tabulated');
  await settled(page);
}

async function openTable(page: Page): Promise<Locator> {
  await page.getByRole('button', { name: /the table …/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.waitFor();
  return dialog;
}

const textOf = (dialog: Locator) => dialog.getByRole('textbox', { name: /^Rows of r and V/ });
const takeIn = (dialog: Locator) => dialog.getByRole('button', { name: /^Take th/ });
const summary = (page: Page) => page.getByRole('group', { name: 'Interaction term' });

test('a file with decimal commas is read, mapped, taken in one step, and taken back in one', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await chooseTable(page);
  const before = await summary(page).textContent();
  const dialog = await openTable(page);
  await dialog.locator('input[type=file]').setInputFiles({
    name: 'well.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from(ROWS),
  });
  await dialog.getByText('5 rows read.', { exact: false }).waitFor();
  expect(await dialog.getByLabel('Unit of r').inputValue()).toBe('fm');
  expect(await dialog.getByLabel('Unit of V').inputValue()).toBe('MeV');
  await takeIn(dialog).click();
  await dialog.waitFor({ state: 'detached' });
  await settled(page);
  expect(await summary(page).textContent()).toMatch(/5 (rows|points).*from well\.csv/);
  await page.keyboard.press('ControlOrMeta+z');
  await settled(page);
  expect(await summary(page).textContent()).toBe(before);
});

test('nothing is taken while a line is faulty, and the line is named', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await chooseTable(page);
  const dialog = await openTable(page);
  await textOf(dialog).fill('0 -10\n1 -5\n2 oops\n3 -1\n4 -0.5');
  await dialog.getByText(/Line 3: .*oops/).waitFor();
  expect(await takeIn(dialog).isDisabled()).toBe(true);
  await textOf(dialog).fill('0 -10\n1 -5\n2 -2\n3 -1\n4 -0.5');
  await dialog.getByText('5 rows read.', { exact: false }).waitFor();
  expect(await takeIn(dialog).isEnabled()).toBe(true);
});

test('a million rows, even of the shortest, are refused in words, and the page goes on', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await chooseTable(page);
  const dialog = await openTable(page);
  await dialog.locator('input[type=file]').setInputFiles({
    name: 'long.txt',
    mimeType: 'text/plain',
    buffer: Buffer.from('1 2\n'.repeat(1e6)),
  });
  await dialog.getByText(/long\.txt is larger than .* thin the table out/).waitFor();
  await dialog.getByRole('button', { name: 'Cancel' }).click();
  await dialog.waitFor({ state: 'detached' });
});

test('the keyboard alone opens the dialog, fills it and takes the rows; the focus returns', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await chooseTable(page);
  const opener = page.getByRole('button', { name: /the table …/ });
  await tabTo(page, opener);
  await page.keyboard.press('Enter');
  const dialog = page.getByRole('dialog');
  await dialog.waitFor();
  expect(await textOf(dialog).evaluate((box) => box === document.activeElement)).toBe(true);
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.insertText('0 -10\n1 -5\n2 -2\n3 -1\n4 -0.5');
  await tabTo(page, takeIn(dialog));
  await page.keyboard.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  await expect
    .poll(() => opener.evaluate((button) => button === document.activeElement))
    .toBe(true);
  expect(await summary(page).textContent()).toMatch(/5 (rows|points)/);
});

test('what is no table is refused in words, and nothing can be taken of it', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await chooseTable(page);
  const dialog = await openTable(page);
  const text = textOf(dialog);
  await text.focus();
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.insertText('Scattering of slow neutrons\nby hydrogen, as it was measured.');
  await dialog.getByText('No line of the text holds a number.').waitFor();
  expect(await takeIn(dialog).isDisabled()).toBe(true);
  await text.fill('<table><tr><td>0</td><td>-10</td></tr></table>');
  await dialog.getByText('No line of the text holds a number.').waitFor();
  expect(await takeIn(dialog).isDisabled()).toBe(true);
});

test('faulty lines are left out by a tick, named, and the text stays whole', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await chooseTable(page);
  const dialog = await openTable(page);
  const text = 'r/pm;V/eV\n0;-10,5\n50;1.234\n100;-2,5\n40;-6\n150;oops\n200;-0,25';
  await textOf(dialog).fill(text);
  await dialog.getByLabel('Decimal sign').selectOption('comma');
  await dialog.getByText(/“1\.234” for V has a point .* write 1,234 or 1234/).waitFor();
  await dialog.getByText('3 lines need mending.').waitFor();
  await dialog.getByRole('checkbox', { name: /^Leave these 2 lines out/ }).check();
  await dialog.getByText('2 lines are left out.').waitFor();
  await dialog.getByText(/Line 6: “oops”/).waitFor();
  // A row out of order is no line to leave out.
  expect(await takeIn(dialog).isDisabled()).toBe(true);
  await dialog.getByRole('button', { name: 'Sort the rows by r' }).click();
  await dialog.getByText('4 rows read.', { exact: false }).waitFor();
  await takeIn(dialog).click();
  await dialog.waitFor({ state: 'detached' });
  await settled(page);
  expect(await summary(page).textContent()).toMatch(/4 (rows|points)/);
  const again = await openTable(page);
  expect(await textOf(again).inputValue()).toBe(text);
});
