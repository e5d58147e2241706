import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createCompute } from '#server/compute/compute.ts';
import type { ComputePool } from '#server/compute/compute.ts';
import type { Problem } from '#shared/contracts/problem-details.ts';
import { CONTRACT_BODY, Q } from '#tests/physics/observables/bodies.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let pool: ComputePool;
let agent: Agent;
beforeAll(async () => {
  pool = createCompute({ threads: 2 });
  app = await createTestApp({ compute: pool.compute });
  agent = await app.signedIn('theorist');
  // The parser is loaded with the first formula of each thread.
  await Promise.all([1, 2].map((V0) => send(expression('V0*exp(-r/a)', { V0: Q(V0, 'eV') }))));
});
afterAll(async () => {
  await app.close();
  await pool.close();
});

const expression = (formula: unknown, more: object = {}) => ({
  form: 'expression',
  formula,
  parameters: { V0: Q(-10, 'eV'), a: Q(1, 'angstrom'), R: Q(3, 'angstrom'), ...more },
});
const rows = (count: number, step = 0.01) =>
  Array.from({ length: count }, (_, i) => [i * step, -10 * Math.exp(-i * step)]);
const table = (points: unknown, more: object = {}) => ({
  form: 'tabulated',
  lengthUnit: 'angstrom',
  energyUnit: 'eV',
  points,
  tail: 'zero',
  ...more,
});
const send = (term: object) =>
  agent.post('/api/estimates').send({ ...CONTRACT_BODY, interaction: { terms: [term] } });

interface Refused {
  status: number;
  problem: Problem;
  /** Requests of others that were answered meanwhile. */
  others: number;
}

/** Sends a term while someone else asks for something small again and again. */
async function refusedAmongOthers(request: () => PromiseLike<{ status: number; body: unknown }>) {
  let others = 0;
  let over = false;
  const bystander = (async () => {
    while (!over) {
      await agent.get('/api/health').expect(200);
      others += 1;
    }
  })();
  const { status, body } = await request();
  over = true;
  await bystander;
  return { status, problem: body as Problem, others } satisfies Refused;
}

/** The bystander was served all along; how fast is measured by `npm run drill`, for no test asserts a time. */
function expectOthersServed({ others }: Refused): void {
  expect(others).toBeGreaterThan(0);
}

describe('formulas that reach, loop, nest or allocate', () => {
  test.each([
    ['globals', 'constructor', /neither r nor a parameter/],
    ['import', 'import("fs")', /no texts/],
    ['a definition', 'f(x) = x', /nothing is assigned/],
    ['an allocation', '[1:1e9]', /makes lists/],
    ['a tower of powers', Array(900).fill('2').join('^'), /nested more than 50 deep/],
    ['2,000 parentheses', `${'('.repeat(999)}r${')'.repeat(999)}`, /at most 50 deep/],
    ['a loop', 'while(1)', /while is no function/],
    ['wild oscillation', 'V0*sin(exp(exp(r/a)))*exp(-r/a)', /cannot be followed|no finite/],
    ['a number that is none', 'V0*log(-r/a)', /no finite value/],
    ['wrong units', 'V0*exp(-r)', /Divide by a length/],
    ['no text', 12, /formula is a text/],
  ])('%s', async (_, formula, words) => {
    const refused = await refusedAmongOthers(() => send(expression(formula)));
    expect(refused.status).toBe(422);
    expect(refused.problem.errors?.[0]?.path).toBe('/interaction/terms/0/formula');
    expect(refused.problem.errors?.[0]?.message).toMatch(words);
    expectOthersServed(refused);
  });

  test('a parameter without a value and one of another kind', async () => {
    const missing = await send({ form: 'expression', formula: 'V0*exp(-r/a)', parameters: {} });
    expect((missing.body as Problem).detail).toMatch(/V0 is neither r nor a parameter/);
    const strange = await send(expression('V0*exp(-r/a)', { V0: Q(1, 's') }));
    expect((strange.body as Problem).errors?.[0]).toMatchObject({
      path: '/interaction/terms/0/parameters/V0',
      message: expect.stringMatching(/energies and lengths/) as unknown,
    });
    const none = await send({ form: 'expression', formula: 'V0' });
    expect((none.body as Problem).errors?.[0]?.path).toBe('/interaction/terms/0/parameters');
  });

  test('a formula that runs out of time ends with its thread and others go on', async () => {
    const heavy = expression('V0*cos(r/R*997)*exp(-r/a)');
    const body = { ...CONTRACT_BODY, interaction: { terms: [heavy] } };
    const late = pool.compute('estimate', body as never, { deadline: 1 });
    await expect(late).rejects.toMatchObject({ code: 'tooMuchWork' });
    await send(expression('V0*exp(-r/a)')).expect(200);
  });
});

describe('tables that are none', () => {
  const swapped = rows(50).map((row, i, all) => (i === 20 ? all[21] : i === 21 ? all[20] : row));
  test.each([
    ['out of order', table(swapped), '/points/21', /r must rise from row to row/],
    [
      'with a gap',
      table([...rows(20), ...rows(20).map(([r = 0, v]) => [r + 50, v])]),
      '/points/20',
      /a gap/,
    ],
    ['with a row twice', table([...rows(20), rows(20)[19]]), '/points/20', /must rise/],
    ['with a text', table([...rows(20), [1, 'x']]), '/points/20/1', /V must be a number/],
    ['with three columns', table([[0, 1, 2]]), '/points/0', /two numbers|at most|pair/i],
    ['that is too short', table(rows(2)), '/points', /too short/],
    ['of 2,001 rows', table(rows(2001)), '/points', /at most 2000 rows/],
    ['of 50,000 rows', table(rows(50_000).map(([r]) => [r, 1])), '/points', /at most 2000 rows/],
    ['without its unit', table(rows(20), { lengthUnit: undefined }), '/lengthUnit', /Give a unit/],
    ['in inches', table(rows(20), { lengthUnit: 'inch' }), '/lengthUnit', /not a length unit/],
    ['with a strange tail', table(rows(20), { tail: 'coulumb' }), '/tail', /Did you mean coulomb/],
    ['that is a text', table('0 1'), '/points', /list of pairs/],
  ])('%s', async (_, term, path, words) => {
    const refused = await refusedAmongOthers(() => send(term));
    expect(refused.status).toBe(422);
    const fault = refused.problem.errors?.find((one) => one.path === `/interaction/terms/0${path}`);
    expect(fault?.message, JSON.stringify(refused.problem.errors)).toMatch(words);
    expectOthersServed(refused);
  });

  test('a million rows are refused in words before they are read', async () => {
    const term = table(rows(1_000_000, 1e-6));
    const body = JSON.stringify({ ...CONTRACT_BODY, interaction: { terms: [term] } });
    const refused = await refusedAmongOthers(() =>
      agent.post('/api/estimates').set('Content-Type', 'application/json').send(body),
    );
    expect(refused.status).toBe(413);
    expect(refused.problem).toMatchObject({
      code: 'payloadTooLarge',
      detail: expect.stringMatching(/larger than 1 MB.*2000 rows/) as unknown,
    });
    expectOthersServed(refused);
  });
});

describe('what is taken', () => {
  test('a table with the text it came from, a table in other units', async () => {
    const text = rows(40)
      .map((row) => row.join('\t'))
      .join('\n');
    await send(table(rows(40), { original: { name: 'v.tsv', text } })).expect(200);
    const other = table(
      rows(40).map(([r = 0, v = 0]) => [r * 100, v / 1000]),
      { lengthUnit: 'pm', energyUnit: 'keV' },
    );
    const [one, two] = await Promise.all([send(table(rows(40))), send(other)]);
    type Body = { methods: { born1: { elastic: { value: number } } } };
    const value = (answer: { body: unknown }) => (answer.body as Body).methods.born1.elastic.value;
    expect(Math.abs(value(one) / value(two) - 1)).toBeLessThan(1e-12);
  });

  test('misspelt names are told what was probably meant', async () => {
    const fault = async (term: object) =>
      ((await send(term)).body as Problem).errors?.map(({ message }) => message).join(' ');
    expect(await fault({ form: 'yukwa' })).toMatch(/Did you mean yukawa\?/);
    expect(await fault(table(rows(20), { tial: 'zero' }))).toMatch(/Did you mean tail\?/);
    expect(await fault({ form: 'extendedCharge', kind: 'fermy' })).toMatch(/Did you mean fermi\?/);
    expect(await fault({ form: 'atomicElectron', element: 'Xx' })).toMatch(/Xx/);
    expect(await fault({ form: 'contact' })).toMatch(/Give exactly one of b, nuclide, element/);
    const radius = { form: 'extendedCharge', radius: Q(2, 'fm') };
    expect(await fault({ ...radius, kind: 'fermi' })).toMatch(/missing.*"diffuseness"/);
    expect(await fault({ ...radius, kind: 'gaussian', diffuseness: Q(1, 'fm') })).toMatch(
      /goes with kind fermi or helm only/,
    );
  });
});
