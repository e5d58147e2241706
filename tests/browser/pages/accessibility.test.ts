import { afterAll, afterEach, beforeAll, describe, test } from 'vitest';
import type { Role } from '#shared/roles.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectAccessible, expectNoSidewaysScroll } from '#tests/browser/support/accessibility.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';

let stage: Stage;
let owner: Account;
beforeAll(async () => {
  stage = await openStage();
  const { account, agent } = await stage.app.person('experimentalist');
  owner = account;
  await saveCase(agent, 'Screened electrons, forward cone', { tags: ['forward', 'survey'] });
  await saveCase(
    agent,
    'A title that goes on for long enough to need more than one line of a narrow screen',
  );
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const VIEWS = (['light', 'dark'] as const).flatMap((theme) =>
  ([1440, 390] as const).map((width) => ({ theme, width })),
);
const PAGES: ReadonlyArray<{ name: string; path: string; who?: Role | 'owner' }> = [
  { name: 'sign-in', path: '/sign-in' },
  { name: 'desk', path: '/', who: 'owner' },
  { name: 'empty desk', path: '/', who: 'theorist' },
  { name: 'cases', path: '/cases', who: 'owner' },
  { name: 'cases, none found', path: '/cases?q=zirconium', who: 'owner' },
  { name: 'account', path: '/account', who: 'owner' },
  { name: 'people', path: '/people', who: 'administrator' },
  { name: 'people, to others', path: '/people', who: 'manager' },
  { name: 'not found', path: '/nowhere', who: 'owner' },
];

describe.each(VIEWS)('in $theme at $width px', (view) => {
  test.each(PAGES)('$name has no violation and no sideways scroll', async ({ path, who }) => {
    const { page, goTo } = await stage.visitor(who === 'owner' ? owner : who, view);
    await goTo(path);
    await page.waitForLoadState('networkidle');
    await expectAccessible(page);
    await expectNoSidewaysScroll(page);
  });

  test('dialogs have no violation', async () => {
    const { page, goTo } = await stage.visitor(owner, view);
    await goTo('/account');
    await page.getByRole('button', { name: 'New token' }).click();
    await page.getByRole('dialog', { name: 'New token' }).waitFor();
    await expectAccessible(page);
    await page.keyboard.press('Escape');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await page.locator('body').press('?');
    await page.getByRole('dialog', { name: 'Keys' }).waitFor();
    await expectAccessible(page);
  });
});

test.each(['light', 'dark'] as const)('the menu of a narrow screen, in %s', async (theme) => {
  const { page, goTo } = await stage.visitor(owner, { width: 390, theme });
  await goTo('/');
  await page.getByRole('button', { name: 'Menu', exact: true }).click();
  await page.getByRole('dialog', { name: 'Menu' }).waitFor();
  await expectAccessible(page);
});

test('every page fits a screen of 360 px', async () => {
  const { page, goTo } = await stage.visitor(owner, { width: 390 });
  await page.setViewportSize({ width: 360, height: 740 });
  for (const path of ['/', '/cases', '/account', '/nowhere']) {
    await goTo(path);
    await page.waitForLoadState('networkidle');
    await expectNoSidewaysScroll(page);
  }
});
