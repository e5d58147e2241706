import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import { scanResultSchema } from '#shared/contracts/scans.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';
import {
  eV,
  energyScan,
  isDone,
  startScan,
  startWorker,
  waitFor,
  watchedCompute,
} from './scan-requests.ts';
import type { RunningWorker } from './scan-requests.ts';

let app: TestApp;
let agent: Agent;
let worker: RunningWorker | undefined;
beforeAll(async () => {
  app = await createTestApp();
  agent = await app.signedIn('theorist');
});
afterEach(async () => {
  await worker?.stop();
  worker = undefined;
});
afterAll(() => app.close());

async function resultOf(body: object) {
  worker ??= startWorker(app);
  const id = await startScan(agent, body);
  await waitFor(agent, id, isDone);
  const json = await agent.get(`/api/scans/${id}/result`).expect(200);
  const csv = await agent.get(`/api/scans/${id}/result`).set('Accept', 'text/csv').expect(200);
  return { id, result: scanResultSchema.parse(json.body), csv };
}

async function estimateAt(changes: object) {
  const answer = await agent.post('/api/estimates').send({ ...yukawaDocument, ...changes });
  const born = estimateSchema.parse(answer.body).methods.born1;
  if (!born || 'unavailable' in born) throw new Error('No first order.');
  return born;
}

describe('what a scan answers', () => {
  test('totals over energy are those of single estimates, as JSON and as CSV', async () => {
    const { result, csv } = await resultOf(energyScan);
    expect(result).toMatchObject({
      method: 'born1',
      unit: 'angstrom2',
      axes: [{ path: '/energy', unit: 'eV' }],
      empty: [],
    });
    const energies = result.axes[0]?.values ?? [];
    expect(energies).toHaveLength(20);
    expect([energies[0], energies.at(-1)]).toEqual([10, 1000]);
    energies.forEach((energy, i) => expectRelative(energy, 10 * 100 ** (i / 19), 1e-14));
    for (const i of [0, 7, 19]) {
      const { total } = await estimateAt({ energy: eV(energies[i] ?? NaN) });
      if (!('value' in total)) throw new Error('The total diverges.');
      expect(result.values[i]).toBe(total.value);
    }

    expect(csv.headers['content-type']).toBe('text/csv; charset=utf-8');
    const lines = csv.text.trimEnd().split('\n');
    expect(lines[0]).toBe('energy (eV),total (angstrom2)');
    expect(lines).toHaveLength(21);
    lines.slice(1).forEach((line, i) => {
      expect(line.split(',').map(Number)).toEqual([energies[i], result.values[i]]);
    });
  });

  test('angular distributions over two inputs: nested by axis, and a row an angle', async () => {
    const { result, csv } = await resultOf({
      ...energyScan,
      output: 'dcs',
      axes: [
        {
          path: '/interaction/terms/0/V0',
          from: { value: -10, unit: 'meV' },
          to: eV(-20),
          count: 2,
        },
        { path: '/energy', values: [{ value: 0.1, unit: 'keV' }, eV(200), eV(300)] },
      ],
    });
    expect(result.axes).toEqual([
      { path: '/interaction/terms/0/V0', unit: 'meV', values: [-10, -20_000] },
      { path: '/energy', unit: 'keV', values: [0.1, 0.2, 0.3] },
    ]);
    expect(result).toMatchObject({
      unit: 'angstrom2/sr',
      angles: { unit: 'deg', frame: 'cm', values: [0, 30, 60, 90, 180] },
    });
    const terms = [{ ...yukawaDocument.interaction.terms[0], V0: { value: -20_000, unit: 'meV' } }];
    const single = await estimateAt({
      energy: { value: 0.3, unit: 'keV' },
      interaction: { terms },
    });
    expect(result.values[1]).toHaveLength(3);
    expect((result.values[1] as unknown[])[2]).toEqual(single.differential.map(({ dcs }) => dcs));

    const lines = csv.text.trimEnd().split('\n');
    expect(lines[0]).toBe('V0 (meV),energy (keV),theta (deg),dcs (angstrom2/sr)');
    expect(lines).toHaveLength(1 + 2 * 3 * 5);
    expect(lines.at(-1)).toBe(`-20000,0.3,180,${single.differential[4]?.dcs}`);
  });

  test('a divergent point is null, in CSV empty, and the reason is given', async () => {
    const { result, csv } = await resultOf({
      ...energyScan,
      estimate: {
        ...yukawaDocument,
        target: { kind: 'fixed', charge: 1 },
        interaction: { terms: [{ form: 'coulomb', chargeProduct: -1 }] },
        goldenRule: { theta: 60 },
      },
      axes: [{ path: '/interaction/terms/0/chargeProduct', from: -2, to: 0, count: 3 }],
    });
    expect(result.axes[0]).toEqual({
      path: '/interaction/terms/0/chargeProduct',
      unit: null,
      values: [-2, -1, 0],
    });
    expect(result.values).toEqual([null, null, 0]);
    expect(result.empty).toEqual([
      { reason: expect.stringMatching(/grows without limit/) as unknown, points: 2, first: 0 },
    ]);
    expect(csv.text).toBe('chargeProduct (1),total (angstrom2)\n-2,\n-1,\n0,0\n');
  });
});

test.each(['born1', 'partialWaves'] as const)(
  'a point is what an estimate by %s gives there: curve of the lab, total, verdict',
  async (method) => {
    const collision = {
      ...yukawaDocument,
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'He-4' },
      energy: { value: 1, unit: 'MeV' },
      kinematics: 'relativistic',
      interaction: {
        terms: [{ form: 'gaussian', V0: { value: -2, unit: 'MeV' }, a: { value: 2, unit: 'fm' } }],
      },
      frame: 'lab',
      angles: { unit: 'deg', values: [10, 40, 80] },
      goldenRule: { theta: 60 },
      units: { length: 'fm', area: 'millibarn', energy: 'MeV' },
      methods: [method],
    };
    const answer = await agent.post('/api/estimates').send(collision).expect(200);
    const { methods, validity } = estimateSchema.parse(answer.body);
    const single = methods[method];
    if (!single || 'unavailable' in single || !('value' in single.total)) throw new Error('None.');
    const axes = [{ path: '/energy', values: [collision.energy] }];
    const scan = { estimate: collision, method, axes };
    const total = await resultOf({ ...scan, output: 'total' });
    expect(total.result).toMatchObject({ unit: 'millibarn', values: [single.total.value] });
    const dcs = await resultOf({ ...scan, output: 'dcs' });
    expect(dcs.result.values).toEqual([single.differential.map((point) => point.dcs)]);
    const verdict = await resultOf({ ...scan, output: 'verdict' });
    expect(verdict.result).toMatchObject({ unit: null, values: [validity.verdict] });
    expect(verdict.csv.text).toBe(`energy (MeV),verdict\n1,${validity.verdict}\n`);
  },
);

test('a method that allows no point of a scan is refused at once', async () => {
  const terms = [{ form: 'hardSphere', R: { value: 1, unit: 'angstrom' } }];
  const estimate = { ...yukawaDocument, interaction: { terms } };
  const answer = await agent.post('/api/scans').send({ ...energyScan, estimate });
  expect(answer.status).toBe(422);
  expect(answer.body).toMatchObject({ errors: [{ path: '/method' }] });
});

test('identical points are computed once: within a scan, and in the next one', async () => {
  let computed = 0;
  worker = startWorker(
    app,
    watchedCompute(() => void (computed += 1)),
  );
  const axes = [{ path: '/energy', values: [51, 52, 51, 53, 52].map(eV) }];
  const first = await resultOf({ ...energyScan, axes });
  expect(computed).toBe(3);
  const [a, b, c, , e] = first.result.values;
  expect([c, e]).toEqual([a, b]);
  const again = [{ path: '/energy', values: [52, 51, 54].map(eV) }];
  const second = await resultOf({ ...energyScan, axes: again });
  expect(computed).toBe(4);
  expect(second.result.values.slice(0, 2)).toEqual([b, a]);
});

test('a result before the end is refused (409), an unknown scan not found', async () => {
  const id = await startScan(agent);
  const early = await agent.get(`/api/scans/${id}/result`).expect(409);
  expect(early.body).toMatchObject({ code: 'conflict', state: 'queued', done: 0, total: 20 });
  await agent.get(`/api/scans/${crypto.randomUUID()}`).expect(404);
  await agent.get('/api/scans/nonsense/result').expect(404);
  await agent.post(`/api/scans/${id}/cancel`).expect(200);
});

test.each([
  [{ axes: [] }, '/axes'],
  [{ method: 'born3' }, '/method'],
  [{ output: 'dsc' }, '/output'],
  [{ axes: [{ path: '/enrgy', from: eV(1), to: eV(2), count: 2 }] }, '/axes/0/path'],
  [{ axes: [{ path: '/target/kind', from: 1, to: 2, count: 2 }] }, '/axes/0/path'],
  [{ axes: [{ path: '/angles/values/0', from: 1, to: 2, count: 2 }] }, '/axes/0/path'],
  [{ axes: [{ path: '/energy', from: 1, to: 2, count: 2 }] }, '/axes/0/from'],
  [{ axes: [{ path: '/target/charge', from: eV(1), to: 2, count: 2 }] }, '/axes/0/from'],
  [
    { axes: [{ path: '/energy', from: eV(1), to: { value: 2, unit: 'fm' }, count: 2 }] },
    '/axes/0/to/unit',
  ],
  [
    { axes: [{ path: '/energy', from: eV(0), to: eV(2), count: 2, scale: 'log' }] },
    '/axes/0/scale',
  ],
  [{ axes: [{ path: '/energy', from: eV(-1), to: eV(2), count: 2 }] }, '/axes/0'],
  [{ axes: [{ path: '/energy', from: eV(1), to: eV(2), count: 0 }] }, '/axes/0/count'],
  [{ axes: [{ path: '/energy', from: eV(1), to: eV(2), count: 2e5 }] }, '/axes/0/count'],
  [
    {
      axes: [
        { path: '/energy', from: eV(1), to: eV(2), count: 50_000 },
        { path: '/interaction/terms/0/V0', from: eV(1), to: eV(2), count: 3 },
      ],
    },
    '/axes',
  ],
  [{ campaignId: crypto.randomUUID() }, '/campaignId'],
])('a scan that can never be is refused in words: %j', async (changes, path) => {
  const answer = await agent
    .post('/api/scans')
    .send({ ...energyScan, ...changes })
    .expect(422);
  const { errors } = answer.body as { errors: { path: string; message: string }[] };
  expect(errors.map((error) => error.path)).toContain(path);
});
