import { describe, expect, test } from 'vitest';
import { ELECTRON_MASS, PROTON_MASS } from '#server/physics/constants/codata2022.ts';
import { mckinleyFeshbachFactor, mottCrossSection } from '#server/physics/methods/spin-factor.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { DomainError } from '#shared/errors.ts';
import type { FieldError } from '#shared/errors.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTRACT_BODY, Q, answer, born1, dcsAt, errorOf, integral, pointAt } from './bodies.ts';

const COULOMB = { terms: [{ form: 'coulomb' }] };
const fast = (energy: number, changes: object = {}) => ({
  ...CONTRACT_BODY,
  energy: Q(energy, 'MeV'),
  kinematics: 'relativistic',
  target: { kind: 'fixed', charge: 13 },
  interaction: COULOMB,
  angles: { values: [10, 30, 90, 150, 180] },
  goldenRule: { theta: 90 },
  units: { length: 'fm', area: 'barn', energy: 'MeV' },
  ...changes,
});
const PROTON = { target: { kind: 'species', species: 'proton' }, frame: 'lab' };
const faults = (body: object): readonly FieldError[] => {
  try {
    answer(body);
  } catch (error) {
    if (error instanceof DomainError) return error.details.errors ?? [];
    throw error;
  }
  return [];
};

describe('Mott factor', () => {
  test('1 MeV electrons on aluminium at 90 degrees: 1.0903266 b/sr, recomputed outside this project', () => {
    expectRelative(dcsAt(answer(fast(1)), 90), 1.0903266, 1e-7);
  });

  test('with the recoil of a point proton the lab curve is the formula of Mott, to its bounds', () => {
    const energy = 1e9 - ELECTRON_MASS;
    const estimate = answer(fast(energy / 1e6, PROTON));
    for (const theta of [10, 30, 90, 150, 180]) {
      const point = pointAt(estimate, theta);
      const mott = mottCrossSection({
        chargeProduct: -1,
        mass: ELECTRON_MASS,
        targetMass: PROTON_MASS,
        energy,
        theta: (theta * Math.PI) / 180,
      });
      const expected = mott.value * 1e8;
      expectRelative(point.dcs ?? NaN, expected, 1e-11);
      const bound = errorOf(point.dcs ?? NaN, point) + mott.error * 1e8;
      expect(Math.abs((point.dcs ?? NaN) - expected)).toBeLessThanOrEqual(bound);
    }
  });

  test('an extended charge multiplies it by the square of its form factor', () => {
    const radius = 0.8;
    const term = { form: 'extendedCharge', kind: 'gaussian', radius: Q(radius, 'fm') };
    const energy = 400;
    const point = answer(fast(energy, PROTON));
    const spread = answer(fast(energy, { ...PROTON, interaction: { terms: [term] } }));
    for (const theta of [10, 90, 180]) {
      const q = pointAt(spread, theta).q ?? NaN;
      const squared = Math.exp((-(q * q) * radius * radius) / 3);
      expectRelative(dcsAt(spread, theta), dcsAt(point, theta) * squared, 1e-9);
    }
  });

  test('slow leptons have no spin to show', () => {
    const slow = answer(fast(1e-9));
    const plain = answer(fast(1e-9, { kinematics: 'nonrelativistic' }));
    for (const theta of [10, 90, 180]) {
      expectRelative(dcsAt(slow, theta), dcsAt(plain, theta), 1e-8);
    }
  });

  test('the integrals hold it: against quadrature of the formula for a screened charge', () => {
    const a = 0.3;
    const screened = { terms: [{ form: 'screenedCoulomb', a: Q(a, 'angstrom') }] };
    const estimate = answer(
      fast(0.5, { interaction: screened, units: { length: 'angstrom', area: 'angstrom2' } }),
    );
    const { elastic, viscosity } = born1(estimate);
    const forward = pointAt(estimate, 180);
    const k = estimate.kinematics.k.value;
    const square = estimate.kinematics.beta ** 2;
    const strength = (forward.amplitude?.re ?? NaN) * (1 / a ** 2 + 4 * k * k);
    const moment = (weight: (t: number) => number) =>
      integrate(
        (t) =>
          (8 * Math.PI * t * weight(t) * (1 - square * t * t) * strength ** 2) /
          (1 / a ** 2 + (2 * k * t) ** 2) ** 2,
        0,
        1,
        { breakpoints: [1e-3, 1e-2, 0.1] },
      ).value;
    expectRelative(
      integral(elastic).value,
      moment(() => 1),
      1e-10,
    );
    expectRelative(
      integral(viscosity).value,
      moment((t) => 4 * t * t * (1 - t * t)),
      1e-10,
    );
  });

  test('it stands after the golden rule, which is without it', () => {
    const estimate = answer(fast(1));
    const { goldenRule } = estimate;
    if ('unavailable' in goldenRule) throw new Error('unavailable');
    const plain = answer(
      fast(1, {
        projectile: { species: 'custom', mass: Q(510998.95069, 'eV'), charge: -1, spin: 0 },
      }),
    );
    expectRelative(goldenRule.dcs.value, dcsAt(plain, 90), 1e-13);
    expect(goldenRule.factorsAfter.map(({ name }) => name)).toEqual(['spin']);
    expectRelative(goldenRule.factorsAfter[0]?.dcs.value ?? NaN, dcsAt(estimate, 90), 1e-13);
  });

  test('a muon on an electron and two electrons are told why they have none', () => {
    const code = (changes: object) =>
      answer(fast(1, changes)).warnings.find((one) => one.code === 'spinFactorMissing')?.message;
    const electron = { kind: 'species', species: 'electron' };
    expect(code({ target: electron })).toMatch(/Møller and Bhabha/);
    const light = { kind: 'custom', mass: Q(1, 'MeV'), charge: 1, spin: 0 };
    const muon = { projectile: { species: 'muon-' }, target: light };
    expect(code(muon)).toMatch(/heavier than its target/);
  });
});

describe('McKinley and Feshbach on request', () => {
  const asked = { corrections: ['mckinleyFeshbach'] };

  test('electrons scatter more, positrons less, by the published factor', () => {
    for (const [species, product] of [
      ['electron', -13],
      ['positron', 13],
    ] as const) {
      const projectile = { species };
      const plain = answer(fast(1, { projectile }));
      const corrected = answer(fast(1, { projectile, ...asked }));
      const gamma = 1 + 1e6 / ELECTRON_MASS;
      for (const theta of [30, 90, 150]) {
        const angle = (theta * Math.PI) / 180;
        const ratio =
          mckinleyFeshbachFactor(gamma, angle, product).value /
          (1 - (1 - gamma ** -2) * Math.sin(angle / 2) ** 2);
        expectRelative(dcsAt(corrected, theta) / dcsAt(plain, theta), ratio, 1e-12);
      }
    }
    const { goldenRule, warnings } = answer(fast(1, asked));
    if ('unavailable' in goldenRule) throw new Error('unavailable');
    expect(goldenRule.factorsAfter.map(({ name }) => name)).toEqual(['spin', 'mckinleyFeshbach']);
    expect(warnings.some(({ code }) => code === 'correctionOutOfRange')).toBe(false);
    const gold = answer(fast(1, { ...asked, target: { kind: 'fixed', charge: 79 } }));
    expect(gold.warnings.some(({ code }) => code === 'correctionOutOfRange')).toBe(true);
  });

  test('refused where it has no meaning, in words', () => {
    const slow = { ...asked, kinematics: 'nonrelativistic' };
    expect(faults(fast(1, slow))).toMatchObject([
      { path: '/corrections/0', message: expect.stringMatching(/relativistic/) as unknown },
    ]);
    const [term] = CONTRACT_BODY.interaction.terms;
    expect(faults(fast(1, { ...asked, interaction: { terms: [term] } }))).toHaveLength(1);
    const dense = {
      ...asked,
      projectile: { species: 'positron' },
      target: { kind: 'fixed', charge: 118 },
    };
    expect(faults(fast(20, dense))[0]?.message).toMatch(/negative/);
  });

  test('at the wrong place it is told the right one', () => {
    const inTerm = { terms: [{ form: 'coulomb', corrections: 'mckinleyFeshbach' }] };
    expect(faults(fast(1, { interaction: inTerm }))[0]?.message).toMatch(/beside interaction/);
  });
});
