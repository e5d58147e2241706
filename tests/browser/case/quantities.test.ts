import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { saveCase } from '#tests/browser/support/case-factory.ts';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { readoutText, retype, settled } from './case-steps.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const energyOf = (page: Page) => page.getByLabel('Kinetic energy, lab');

async function elasticOf(page: Page): Promise<number> {
  const name = await page.getByRole('button', { name: /^Elastic σ/ }).getAttribute('aria-label');
  return Number(/: ([-\d.e]+) /.exec(name ?? '')?.[1]);
}

test('a wavelength and an energy per nucleon become energies, with a note, and the particle rules', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  await page.getByLabel('Particle', { exact: true }).selectOption('neutron');
  await retype(page, energyOf(page), '1.8 angstrom');
  // 81.804 meV Å² over the square of the wavelength, the neutron constant, is 25.25 meV.
  await page.getByText(/A wavelength of 1\.8 Å is a kinetic energy of 0\.0252\d* eV/).waitFor();
  await settled(page);
  expect(await page.getByRole('list', { name: 'Beam line' }).textContent()).toMatch(
    /neutron, 0\.0252\d* eV/,
  );
  await page.getByLabel('Particle', { exact: true }).selectOption('electron');
  await page.getByText(/A wavelength of 1\.8 Å is a kinetic energy of 46\.4\d* eV/).waitFor();
  expect(await energyOf(page).inputValue()).toBe('1.8 angstrom');

  await page.getByLabel('Particle', { exact: true }).selectOption('alpha');
  await retype(page, energyOf(page), '2.5 MeV/u');
  await page.getByText(/2\.5 MeV per nucleon times mass number 4 is 10 MeV/).waitFor();
  await page.getByLabel('Unit of the energy').selectOption('keV');
  expect(await energyOf(page).inputValue()).toBe('10000 keV');
});

test('the unit of a figure converts it where it stands, everywhere at once, and is remembered', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  const inAngstrom = await elasticOf(page);
  expectRelative(inAngstrom, 0.816789, 1e-6);
  await page.getByLabel('Unit of Elastic σ, first Born').selectOption('fm2');
  expectRelative(await elasticOf(page), inAngstrom * 1e10, 1e-14);
  expect(await readoutText(page)).toContain('fm²/sr');
  expect(await page.getByLabel('Unit of Viscosity σ, first Born').inputValue()).toBe('fm2');
  await page.reload();
  await settled(page);
  expect(await page.getByLabel('Unit of Elastic σ, first Born').inputValue()).toBe('fm2');
});

test('a click copies every digit', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  const value = await elasticOf(page);
  await page.getByRole('button', { name: /^Elastic σ/ }).click();
  await page.getByText('copied', { exact: false }).first().waitFor();
  expect(await page.evaluate(() => navigator.clipboard.readText())).toBe(`${value} angstrom2`);
});

test('a heavy projectile has two branches in the lab, drawn as curves of their own', async () => {
  const { account, agent } = await stage.app.person('experimentalist');
  const id = await saveCase(agent, 'Alphas on hydrogen', {
    document: {
      projectile: { species: 'alpha' },
      target: { kind: 'species', species: 'proton' },
      energy: { value: 2, unit: 'MeV' },
      interaction: { terms: [{ form: 'coulomb' }] },
      methods: ['born1'],
      angles: { unit: 'deg', values: [5, 10, 14, 30] },
      frame: 'lab',
      units: { length: 'fm', area: 'barn', energy: 'MeV' },
    },
  });
  const { page, goTo } = await stage.visitor(account);
  await goTo(`/cases/${id}`);
  await settled(page);
  const legend = page.getByRole('list', { name: 'Curves' });
  expect(await legend.getByRole('listitem').count()).toBe(3);
  const row = await readoutText(page);
  const values = [...row.matchAll(/([\d.]+) b\/sr/g)].map((match) => Number(match[1]));
  expectRelative((values[1] ?? NaN) + (values[2] ?? NaN), values[0] ?? NaN, 1e-4);

  // Beyond the cone there is nothing, and the row says why.
  await page.getByRole('slider', { name: 'Crosshair' }).focus();
  await page.keyboard.press('End');
  expect(await readoutText(page)).toMatch(/cone|largest|reach/i);

  const low = legend.getByRole('button', { name: /smaller/ });
  await low.click();
  expect(await low.getAttribute('aria-pressed')).toBe('false');

  await page.getByRole('radio', { name: 'cm', exact: true }).check();
  await settled(page);
  expect(await legend.getByRole('listitem').count()).toBe(1);
});

test('the box of the golden rule moves every line but the last', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new?section=golden-rule');
  const chain = page.getByRole('region', { name: 'Chain' });
  await chain.waitFor();
  const valueOf = async (name: string) => {
    const label = await chain
      .getByRole('button', { name: new RegExp(`^${name}`) })
      .getAttribute('aria-label');
    return Number(/: ([-\d.e+]+) /.exec(label ?? '')?.[1]);
  };
  const before = [await valueOf('Transition rate'), await valueOf('Differential cross section')];
  const box = page.getByRole('region', { name: 'Box' });
  await retype(page, box.getByLabel('Box side L'), '40 nm');
  await box.getByText(/the last line (did not change|changed by)/).waitFor();
  expectRelative((await valueOf('Transition rate')) * 64, before[0] ?? NaN, 1e-12);
  expectRelative(await valueOf('Differential cross section'), before[1] ?? NaN, 1e-13);
});

test('the curve leaves as numbers with units, as a drawing and as a picture', async () => {
  const { page, goTo } = await stage.visitor('experimentalist');
  await goTo('/cases/new');
  await settled(page);
  for (const [name, ending] of [
    [/CSV/, 'csv'],
    [/SVG/, 'svg'],
    [/PNG/, 'png'],
  ] as const) {
    await page.getByRole('button', { name: 'Export', exact: true }).click();
    const waiting = page.waitForEvent('download');
    await page.getByRole('menuitem', { name }).click();
    const download = await waiting;
    expect(download.suggestedFilename()).toBe(`new-case-dcs.${ending}`);
    if (ending !== 'csv') continue;
    const stream = await download.createReadStream();
    const chunks: Buffer[] = [];
    for await (const chunk of stream) chunks.push(Buffer.from(chunk as Uint8Array));
    const lines = Buffer.concat(chunks).toString('utf8').split('\r\n');
    expect(lines[1]).toBe('deg (cm),1/angstrom (cm),1,angstrom2/sr (cm)');
    expect(lines).toHaveLength(2 + 181 + 1);
  }
});
