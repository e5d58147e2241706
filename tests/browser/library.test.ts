import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import type { Page } from 'playwright-core';
import type { InteractionDetail } from '#shared/contracts/library.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectAccessible, expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { addVersion, citing, publish, yukawaTerms } from '../server/library/library-requests.ts';
import { saveCase } from './support/case-factory.ts';
import { settled } from './case/case-steps.ts';

let stage: Stage;
let theorist: Account;
let experimentalist: Account;
let interactionId: string;
let caseId: string;

beforeAll(async () => {
  stage = await openStage();
  const publisher = await stage.app.person('theorist');
  const reader = await stage.app.person('experimentalist');
  theorist = publisher.account;
  experimentalist = reader.account;
  const { published, etag } = await publish(publisher.agent, { name: 'Standing well' });
  await addVersion(publisher.agent, published, etag, {
    source: 'A lab note with a name that goes on for longer than one line of a narrow screen has',
  }).expect(201);
  interactionId = published.id;
  caseId = await saveCase(reader.agent, 'Cites the old well', { document: citing(published, 1) });
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const dialogOf = (page: Page) => page.getByRole('dialog');

async function fillPublication(page: Page, texts: Record<string, string>): Promise<void> {
  for (const [label, text] of Object.entries(texts)) {
    await dialogOf(page).getByLabel(label, { exact: true }).fill(text);
  }
}

test('a theorist publishes from a case, an experimentalist uses it and is told of a newer version', async () => {
  const { page, goTo } = await stage.visitor(theorist);
  await goTo('/library');
  await page.getByRole('button', { name: 'New interaction' }).click();
  await dialogOf(page).getByRole('link', { name: 'Begin a case' }).click();
  await settled(page);
  await page.getByRole('button', { name: 'Publish to the library' }).click();
  await dialogOf(page).getByRole('button', { name: 'Publish', exact: true }).click();
  await dialogOf(page).getByText('The name is empty; type something.').waitFor();
  await fillPublication(page, {
    Name: 'Shallow well of the group',
    Description: 'A screened attraction, as the group uses it.',
    'Where it holds': 'Electrons of the gun.',
    'Lowest energy, lab (may be empty)': '50 eV',
    'Highest energy, lab (may be empty)': '10 keV',
    Source: 'Lab note 7',
  });
  await dialogOf(page).getByLabel('electron', { exact: true }).check();
  await dialogOf(page).getByRole('button', { name: 'Publish', exact: true }).click();
  await page.getByText('Published “Shallow well of the group”, version 1.').waitFor();
  await page.getByRole('link', { name: 'Shallow well of the group, version 1' }).waitFor();

  const other = await stage.visitor(experimentalist);
  await other.goTo('/library?q=shallow');
  await other.page.getByRole('link', { name: 'Shallow well of the group' }).click();
  await other.page.getByRole('link', { name: 'Use in a case' }).click();
  await settled(other.page);
  await other.page.getByRole('link', { name: 'Shallow well of the group, version 1' }).waitFor();
  await other.page.keyboard.press('ControlOrMeta+s');
  await dialogOf(other.page).getByRole('button', { name: 'Save case' }).click();
  await other.page.getByText(/Saved as case \d+, version 1/).waitFor();

  await page.locator('input[value="-10 eV"], input[value="−10 eV"]').first().fill('-12 eV');
  await settled(page);
  await page.getByRole('button', { name: 'Publish to the library' }).click();
  await dialogOf(page)
    .getByLabel('Publish as')
    .selectOption({ label: 'version 2 of Shallow well of the group' });
  await dialogOf(page).getByRole('button', { name: 'Publish version 2' }).click();
  await page.getByRole('link', { name: 'Shallow well of the group, version 2' }).waitFor();

  await other.page.reload();
  await settled(other.page);
  await other.page
    .getByText('Version 2 of “Shallow well of the group” is in the library.')
    .waitFor();
  await other.page.getByRole('button', { name: 'Take version 2 …' }).click();
  const differences = (await dialogOf(other.page).locator('dl').textContent()) ?? '';
  expect(differences).toMatch(/−10 eV.*−12 eV/);
  await dialogOf(other.page).getByRole('button', { name: 'Take version 2' }).click();
  await other.page.getByRole('link', { name: 'Shallow well of the group, version 2' }).waitFor();
  expect(await other.page.getByText('is in the library.').count()).toBe(0);
  await other.page.keyboard.press('ControlOrMeta+s');
  await dialogOf(other.page).getByRole('button', { name: 'Save version 2' }).click();
  await other.page.getByText('Saved as version 2.').waitFor();
});

test('a changed term leaves the citation out, and undo brings it back', async () => {
  const { page, goTo } = await stage.visitor(experimentalist);
  await goTo(`/cases/${caseId}`);
  await settled(page);
  const cited = page.getByRole('link', { name: 'Standing well, version 1' });
  await cited.waitFor();
  await page.getByRole('button', { name: 'Add a term' }).click();
  await cited.waitFor({ state: 'detached' });
  await page.getByRole('button', { name: 'Undo (Ctrl+Z)' }).click();
  await cited.waitFor();
});

test('an interaction is taken into a case at its station, whatever the beam, which is then told', async () => {
  const { page, goTo } = await stage.visitor(experimentalist);
  await goTo('/cases/new?start=neutron');
  await settled(page);
  await page.getByRole('button', { name: 'From the library' }).click();
  await dialogOf(page).getByRole('searchbox', { name: 'Search the library' }).fill('standing');
  await dialogOf(page).getByRole('button', { name: 'Take Standing well' }).click();
  await page.getByRole('link', { name: 'Standing well, version 2' }).waitFor();
  await page.getByText('This beam is not one “Standing well” was published for.').waitFor();
  await page.getByText('It is meant for electron; this beam is neutron.').waitFor();
});

test('a theorist corrects the text, retires an interaction and takes it back', async () => {
  const { page, goTo } = await stage.visitor(theorist);
  const { published } = await publish(await stage.app.signedIn(theorist), { name: 'Passing well' });
  await goTo(`/library/interactions/${published.id}`);
  await page.getByRole('button', { name: 'Correct the text' }).click();
  await fillPublication(page, { Source: 'Lab note 9' });
  await dialogOf(page).getByRole('button', { name: 'Publish version 2' }).click();
  await page.getByText('version 2 of 2').waitFor();
  await page.getByRole('heading', { name: 'What changed' }).waitFor();
  await page.getByRole('button', { name: 'Retire', exact: true }).click();
  await dialogOf(page).getByRole('button', { name: 'Retire', exact: true }).click();
  await dialogOf(page)
    .getByText(/Say why/)
    .waitFor();
  await dialogOf(page).getByLabel('Reason').fill('Nobody uses it.');
  await dialogOf(page).getByRole('button', { name: 'Retire', exact: true }).click();
  await page.getByText('Nobody uses it.').waitFor();
  expect(await page.getByRole('link', { name: 'Use in a case' }).count()).toBe(0);
  await page.getByRole('button', { name: 'Take back' }).click();
  await dialogOf(page).getByLabel('Reason').fill('Somebody does.');
  await dialogOf(page).getByRole('button', { name: 'Take back' }).click();
  await page.getByRole('link', { name: 'Use in a case' }).waitFor();
});

test('two theorists publish at once: the second is shown what the first changed, and goes on', async () => {
  const first = await stage.app.signedIn(theorist);
  const { published, etag } = await publish(first, { name: 'Contested well' });
  const { page, goTo, console } = await stage.visitor('theorist');
  console.expect(/412 \(Precondition Failed\).*\/api\/interactions\//);
  await goTo(`/library/interactions/${published.id}`);
  await page.getByRole('button', { name: 'Correct the text' }).click();
  await fillPublication(page, { Source: 'Lab note 10' });
  await addVersion(first, published, etag).expect(201);
  await dialogOf(page).getByRole('button', { name: 'Publish version 2' }).click();
  await dialogOf(page)
    .getByText(/published version 2 after you began/)
    .waitFor();
  await dialogOf(page).getByText('−12 eV').waitFor();
  expect(await dialogOf(page).getByLabel('Source', { exact: true }).inputValue()).toBe(
    'Lab note 10',
  );
  await dialogOf(page).getByRole('button', { name: 'Go on to version 3' }).click();
  await dialogOf(page).getByRole('button', { name: 'Publish version 3' }).click();
  await page.getByText('version 3 of 3').waitFor();
  const { terms, source } = (await first.get(`/api/interactions/${published.id}`))
    .body as InteractionDetail;
  expect({ terms, source }).toEqual({ terms: yukawaTerms(-12), source: 'Lab note 10' });
});

test('who may not publish sees no such button; the search of the top bar finds interactions', async () => {
  const { page, goTo } = await stage.visitor('manager');
  await goTo('/library');
  await page.getByRole('link', { name: 'Standing well' }).waitFor();
  expect(await page.getByRole('button', { name: 'New interaction' }).count()).toBe(0);
  await page.getByRole('combobox', { name: /Search cases/ }).fill('standing well');
  await page.getByRole('option', { name: /Standing well.*Version 2/ }).click();
  await page.getByRole('heading', { name: 'Standing well', level: 1 }).waitFor();
  await page.getByRole('button', { name: 'Retire' }).waitFor();
  expect(await page.getByRole('button', { name: 'Correct the text' }).count()).toBe(0);
});

test.each([
  ['the list', '/library'],
  ['nothing found', '/library?q=zirconium'],
  ['an interaction', ''],
  ['an older version', '/versions/1'],
])('%s: no violation in any view', async (_, rest) => {
  const { page, goTo } = await stage.visitor(experimentalist);
  const path = rest.startsWith('/library') ? rest : `/library/interactions/${interactionId}${rest}`;
  await goTo(path);
  await page.waitForLoadState('networkidle');
  await expectSoundInEveryView(page);
});

test('an empty library: no violation in any view', async () => {
  const empty = await openStage();
  try {
    const { page, goTo } = await empty.visitor('theorist');
    await goTo('/library');
    await page.getByText('Nothing is published yet.').waitFor();
    await expectSoundInEveryView(page);
    await empty.settle();
  } finally {
    await empty.close();
  }
});

test('no such interaction: said in words', async () => {
  const { page, goTo, console } = await stage.visitor(experimentalist);
  console.expect(/404 \(Not Found\).*\/api\/interactions\//);
  await goTo('/library/interactions/00000000-0000-4000-8000-000000000000');
  await page.getByRole('heading', { name: 'Interaction not found' }).waitFor();
  await expectAccessible(page);
});

test('a case that is told of a newer version: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(experimentalist);
  await goTo(`/cases/${caseId}`);
  await settled(page);
  await page.getByRole('button', { name: 'Take version 2 …' }).waitFor();
  await expectSoundInEveryView(page);
});

test('what a newer version changes: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(experimentalist);
  await goTo(`/cases/${caseId}`);
  await settled(page);
  await page.getByRole('button', { name: 'Take version 2 …' }).click();
  await dialogOf(page).locator('dl').waitFor();
  await expectSoundInEveryView(page);
});

test('the dialog of publishing, with faults: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(theorist);
  await goTo('/cases/new');
  await settled(page);
  await page.getByRole('button', { name: 'Publish to the library' }).click();
  await dialogOf(page).getByRole('button', { name: 'Publish', exact: true }).click();
  await expectSoundInEveryView(page);
});

test('the dialog of taking: no violation in any view', async () => {
  const { page, goTo } = await stage.visitor(theorist);
  await goTo('/cases/new');
  await settled(page);
  await page.getByRole('button', { name: 'From the library' }).click();
  await dialogOf(page).getByText('Standing well').waitFor();
  await expectSoundInEveryView(page);
});
