import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createCompute } from '#server/compute/compute.ts';
import type { ComputePool } from '#server/compute/compute.ts';
import { VERSION } from '#server/version.ts';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { Problem } from '#shared/contracts/problem-details.ts';
import { CONTRACT_BODY, Q } from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let pool: ComputePool;
let agent: Agent;
beforeAll(async () => {
  pool = createCompute({ threads: 2 });
  app = await createTestApp({ compute: pool.compute });
  agent = await app.signedIn('experimentalist');
});
afterAll(async () => {
  await app.close();
  await pool.close();
});

const post = (body: object) => agent.post('/api/estimates').send(body);
const ask = async (changes: object): Promise<Estimate> =>
  estimateSchema.parse((await post({ ...CONTRACT_BODY, ...changes }).expect(200)).body);

/** The faults of a refused body, by pointer. */
async function faults(changes: object): Promise<Record<string, string>> {
  const answer = await post({ ...CONTRACT_BODY, ...changes }).expect(422);
  expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
  const problem = answer.body as Problem;
  return Object.fromEntries((problem.errors ?? []).map(({ path, message }) => [path, message]));
}
const terms = (...list: object[]) => ({ interaction: { terms: list } });
const YUKAWA = { form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') };

test('the body of the contract over HTTP, from a worker thread', async () => {
  const estimate = await ask({});
  expect(estimate.engine).toEqual({ name: 'tallybarn', version: VERSION });
  const born1 = estimate.methods.born1;
  if (!born1 || 'unavailable' in born1) throw new Error('unavailable');
  expectRelative(born1.differential[0]?.dcs ?? NaN, 6.888967358, 1e-10);
  expect(estimate.validity.criteria.filter(({ decides }) => decides)).toHaveLength(1);
});

test('a saved document may be sent as it is; entered is kept out of the numbers', async () => {
  const saved = { format: 1, runPlan: { anything: true }, entered: { '/energy': '100 eV' } };
  expect(await ask(saved)).toEqual(await ask({}));
});

const ALL = ['born1', 'born2', 'eikonal', 'partialWaves'];
const curveOf = (estimate: Estimate, method: keyof Estimate['methods']) => {
  const found = estimate.methods[method];
  if (!found || 'unavailable' in found) throw new Error(`${method} is unavailable`);
  return found;
};

describe('methods beyond first order', () => {
  test('stand beside it, each with the keys of the contract, and the exact one decides', async () => {
    const all = await ask({ methods: ALL });
    expect(Object.keys(all.methods)).toEqual(ALL);
    const exact = curveOf(all, 'partialWaves');
    expect(exact.phaseShifts?.[0]).toMatchObject({ l: 0, delta: expect.any(Number) as unknown });
    // Beyond lMax first order stands, and is listed too.
    expect(exact.phaseShifts?.length).toBeGreaterThan(exact.lMax ?? NaN);
    expect(exact.opticalTheorem?.residual).toBeLessThan(1e-8);
    const [first, total] = [curveOf(all, 'born1').elastic, exact.elastic];
    if ('divergent' in first || 'divergent' in total) throw new Error('divergent');
    const { validity } = all;
    expect(validity.basis).toBe('exact');
    expectRelative(validity.deviation ?? NaN, Math.abs(first.value / total.value - 1), 1e-9);
    expect(validity.deviations).toMatchObject({
      decides: 'elastic',
      limits: { sound: 0.02, usable: 0.2 },
    });
    expect(validity.criteria.some(({ decides }) => decides)).toBe(false);
  });

  test('may be asked for alone: first order is judged all the same', async () => {
    const [alone, all] = [await ask({ methods: ['partialWaves'] }), await ask({ methods: ALL })];
    expect(Object.keys(alone.methods)).toEqual(['partialWaves']);
    expect(alone.methods.partialWaves).toEqual(all.methods.partialWaves);
    expect(alone.goldenRule).toEqual(all.goldenRule);
    expect(alone.validity).toEqual(all.validity);
  });

  test('say in words what an interaction does not allow, beside the others', async () => {
    const contact = { form: 'contact', b: Q(6.65, 'fm') };
    const body = { projectile: { species: 'neutron' }, methods: ALL, ...terms(contact) };
    const { methods, validity } = await ask(body);
    expect(methods.born1).toHaveProperty('differential');
    for (const name of ['born2', 'eikonal', 'partialWaves'] as const) {
      expect(methods[name]).toMatchObject({
        unavailable: true,
        reason: expect.stringMatching(/first order/i) as unknown,
      });
    }
    expect(validity.basis).toBe('criteria');
  });
});

test('units of the answer follow the question', async () => {
  const inFm = await ask({ units: { length: 'fm', area: 'barn', energy: 'MeV' } });
  const plain = await ask({});
  expect(inFm.kinematics.k.unit).toBe('1/fm');
  expectRelative(inFm.kinematics.k.value, plain.kinematics.k.value * 1e-5, 1e-15);
  const [a, b] = [inFm.methods.born1, plain.methods.born1];
  if (!a || !b || 'unavailable' in a || 'unavailable' in b) throw new Error('unavailable');
  expectRelative(a.differential[1]?.dcs ?? NaN, (b.differential[1]?.dcs ?? NaN) * 1e8, 1e-15);
  expectRelative(
    a.differential[1]?.amplitude?.re ?? NaN,
    (b.differential[1]?.amplitude?.re ?? NaN) * 1e5,
    1e-15,
  );
  if ('unavailable' in inFm.goldenRule || 'unavailable' in plain.goldenRule)
    throw new Error('none');
  const [x, y] = [inFm.goldenRule, plain.goldenRule];
  expect(x.matrixElementTimesVolume.unit).toBe('MeV fm3');
  expectRelative(x.matrixElementTimesVolume.re, y.matrixElementTimesVolume.re * 1e9, 1e-14);
  expect(x.densityOfStates.unit).toBe('1/(MeV sr)');
  expectRelative(x.densityOfStates.value, y.densityOfStates.value * 1e6, 1e-14);
  expect(x.flux.unit).toBe('1/(barn s)');
  expectRelative(x.flux.value, y.flux.value * 1e-8, 1e-14);
  expect(x.dcs.unit).toBe('barn/sr');
});

test('angles in radians and milliradians are the same angles', async () => {
  const curve = async (unit: string, values: number[]) => {
    const { born1 } = (await ask({ angles: { unit, values }, goldenRule: {} })).methods;
    if (!born1 || 'unavailable' in born1) throw new Error('unavailable');
    return born1.differential.map(({ dcs }) => dcs ?? NaN);
  };
  const degrees = await curve('deg', [0, 90, 180]);
  const radians = await curve('rad', [0, Math.PI / 2, Math.PI]);
  const milli = await curve('mrad', [0, 500 * Math.PI, 1000 * Math.PI]);
  degrees.forEach((dcs, i) => {
    expectRelative(radians[i] ?? NaN, dcs, 1e-14);
    expectRelative(milli[i] ?? NaN, dcs, 1e-14);
  });
});

describe('refusals point at what is wrong and say the mend', () => {
  test('a unit of another kind, a misspelt one, a missing one', async () => {
    const term = { form: 'squareWell', V0: Q(1, 'angstrom'), W0: Q(-1, 'ev'), R: 3 };
    const found = await faults(terms(term));
    expect(found['/interaction/terms/0/V0']).toMatch(/not an energy unit; it is a unit of length/);
    expect(found['/interaction/terms/0/W0']).toMatch(/did you mean eV/);
    expect(found['/interaction/terms/0/R']).toMatch(/needs a value and a unit/);
  });

  test('an unknown form lists the known ones, an unknown parameter its own', async () => {
    const found = await faults(terms({ form: 'yukava' }, { ...YUKAWA, b: 1 }));
    expect(found['/interaction/terms/0/form']).toMatch(/yukawa, coulomb, .*contact/);
    expect(found['/interaction/terms/1/b']).toMatch(/it takes V0, a/);
  });

  test('a missing parameter, a negative length, a positive W0', async () => {
    const found = await faults(
      terms(
        { form: 'yukawa', a: Q(-1, 'nm') },
        { form: 'gaussian', V0: Q(1, 'eV'), W0: Q(1, 'eV'), a: Q(1, 'nm') },
      ),
    );
    expect(found['/interaction/terms/0/V0']).toMatch(/missing.*"unit":"eV"/);
    expect(found['/interaction/terms/0/a']).toMatch(/at least .* nm/);
    expect(found['/interaction/terms/1/W0']).toMatch(/absorbs/);
  });

  test('particles, energy and angles', async () => {
    const found = await faults({
      projectile: { nuclide: 'Ca40' },
      target: { kind: 'custom', mass: Q(0, 'u'), charge: 1, spin: 0 },
      angles: { values: [10, 181] },
      goldenRule: { theta: -1 },
    });
    expect(found['/projectile/nuclide']).toMatch(/write Ca-40/);
    expect(found['/target/mass']).toMatch(/above zero/);
    expect(found['/angles/values/1']).toMatch(/between 0 and 180 degrees/);
    expect(found['/goldenRule/theta']).toMatch(/between 0 and 180 degrees/);
    expect(await faults({ energy: Q(-1, 'eV') })).toHaveProperty('/energy');
    expect(await faults({ angles: { unit: 'rad', from: 0, to: 3.2, count: 5 } })).toHaveProperty(
      '/angles/to',
    );
  });

  test('identity that cannot be', async () => {
    const clash = {
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'C-12' },
    };
    expect((await faults({ ...clash, identical: true }))['/identical']).toMatch(
      /different particles/,
    );
    expect((await faults({ identical: true }))['/identical']).toMatch(/fixed centre/);
  });

  test('no method, an unknown one, and keys nobody knows', async () => {
    expect(await faults({ methods: [] })).toHaveProperty('/methods');
    expect(await faults({ methods: ['born7'] })).toHaveProperty('/methods/0');
    expect(await faults({ metods: ['born1'] })).toHaveProperty('/metods');
  });

  test('a sphere too large for its angles is too much work, in words', async () => {
    const term = { form: 'squareWell', V0: Q(-1, 'eV'), R: Q(1, 'mm') };
    const answer = await post({ ...CONTRACT_BODY, ...terms(term) }).expect(422);
    expect(answer.body).toMatchObject({ code: 'tooMuchWork' });
    expect((answer.body as Problem).detail).toMatch(/wave number and radius/);
  });
});

describe('hostile input', () => {
  afterAll(async () => {
    await ask({});
    await agent.get('/api/health').expect(200);
  });
  const raw = (text: string, type = 'application/json') =>
    agent.post('/api/estimates').set('Content-Type', type).send(text);
  const withEnergy = (text: string) =>
    JSON.stringify(CONTRACT_BODY).replace('{"value":100,"unit":"eV"}', text);

  test('1e400 is no number, and -1e400, NaN, text and null are none', async () => {
    for (const value of ['1e400', '-1e400', '"100"', 'null', '[]']) {
      const answer = await raw(withEnergy(`{"value":${value},"unit":"eV"}`)).expect(422);
      expect((answer.body as Problem).errors?.[0]?.path).toBe('/energy/value');
    }
    await raw(withEnergy('{"value":NaN,"unit":"eV"}')).expect(400);
  });

  test('empty bodies, torn ones and other content types', async () => {
    await agent.post('/api/estimates').set('Content-Type', 'application/json').send('').expect(400);
    await raw('{"projectile":').expect(400);
    await raw('[]').expect(422);
    await raw('null').expect(422);
    await raw(JSON.stringify(CONTRACT_BODY), 'text/plain').expect(415);
    await raw('species=electron', 'application/x-www-form-urlencoded').expect(415);
  });

  test('ten million angles by count, and as many as a body holds', async () => {
    const path = '/angles/count';
    expect(await faults({ angles: { from: 0, to: 180, count: 1e7 } })).toHaveProperty(path);
    const many = { ...CONTRACT_BODY, angles: { values: new Array<number>(100_000).fill(1) } };
    expect((await post(many).expect(422)).body).toMatchObject({ code: 'invalidInput' });
    const flood = { ...CONTRACT_BODY, angles: { values: new Array<number>(1e7).fill(1) } };
    await post(flood).expect(413);
  });

  test('prototype keys and endless nesting', async () => {
    await raw(withEnergy('{"value":1,"unit":"eV"},"__proto__":{"x":1}')).expect(422);
    await raw(withEnergy(`${'['.repeat(5000)}${']'.repeat(5000)}`)).expect(422);
    const term = { form: 'constructor', toString: 1 };
    expect(await faults(terms(term))).toHaveProperty('/interaction/terms/0/form');
    expect(await faults(terms({ ...YUKAWA, constructor: 1 }))).toHaveProperty(
      '/interaction/terms/0/constructor',
    );
  });
});

test('twelve terms, kR of a thousand and 5,000 angles are answered within the deadline', async () => {
  const list = Array.from({ length: 12 }, (_, i) =>
    i % 2 === 0
      ? { form: 'squareWell', V0: Q(-1, 'eV'), R: Q(195.2 - i, 'angstrom') }
      : { form: 'woodsSaxon', V0: Q(-1, 'eV'), R: Q(195.2 - i, 'angstrom'), a: Q(0.5, 'angstrom') },
  );
  const estimate = await ask({ ...terms(...list), angles: { from: 0, to: 180, count: 5000 } });
  expect(estimate.methods.born1).toHaveProperty('differential.length', 5000);
});

test('whoever has not signed in is asked to', async () => {
  await app.anonymous().post('/api/estimates').send(CONTRACT_BODY).expect(401);
});
