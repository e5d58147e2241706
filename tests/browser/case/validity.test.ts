import { readFile } from 'node:fs/promises';
import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectAccessible, expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import type { Agent } from '#tests/support/test-app.ts';
import { figure, retype, settled, tabTo } from './case-steps.ts';

let stage: Stage;
let owner: Account;
let agent: Agent;
let id: string;
beforeAll(async () => {
  stage = await openStage();
  const person = await stage.app.person('experimentalist');
  owner = person.account;
  agent = person.agent;
  id = await saveCase(agent, 'Held against every method');
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const part = (page: Page, name: string) => page.getByRole('region', { name, exact: true });

/** Waits until every method of the inputs shown is there. */
async function compared(page: Page): Promise<void> {
  await part(page, 'Integrated cross sections').waitFor();
  await page.waitForTimeout(250);
  await page.waitForFunction(() => document.querySelectorAll('main [aria-busy=true]').length === 0);
}

/** The value behind a figure, with all its digits. */
async function valueOf(page: Page, name: RegExp): Promise<number> {
  const label = await figure(page, name).getAttribute('aria-label');
  return Number(/: ([-\d.e+]+) /.exec(label ?? '')?.[1]);
}

const BORN = /^Elastic σ, first Born/;
const EXACT = /^Elastic σ, exact/;

/** First order of a Yukawa potential in closed form: 4π A²/(1 + 4k²a²), A = 2 mu |V0| a³/hbar², with hbar²/2m = 3.80998211 eV Å². */
function yukawaBorn(energy: number): number {
  const strength = 10 / 3.8099821161;
  return (4 * Math.PI * strength ** 2) / (1 + (4 * energy) / 3.8099821161);
}

describe('the verdict', () => {
  test('rests on the exact curve: its number is that of the two totals, and follows the typing', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}?section=validity`);
    await compared(page);
    for (const energy of [100, 4]) {
      await retype(page, page.getByLabel('Kinetic energy, lab'), `${energy} eV`);
      await compared(page);
      const [born, exact] = [await valueOf(page, BORN), await valueOf(page, EXACT)];
      expectRelative(born, yukawaBorn(energy), 1e-7);
      const off = 100 * (born / exact - 1);
      const verdict = part(page, 'Verdict');
      const shown = /([+−]?[\d.]+)(?: × 10(\S+))?\u00a0%/.exec((await verdict.textContent()) ?? '');
      expectRelative(Number(shown?.[1]?.replace('−', '-')), off, 6e-3);
      const word = Math.abs(off) < 2 ? 'sound' : Math.abs(off) < 20 ? 'usable' : 'not valid';
      // A sign stands before the word, so that the hue is never alone.
      expect(await verdict.locator('p').first().textContent()).toMatch(new RegExp(`^[●◐○]${word}`));
      await verdict.getByText(/Basis: the exact calculation/).waitFor();
    }
  });

  test('asks for every method without touching the case', async () => {
    const { page, goTo } = await stage.visitor(owner);
    const asked: string[][] = [];
    page.on('request', (request) => {
      if (!request.url().endsWith('/api/estimates')) return;
      const body = JSON.parse(request.postData() ?? '{}') as { methods: string[] };
      asked.push(body.methods);
    });
    await goTo(`/cases/${id}`);
    await settled(page);
    expect(asked.every((methods) => methods.join() === 'born1')).toBe(true);
    await page.getByRole('link', { name: 'Validity', exact: true }).click();
    await compared(page);
    expect(page.url()).toContain('section=validity');
    expect(asked.at(-1)).toEqual(['born1', 'born2', 'eikonal', 'partialWaves']);
    await page.getByRole('link', { name: 'Cross section', exact: true }).click();
    await settled(page);
    const curves = page.getByRole('list', { name: 'Curves' }).getByRole('button');
    expect(await curves.allTextContents()).toEqual(['first Born']);
    expect(await page.getByRole('button', { name: 'Undo' }).isEnabled()).toBe(false);
  });

  test('a hard sphere has no first order: why is said, and its s wave is that of a wall', async () => {
    const { page, goTo } = await stage.visitor('theorist');
    await goTo('/cases/new');
    await settled(page);
    await page.getByLabel('Form', { exact: true }).selectOption('hardSphere');
    await page.getByRole('link', { name: 'Validity', exact: true }).click();
    await compared(page);
    await part(page, 'Verdict').getByText('not assessed').waitFor();
    await part(page, 'Conditions of the methods')
      .getByText(/hard sphere is infinitely strong/)
      .first()
      .waitFor();
    await part(page, 'Phase shifts')
      .getByText(/The phase shifts as a table/)
      .click();
    const row = await page
      .getByRole('region', { name: 'Table of phase shifts' })
      .locator('tbody tr')
      .first()
      .innerText();
    const delta = Number(row.split(/\s+/)[1]?.replace('−', '-'));
    // -kR, brought between -π/2 and π/2; k of 100 eV electrons and R as the form begins.
    const kR = 5.123167223153056 * Number(await radius(page));
    expectRelative(delta, -(kR - Math.PI * Math.round(kR / Math.PI)), 1e-6);
    expect(row).toContain('—');
  });
});

async function radius(page: Page): Promise<number> {
  const text = await page
    .getByLabel(/^Radius/)
    .first()
    .inputValue();
  return Number.parseFloat(text);
}

describe('on the Cross section', () => {
  test('methods are chosen by keyboard, saved with the case and taken back by one step', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}`);
    await settled(page);
    const exact = page.getByRole('checkbox', { name: 'exact (phase shifts)' });
    expect(await page.getByRole('checkbox', { name: 'first Born' }).isDisabled()).toBe(true);
    await tabTo(page, exact);
    await page.keyboard.press('Space');
    await settled(page);
    const curves = page.getByRole('list', { name: 'Curves' }).getByRole('button');
    await expect
      .poll(() => curves.allTextContents())
      .toEqual(['first Born', 'exact (phase shifts)']);
    await page
      .getByText(/elastic .* % from exact/)
      .first()
      .waitFor();
    await page.getByRole('button', { name: 'Undo' }).click();
    await settled(page);
    expect(await exact.isChecked()).toBe(false);
    expect(await curves.allTextContents()).toEqual(['first Born']);
  });

  test('a method that cannot be had says why', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new?start=neutron');
    await settled(page);
    await page.getByRole('checkbox', { name: /^exact \(phase shifts\)/ }).check();
    await settled(page);
    await page.getByText('not available here').waitFor();
    await page.getByText(/contact interaction is first order by definition/).waitFor();
  });
});

describe('what first order cannot see', () => {
  test('the sign: first order gives a ratio of one, the exact calculation another', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}?section=validity`);
    await compared(page);
    const button = page.getByRole('button', { name: 'Same case, opposite sign' });
    await tabTo(page, button);
    await page.keyboard.press('Enter');
    const totals = page.getByRole('region', { name: 'Elastic totals of both signs' });
    await totals.waitFor();
    const ratioOf = async (name: string) =>
      Number(await totals.getByRole('row', { name }).locator('td').last().textContent());
    expect(await ratioOf('first Born')).toBe(1);
    const exact = await ratioOf('exact');
    expect(Math.abs(exact - 1)).toBeGreaterThan(0.05);
    const [given, turned] = await Promise.all(
      [0, 1].map(async (place) =>
        Number.parseFloat(
          (await totals
            .getByRole('row', { name: 'exact' })
            .locator('td')
            .nth(place)
            .textContent()) ?? '',
        ),
      ),
    );
    expectRelative((turned ?? NaN) / (given ?? NaN), exact, 1e-4);
  });

  test('electrons are held against positrons', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new');
    await settled(page);
    await page.getByLabel('Form', { exact: true }).selectOption('screenedCoulomb');
    await page.getByLabel(/^Charge of the centre/).fill('2');
    await page.getByRole('link', { name: 'Validity', exact: true }).click();
    await compared(page);
    await page.getByRole('button', { name: 'Same case with the positron' }).click();
    await page.getByText('Compared: positrons in place of electrons.').waitFor();
  });
});

describe('planes and waves', () => {
  test('are walked by arrow keys, spoken, and stand in tables', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}?section=validity`);
    await compared(page);
    const plane = part(page, 'The amplitude in its plane');
    const slider = plane.getByRole('slider');
    await tabTo(page, slider);
    const spoken = (from: typeof slider) => () => from.getAttribute('aria-valuetext');
    await expect.poll(spoken(slider)).toMatch(/^θ = 0°: first Born .*exact/);
    await page.keyboard.press('ArrowRight');
    await expect.poll(spoken(slider)).toMatch(/^θ = 1°: first Born .* \+ 0 i Å, .*exact/);
    await plane.getByText(/The amplitudes as a table/).click();
    const table = page.getByRole('region', { name: 'Table of amplitudes' });
    await expect.poll(() => table.getByRole('row').count()).toBe(1 + 181);

    const waves = part(page, 'Phase shifts').getByRole('slider');
    await waves.focus();
    await page.keyboard.press('ArrowRight');
    await expect.poll(spoken(waves)).toMatch(/^l = 1: δ = 0\.3\d+ rad, \|S\| = 1/);
  });

  test.each([
    ['All methods', 'Numbers with units', /-methods\.csv$/],
    ['All methods', 'Drawing', /-methods\.svg$/],
    ['Every wave within the circle', 'Drawing', /-unitarity\.svg$/],
    ['The amplitude in its plane', 'Picture', /-amplitude\.png$/],
    ['Phase shifts', 'Numbers with units', /-phase-shifts\.csv$/],
  ])('%s is taken as a file: %s', async (name, item, file) => {
    const { context, page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}?section=validity`);
    await compared(page);
    await part(page, name).getByRole('button', { name: 'Export' }).click();
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('menuitem', { name: item }).click(),
    ]);
    expect(download.suggestedFilename()).toMatch(file);
    const content = await readFile(await download.path());
    if (item === 'Picture') expect(content.subarray(1, 4).toString()).toBe('PNG');
    if (item === 'Numbers with units') {
      // As many columns in every row, names and units first.
      const rows = content.toString().trim().split('\r\n');
      const columns = new Set(rows.map((row) => row.split(',').length));
      expect(rows.length).toBeGreaterThan(10);
      expect(columns.size).toBe(1);
    }
    if (item !== 'Drawing') return;
    // A page of its own: that of the application allows no styles in markup, which a drawing has.
    const blank = await context.newPage();
    const wrong = await blank.evaluate(
      (text) => new DOMParser().parseFromString(text, 'image/svg+xml').querySelector('parsererror'),
      content.toString(),
    );
    expect(wrong).toBeNull();
  });
});

describe('states', () => {
  test('no violation in any view, with the tables and the comparison open', async () => {
    const { page, goTo } = await stage.visitor(owner);
    // Few angles and a short range: axe walks every cell of every table.
    const few = await saveCase(agent, 'Few angles', {
      document: {
        projectile: { species: 'electron' },
        target: { kind: 'fixed', charge: 0 },
        energy: { value: 20, unit: 'eV' },
        interaction: {
          terms: [
            {
              form: 'gaussian',
              V0: { value: -20, unit: 'eV' },
              W0: { value: -2, unit: 'eV' },
              a: { value: 1, unit: 'angstrom' },
            },
          ],
        },
        methods: ['born1', 'partialWaves'],
        angles: { unit: 'deg', from: 0, to: 180, count: 7 },
      },
    });
    await goTo(`/cases/${few}?section=validity`);
    await compared(page);
    await page.getByRole('button', { name: 'Same case, opposite sign' }).click();
    await page.getByRole('region', { name: 'Elastic totals of both signs' }).waitFor();
    for (const name of [/The phase shifts as a table/, /The amplitudes as a table/]) {
      await page.getByText(name).click();
    }
    await compared(page);
    await expectSoundInEveryView(page);
  });

  test('a failure says so, keeps nothing false on the page, and is tried again', async () => {
    const { page, goTo, console: lines } = await stage.visitor(owner);
    lines.expect(/503/);
    let broken = true;
    await page.route('**/api/estimates', async (route) => {
      const all = (route.request().postData() ?? '').includes('partialWaves');
      if (!all || !broken) return route.continue();
      await route.fulfill({
        status: 503,
        contentType: 'application/problem+json',
        body: JSON.stringify({
          type: 'about:blank',
          title: 'Busy',
          status: 503,
          code: 'busy',
          detail: 'Every engine thread is busy.',
        }),
      });
    });
    await goTo(`/cases/${id}?section=validity`);
    const alert = page.getByRole('alert');
    await alert.getByText('The methods could not be held against each other.').waitFor();
    expect(await part(page, 'Verdict').count()).toBe(0);
    await expectAccessible(page);
    broken = false;
    await alert.getByRole('button', { name: 'Try again' }).click();
    await compared(page);
    expect(await alert.count()).toBe(0);
  });

  test('inputs that are refused leave the last comparison, greyed', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}?section=validity`);
    await compared(page);
    const before = await valueOf(page, EXACT);
    await retype(page, page.getByLabel('Kinetic energy, lab'), 'ten');
    await page.getByText('One input needs mending', { exact: false }).waitFor();
    expect(await valueOf(page, EXACT)).toBe(before);
  });

  test('an older version is compared with the engine of today, and says so', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await goTo(`/cases/${id}/versions/1?section=validity`);
    await compared(page);
    await page.getByText(/Computed now by tallybarn .* from the inputs of version 1/).waitFor();
  });
});
