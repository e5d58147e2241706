import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { expect } from 'vitest';

/** No violation of any rule axe knows on the page as it stands. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  const found = violations.map(({ id, nodes }) => ({
    id,
    where: nodes.map((node) => `${node.target.join(' ')}: ${node.failureSummary ?? ''}`),
  }));
  expect(found).toEqual([]);
}

/** Nothing to be scrolled sideways. */
export async function expectNoSidewaysScroll(page: Page): Promise<void> {
  const [content, window] = await page.evaluate(() => [
    document.documentElement.scrollWidth,
    document.documentElement.clientWidth,
  ]);
  expect(content).toBeLessThanOrEqual(window ?? 0);
}

/** Colours and sizes of a new view are there once it has been drawn and no transition is under way, however short. */
export async function painted(page: Page): Promise<void> {
  await page.evaluate(async () => {
    const frame = () => new Promise((done) => requestAnimationFrame(done));
    await frame();
    await frame();
    const running = document.getAnimations().filter(({ effect }) => {
      const end = effect?.getComputedTiming().endTime;
      return typeof end === 'number' && Number.isFinite(end);
    });
    await Promise.allSettled(running.map(({ finished }) => finished));
    await frame();
  });
}

/** The page as it stands, in both themes, wide, narrow, and without sideways scroll on the narrowest. */
export async function expectSoundInEveryView(page: Page): Promise<void> {
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme });
    for (const width of [1440, 390]) {
      await page.setViewportSize({ width, height: 900 });
      await painted(page);
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
    }
  }
  await page.setViewportSize({ width: 360, height: 800 });
  await painted(page);
  await expectNoSidewaysScroll(page);
}
