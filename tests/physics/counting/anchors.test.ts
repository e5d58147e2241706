import { describe, expect, test } from 'vitest';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { ALPHA_ON_GOLD, ONE_BARN, Q, only, plan, valueOf } from './plans.ts';

const gold = { formula: 'Au', scatterer: 'Au' };

describe('rates that can be checked by hand', () => {
  test('1 nA of protons on 1 mg/cm2 of gold, 1 b/sr and 1 msr: 19.0830587 a second (e, N_A exact, Au 196.96657)', () => {
    const answer = plan({
      estimate: ONE_BARN,
      beam: { current: Q(1, 'nA'), chargeState: 1 },
      foil: { ...gold, arealDensity: Q(1, 'mg/cm2') },
      detectors: [{ name: 'D', angle: 30, solidAngle: 1e-3 }],
    });
    const one = only(answer);
    expectRelative(valueOf(one.product), 19.0830587, 1e-8);
    const product = one.factors.reduce((sum, { value }) => sum * value, 1e-24);
    expectRelative(valueOf(one.product), product, 1e-14);
    expectRelative(answer.beamRate.value, 6.241509074e9, 1e-9);
    expectRelative(answer.arealDensity.value, 3.057443e18, 1e-6);
  });

  test('twice the charge of each particle is half as many of them', () => {
    const rate = (chargeState: number) =>
      plan({
        estimate: { ...ONE_BARN, projectile: { species: 'alpha' } },
        beam: { current: Q(1, 'nA'), chargeState },
        foil: { ...gold, arealDensity: Q(1, 'mg/cm2') },
        detectors: [{ name: 'D', angle: 30, solidAngle: 1e-3 }],
      }).beamRate.value;
    expectRelative(rate(2), 3.120754537e9, 1e-9);
    expectRelative(rate(1) / rate(2), 2, 1e-15);
  });

  const student = plan({
    estimate: ALPHA_ON_GOLD,
    beam: { particlesPerSecond: 1000 },
    foil: { ...gold, density: Q(19.3, 'g/cm3'), thickness: Q(1, 'um') },
    detectors: [20, 60, 150].map((angle) => ({ name: `${angle}°`, angle, solidAngle: 0.01 })),
  });

  test.each([
    [0, 0.0698, 3],
    [1, 1.015e-3, 4],
    [2, 7.29e-5, 3],
  ])(
    'a thousand alpha particles a second on 1 um of gold, detector %i: %d a second, to %i digits',
    (i, printed, digits) => {
      const product = valueOf(student.detectors[i]?.product ?? null);
      expect(Number(product.toPrecision(digits))).toBe(printed);
    },
  );

  test('10^4 counts without averaging take 1.66, 114 and 1588 days, and the page says so', () => {
    const days = student.detectors.map(({ product }) => 1e4 / valueOf(product) / 86_400);
    expect(days.map((one) => Number(one.toPrecision(one < 10 ? 3 : one < 1000 ? 3 : 4)))).toEqual([
      1.66, 114, 1588,
    ]);
    expect(student.verdict).toBe('notFeasible');
    expect(student.decidedBy).toMatchObject({ factor: 'time', detector: '150°' });
    expect(student.warnings.map(({ code }) => code)).toContain('hopeless');
  });

  test('the averaged rate is the product times what its averages say', () => {
    for (const one of student.detectors) {
      const { acceptance, energies, attenuation } = one.averaging;
      const rate = valueOf(one.product) * acceptance * energies * attenuation;
      expectRelative(one.trueRate.value, rate, 1e-12);
      expect(acceptance).toBeGreaterThan(1);
      expect(energies).toBeGreaterThan(1.08);
      expect(attenuation).toBeLessThan(1);
    }
  });
});
