import { afterAll, afterEach, beforeAll, test } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { DEMO_CASES, seedDemo } from '#server/db/seeders/demo/seed-demo.ts';
import { expectNoSidewaysScroll, painted } from '#tests/browser/support/accessibility.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { query } from '#tests/support/test-database.ts';

/** The first worked case of every form, so that each has been seen once. */
function firstOfEveryForm(): string[] {
  const seen = new Set<string>();
  return DEMO_CASES.flatMap(({ title, versions }) => {
    const forms = versions.at(-1)?.document.interaction.terms.map(({ form }) => form) ?? [];
    const fresh = forms.some((form) => !seen.has(form));
    forms.forEach((form) => seen.add(form));
    return fresh ? [title] : [];
  });
}

let stage: Stage;
const ids = new Map<string, string>();
beforeAll(async () => {
  stage = await openStage();
  await seedDemo({
    em: stage.app.em(),
    compute: (kind, input) => Promise.resolve(ENGINE[kind](input)),
    clock: () => new Date(),
    passwordCost: 4,
  });
  const rows = await query(stage.app.database.ownerUrl, 'select id, title from cases');
  for (const { id, title } of rows) ids.set(String(title), String(id));
}, 60_000);
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('a worked case of every form in a newest version opens, does not scroll sideways, and says nothing on the console', async () => {
  const { page, goTo } = await stage.visitor('manager');
  for (const title of firstOfEveryForm()) {
    await page.setViewportSize({ width: 1440, height: 900 });
    await goTo(`/cases/${ids.get(title)}`);
    await page.getByText(title).first().waitFor();
    await page.waitForLoadState('networkidle');
    await page.setViewportSize({ width: 390, height: 844 });
    await painted(page);
    await expectNoSidewaysScroll(page);
  }
}, 120_000);
