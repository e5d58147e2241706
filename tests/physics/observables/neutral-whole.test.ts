import { describe, expect, test } from 'vitest';
import {
  BOHR,
  COULOMB_EV_ANGSTROM,
  ELECTRON_MASS,
  HARTREE,
  HBAR_C_EV_ANGSTROM,
} from '#server/physics/constants/codata2022.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { Q, answer, born1, errorOf, integral, pointAt } from './bodies.ts';

/* A nucleus and its electrons as two terms: their 1/r tails cancel, and what is left has a forward value. */

/** The 1s density of hydrogen is the exponential one of rms radius √3 a0. */
const CLOUD = Q(Math.sqrt(3), 'bohr');
/** e² m/ħ² in units of 1/a0: 1 but for the digits in which the printed constants differ. */
const ATOMIC = (COULOMB_EV_ANGSTROM * ELECTRON_MASS * BOHR) / HBAR_C_EV_ANGSTROM ** 2;
/** (k a0)² at half a hartree, likewise. */
const K2 = (ELECTRON_MASS * HARTREE * BOHR ** 2) / HBAR_C_EV_ANGSTROM ** 2;
const ANGLES = [0, 1e-6, 1e-3, 0.03, 1, 30, 90, 180];

const electrons = (terms: object[], more: object = {}) => ({
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 1 },
  energy: Q(0.5, 'hartree'),
  interaction: { terms },
  methods: ['born1'],
  angles: { values: ANGLES },
  units: { length: 'bohr', area: 'bohr2', energy: 'hartree' },
  ...more,
});
const HYDROGEN = [
  { form: 'coulomb', chargeProduct: -1 },
  { form: 'extendedCharge', kind: 'dipole', radius: CLOUD, chargeProduct: 1 },
];

/** Static field of hydrogen at k a0 = 1, in a0: N. F. Mott and H. S. W. Massey, The Theory of Atomic Collisions. */
function amplitudeOfHydrogen(theta: number): number {
  const square = K2 * (2 * Math.sin((theta * Math.PI) / 360)) ** 2;
  return (ATOMIC * 2 * (8 + square)) / (4 + square) ** 2;
}

describe('the field of a hydrogen atom as two charges', () => {
  const estimate = answer(electrons(HYDROGEN));

  test.each(ANGLES)('amplitude at %d degrees, forward included', (theta) => {
    const { dcs, amplitude, ...rest } = pointAt(estimate, theta);
    if (typeof dcs !== 'number' || !amplitude) throw new Error(`nothing at ${theta}`);
    const exact = amplitudeOfHydrogen(theta);
    expectRelative(amplitude.re, exact, 1e-11);
    expect(Math.abs(dcs - exact ** 2)).toBeLessThanOrEqual(errorOf(dcs, rest));
    expect(errorOf(dcs, rest)).toBeLessThan(1e-10 * dcs);
  });

  test('the whole is finite: π (7k⁴ + 18k² + 12)/(3 (1 + k²)³), 4.8432887 from the textbook', () => {
    const { value } = integral(born1(estimate).elastic);
    const exact = (Math.PI * (7 * K2 ** 2 + 18 * K2 + 12)) / (3 * (1 + K2) ** 3);
    expectRelative(value, ATOMIC ** 2 * exact, 1e-12);
    expectRelative(value, 4.8432887, 1e-8);
  });

  test('forward the golden rule has its matrix element too', () => {
    const sheet = answer(electrons(HYDROGEN, { goldenRule: { theta: 0 } })).goldenRule;
    if ('unavailable' in sheet) throw new Error(sheet.reason);
    expectRelative(sheet.matrixElementTimesVolume.re, -2 * Math.PI, 1e-11);
    expectRelative(sheet.dcs.value, ATOMIC ** 2, 1e-11);
  });

  test('the forward value is the limit of the amplitude in the criterion of the second order', () => {
    const found = estimate.validity.criteria.find(({ name }) => name === 'secondOrder');
    const elastic = integral(born1(estimate).elastic).value;
    expectRelative(found?.value ?? NaN, elastic / (4 * Math.PI), 1e-11);
  });
});

/** 1/r outside, levelled off inside within a length. */
const levelled = (c: number, length: number) => ({
  form: 'expression',
  formula: 'c/r*(1 - exp(-r/a))',
  parameters: { c: Q(c, 'hartree bohr'), a: Q(length, 'bohr') },
});
const table = (end: number, depth: number) => ({
  form: 'tabulated',
  lengthUnit: 'bohr',
  energyUnit: 'hartree',
  points: Array.from({ length: 21 }, (_, i) => [i / 10, end + depth * (1 - i / 20) ** 2]),
  tail: 'coulomb',
});

test('two formulas with opposite tails: the difference of two Yukawas, forwards too', () => {
  const { differential } = born1(answer(electrons([levelled(2, 1), levelled(-2, 3)])));
  for (const { theta, amplitude } of differential) {
    const square = (2 * Math.sin((theta * Math.PI) / 360)) ** 2;
    const rest = (a: number) => -(a * a) / (1 + square * a * a);
    expectRelative(amplitude?.re ?? NaN, -4 * (rest(1) - rest(3)), 1e-9);
  }
});

test('two tables with opposite tails: ∫ r² V dr forwards', () => {
  const { differential } = born1(answer(electrons([table(2, 5), table(-2, 3)])));
  // ∫_0^2 r² (1 - r/2)² dr = 4/15
  expectRelative(differential[0]?.amplitude?.re ?? NaN, (-2 * 8 * 4) / 15, 1e-9);
  expectRelative(
    differential[2]?.amplitude?.re ?? NaN,
    differential[0]?.amplitude?.re ?? NaN,
    1e-8,
  );
});

test('a sphere of charge in a cloud: <r²>/6 of the two forwards', () => {
  const charge = (kind: string, radius: number, chargeProduct: number) => ({
    form: 'extendedCharge',
    kind,
    radius: Q(radius, 'bohr'),
    chargeProduct,
  });
  const terms = [charge('uniformSphere', 0.01, -3), charge('gaussian', 1, 3)];
  const { differential } = born1(answer(electrons(terms)));
  const forward = (2 * ATOMIC * 3 * (1 - 0.6e-4)) / 6;
  for (const theta of [0, 1e-6, 1e-3]) {
    const found = differential.find((point) => point.theta === theta);
    expectRelative(found?.amplitude?.re ?? NaN, forward, 1e-8);
  }
});
