import { readFile } from 'node:fs/promises';
import type { Locator, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import type { Account } from '#server/modules/users/account.entity.ts';
import { expectSoundInEveryView } from '#tests/browser/support/accessibility.ts';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import type { Agent } from '#tests/support/test-app.ts';
import { startWorker } from '#tests/server/jobs/scan-requests.ts';
import { retype, tabTo } from './case-steps.ts';

let stage: Stage;
let owner: Account;
let agent: Agent;
beforeAll(async () => {
  stage = await openStage();
  const person = await stage.app.person('experimentalist');
  owner = person.account;
  agent = person.agent;
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const part = (page: Page, name: string) => page.getByRole('region', { name, exact: true });
const field = (page: Page, name: string) => page.getByRole('textbox', { name, exact: true });
const sliderOf = (page: Page, name: string) =>
  page.getByRole('slider', { name: `Angle of ${name}` });

/** 100 eV electrons on a Yukawa centre of -10 eV and 1 angstrom; the plan has two detectors and everything stated. */
const DOCUMENT = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 0 },
  energy: { value: 100, unit: 'eV' },
  interaction: {
    terms: [{ form: 'yukawa', V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } }],
  },
  methods: ['born1'],
};
const counter = {
  distance: { value: 100, unit: 'mm' },
  apertureRadius: { value: 5, unit: 'mm' },
  efficiency: 0.8,
  deadTime: { value: 1, unit: 'us' },
  backgroundRate: { value: 2, unit: '1/s' },
};
const RUN_PLAN = {
  beam: { current: { value: 1, unit: 'nA' }, chargeState: -1, dutyFactor: 1 },
  foil: {
    formula: 'CH2',
    density: { value: 1, unit: 'g/cm3' },
    thickness: { value: 0.001, unit: 'nm' },
    scatterer: 'C',
  },
  detectors: [
    { name: 'Near', angle: 30, ...counter },
    { name: 'Far', angle: 90, ...counter },
  ],
  aim: {
    relativePrecision: 0.02,
    beamTime: { value: 40, unit: 'h' },
    setupTime: { value: 10, unit: 'min' },
  },
  uncertainties: { current: 0.02, efficiency: 0.03 },
};

/** Waits until the figures belong to the inputs. */
async function sized(page: Page): Promise<void> {
  await part(page, 'What every detector sees').waitFor();
  await page.waitForTimeout(300);
  await page.waitForFunction(() => document.querySelectorAll('main [aria-busy=true]').length === 0);
}

async function openPlan(page: Page, goTo: (path: string) => Promise<void>): Promise<string> {
  const id = await saveCase(agent, 'A run', { document: { ...DOCUMENT, runPlan: RUN_PLAN } });
  await goTo(`/cases/${id}?section=run-plan`);
  await sized(page);
  return id;
}

/** `1.234 × 10⁻⁵ s⁻¹` as a number. */
function numberIn(text: string): number {
  const [, mantissa, exponent] = /([−-]?[\d.]+)(?:\s×\s10([−-]?[\d⁻⁰¹²³⁴-⁹]+))?/u.exec(text) ?? [];
  const power = (exponent ?? '0').normalize('NFKC').replace('−', '-');
  return Number(`${(mantissa ?? '').replace('−', '-')}e${power}`);
}

async function cellsOf(table: Locator, row: string): Promise<string[]> {
  return table.getByRole('row', { name: row }).locator('td').allTextContents();
}
const detectorTable = (page: Page) => page.getByRole('region', { name: 'Table of detectors' });

/** First order of the Yukawa centre above, angstrom²/sr, with hbar²/2m = 3.8099821161 eV angstrom². */
function yukawa(degrees: number): number {
  const q2 = ((4 * 100) / 3.8099821161) * Math.sin((degrees * Math.PI) / 360) ** 2;
  return (10 / 3.8099821161) ** 2 / (1 + q2) ** 2;
}

describe('a plan from nothing', () => {
  test('by keyboard; its product of factors is the one done by hand', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new?section=run-plan');
    await tabTo(page, page.getByRole('button', { name: 'Plan a run' }));
    await page.keyboard.press('Enter');
    await sized(page);
    const areal = field(page, 'Areal density');
    await tabTo(page, areal);
    await retype(page, areal, '2e14 1/cm2');
    await sized(page);
    const row = part(page, 'Detector D1').getByRole('row', { name: /^product/ });
    const shown = numberIn((await row.locator('td').textContent()) ?? '');
    const particles = 1e-9 / 1.602176634e-19;
    const solidAngle = 2 * Math.PI * (1 - Math.cos(Math.atan(5 / 100)));
    // 1 angstrom² is 1e-16 cm².
    expectRelative(shown, particles * 2e14 * 1e-16 * yukawa(30) * solidAngle, 1e-6);
    await part(page, 'Can it be done?')
      .getByText(/^●feasible$/)
      .waitFor();
    const beamLine = page.getByRole('list', { name: 'Beam line' });
    await beamLine.getByText(/run: D1 at 30°/).waitFor();
  });

  test('neutrons carry no current: the beam is a rate, and no current is offered', async () => {
    const { page, goTo } = await stage.visitor('experimentalist');
    await goTo('/cases/new?start=neutron&section=run-plan');
    await page.getByRole('button', { name: 'Plan a run' }).click();
    await sized(page);
    await page.getByText(/carries no charge: its beam is given as a rate/).waitFor();
    await field(page, 'Particles on target').waitFor();
    expect(await page.getByRole('radio', { name: 'electric current' }).count()).toBe(0);
  });

  test('left out again it leaves neither plan nor fault behind, and one step brings it back', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    await field(page, 'Efficiency').fill('2');
    await page.getByText('One input needs mending', { exact: false }).waitFor();
    await page.getByRole('button', { name: 'Leave the plan out' }).click();
    await page.getByText('No run is planned for this case').waitFor();
    await expect.poll(() => page.getByText(/needs mending/).count()).toBe(0);
    await page.getByRole('button', { name: 'Undo' }).click();
    await part(page, 'Detectors of the run').waitFor();
    expect(await field(page, 'Efficiency').inputValue()).toBe('2');
  });
});

describe('detectors', () => {
  test('one is dragged along its circle, past 180° and back by one step', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    const view = page.getByRole('group', { name: 'Top view of beam, target and detectors' });
    await view.scrollIntoViewIfNeeded();
    const box = await view.boundingBox();
    if (!box) expect.fail('The view is drawn.');
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    const radius = (box.width * (160 - 34)) / 320;
    const at = (degrees: number): [number, number] => [
      x + radius * Math.cos((degrees * Math.PI) / 180),
      y - radius * Math.sin((degrees * Math.PI) / 180),
    ];
    await page.mouse.move(...at(90));
    await page.mouse.down();
    await page.mouse.move(...at(130), { steps: 4 });
    await page.mouse.move(...at(200), { steps: 4 });
    await page.mouse.up();
    const angle = field(page, 'Angle, lab');
    expect(await field(page, 'Name').inputValue()).toBe('Far');
    // The other side of the beam: 200° is -160°.
    const dragged = Number(await angle.inputValue());
    expect(Math.abs(dragged + 160)).toBeLessThan(0.5);
    await sized(page);
    expect(numberIn((await cellsOf(detectorTable(page), 'Far'))[0] ?? '')).toBe(dragged);
    await page.getByRole('button', { name: 'Undo' }).click();
    expect(await angle.inputValue()).toBe('90');
  });

  test('one is moved by the arrow keys, and never beyond 180°', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    const slider = sliderOf(page, 'Near');
    await tabTo(page, slider);
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('Shift+ArrowRight');
    expect(await slider.getAttribute('aria-valuenow')).toBe('31.9');
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/^31\.9\d* degrees$/);
    await field(page, 'Angle, lab').fill('179.95');
    await slider.focus();
    await page.keyboard.press('ArrowUp');
    expect(await slider.getAttribute('aria-valuenow')).toBe('180');
  });

  test('a series stands in place of all; a removed one takes its open text along', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    await page.getByRole('button', { name: 'Angle series …' }).click();
    const dialog = page.getByRole('dialog', { name: 'Angle series' });
    await retype(page, dialog.getByLabel('Step (°)'), '0');
    await dialog.getByText('The step must be above 0.').waitFor();
    await retype(page, dialog.getByLabel('Step (°)'), '35');
    await dialog.getByRole('button', { name: 'Make 5 positions' }).click();
    await sized(page);
    const rows = detectorTable(page).locator('tbody tr');
    expect(await rows.count()).toBe(5);
    expect(await rows.last().locator('td').first().textContent()).toBe('160.00°');

    await page.getByRole('combobox', { name: 'Detector', exact: true }).selectOption('D2');
    await retype(page, field(page, 'Efficiency'), '1.5');
    await page.getByText('The efficiency must be at most 1.').first().waitFor();
    await page.getByRole('button', { name: 'Remove D2' }).click();
    await sized(page);
    expect(await rows.count()).toBe(4);
    expect(await page.getByText('The efficiency must be at most 1.').count()).toBe(0);
    await page.getByRole('button', { name: 'Undo' }).click();
    await page.getByText('The efficiency must be at most 1.').first().waitFor();
  });
});

describe('a refused input is said at its field, and the last answer stays', () => {
  test.each([
    ['Efficiency', '1.2', /must be at most 1\./],
    ['Thickness', '-5 nm', /thickness must be above zero/i],
    ['Charge state', '0', /carries no current/],
    ['Charge state', '', /type a number/],
    ['Duty factor', '2', /must be at most 1\./],
    ['Name', ' ', /Name: type one/],
  ])('%s: `%s`', async (name, text, fault) => {
    const { page, goTo, console: lines } = await stage.visitor(owner);
    lines.expect(/422/);
    await openPlan(page, goTo);
    const before = await cellsOf(detectorTable(page), 'Near');
    const control = field(page, name);
    // At once: on the way to 1.2 stands a sound 1.
    await control.fill(text);
    await expect.poll(() => control.getAttribute('aria-invalid')).toBe('true');
    const described = (await control.getAttribute('aria-describedby')) ?? '';
    const [error = ''] = described.split(' ');
    expect(await page.locator(`[id="${error}"]`).textContent()).toMatch(fault);
    const alert = page.getByRole('alert').filter({ hasText: 'those of the last sound inputs' });
    await alert.waitFor();
    expect(await cellsOf(detectorTable(page), 'Near')).toEqual(before);
  });

  test('a solid angle above the whole sphere, with no violation in any view', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    await page.getByRole('radio', { name: 'solid angle' }).check();
    await sized(page);
    await retype(page, field(page, 'Solid angle'), '12.6');
    await page
      .getByText(/The solid angle must be at most 12\.566/)
      .first()
      .waitFor();
    await expectSoundInEveryView(page);
  });

  test('a server that cannot answer is asked again', async () => {
    const { page, goTo, console: lines } = await stage.visitor(owner);
    lines.expect(/503/);
    await openPlan(page, goTo);
    let broken = true;
    await page.route('**/api/run-plans', (route) =>
      broken
        ? route.fulfill({
            status: 503,
            contentType: 'application/problem+json',
            body: JSON.stringify({
              type: 'about:blank',
              title: 'Busy',
              status: 503,
              code: 'busy',
              detail: 'Every engine thread is busy.',
            }),
          })
        : route.continue(),
    );
    await retype(page, field(page, 'Thickness'), '0.2 nm');
    const alert = page.getByRole('alert').filter({ hasText: 'The run could not be sized' });
    await alert.waitFor();
    broken = false;
    await alert.getByRole('button', { name: 'Try again' }).click();
    await sized(page);
    expect(await alert.count()).toBe(0);
  });
});

describe('the inverse question', () => {
  test('the solid angle it names reaches the precision in the time there is', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    const [, takes] = await cellsOf(detectorTable(page), 'Far');
    const [value, unit] = (takes ?? '').split('\u00a0');
    const there = 0.8 * Number(value);
    await field(page, 'Beam time there is').fill(`${there} ${unit}`);
    await sized(page);
    const table = page.getByRole('region', { name: 'Table of what would reach the aim' });
    const before = await cellsOf(table, 'Far');
    // factor, current, areal density, solid angle, time
    const [factor, , , solidAngle] = before.map(numberIn);
    expect(factor ?? NaN).toBeGreaterThan(0);
    await page.getByRole('combobox', { name: 'Detector', exact: true }).selectOption('Far');
    await page.getByRole('radio', { name: 'solid angle' }).check();
    await field(page, 'Solid angle').fill(String((solidAngle ?? NaN) * 1e-3));
    await sized(page);
    const [, now = ''] = await cellsOf(detectorTable(page), 'Far');
    expect(now.split('\u00a0')[1]).toBe(unit);
    // The mean over a wider opening is a little another one, and the table shows three digits.
    expectRelative(numberIn(now), there, 0.01);
  });

  test('without a beam time it is offered', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    await field(page, 'Beam time there is').fill('');
    await sized(page);
    const panel = part(page, 'What would it take?');
    await panel.getByRole('button', { name: 'Ask for 24 h of beam' }).click();
    await sized(page);
    await panel.getByText(/within 24\.0.h/).waitFor();
    expect(await field(page, 'Beam time there is').inputValue()).toBe('24 h');
  });
});

describe('the run sheet', () => {
  test('shares the beam time, and is taken as a file', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    const sheet = part(page, 'Run sheet');
    await sheet.getByText(/in 40\.0.h by the clock, 5 shifts/).waitFor();
    const lines = sheet.locator('tbody tr');
    expect(await lines.first().textContent()).toMatch(/^Near30\.000°sample0:10/);
    await sheet.getByLabel('Lost in each shift (min)').fill('500');
    await sheet.getByText('More is lost than a shift has.').waitFor();
    await sheet.getByLabel('Lost in each shift (min)').fill('30');
    await expect.poll(() => lines.first().textContent()).toMatch(/^Near30\.000°sample0:40/);
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      sheet.getByRole('button', { name: 'CSV' }).click(),
    ]);
    expect(download.suggestedFilename()).toMatch(/-run-sheet\.csv$/);
    const rows = (await readFile(await download.path(), 'utf8')).trim().split('\r\n');
    expect(rows[0]).toMatch(/^step,detector,angle \(lab\)/);
    const counting = rows.slice(2).reduce((sum, row) => sum + Number(row.split(',')[5]), 0);
    // 40 h but for the set-up of two positions of ten minutes each, and half an hour of five shifts.
    expectRelative(counting, 40 * 3600 - 2 * 600 - 5 * 1800, 1e-9);
  });
});

describe('Monte Carlo', () => {
  test('is drawn by a worker, held against the budget, and forgotten with its inputs', async () => {
    const worker = startWorker(stage.app);
    try {
      const { page, goTo } = await stage.visitor(owner);
      await openPlan(page, goTo);
      const drawn = part(page, 'Monte Carlo');
      await drawn.getByRole('button', { name: 'Draw the inputs a million times' }).click();
      const table = drawn.getByRole('region', { name: 'Monte Carlo beside the budget' });
      await table.waitFor({ timeout: 60_000 });
      const [spread = ''] = await cellsOf(table, 'Monte Carlo, symmetric');
      const [budget = ''] = await cellsOf(table, 'budget');
      // 2 % of the current and 3 % of the efficiency: a product of two normal factors.
      expectRelative(numberIn(budget), 100 * Math.hypot(0.02, 0.03), 2e-3);
      expectRelative(numberIn(spread), 100 * Math.hypot(0.02, 0.03), 5e-3);
      await expectSoundInEveryView(page);
      await field(page, 'Thickness').fill('0.002 nm');
      await sized(page);
      expect(await table.count()).toBe(0);
    } finally {
      await worker.stop();
    }
  });

  test('is cancelled while no worker has taken it', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    const drawn = part(page, 'Monte Carlo');
    await drawn.getByRole('button', { name: 'Draw the inputs a million times' }).click();
    await drawn.getByText(/no worker runs/).waitFor();
    await drawn.getByRole('button', { name: 'Cancel' }).click();
    await drawn.getByText('Cancelled.').waitFor();
    await drawn.getByRole('button', { name: 'Draw the inputs a million times' }).waitFor();
  });
});

describe('the target', () => {
  test('its other elements are counted as background', async () => {
    const { page, goTo, console: lines } = await stage.visitor(owner);
    // The beam of the case moves on first, the element follows when told.
    lines.expect(/422/);
    await openPlan(page, goTo);
    const others = part(page, 'Other elements of the target');
    await others.getByRole('button', { name: 'Count H as background' }).click();
    await sized(page);
    await others.getByText(/as H-1/).waitFor();
    expect(await others.getByRole('button', { name: /Count H as/ }).count()).toBe(0);
    await retype(page, page.getByLabel('Kinetic energy, lab'), '120 eV');
    await others.getByRole('button', { name: 'Take the beam of the case' }).click();
    await sized(page);
    expect(await page.getByText(/Give it the energy of the estimate/i).count()).toBe(0);
    await others.getByRole('button', { name: 'Count H no longer' }).click();
    await others.getByRole('button', { name: 'Count H as background' }).waitFor();
  });
});

describe('saved', () => {
  test('a plan is saved with its result, reopened, and an older version shows what it was saved with', async () => {
    const { page, goTo } = await stage.visitor(owner);
    const id = await openPlan(page, goTo);
    const first = await cellsOf(detectorTable(page), 'Near');
    await retype(page, field(page, 'Thickness'), '0.2 nm');
    await sized(page);
    const second = await cellsOf(detectorTable(page), 'Near');
    expect(second).not.toEqual(first);
    await page.keyboard.press('ControlOrMeta+s');
    await page.getByRole('dialog').waitFor();
    await page.keyboard.press('ControlOrMeta+s');
    await page.getByText(/version 2, saved/).waitFor();
    await page.reload();
    await sized(page);
    expect(await field(page, 'Thickness').inputValue()).toBe('0.2 nm');
    expect(await cellsOf(detectorTable(page), 'Near')).toEqual(second);

    let asked = 0;
    page.on('request', (request) => {
      if (request.url().endsWith('/api/run-plans')) asked += 1;
    });
    await goTo(`/cases/${id}/versions/1?section=run-plan`);
    await sized(page);
    expect(await cellsOf(detectorTable(page), 'Near')).toEqual(first);
    expect(asked).toBe(0);
    expect(await field(page, 'Thickness').isDisabled()).toBe(true);
    const slider = sliderOf(page, 'Near');
    await slider.focus();
    await page.keyboard.press('ArrowLeft');
    expect(await slider.getAttribute('aria-valuenow')).toBe('30');
  });

  test('question and answer are taken as JSON, the table as CSV with units', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    const take = async (name: string) => {
      const [download] = await Promise.all([
        page.waitForEvent('download'),
        part(page, 'What every detector sees').getByRole('button', { name, exact: true }).click(),
      ]);
      return readFile(await download.path(), 'utf8');
    };
    const { request, answer } = JSON.parse(await take('JSON')) as {
      request: object;
      answer: { detectors: { trueRate: { value: number } }[] };
    };
    const again = await agent.post('/api/run-plans').send(request).expect(200);
    expect(again.body).toEqual(answer);
    const [names, units, near] = (await take('CSV')).split('\r\n').map((row) => row.split(','));
    const column = (names ?? []).indexOf('true rate');
    expect(units?.[column]).toBe('1/s');
    expect(Number(near?.[column])).toBe(answer.detectors[0]?.trueRate.value);
  });
});

describe('seen by everybody', () => {
  test('no violation in any view of a whole plan; on paper there are words instead of fields', async () => {
    const { page, goTo } = await stage.visitor(owner);
    await openPlan(page, goTo);
    await page.getByText('Uncertainties of the inputs').click();
    await expectSoundInEveryView(page);
    await page.emulateMedia({ media: 'print' });
    await part(page, 'Run in words').getByText('efficiency 0.8').first().waitFor();
    expect(await field(page, 'Thickness').isVisible()).toBe(false);
    expect(await page.getByRole('button', { name: 'CSV' }).first().isVisible()).toBe(false);
  });
});
