import { describe, expect, test } from 'vitest';
import { secondBorn } from '#server/physics/methods/born2/second-born.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { readReference, type Split } from '#tests/physics/numerics/reference-table.ts';
import { available, difference, form, inputOf, modulus, scaled } from './input.ts';

interface Row {
  lengths: number[];
  k: number;
  q: number;
  re: Split;
  im: Split;
}
type Table = Record<'gaussian' | 'exponential' | 'yukawas', Row[]>;
const TABLE = readReference<Table>('methods/second-born.json');

function secondPart(terms: readonly Term[], k: number, q: number) {
  const input = inputOf(terms, k);
  return difference(available(secondBorn(input)).amplitude(q), input.born.amplitude(q));
}

const WELL = form('squareWell', { V0: -2, W0: 0, R: 1.3 });
const REAL: [string, Term[]][] = [
  ['squareWell', [WELL]],
  ['gaussian', [form('gaussian', { V0: 3, W0: 0, a: 0.8 })]],
  ['exponential', [form('exponential', { V0: -3, a: 0.5 })]],
  ['woodsSaxon', [form('woodsSaxon', { V0: -1, W0: 0, R: 3, a: 0.4 })]],
  ['hulthen', [form('hulthen', { V0: -2, a: 0.7 })]],
  ['deltaShell', [form('deltaShell', { g: 1.5, R: 1 })]],
  ['yukawa', [form('yukawa', { V0: 2, a: 1 })]],
  ['moliere', [form('moliere', { Z: 3 })]],
  ['a sum', [WELL, form('yukawa', { V0: 2, a: 1 }), form('deltaShell', { g: -1, R: 0.7 })]],
  [
    'a neutral whole',
    [
      form('coulomb', { chargeProduct: -2 }),
      form('extendedCharge', { chargeProduct: 2, kind: 'gaussian', radius: 0.8 }),
    ],
  ],
];

describe('against the integral over intermediate momenta (mpmath)', () => {
  test.each(['gaussian', 'exponential'] as const)('%s: the error bounds the deviation', (name) => {
    for (const row of TABLE[name]) {
      const values = { V0: 2, a: row.lengths[0] ?? NaN };
      const unit = form(name, name === 'gaussian' ? { ...values, W0: 0 } : values);
      const f2 = secondPart([unit], row.k, row.q);
      const deviation = Math.hypot(f2.re - row.re.high, f2.im - row.im.high);
      expect(deviation, JSON.stringify(row)).toBeLessThanOrEqual(f2.error);
      const forward = modulus(secondPart([unit], row.k, 0));
      expect(f2.error).toBeLessThan(1e-12 * Math.max(forward, unit.norm));
    }
  });

  test('two Yukawa potentials: cross terms by what the sum has beyond its parts', () => {
    for (const row of TABLE.yukawas) {
      const [first, second] = row.lengths.map((a) => form('yukawa', { V0: 2 / a, a }));
      if (!first || !second) throw new Error('two lengths are needed');
      const both = secondPart([first, second], row.k, row.q);
      const [one, other] = [first, second].map((term) => secondPart([term], row.k, row.q));
      if (!one || !other) throw new Error('two lengths are needed');
      // The cross term stands twice.
      expectRelative((both.re - one.re - other.re) / 2, row.re.high, 1e-13);
      expectRelative((both.im - one.im - other.im) / 2, row.im.high, 1e-13);
    }
  });
});

describe.each(REAL)('%s', (_name, terms) => {
  test.each([0.02, 1.1, 6])('conserves particles to second order at k = %f', (k) => {
    const found = available(secondBorn(inputOf(terms, k)));
    expect(found.absorption).toEqual({ value: 0, error: 0 });
    const residual = found.conditions.find(({ name }) => name === 'opticalTheorem');
    expect(residual?.holds).toBe(true);
    expect(residual?.value).toBeLessThan(1e-9);
  });

  test('second order goes with the square of the strength: its sign does not matter', () => {
    for (const q of [0, 0.9, 2.2]) {
      const f2 = secondPart(terms, 1.1, q);
      const opposite = secondPart(
        terms.map((term) => scaled(term, -1)),
        1.1,
        q,
      );
      const triple = secondPart(
        terms.map((term) => scaled(term, 3)),
        1.1,
        q,
      );
      const size = modulus(f2);
      expect(modulus(difference(f2, opposite))).toBeLessThan(1e-12 * size);
      expect(Math.abs(triple.re - 9 * f2.re)).toBeLessThan(1e-11 * size);
      expect(Math.abs(triple.im - 9 * f2.im)).toBeLessThan(1e-11 * size);
    }
  });

  test('its size is said relative to first order', () => {
    const input = inputOf(terms, 1.1);
    const { conditions } = available(secondBorn(input));
    const { value, holds } = conditions.find(({ name }) => name === 'secondOrderSize') ?? {};
    const ratio = modulus(secondPart(terms, 1.1, 0)) / modulus(input.born.shortRange(0));
    expectRelative(value ?? NaN, ratio, 1e-12);
    expect(holds).toBe(ratio <= 0.1);
  });
});

test('stretched lengths at the same k times range stretch the amplitude', () => {
  const s = 2.3;
  const shapes = (stretch: number) => [
    form('woodsSaxon', { V0: -1 / stretch ** 2, W0: 0, R: 3 * stretch, a: 0.4 * stretch }),
    form('hulthen', { V0: 2 / stretch ** 2, a: 0.7 * stretch }),
  ];
  for (const q of [0, 1, 4]) {
    const f2 = secondPart(shapes(1), 2, q);
    const stretched = secondPart(shapes(s), 2 / s, q / s);
    expect(Math.abs(stretched.re / s - f2.re)).toBeLessThan(
      1e-12 * modulus(secondPart(shapes(1), 2, 0)),
    );
    expect(Math.abs(stretched.im / s - f2.im)).toBeLessThan(
      1e-12 * modulus(secondPart(shapes(1), 2, 0)),
    );
  }
});

describe('limits at zero energy', () => {
  test('square well: a/R = -x²/3 - 2x⁴/15 of 1 - tan(x)/x', () => {
    const R = 1.3;
    const square = 0.5 * 2 * R * R;
    const f2 = secondPart([WELL], 1e-6, 0);
    expectRelative(f2.re, (2 * square * square * R) / 15, 1e-9);
    expectRelative(f2.im, 1e-6 * ((square * R) / 3) ** 2, 1e-9);
  });

  test('delta shell: a/R = G - G² of G/(1 + G)', () => {
    const shell = form('deltaShell', { g: 1.5, R: 0.7 });
    expectRelative(secondPart([shell], 1e-6, 0).re, 0.7 * (0.75 * 0.7) ** 2, 1e-9);
  });

  test('Yukawa: f2(0) = c²/(2 mu³) for U = c exp(-mu r)/r', () => {
    const term = form('yukawa', { V0: 3, a: 0.4 });
    const c = 0.5 * 3 * 0.4;
    expectRelative(secondPart([term], 1e-7, 0).re, (c * c * 0.4 ** 3) / 2, 1e-12);
  });
});

describe('complex depths', () => {
  const wave = (V0: number, W0: number) => [
    form('gaussian', { V0, W0, a: 1 }),
    form('squareWell', { V0: W0, W0: V0, R: 0.5 }),
  ];

  test('a common phase of all strengths turns f2 by twice of it', () => {
    const real = [form('gaussian', { V0: -2, W0: 0, a: 1 })];
    const imaginary = [form('gaussian', { V0: 0, W0: -2, a: 1 })];
    for (const q of [0, 1.5]) {
      const [f, g] = [secondPart(real, 1, q), secondPart(imaginary, 1, q)];
      expectRelative(g.re, -f.re, 1e-12);
      expectRelative(g.im, -f.im, 1e-12);
    }
  });

  test('of different phases: a quadratic form in the strengths', () => {
    // f2(u + iv) = f2(u) - f2(v) + i[f2(u+v) - f2(u) - f2(v)] for real u, v.
    const mixed = secondPart(wave(-1, -0.5), 1.4, 0.8);
    const real = (depth: number, step: number) => [
      form('gaussian', { V0: depth, W0: 0, a: 1 }),
      form('squareWell', { V0: step, W0: 0, R: 0.5 }),
    ];
    const u = real(-1, -0.5);
    const v = real(-0.5, -1);
    const [fu, fv, fs] = [u, v, [...u, ...v]].map((terms) => secondPart(terms, 1.4, 0.8));
    if (!fu || !fv || !fs) throw new Error('three amplitudes are needed');
    const cross = difference(difference(fs, fu), fv);
    expectRelative(mixed.re, fu.re - fv.re - cross.im, 1e-11);
    expectRelative(mixed.im, fu.im - fv.im + cross.re, 1e-11);
  });

  test('absorption is the optical theorem of second order less |f1|² over all angles', () => {
    const k = 1.4;
    const terms = wave(-1, -0.5);
    const input = inputOf(terms, k);
    const found = available(secondBorn(input));
    const forward = found.amplitude(0);
    if (!forward || 'divergent' in found.absorption) throw new Error('finite values are needed');
    // ∫ |f1|² dΩ = (2π/k²) ∫ |f1|² q dq by Simpson's rule.
    const n = 400;
    let elastic = 0;
    for (let i = 0; i <= n; i++) {
      const q = (2 * k * i) / n;
      const { re, im } = input.born.shortRange(q);
      const weight = i === 0 || i === n ? 1 : i % 2 === 1 ? 4 : 2;
      elastic += (weight * (2 * k) * q * (re * re + im * im)) / (3 * n);
    }
    elastic *= (2 * Math.PI) / (k * k);
    expectRelative(found.absorption.value, ((4 * Math.PI) / k) * forward.im - elastic, 1e-8);
    expect(found.absorption.value).toBeGreaterThan(0);
  });
});

describe('refusals, in words', () => {
  const refused = (terms: readonly Term[], k = 1) => {
    const found = secondBorn(inputOf(terms, k));
    return 'unavailable' in found ? found.unavailable : '';
  };

  test.each([
    ['a Coulomb tail', form('coulomb', {}), /Coulomb tail diverges/],
    ['a charge', form('extendedCharge', { kind: 'uniformSphere', radius: 1 }), /Coulomb tail/],
    ['contact', form('contact', { b: 1e-5 }), /first order alone/],
    ['a power tail', form('polarization', { alpha: 1, d: 1 }), /power of r/],
  ])('%s', (_name, term, words) => {
    expect(refused([term])).toMatch(words);
    // A strength of zero is no term at all.
    expect(refused([scaled(term, 0)])).toBe('');
  });

  test('a hard sphere has no first order either', () => {
    const sphere = form('hardSphere', { R: 1 });
    expect('unavailable' in secondBorn({ ...inputOf([], 1), terms: [sphere] })).toBe(true);
  });

  test('an atom whose potential is not known at the momenta of the energy', () => {
    const atom = form('atomicElectron', { element: 'C' });
    expect(refused([atom], 5)).toBe('');
    expect(refused([atom], 13)).toMatch(/q = 25\.1 per angstrom.*moliere/);
  });

  test('what would take too long', () => {
    expect(refused([form('woodsSaxon', { V0: -1, W0: 0, R: 3, a: 0.4 })], 1e5)).toMatch(/too long/);
  });
});
