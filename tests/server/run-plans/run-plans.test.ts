import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let agent: Agent;
beforeAll(async () => {
  app = await createTestApp();
  ({ agent } = await app.person('experimentalist'));
});
afterAll(() => app.close());

interface Problem {
  code: string;
  errors: { path: string; message: string }[];
}
const Q = (value: number, unit: string) => ({ value, unit });

/** The body of the contract. */
const body = {
  estimate: {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: Q(100, 'eV'),
    kinematics: 'nonrelativistic',
    interaction: { terms: [{ form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') }] },
    methods: ['born1'],
  },
  method: 'born1',
  beam: { current: Q(10, 'nA'), chargeState: 1, dutyFactor: 1, energySpread: Q(0.5, 'eV') },
  foil: { formula: 'C', density: Q(2, 'g/cm3'), thickness: Q(2, 'nm'), tilt: 0, scatterer: 'C' },
  detectors: [
    {
      name: 'D1',
      angle: 30,
      distance: Q(100, 'mm'),
      apertureRadius: Q(2, 'mm'),
      efficiency: 0.9,
      deadTime: Q(1, 'us'),
      deadTimeModel: 'nonParalysable',
      backgroundRate: Q(0.2, '1/s'),
    },
  ],
  aim: { relativePrecision: 0.02 },
  uncertainties: { current: 0.02, thickness: 0.05, efficiency: 0.03 },
};
const [detector] = body.detectors;
const withDetector = (change: object) => ({ ...body, detectors: [{ ...detector, ...change }] });

describe('POST /api/run-plans', () => {
  test('answers the body of the contract with every key it names', async () => {
    const answer = (await agent.post('/api/run-plans').send(body).expect(200)).body as RunPlan;
    expect(answer).toMatchObject({
      arealDensity: { unit: '1/cm2' },
      beamRate: { unit: '1/s' },
      totalTime: { unit: 's' },
      verdict: 'singleScatteringNotValid',
    });
    const [one] = answer.detectors;
    expect(one).toMatchObject({
      name: 'D1',
      averagedDcs: { unit: 'angstrom2/sr' },
      pointDcs: { unit: 'angstrom2/sr' },
      trueRate: { unit: '1/s' },
      observedRate: { unit: '1/s' },
      backgroundRate: { value: 0.2, unit: '1/s' },
      decisionThreshold: { unit: '1/s' },
      detectionLimit: { unit: '1/s' },
      timeForPrecision: { signal: { unit: 's' }, blank: { unit: 's' }, total: { unit: 's' } },
    });
    expect(one?.uncertaintyBudget.map(({ input }) => input)).toEqual([
      'current',
      'thickness',
      'efficiency',
    ]);
    expectRelative(one?.solidAngle ?? NaN, 2 * Math.PI * (1 - 100 / Math.hypot(100, 2)), 1e-10);
    expectRelative(answer.beamRate.value, 6.241509074460763e10, 1e-14);
    expectRelative(answer.arealDensity.value, 2.0055e16, 1e-4);
    expect(answer.warnings.map(({ code }) => code)).toContain('singleScatteringNotValid');
  });

  test('says what it assumes', async () => {
    const bare = { ...body, detectors: [{ name: 'D', angle: 30, solidAngle: 0.001 }] };
    const beam = { current: Q(10, 'pA'), chargeState: 1 };
    const answer = await agent
      .post('/api/run-plans')
      .send({ ...bare, beam, aim: undefined })
      .expect(200);
    const codes = (answer.body as RunPlan).warnings.map(({ code }) => code);
    for (const code of ['efficiency', 'deadTime', 'background', 'dutyFactor', 'aim']) {
      expect(codes).toContain(`${code}Assumed`);
    }
  });

  test('takes a saved document as its estimate', async () => {
    const estimate = { ...body.estimate, format: 1, runPlan: { anything: true } };
    await agent
      .post('/api/run-plans')
      .send({ ...body, estimate })
      .expect(200);
  });

  const uncharged = { current: body.beam.current };
  test.each([
    [{ ...body, beam: uncharged }, '/beam/chargeState', /charge state/],
    [{ ...body, beam: {} }, '/beam', /current|particlesPerSecond/],
    [
      { ...body, beam: { ...body.beam, particlesPerSecond: 5 } },
      '/beam/particlesPerSecond',
      /both/,
    ],
    [{ ...body, beam: { ...body.beam, chargeState: 2 } }, '/beam/chargeState', /at most 1/],
    [{ ...body, beam: { ...body.beam, dutyFactor: 1.5 } }, '/beam/dutyFactor', /at most 1/],
    [{ ...body, beam: { ...body.beam, energySpread: Q(50, 'eV') } }, '/beam/energySpread', /20 %/],
    [withDetector({ efficiency: 1.2 }), '/detectors/0/efficiency', /at most 1/],
    [withDetector({ solidAngle: 13 }), '/detectors/0/solidAngle', /4π/],
    [withDetector({ solidAngle: 0.1 }), '/detectors/0/solidAngle', /not both/],
    [withDetector({ distance: undefined }), '/detectors/0/distance', /solidAngle/],
    [withDetector({ angle: 200 }), '/detectors/0/angle', /180/],
    [withDetector({ colour: 'red' }), '/detectors/0/colour', /not known/],
    [{ ...body, foil: { ...body.foil, thickness: Q(-2, 'nm') } }, '/foil/thickness', /above zero/],
    [{ ...body, foil: { ...body.foil, density: undefined } }, '/foil/density', /density/],
    [{ ...body, foil: { ...body.foil, tilt: 90 } }, '/foil/tilt', /90 degrees/],
    [{ ...body, foil: { ...body.foil, scatterer: 'Au' } }, '/foil/scatterer', /contains no Au/],
    [{ ...body, foil: { ...body.foil, formula: 'Xx' } }, '/foil/formula', /not an element/],
    [{ ...body, foil: { arealDensity: Q(1, 'mg/cm2') } }, '/foil/formula', /formula/],
    [{ ...body, foil: undefined }, '/foil', /target/],
    [
      { ...body, foil: { ...body.foil, isotopes: { 'C-12': 0.5 } } },
      '/foil/isotopes',
      /add up to 0.5/,
    ],
    [{ ...body, detectors: [] }, '/detectors', /at least one/],
    [{ ...body, detectors: [detector, detector] }, '/detectors/1/name', /two detectors/],
    [{ ...body, aim: { relativePrecision: 0 } }, '/aim/relativePrecision', /above zero/],
    [{ ...body, uncertainties: { luck: 0.1 } }, '/uncertainties/luck', /not known/],
    [
      { ...body, estimate: { ...body.estimate, energy: Q(0, 'eV') } },
      '/estimate/energy',
      /above zero/,
    ],
    [
      { ...body, contributions: [{ scatterer: 'H', estimate: body.estimate }] },
      '/contributions/0/scatterer',
      /no H/,
    ],
  ])('refuses %# at %s', async (sent, path, words) => {
    const answer = await agent.post('/api/run-plans').send(sent).expect(422);
    const { code, errors } = answer.body as Problem;
    expect(code).toBe('invalidInput');
    const found = errors.find((error) => error.path === path);
    expect(found, JSON.stringify(errors)).toBeDefined();
    expect(found?.message).toMatch(words);
  });
});
