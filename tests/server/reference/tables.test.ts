import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  elementsTableSchema,
  materialsTableSchema,
  neutronTableSchema,
  nuclideDetailSchema,
  nuclidesTableSchema,
  overviewSchema,
  speciesTableSchema,
} from '#shared/contracts/reference.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

let app: TestApp;
let agent: Agent;
beforeAll(async () => {
  app = await createTestApp();
  agent = await app.signedIn('theorist');
});
afterAll(() => app.close());

const get = async (path: string): Promise<unknown> =>
  (await agent.get(`/api/reference${path}`).expect(200)).body;
const nuclides = async (query: string) =>
  nuclidesTableSchema.parse(await get(`/nuclides?${query}`));
const names = async (query: string) => (await nuclides(query)).items.map(({ nuclide }) => nuclide);

describe('the overview', () => {
  it('names every table with its edition and counts what the lists hold', async () => {
    const { tables } = overviewSchema.parse(await get(''));
    const paths: Record<string, string> = { neutronLengths: 'neutron-lengths' };
    for (const { key, entries, edition, source, licence } of tables) {
      const list = (await get(`/${paths[key] ?? key}?pageSize=1`)) as { total: number };
      expect(list.total, key).toBe(entries);
      for (const text of [edition, source, licence]) expect(text.length, key).toBeGreaterThan(3);
    }
    expect(tables).toHaveLength(6);
  });
});

describe('nuclides', () => {
  it.each(['Ca-40', 'ca-40', '40Ca', '⁴⁰Ca', 'calcium 40', 'Calcium-40', ' ca 40 ', '40 ca'])(
    'are found as %s',
    async (text) => {
      expect((await names(`q=${encodeURIComponent(text)}`))[0]).toBe('Ca-40');
    },
  );

  it('of an element come by abundance when searched, by mass number when filtered', async () => {
    expect((await names('q=calcium')).slice(0, 3)).toEqual(['Ca-40', 'Ca-44', 'Ca-42']);
    expect(await names('element=He&occurrence=natural')).toEqual(['He-3', 'He-4']);
    expect(await names('q=deuterium')).toEqual(['H-2']);
    expect(await names('q=aluminum 27')).toEqual(['Al-27']);
  });

  it('are paged, and sorted with what has no value last either way', async () => {
    const page = await nuclides('page=2&pageSize=3&element=Ca&occurrence=natural&sort=-abundance');
    expect(page).toMatchObject({ page: 2, pageSize: 3, total: 6 });
    expect(page.items.map(({ abundance }) => abundance)).toEqual([0.00187, 0.00135, 0.00004]);
    const rising = (await nuclides('element=Ca&sort=abundance&pageSize=200')).items;
    expect(rising[0]?.nuclide).toBe('Ca-46');
    expect(rising.at(-1)?.abundance).toBeNull();
    expect((await nuclides('page=999&element=Ca')).items).toEqual([]);
  });

  it('carry units, and the edition they were read from', async () => {
    const { items, table } = await nuclides('q=Ca-40');
    expect(items[0]).toMatchObject({
      element: 'Calcium',
      atomicNumber: 20,
      massNumber: 40,
      atomicMass: { value: 39.962590863, unit: 'u' },
      spin: 0,
    });
    expect(table.edition).toBe('AME2012');
    expect(table.source).toContain('1603');
  });

  it('say everything the tables know on one page', async () => {
    const gold = nuclideDetailSchema.parse(await get('/nuclides/Au-197'));
    // rms charge radius 5.4371 fm: Angeli and Marinova (2013).
    expectRelative(gold.charge?.rms.value ?? NaN, 5.4371, 2e-4);
    expect(gold.neutron?.b?.unit).toBe('fm');
    expect(gold.isotopes.map(({ nuclide }) => nuclide)).toEqual(['Au-197']);
    expect(gold.tables.map(({ key }) => key)).toEqual([
      'nuclides',
      'nuclearCharge',
      'neutronLengths',
    ]);
    const alpha = nuclideDetailSchema.parse(await get('/nuclides/He-4'));
    expect(alpha.species).toBe('Alpha particle');
    // CODATA 2022: 3727.3794118 MeV.
    expectRelative(alpha.nuclearMass.value, 3727.3794118, 1e-11);
    await agent.get('/api/reference/nuclides/Xx-1').expect(404);
    await agent.get('/api/reference/nuclides/ca-40').expect(404);
  });
});

describe('the other tables', () => {
  it('particles carry CODATA masses with their uncertainty', async () => {
    const { items } = speciesTableSchema.parse(await get('/species?q=proton'));
    expect(items[0]?.mass).toEqual({ value: 938.27208943, unit: 'MeV', uncertainty: 2.9e-7 });
    const { items: all } = speciesTableSchema.parse(await get('/species?sort=-mass'));
    expect(all[0]?.key).toBe('alpha');
    expect(all).toHaveLength(10);
    const alpha = speciesTableSchema.parse(await get(`/species?q=${encodeURIComponent('α')}`));
    expect(alpha.items[0]?.key).toBe('alpha');
  });

  it('elements know their weights, intervals and main isotope', async () => {
    const { items } = elementsTableSchema.parse(await get('/elements?q=Cl'));
    expect(items[0]).toMatchObject({
      symbol: 'Cl',
      weight: { unit: 'g/mol' },
      interval: [35.446, 35.457],
      mainIsotope: 'Cl-35',
      naturalIsotopes: 2,
      density: null,
      phase: 'gas',
    });
    const heavy = elementsTableSchema.parse(await get('/elements?sort=-density&pageSize=2')).items;
    expect(heavy.map(({ symbol }) => symbol).sort()).toEqual(['Ir', 'Os']);
    const technetium = elementsTableSchema.parse(await get('/elements?q=technetium')).items[0];
    expect(technetium).toMatchObject({ weight: null, mainIsotope: null, naturalIsotopes: 0 });
  });

  it('neutron lengths say their contradictions and resonances in words', async () => {
    const read = async (query: string) =>
      neutronTableSchema.parse(await get(`/neutron-lengths?${query}`));
    const cadmium = (await read('q=Cd')).items[0];
    expect(cadmium).toMatchObject({ name: 'Cd', resonant: true });
    expect(cadmium?.cautions.join(' ')).toMatch(/does not follow 1\/v/);
    const oxygen = (await read('q=O-17')).items[0];
    expect(oxygen?.cautions.join(' ')).toMatch(/4π\|b\|² gives 3\.941 b.*4\.2 b/);
    const resonant = await read('caution=resonant&pageSize=200');
    expect(resonant.items.every((item) => item.resonant)).toBe(true);
    expect(resonant.total).toBeGreaterThan(5);
    const contradictory = await read('caution=contradiction&pageSize=200');
    expect(
      contradictory.items.every(({ cautions }) => cautions.join().includes('Contradiction')),
    ).toBe(true);
    // Bound coherent length of natural nickel, 10.3(1) fm: Sears, Neutron News 3 no. 3 (1992) 26.
    expect((await read('q=nickel')).items[0]?.b).toEqual({
      value: 10.3,
      unit: 'fm',
      uncertainty: 0.1,
    });
  });

  it('materials carry number densities that follow from density and formula', async () => {
    const { items } = materialsTableSchema.parse(await get('/materials?q=water'));
    const water = items.find(({ key }) => key === 'water');
    // 0.998 g/cm³ · N_A / 18.015 g/mol is 0.03336 molecules per cubic angstrom.
    expectRelative(water?.unitsPerVolume?.value ?? NaN, 0.03336, 5e-3);
    const gases = materialsTableSchema.parse(await get('/materials?phase=gas&pageSize=200')).items;
    expect(
      gases.every(({ density, unitsPerVolume }) => density === null && unitsPerVolume === null),
    ).toBe(true);
  });
});

describe('every list', () => {
  const lists = ['species', 'nuclides', 'elements', 'neutron-lengths', 'materials', 'forms'];

  it.each(lists)('%s is kept by the browser and asked for anew by its tag', async (list) => {
    const path = `/api/reference/${list}?q=c&pageSize=2`;
    const first = await agent.get(path).expect(200);
    const tag = first.headers['etag'] ?? '';
    expect(tag).toMatch(/^"[\w-]{22}"$/);
    expect(first.headers['cache-control']).toContain('private');
    const again = await agent.get(path).set('If-None-Match', tag).expect(304);
    expect(again.text).toBe('');
    const other = await agent.get(`/api/reference/${list}?pageSize=1`).set('If-None-Match', tag);
    expect(other.status).toBe(200);
  });

  it.each(lists)('%s refuses a page, size or search out of bounds', async (list) => {
    for (const query of ['page=0', 'pageSize=201', 'page=x', `q=${'a'.repeat(201)}`]) {
      const answer = await agent.get(`/api/reference/${list}?${query}`);
      expect(answer.status, query).toBe(422);
      expect(answer.body).toMatchObject({ code: 'invalidInput' });
    }
  });

  it.each(lists)('%s answers odd searches with an empty list', async (list) => {
    for (const q of ['zzzqq', '%', '\\', "'; drop table", '(((', '💥']) {
      const answer = (await get(`/${list}?q=${encodeURIComponent(q)}`)) as { total: number };
      expect(answer.total, q).toBe(0);
    }
  });
});
