import type { Locator, Page } from 'playwright-core';
import { expect } from 'vitest';

/** The value of dσ/dΩ at the crosshair, as the row below the plot shows it. */
export async function readoutText(page: Page): Promise<string> {
  const row = page.getByRole('region', { name: 'Angular distribution' }).locator('dl').first();
  return (await row.textContent()) ?? '';
}

/** Waits until the figures belong to the inputs: nothing is dimmed any more. */
export async function settled(page: Page): Promise<void> {
  await page.locator('[aria-label="Angular distribution"] dl').first().waitFor();
  // The estimate follows the typing after a short pause.
  await page.waitForTimeout(250);
  await page.waitForFunction(() => document.querySelectorAll('main [aria-busy=true]').length === 0);
}

/** Presses Tab until the wanted control has the focus, as a person without a mouse would. */
export async function tabTo(page: Page, wanted: Locator): Promise<void> {
  for (let presses = 0; presses < 150; presses += 1) {
    if (await wanted.evaluate((element) => element === document.activeElement)) return;
    await page.keyboard.press('Tab');
  }
  expect.fail('150 presses of Tab did not reach the control.');
}

/** Replaces what stands in a field by the keyboard. */
export async function retype(page: Page, field: Locator, text: string): Promise<void> {
  await field.focus();
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type(text);
}

export function figure(page: Page, name: RegExp): Locator {
  return page.getByRole('button', { name });
}
