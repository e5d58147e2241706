import { readFile } from 'node:fs/promises';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { readPdf } from '#tests/support/read-pdf.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

test('the record hands out a version on paper, and the file says what was saved', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'On paper');
  const { page, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}?section=record`);
  const pages: number[] = [];
  for (const name of [/^Proposal page of version 1/, /^Full report of version 1/]) {
    const begun = page.waitForEvent('download');
    await page.getByRole('link', { name }).click();
    const download = await begun;
    expect(download.suggestedFilename()).toMatch(/^case-\d+-version-1-(proposal|full)\.pdf$/);
    const { flow, info } = await readPdf(await readFile(await download.path()));
    expect(info['Title']).toBe('On paper');
    expect(flow).toContain('version 1 (draft)');
    expect(flow).toContain('An estimate, not an authorisation.');
    pages.push(Number(info['Pages']));
  }
  expect(pages[0]).toBe(1);
  expect(pages[1]).toBeGreaterThan(1);
});
