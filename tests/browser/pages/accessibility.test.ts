import { afterAll, afterEach, beforeAll, test } from 'vitest';
import type { Role } from '#shared/roles.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import {
  expectAccessible,
  expectNoSidewaysScroll,
  expectSoundInEveryView,
  painted,
} from '#tests/browser/support/accessibility.ts';
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

test.each(PAGES)(
  '$name: no violation and no sideways scroll in any view',
  async ({ path, who }) => {
    const { page, goTo } = await stage.visitor(who === 'owner' ? owner : who);
    await goTo(path);
    await page.waitForLoadState('networkidle');
    await expectSoundInEveryView(page);
  },
);

const DIALOGS = [
  { title: 'New token', path: '/account', who: 'owner', button: 'New token' },
  { title: 'Keys', path: '/account', who: 'owner', button: 'Keys' },
  { title: 'New account', path: '/people', who: 'administrator', button: 'New account' },
] as const;

test.each(DIALOGS)('the dialog $title: no violation in any view', async (dialog) => {
  const { page, goTo } = await stage.visitor(dialog.who === 'owner' ? owner : dialog.who);
  await goTo(dialog.path);
  await page.getByRole('button', { name: dialog.button, exact: true }).click();
  await page.getByRole('dialog', { name: dialog.title }).waitFor();
  await expectSoundInEveryView(page);
});

test('the menu of a narrow screen: no violation in either theme', async () => {
  const { page, goTo } = await stage.visitor(owner, { width: 390 });
  await goTo('/');
  await page.getByRole('button', { name: 'Menu', exact: true }).click();
  await page.getByRole('dialog', { name: 'Menu' }).waitFor();
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme });
    await painted(page);
    await expectAccessible(page);
  }
});

test('every page fits a screen of 360 px', async () => {
  const { page, goTo } = await stage.visitor(owner);
  await page.setViewportSize({ width: 360, height: 740 });
  for (const path of ['/', '/cases', '/account', '/nowhere']) {
    await goTo(path);
    await page.waitForLoadState('networkidle');
    await expectNoSidewaysScroll(page);
  }
});
