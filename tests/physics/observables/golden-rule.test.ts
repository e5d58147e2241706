import { describe, expect, test } from 'vitest';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTRACT_BODY, Q, answer, born1, dcsAt, integral } from './bodies.ts';

const HBAR = 6.582119569509066e-16;

function sheetOf(body: object) {
  const { goldenRule } = answer(body);
  if ('unavailable' in goldenRule) throw new Error(goldenRule.reason);
  return goldenRule;
}

function windowOf(body: object) {
  const { window } = sheetOf(body);
  if ('none' in window) throw new Error(window.none);
  return { t0Min: window.t0Min.value, t0Max: window.t0Max.value };
}

const inBox = (nm: number) => ({
  ...CONTRACT_BODY,
  goldenRule: { theta: 60, boxSide: Q(nm, 'nm') },
});

test('every step of the chain, by the formulas written out with the numbers of the answer', () => {
  const body = inBox(10);
  const sheet = sheetOf(body);
  const { k, speed, reducedMass } = answer(body).kinematics;
  const volume = 100 ** 3;
  const hbarC = 1973.2698045930247;
  const muOverHbar2 = reducedMass.value / hbarC ** 2;
  const q = 2 * k.value * Math.sin(Math.PI / 6);
  // 4π V0 a³/(1 + q²a²)
  const element = (-40 * Math.PI) / (1 + q * q);
  expectRelative(sheet.matrixElementTimesVolume.re, element, 1e-14);
  const density = (volume * muOverHbar2 * k.value) / (8 * Math.PI ** 3);
  expectRelative(sheet.densityOfStates.value, density, 1e-14);
  expect(sheet.densityOfStates.unit).toBe('1/(eV sr)');
  expectRelative(
    sheet.rate.value,
    ((2 * Math.PI) / HBAR) * (element / volume) ** 2 * density,
    1e-13,
  );
  expectRelative(sheet.flux.value, (speed.value * 1e10) / volume, 1e-14);
  expect(sheet.flux.unit).toBe('1/(angstrom2 s)');
  expectRelative(sheet.dcs.value, sheet.rate.value / sheet.flux.value, 1e-15);
  expectRelative(sheet.dcs.value, dcsAt(answer(body), 60), 1e-14);
});

test('a box ten times as wide changes every step but the first and the last', () => {
  const small = sheetOf(inBox(10));
  const large = sheetOf(inBox(100));
  expect(large.matrixElementTimesVolume).toEqual(small.matrixElementTimesVolume);
  expectRelative(large.densityOfStates.value, 1e3 * small.densityOfStates.value, 1e-14);
  expectRelative(large.rate.value, 1e-3 * small.rate.value, 1e-14);
  expectRelative(large.flux.value, 1e-3 * small.flux.value, 1e-14);
  expectRelative(large.dcs.value, small.dcs.value, 1e-14);
});

test('with relativity the reduced mass of the chain is the energy', () => {
  const sheet = sheetOf({ ...inBox(10), energy: Q(300, 'keV'), kinematics: 'relativistic' });
  const estimate = answer({ ...inBox(10), energy: Q(300, 'keV'), kinematics: 'relativistic' });
  expectRelative(estimate.kinematics.reducedMass.value, 510998.95069 + 300e3, 1e-15);
  expectRelative(sheet.dcs.value, dcsAt(estimate, 60), 1e-14);
});

/** Brute force: the first of many even widths at which |V|² k_f (mu constant) has varied by a tenth. */
function halfWidth(
  strength: (q: number) => number,
  k: number,
  energy: number,
  theta: number,
  most: number,
) {
  const g = (e: number) => {
    const kf = k * Math.sqrt(e / energy);
    const q = Math.sqrt(k * k + kf * kf - 2 * k * kf * Math.cos(theta));
    return strength(q) ** 2 * kf;
  };
  const shell = g(energy);
  const n = 400_000;
  for (let i = 1; i <= n; i++) {
    const w = (most * i) / n;
    if (Math.max(Math.abs(g(energy + w) / shell - 1), Math.abs(g(energy - w) / shell - 1)) > 0.1)
      return w;
  }
  throw new Error('no crossing');
}

describe('interaction times', () => {
  const k = 5.1231672231530565;

  test.each([5, 60, 90, 180])('Yukawa at %s degrees against a brute scan', (theta) => {
    const body = { ...CONTRACT_BODY, goldenRule: { theta, boxSide: Q(10, 'nm') } };
    const width = halfWidth((q) => 1 / (1 + q * q), k, 100, (theta * Math.PI) / 180, 60);
    const { t0Min, t0Max } = windowOf(body);
    expectRelative((2 * Math.PI * HBAR) / t0Min, width, 1e-4);
    const elastic = integral(born1(answer(body)).elastic).value;
    expectRelative(t0Max, 0.1 / (elastic * sheetOf(body).flux.value), 1e-13);
  });

  test.each([20, 61.3, 90, 140])(
    'a sharp sphere of kR = 102 at %s degrees, where the transform oscillates',
    (theta) => {
      const R = 20;
      const terms = [{ form: 'squareWell', V0: Q(-1e-3, 'eV'), R: Q(R, 'angstrom') }];
      const body = {
        ...CONTRACT_BODY,
        interaction: { terms },
        goldenRule: { theta, boxSide: Q(1, 'um') },
      };
      const sphere = (q: number) => (Math.sin(q * R) - q * R * Math.cos(q * R)) / q ** 3;
      const width = halfWidth(sphere, k, 100, (theta * Math.PI) / 180, 1);
      expectRelative((2 * Math.PI * HBAR) / windowOf(body).t0Min, width, 1e-3);
    },
  );

  test('the upper bound grows as the volume; a small box leaves no time', () => {
    expectRelative(windowOf(inBox(100)).t0Max, 1e3 * windowOf(inBox(10)).t0Max, 1e-13);
    expectRelative(windowOf(inBox(100)).t0Min, windowOf(inBox(10)).t0Min, 1e-13);
    const tight = sheetOf({ ...inBox(0.1) }).window;
    expect(tight).toHaveProperty('none', expect.stringMatching(/at least [\d.]+ times longer/));
  });

  test('none without strength, none with an infinite total cross section', () => {
    const off = { terms: [{ form: 'yukawa', V0: Q(0, 'eV'), a: Q(1, 'angstrom') }] };
    expect(sheetOf({ ...inBox(10), interaction: off }).window).toHaveProperty('none');
    const bare = { terms: [{ form: 'coulomb', chargeProduct: -6 }] };
    expect(sheetOf({ ...inBox(10), interaction: bare }).window).toHaveProperty('none');
    const { goldenRule } = answer({ ...inBox(10), interaction: bare, goldenRule: { theta: 0 } });
    expect(goldenRule).toMatchObject({ unavailable: true });
  });
});

test('a box of less than ten ranges is answered with a warning', () => {
  const codes = (nm: number) => answer(inBox(nm)).warnings.map(({ code }) => code);
  expect(codes(0.9)).toContain('boxTooSmall');
  expect(codes(1.1)).not.toContain('boxTooSmall');
});

test('without a range the box is a nanometre, or a picometre where lengths are in fm', () => {
  const body = {
    ...CONTRACT_BODY,
    interaction: { terms: [{ form: 'contact', b: Q(1, 'fm') }] },
    goldenRule: {},
  };
  expect(sheetOf({ ...body, units: {} }).boxSide).toEqual(Q(10, 'angstrom'));
  expectRelative(sheetOf({ ...body, units: { length: 'fm' } }).boxSide.value, 1000, 1e-15);
});
