import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { formDetailSchema, formsTableSchema, startSchema } from '#shared/contracts/reference.ts';
import type { FormDetail, StartKind } from '#shared/contracts/reference.ts';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import { createCompute } from '#server/compute/compute.ts';
import type { ComputePool } from '#server/compute/compute.ts';
import { FORMS } from '#server/physics/potentials/register.ts';
import { SPECIES } from '#server/physics/tables/species.ts';
import { NEUTRON_ENTRIES } from '#server/physics/tables/neutron-lengths.ts';
import { startDocument } from '#server/modules/reference/start-documents.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { MATERIALS } from '#server/physics/tables/materials.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

let app: TestApp;
let agent: Agent;
let pool: ComputePool;
beforeAll(async () => {
  pool = createCompute({ threads: 1 });
  app = await createTestApp({ compute: pool.compute });
  agent = await app.signedIn('administrator');
});
afterAll(async () => {
  await app.close();
  await pool.close();
});

const keys = FORMS.map(({ key }) => key);
const detail = async (key: string): Promise<FormDetail> =>
  formDetailSchema.parse((await agent.get(`/api/reference/forms/${key}`).expect(200)).body);
const start = async (kind: StartKind, name: string) =>
  startSchema.parse(
    (await agent.get('/api/reference/start').query({ kind, name }).expect(200)).body,
  );

describe('the forms', () => {
  it('are all listed, drawn where V is a function', async () => {
    const answer = await agent.get('/api/reference/forms?pageSize=200').expect(200);
    const { items, total } = formsTableSchema.parse(answer.body);
    expect(items.map(({ key }) => key)).toEqual(keys);
    expect(total).toBe(keys.length);
    for (const { key, sketch } of items) {
      const { picture } = await detail(key);
      expect(sketch === null, key).toBe('unavailable' in picture.potential);
      for (const [r, v] of sketch ?? []) {
        expect(r >= 0 && r <= 1 && Math.abs(v) <= 1, key).toBe(true);
      }
    }
  });

  it.each([
    ['rutherford', 'coulomb'],
    ['optical model', 'woodsSaxon'],
    ['Yuk', 'yukawa'],
    ['screened', 'screenedCoulomb'],
  ])('are found by what the trade calls them: %s', async (q, key) => {
    const answer = await agent.get('/api/reference/forms').query({ q }).expect(200);
    expect(formsTableSchema.parse(answer.body).items[0]?.key).toBe(key);
  });

  it('of an unknown key are not found', async () => {
    await agent.get('/api/reference/forms/nonsense').expect(404);
    await agent.get('/api/reference/start?kind=form&name=nonsense').expect(404);
  });

  it.each(keys)('%s: finite curves, remarks, and a document the server computes', async (key) => {
    const { picture, remarks, start: begun } = await detail(key);
    expect(remarks.length).toBeGreaterThan(0);
    const { potential, transform } = picture;
    if (!('unavailable' in potential)) {
      expect(potential.re).toHaveLength(potential.r.length);
      expect(potential.r.every((r, i, all) => r > (all[i - 1] ?? 0))).toBe(true);
    }
    if (!('unavailable' in transform)) {
      expect(transform.re).toHaveLength(transform.q.length);
      expect(transform.error).toBeLessThan(1e-9);
    }
    const answer = await agent.post('/api/estimates').send(begun.document).expect(200);
    expect(estimateSchema.parse(answer.body).engine.name).toBe('tallybarn');
  });
});

describe('what is drawn', () => {
  it('is the transform itself: ∫ r² V dr of a Yukawa potential at q = 0, and half of it at q a = 1', async () => {
    const { picture } = await detail('yukawa');
    if ('unavailable' in picture.transform) throw new Error('no transform');
    const { q, re, unit } = picture.transform;
    // V0 a³ = -10 eV Å³ by hand for the defaults V0 = -10 eV, a = 1 Å.
    expectRelative(re[0] ?? NaN, -10, 1e-14);
    const place = q.findIndex((at) => Math.abs(at - 1) < 1e-12);
    expectRelative(re[place] ?? NaN, -5, 1e-12);
    expect(unit).toEqual({ q: '1/angstrom', s: 'eV angstrom3' });
  });

  it('agrees with a plain sum over the drawn potential', async () => {
    const { picture } = await detail('gaussian');
    if ('unavailable' in picture.transform || 'unavailable' in picture.potential) {
      throw new Error('no curve');
    }
    const { r, re } = picture.potential;
    let volume = 0;
    for (let i = 1; i < r.length; i += 1) {
      const [a, b] = [r[i - 1] ?? 0, r[i] ?? 0];
      volume += 0.5 * (b - a) * (a ** 2 * (re[i - 1] ?? 0) + b ** 2 * (re[i] ?? 0));
    }
    // The trapezoid rule on these steps, and the tail beyond the picture, allow a few per mille.
    expectRelative(volume, picture.transform.re[0] ?? NaN, 5e-3);
  });

  it('begins beside q = 0 where the transform diverges there', async () => {
    const { picture } = await detail('coulomb');
    if ('unavailable' in picture.transform) throw new Error('no transform');
    expect(picture.transform.q[0]).toBeGreaterThan(0);
  });

  it('says why there is nothing to draw', async () => {
    const { picture } = await detail('contact');
    expect(picture.potential).toMatchObject({ unavailable: true });
    const sphere = await detail('hardSphere');
    expect(sphere.picture.transform).toMatchObject({ unavailable: true });
  });
});

describe('documents to start from', () => {
  const starts: [StartKind, string][] = [
    ...SPECIES.map(({ key }): [StartKind, string] => ['species', key]),
    ...MATERIALS.map(({ key }): [StartKind, string] => ['material', key]),
    ['nuclide', 'H-1'],
    ['nuclide', 'He-4'],
    ['nuclide', 'Ca-40'],
    ['nuclide', 'U-238'],
    ['nuclide', 'Og-294'],
    ['neutron', 'V'],
    ['neutron', 'Ni-58'],
    ['neutron', 'Cd'],
  ];

  it.each(starts)('%s %s is computed', async (kind, name) => {
    const { document, title, summary } = await start(kind, name);
    expect(title).not.toBe('');
    expect(summary.beam).not.toBe('');
    await agent.post('/api/estimates').send(document).expect(200);
  });

  it('every measured neutron length is computed, a resonant one by its written value', async () => {
    const known = NEUTRON_ENTRIES.filter(({ b }) => b !== null);
    for (const { name, resonant } of known) {
      const { document } = startDocument('neutron', name);
      const [term] = document.interaction.terms;
      expect(term !== undefined && 'b' in term, name).toBe(resonant);
      expect(computeEstimate(document).methods.born1, name).not.toHaveProperty('unavailable');
    }
    expect(known.length).toBeGreaterThan(300);
    await agent.get('/api/reference/start').query({ kind: 'neutron', name: 'Eu-151' }).expect(422);
  });

  it('put what was asked for in its place', async () => {
    expect((await start('nuclide', 'Ca-40')).document.target).toEqual({
      kind: 'nuclide',
      nuclide: 'Ca-40',
    });
    expect((await start('species', 'muon-')).document.projectile).toEqual({ species: 'muon-' });
    expect((await start('form', 'gaussian')).document.interaction.terms[0]?.form).toBe('gaussian');
    expect((await start('material', 'polyethylene')).document.target).toEqual({
      kind: 'nuclide',
      nuclide: 'C-12',
    });
  });

  it('refuse in words what the tables do not have', async () => {
    const refused = async (query: object) => {
      const answer = await agent.get('/api/reference/start').query(query);
      return [answer.status, (answer.body as { detail: string }).detail] as const;
    };
    expect(await refused({ kind: 'nuclide', name: 'ca40' })).toEqual([
      422,
      expect.stringContaining('write Ca-40'),
    ]);
    expect((await refused({ kind: 'species', name: 'pion' }))[1]).toContain('Known: electron');
    expect((await refused({ kind: 'particle', name: 'pion' }))[0]).toBe(422);
    expect((await refused({ kind: 'form' }))[0]).toBe(422);
  });
});
