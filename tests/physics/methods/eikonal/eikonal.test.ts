import { describe, expect, test } from 'vitest';
import { eikonal } from '#server/physics/methods/eikonal/eikonal.ts';
import type { Complex, Term } from '#server/physics/potentials/types.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { readReference, type Split } from '#tests/physics/numerics/reference-table.ts';
import { available, difference, FACTOR, form, inputOf, modulus, scaled } from '../born2/input.ts';

interface Value {
  k: number;
  q: number;
  re: Split;
  im: Split;
}
interface Row extends Value {
  form: string;
  lengths: number[];
  u: [number, number];
}
interface Table {
  shortRange: Row[];
  uniformCharge: (Value & { eta: number; R: number })[];
  deltaShell: (Value & { g: number; R: number })[];
}
const TABLE = readReference<Table>('methods/eikonal.json');

const at = (terms: readonly Term[], k: number) => available(eikonal(inputOf(terms, k)));

/** The form of a row with the strength that makes its U. */
function termOf({ form: name, lengths, u }: Row): Term {
  const [first = NaN, second = NaN] = lengths;
  const depth = { V0: 1, W0: 0 };
  const shapes: Record<string, () => Term> = {
    squareWell: () => form('squareWell', { ...depth, R: first }),
    exponential: () => form('exponential', { V0: 1, a: first }),
    yukawa: () => form('yukawa', { V0: 1, a: first }),
    woodsSaxon: () => form('woodsSaxon', { ...depth, R: first, a: second }),
  };
  const shape = shapes[name]?.();
  if (!shape) throw new Error(name);
  return { ...shape, strength: { re: (shape.strength.re * u[0]) / FACTOR, im: u[1] / FACTOR } };
}

describe('against the integral over impact parameters as it stands (mpmath)', () => {
  test.each(TABLE.shortRange)('$form, U = $u, k = $k, q = $q', (row) => {
    const found = at([termOf(row)], row.k);
    const f = found.amplitude(row.q);
    const forward = modulus(found.amplitude(0) ?? { re: NaN, im: NaN });
    expect(
      Math.hypot((f?.re ?? NaN) - row.re.high, (f?.im ?? NaN) - row.im.high),
    ).toBeLessThanOrEqual(f?.error ?? NaN);
    expect(f?.error).toBeLessThan(1e-11 * forward);
    expect(found.floor).toBeLessThan(1e-11 * forward);
  });

  test.each(TABLE.deltaShell)('delta shell, g = $g, k = $k, q = $q', (row) => {
    const found = at([form('deltaShell', { g: row.g / FACTOR, R: row.R })], row.k);
    const f = found.amplitude(row.q);
    const forward = modulus(found.shortRange(0));
    const deviation = Math.hypot((f?.re ?? NaN) - row.re.high, (f?.im ?? NaN) - row.im.high);
    expect(deviation).toBeLessThanOrEqual(f?.error ?? NaN);
    expect(f?.error).toBeLessThan(1e-11 * forward);
  });

  test.each(TABLE.uniformCharge)('uniform charge, eta = $eta, k = $k, q = $q', (row) => {
    const tail = 2 * row.eta * row.k;
    const chargeProduct = tail / FACTOR / 14.39964546860267;
    const term = form('extendedCharge', { chargeProduct, kind: 'uniformSphere', radius: row.R });
    const found = at([term], row.k);
    const f = found.shortRange(row.q);
    expectRelative(found.tail.re, tail, 1e-8);
    const forward = modulus(found.shortRange(0));
    // The constant in the charge product is good to nine digits here.
    const allowed = f.error + 1e-8 * forward;
    expect(Math.hypot(f.re - row.re.high, f.im - row.im.high)).toBeLessThan(allowed);
  });
});

/** Σ_{n>=1} (i chi0)^n/n! a²/(2n) exp(-q²a²/4n), times -ik. */
function gaussianSeries(chi0: Complex, a: number, k: number, q: number): Complex {
  const sum = { re: 0, im: 0 };
  let [re, im] = [1, 0];
  for (let n = 1; n < 120; n++) {
    [re, im] = [(-re * chi0.im - im * chi0.re) / n, (re * chi0.re - im * chi0.im) / n];
    const bell = ((a * a) / (2 * n)) * Math.exp((-q * q * a * a) / (4 * n));
    sum.re += re * bell;
    sum.im += im * bell;
  }
  return { re: k * sum.im, im: -k * sum.re };
}

describe('Gaussian: the series in the phase', () => {
  test.each([
    [3, -2, 0],
    [20, -2, -0.7],
    [20, 150, 0],
    [300, 40, -2000],
  ])('k = %f, depth %f + %f i', (k, V0, W0) => {
    const a = 0.8;
    const factor = (-FACTOR * Math.sqrt(Math.PI) * a) / (2 * k);
    const chi0 = { re: factor * V0, im: factor * W0 };
    const found = at([form('gaussian', { V0, W0, a })], k);
    for (const q of [0, 0.5, 2, 5, 12].filter((one) => one <= 2 * k)) {
      const [f, g] = [found.amplitude(q), gaussianSeries(chi0, a, k, q)];
      const deviation = Math.hypot((f?.re ?? NaN) - g.re, (f?.im ?? NaN) - g.im);
      // The alternating series loses what its largest term has too much.
      const lost = 1e-15 * Math.exp(2 * modulus(chi0)) * k * a * a;
      expect(deviation).toBeLessThanOrEqual((f?.error ?? NaN) + lost);
    }
  });
});

const WEAK: [string, Term][] = [
  ['yukawa', form('yukawa', { V0: 1, a: 1 })],
  ['screenedCoulomb', form('screenedCoulomb', { a: 0.4 })],
  ['moliere', form('moliere', { Z: 20 })],
  ['squareWell', form('squareWell', { V0: 1, W0: -0.4, R: 1 })],
  ['gaussian', form('gaussian', { V0: 1, W0: -0.4, a: 1 })],
  ['exponential', form('exponential', { V0: 1, a: 1 })],
  ['woodsSaxon', form('woodsSaxon', { V0: 1, W0: -0.4, R: 2, a: 0.3 })],
  ['hulthen', form('hulthen', { V0: 1, a: 1 })],
  ['polarization', form('polarization', { alpha: 1, d: 1 })],
  ['atomicElectron', form('atomicElectron', { element: 'C' })],
  [
    'tabulated',
    form('tabulated', {
      points: [
        [0, -2],
        [0.4, -1.7],
        [0.9, -0.8],
        [1.5, 0],
      ],
      tail: 'zero',
    }),
  ],
  [
    'expression',
    form('expression', {
      formula: 'V0*exp(-r/a)*(1+r/a)',
      parameters: { V0: { value: 1, unit: 'eV' }, a: { value: 0.5, unit: 'angstrom' } },
    }),
  ],
];

describe.each(WEAK)('%s', (_name, term) => {
  const k = 9;

  test('what it has beyond first order is of second order in a weak potential', () => {
    const beyond = (strength: number, q: number) => {
      const input = inputOf([scaled(term, strength)], k);
      return difference(available(eikonal(input)).amplitude(q), input.born.amplitude(q));
    };
    const strengthOf = 1e-3 / Math.max(1, modulus(term.strength));
    for (const q of [0, 0.7, 3]) {
      const [one, two] = [beyond(strengthOf, q), beyond(2 * strengthOf, q)];
      const size = modulus(beyond(strengthOf, 0));
      expect(Math.abs(two.re - 4 * one.re)).toBeLessThan(0.02 * size);
      expect(Math.abs(two.im - 4 * one.im)).toBeLessThan(0.02 * size);
    }
  });

  test('its phase part is first order: the impact-parameter integral of i chi alone is f1', () => {
    // Odd orders in the strength, f(V) - f(-V), start with twice the first; even ones with nothing of it.
    const strength = 1e-4 / Math.max(1, modulus(term.strength));
    const input = inputOf([scaled(term, strength)], k);
    const [f, g] = [1, -1].map((sign) =>
      available(eikonal(inputOf([scaled(term, sign * strength)], k))).amplitude(1.3),
    );
    const first = input.born.amplitude(1.3);
    if (!f || !g || !first) throw new Error('finite amplitudes are needed');
    expect(Math.abs((f.re - g.re) / 2 - first.re)).toBeLessThan(1e-6 * modulus(first) + 1e-13);
    expect(Math.abs((f.im - g.im) / 2 - first.im)).toBeLessThan(1e-6 * modulus(first) + 1e-13);
  });
});

/** 2π/k² ∫ |f|² q dq over 0 … 2k by Simpson's rule in q. */
function elastic(f: (q: number) => Complex, k: number, last = 2 * k): number {
  const n = 3000;
  let sum = 0;
  for (let i = 0; i <= n; i++) {
    const q = (last * i) / n;
    const { re, im } = f(q);
    sum +=
      ((i === 0 || i === n ? 1 : i % 2 === 1 ? 4 : 2) * last * q * (re * re + im * im)) / (3 * n);
  }
  return (2 * Math.PI * sum) / (k * k);
}

describe('conservation of particles', () => {
  test('4π/k Im f(0) is elastic and absorption, where the angles run far beyond the cone', () => {
    for (const [V0, W0] of [
      [-30, 0],
      [-30, -40],
    ] as const) {
      const k = 40;
      const found = at([form('gaussian', { V0, W0, a: 1 })], k);
      const forward = found.shortRange(0);
      if ('divergent' in found.absorption) throw new Error('absorption is finite');
      const scattered = elastic((q) => found.shortRange(q), k, 30);
      expectRelative(((4 * Math.PI) / k) * forward.im, scattered + found.absorption.value, 1e-9);
    }
  });

  test('a black well removes and scatters πR² each', () => {
    const k = 2000;
    const [R, W0] = [1, -4e6];
    const found = at([form('squareWell', { V0: 0, W0, R })], k);
    if ('divergent' in found.absorption) throw new Error('absorption is finite');
    const area = Math.PI * R * R;
    // 1 - exp(-2 y sqrt(R² - b²)) is open at the rim: 2π ∫ = πR² [1 - 2(1 - (1 + 2y)e^{-2y})/(2y)²].
    const x = (2 * FACTOR * -W0 * R) / k;
    const exact = area * (1 - (2 * (1 - (1 + x) * Math.exp(-x))) / x ** 2);
    expectRelative(found.absorption.value, exact, 1e-11);
    expectRelative(((4 * Math.PI) / k) * found.shortRange(0).im, 2 * area, 1e-5);
  });

  test('without an imaginary part nothing is removed', () => {
    expect(at([form('squareWell', { V0: -5, W0: 0, R: 1 })], 9).absorption).toEqual({
      value: 0,
      error: 0,
    });
  });
});

describe('two point charges', () => {
  const bare = form('coulomb', {});

  test('the modulus is that of first order, forward it diverges', () => {
    const input = inputOf([bare], 3);
    const found = available(eikonal(input));
    expect(found.amplitude(0)).toBeNull();
    for (const q of [1e-3, 0.5, 6]) {
      const f = found.amplitude(q);
      const first = input.born.amplitude(q);
      if (!f || !first) throw new Error('finite away from the forward direction');
      expectRelative(modulus(f), modulus(first), 1e-13);
    }
    expect(found.shortRange(0)).toMatchObject({ re: 0, im: 0 });
  });

  test('the phase is 2 arg Γ(1 + i eta) - eta ln sin²(theta/2), repulsion negative', () => {
    // arg Γ(1 + i) = -0.3016403205 (needs.md D 54, DLMF 33).
    const k = 3;
    const chargeProduct = (2 * k) / FACTOR / 14.39964546860267;
    const found = at([form('coulomb', { chargeProduct })], k);
    const theta = 1.1;
    const f = found.amplitude(2 * k * Math.sin(theta / 2));
    const phase = 2 * -0.3016403205 - Math.log(Math.sin(theta / 2) ** 2) + Math.PI;
    const turned = Math.atan2(f?.im ?? NaN, f?.re ?? NaN);
    expect(Math.abs(Math.sin((turned - phase) / 2))).toBeLessThan(1e-8);
  });

  test('opposite charges leave a neutral whole as it is without a tail', () => {
    const neutral = [
      form('coulomb', { chargeProduct: -2 }),
      form('extendedCharge', { chargeProduct: 2, kind: 'gaussian', radius: 0.8 }),
    ];
    const found = at(neutral, 12);
    expect(found.tail).toEqual({ re: 0, im: 0 });
    const first = inputOf(neutral, 12).born.amplitude(24);
    const f = found.amplitude(24);
    // Near the point charge both are Rutherford's.
    expectRelative(
      modulus(f ?? { re: NaN, im: NaN }),
      modulus(first ?? { re: NaN, im: NaN }),
      0.05,
    );
  });

  test('a weak short-range term beside strong charges feels their transmission', () => {
    const k = 8;
    const strong = form('coulomb', { chargeProduct: 4 });
    const weak = form('gaussian', { V0: 1e-5, W0: 0, a: 0.7 });
    const found = at([strong, weak], k);
    const eta = (FACTOR * 4 * 14.39964546860267) / (2 * k);
    // -ik ∫ b J0(0) (kb)^{2i eta} i chi0 e^{-b²/a²} db = k chi0 (ka)^{2i eta} (a²/2) Γ(1 + i eta), |Γ(1 + i eta)|² = π eta/sinh(π eta).
    const chi0 = (-FACTOR * 1e-5 * Math.sqrt(Math.PI) * 0.7) / (2 * k);
    const size = (k * Math.abs(chi0) * 0.49) / 2;
    const gamma = Math.sqrt((Math.PI * eta) / Math.sinh(Math.PI * eta));
    expectRelative(modulus(found.shortRange(0)), size * gamma, 1e-6);
  });
});

describe('delta shells', () => {
  const shell = (g: number, R: number) => form('deltaShell', { g, R });

  test('two of one radius are one of both strengths', () => {
    for (const q of [0, 3, 11]) {
      const [two, one] = [[shell(2, 1), shell(-0.5, 1)], [shell(1.5, 1)]].map((terms) =>
        at(terms, 12).amplitude(q),
      );
      const { re, im, error } = difference(two ?? null, one ?? null);
      expect(Math.hypot(re, im)).toBeLessThanOrEqual(error);
    }
  });

  test('a thin square shell comes near, as its thickness', () => {
    const k = 12;
    const exact = at([shell(0.8, 1)], k);
    const off = (thickness: number) => {
      const depth = 0.8 / thickness;
      const thin = [
        form('squareWell', { V0: depth, W0: 0, R: 1 + thickness / 2 }),
        form('squareWell', { V0: -depth, W0: 0, R: 1 - thickness / 2 }),
      ];
      return modulus(difference(at(thin, k).amplitude(2), exact.amplitude(2)));
    };
    // Linear in it once the phase at the inner rim is large, A²/R below 1e-3.
    const [wide, narrow] = [off(4e-4), off(4e-5)];
    expect(narrow).toBeLessThan(wide / 3);
    expect(narrow).toBeLessThan(0.002 * modulus(exact.shortRange(0)));
  });

  test('at long waves the rim reaches the centre, where a singular term has no phase', () => {
    const k = 0.8;
    const terms = [shell(0.3, 1), form('hulthen', { V0: 0.2, a: 0.3 })];
    const [f, g] = [at(terms, k).shortRange(0), at([...terms].reverse(), k).shortRange(0)];
    expect(modulus(difference(f, g))).toBeLessThanOrEqual(f.error + g.error);
    // f - f1 = (ik/2) ∫ b chi² db to lowest order: imaginary, positive, and smaller.
    const beyond = difference(f, inputOf(terms, k).born.amplitude(0));
    expect(beyond.im).toBeGreaterThan(Math.abs(beyond.re));
    expect(modulus(beyond)).toBeLessThan(0.5 * modulus(f));
  });

  test('beside a black disc of the same radius: what the disc lets through', () => {
    const k = 50;
    const disc = form('squareWell', { V0: 0, W0: -4e5, R: 1 });
    const [both, alone] = [[disc, shell(3, 1)], [disc]].map((terms) => at(terms, k));
    const [f, g] = [both?.shortRange(0), alone?.shortRange(0)];
    if (!f || !g || !both || !alone) throw new Error('two amplitudes are needed');
    expect(modulus(difference(f, g))).toBeLessThan(1e-3 * modulus(g));
    if ('divergent' in both.absorption || 'divergent' in alone.absorption)
      throw new Error('finite');
    expectRelative(both.absorption.value, alone.absorption.value, 1e-10);
  });

  test('several, with absorption: what scatters and what is lost make the total', () => {
    const k = 40;
    const terms = [shell(30, 1), shell(-20, 0.6), form('gaussian', { V0: 0, W0: -60, a: 1 })];
    const found = at(terms, k);
    if ('divergent' in found.absorption) throw new Error('absorption is finite');
    // A shell throws far: what lies beyond 2k is missing from the integral.
    const scattered = elastic((q) => found.shortRange(q), k);
    const total = ((4 * Math.PI) / k) * found.shortRange(0).im;
    expect(scattered + found.absorption.value).toBeLessThan(total);
    expectRelative(scattered + found.absorption.value, total, 0.05);
  });
});

describe('conditions', () => {
  const conditionsAt = (terms: Term[], k: number) =>
    Object.fromEntries(at(terms, k).conditions.map((one) => [one.name, one]));

  test('short waves, fast particles, small angles, each with its number and words', () => {
    const found = conditionsAt([form('squareWell', { V0: -2, W0: 0, R: 3 })], 4);
    expect(found['shortWaves']).toMatchObject({ value: 12, least: 5, holds: true });
    // Depth 1/angstrom² over r > 1/k, of 16/angstrom².
    expectRelative(found['fastParticles']?.value ?? NaN, (11 / 12) * (1 / 16), 1e-12);
    expect(found['fastParticles']?.holds).toBe(true);
    expectRelative(found['smallAngles']?.value ?? NaN, 1 / Math.sqrt(12), 1e-14);
    for (const { meaning } of Object.values(found)) expect(meaning.length).toBeGreaterThan(40);
  });

  test('do not hold at low energy', () => {
    const found = conditionsAt([form('squareWell', { V0: -2, W0: 0, R: 3 })], 0.5);
    expect(found['shortWaves']?.holds).toBe(false);
    const deep = conditionsAt([form('squareWell', { V0: -20, W0: 0, R: 3 })], 2);
    expect(deep['fastParticles']?.holds).toBe(false);
  });

  test('charges have eta, and no mean depth', () => {
    const term = form('extendedCharge', { chargeProduct: 2, kind: 'uniformSphere', radius: 1 });
    const found = conditionsAt([term], 9);
    expectRelative(found['eta']?.value ?? NaN, (FACTOR * 2 * 14.39964546860267) / 18, 1e-8);
    expect(found['fastParticles']).toBeUndefined();
  });

  test('a potential known to some momentum only says where that ends', () => {
    const found = conditionsAt([form('atomicElectron', { element: 'C' })], 40);
    expect(found['momentumTransfer']).toMatchObject({ value: 80, holds: false });
  });
});

describe('refusals, in words', () => {
  test.each([
    ['contact', form('contact', { b: 1e-5 }), /first order alone/],
    ['hardSphere', form('hardSphere', { R: 1 }), /infinitely hard/],
  ])('%s', (_name, term, words) => {
    const found = eikonal({ ...inputOf([], 5), terms: [term] });
    expect('unavailable' in found && words.test(found.unavailable)).toBe(true);
  });

  test.each([
    ['far too strong', form('gaussian', { V0: -1e6, W0: 0, a: 1 }), 0.01, /rad.*far too strong/],
    ['all but black', form('squareWell', { V0: 0, W0: -1e7, R: 1 }), 0.001, /lost in rounding/],
    ['singular', form('yukawa', { V0: 1700, a: 1 }), 0.5, /turns too fast/],
  ])('%s', (_name, term, k, words) => {
    const found = eikonal(inputOf([term], k));
    expect('unavailable' in found ? found.unavailable : '').toMatch(words);
  });

  test('no interaction scatters nothing', () => {
    const found = at([], 3);
    expect(found.amplitude(1)).toMatchObject({ re: 0, im: 0, error: 0 });
    expect(found.conditions).toEqual([]);
  });
});
