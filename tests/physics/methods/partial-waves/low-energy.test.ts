import { describe, expect, test } from 'vitest';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { TWO_MU, wavesOf } from './waves-of.ts';

const well = (x: number, R = 1) => build('squareWell', { V0: (-x * x) / (TWO_MU * R * R), R });
const lowEnergyOf = (x: number, R = 1) => wavesOf([well(x, R)], 0.1 / R).lowEnergy;

describe('scattering length and effective range', () => {
  // needs of the trade: a/R = 1 - tan x/x
  test.each([
    [0.5, -0.09260498],
    [1, -0.55740772],
    [1.5, -8.40094665],
  ])('square well with x = %s: a = %s R', (x, expected) => {
    const { scatteringLength: a } = lowEnergyOf(x);
    expectRelative(a?.value ?? NaN, expected, 3e-8);
    const exact = 1 - Math.tan(x) / x;
    expect(Math.abs((a?.value ?? NaN) - exact)).toBeLessThanOrEqual(a?.error ?? 0);
    expectRelative(a?.value ?? NaN, exact, 1e-12);
  });

  test.each([0.5, 1.2, 2, 4, 5.5])(
    'square well with x = %s: r = R(1 - R/(x² a) - R²/(3 a²))',
    (x) => {
      const R = 2.7;
      const { scatteringLength, effectiveRange } = lowEnergyOf(x, R);
      const a = R * (1 - Math.tan(x) / x);
      expectRelative(scatteringLength?.value ?? NaN, a, 1e-11);
      const exact = R * (1 - R / (x * x * a) - R ** 2 / (3 * a * a));
      expect(Math.abs((effectiveRange?.value ?? NaN) - exact)).toBeLessThanOrEqual(
        effectiveRange?.error ?? 0,
      );
      expectRelative(effectiveRange?.value ?? NaN, exact, 1e-9);
    },
  );

  test('hard sphere: R and 2R/3', () => {
    const { lowEnergy } = wavesOf([build('hardSphere', { R: 1.5 })], 0.2);
    expectRelative(lowEnergy.scatteringLength?.value ?? NaN, 1.5, 1e-13);
    expectRelative(lowEnergy.effectiveRange?.value ?? NaN, 1, 1e-12);
  });

  test('they give the phase at low energy: k cot δ = -1/a + r k²/2', () => {
    const term = build('gaussian', { V0: -14, a: 1.1 });
    const k = 0.02;
    const { waves, lowEnergy } = wavesOf([term], k);
    const [a, r] = [lowEnergy.scatteringLength?.value, lowEnergy.effectiveRange?.value];
    const expansion = -1 / (a ?? NaN) + ((r ?? NaN) * k * k) / 2;
    expectRelative(k / Math.tan(waves[0]?.delta ?? NaN), expansion, 1e-6);
  });

  test('of the weakest wells it keeps its digits: -x²/3 - 2x⁴/15 - 17x⁶/315 - …', () => {
    for (const x of [1e-6, 1e-3, 0.02]) {
      const { scatteringLength: a } = lowEnergyOf(x);
      const exact = -(x ** 2) / 3 - (2 * x ** 4) / 15 - (17 * x ** 6) / 315 - (62 * x ** 8) / 2835;
      expectRelative(a?.value ?? NaN, exact, 1e-12);
    }
  });

  test('an effective range that rounding has eaten is said to be', () => {
    const { effectiveRange, remark } = lowEnergyOf(1e-4);
    expect(effectiveRange).toBeNull();
    expect(remark).toMatch(/effective range is lost in rounding/);
  });
});

describe('bound states of l = 0', () => {
  test.each([
    [1.5, 0],
    [1.6, 1],
    [4.7, 1],
    [4.8, 2],
    [20, 6],
  ])('square well with x = %s holds %s', (x, count) => {
    expect(lowEnergyOf(x).boundStates).toBe(count);
  });

  test('a resonance at zero energy is said', () => {
    const { remark, scatteringLength } = lowEnergyOf(Math.PI / 2 - 1e-4);
    expect(scatteringLength?.value).toBeLessThan(-1000);
    expect(remark).toMatch(/resonance at zero energy.*barely missed/i);
    expect(lowEnergyOf(Math.PI / 2 + 1e-4).remark).toMatch(/barely bound/);
    expect(lowEnergyOf(1).remark).toBeNull();
  });
});

describe('where they have no meaning', () => {
  test('a Coulomb tail', () => {
    const charge = build('coulomb', { chargeProduct: 1 });
    const { lowEnergy } = wavesOf([charge, well(1)], 1);
    expect(lowEnergy.scatteringLength).toBeNull();
    expect(lowEnergy.remark).toMatch(/1\/r/);
  });

  test('complex depths: the complex length is in the words', () => {
    const { lowEnergy } = wavesOf([build('squareWell', { V0: -4, W0: -4, R: 1 })], 0.3);
    expect(lowEnergy.scatteringLength).toBeNull();
    // 1 - tan(x)/x with x² = 1 + i, by hand: tan(x) = -i tanh(ix).
    expect(lowEnergy.remark).toMatch(/complex depths.*-0\.\d+ - 0\.\d+i/i);
  });

  test('a polarization tail has a length, but no effective range', () => {
    const d = 0.8;
    const term = build('polarization', { alpha: 2, d });
    const { lowEnergy } = wavesOf([term], 0.5);
    // u = sqrt(r² + d²) sin(n atan(r/d)), n² = 1 + B/d², solves u'' = -B u/(r² + d²)²
    const B = -TWO_MU * term.strength.re;
    const n = Math.sqrt(1 + B / (d * d));
    const exact = (d * n) / Math.tan((n * Math.PI) / 2);
    expectRelative(lowEnergy.scatteringLength?.value ?? NaN, exact, 1e-9);
    expect(lowEnergy.effectiveRange).toBeNull();
    expect(lowEnergy.remark).toMatch(/r\^-4.*does not exist/);
  });
});
