import { describe, expect, it } from 'vitest';
import { BOHR, ELECTRON_MASS } from '#server/physics/constants/codata2022.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { sampleCone } from '#server/physics/observables/cone-samples.ts';
import { directIntegrals } from '#server/physics/observables/integrals.ts';
import { atomicElectron } from '#server/physics/potentials/atomic-electron.ts';
import type { FormContext, Term } from '#server/physics/potentials/types.ts';
import { electronScatteringFactor } from '#server/physics/tables/electron-scattering.ts';
import { xrayFormFactor } from '#server/physics/tables/xray-form-factors.ts';
import { deviation, readReference, type Split } from '#tests/physics/numerics/reference-table.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { transform, unitTerm } from './build-term.ts';

const { rows } = readReference<{ rows: (Split & { element: string; q: number })[] }>(
  'potentials/atomicElectron.json',
);

/** At rest mass: f1 is f_e itself. */
const AT_REST: FormContext = {
  twoMuOverHbar2: 1 / 3.8099821161548593,
  projectileCharge: -1,
  targetCharge: 0,
  projectile: 'electron',
};
const termOf = (element: string, context = AT_REST) => atomicElectron.build({ element }, context);
const FOUR_PI = 4 * Math.PI;
const factor = (element: string) => {
  const term = termOf(element);
  return (s: number) => transform(term, 'closed', FOUR_PI * s).value;
};

function electronAt(energy: number) {
  return twoBody({
    projectileMass: ELECTRON_MASS,
    targetMass: Infinity,
    energy,
    regime: 'relativistic',
  });
}

function elastic(terms: Term[], k: number, twoMuOverHbar2: number): number {
  const born = firstBorn(terms, twoMuOverHbar2);
  const range = Math.max(...terms.map((term) => term.range ?? 0));
  const samples = sampleCone((q) => born.shortRange(q), k, { range, edge: 0, terms: terms.length });
  return directIntegrals(samples)[0].value;
}

describe('atomicElectron', () => {
  it.each(['closed', 'quadrature'] as const)('%s: within its error of 30 digits', (route) => {
    for (const row of rows) {
      const term = termOf(row.element);
      const { value, error, status } = transform(term, route, row.q);
      expect(deviation(value, row), JSON.stringify(row)).toBeLessThanOrEqual(error);
      expect(status).toBe('converged');
      expect(error).toBeLessThanOrEqual(5e-14 * term.norm);
      if (route === 'closed') expect(error).toBeLessThanOrEqual(1e-13 * row.high + 1e-16);
    }
  });

  // International Tables for Crystallography C, table 4.3.2.2, evaluated by an independent program.
  it.each([
    ['C', [2.5088, 2.1379355, 0.413583, 0.1173927]],
    ['Al', [5.8872, 4.2366214, 0.6984963, 0.25465]],
    ['Au', [10.5714, 9.2537157, 3.0723934, 1.2102446]],
    ['H', [0.5288, 0.453319, 0.0890269, 0.0237724]],
  ] as const)(
    'f_e of %s at s = 0, 0.1, 0.5, 1 is that of the International Tables',
    (element, printed) => {
      const f = factor(element);
      [0, 0.1, 0.5, 1].forEach((s, i) => expectRelative(f(s), printed[i] ?? NaN, 2.2e-6));
    },
  );

  it('hydrogen: within half a per cent of the exact factor, a0 at s = 0', () => {
    const f = factor('H');
    const exact = (s: number) => {
      const x = (FOUR_PI * s * BOHR) ** 2;
      return (2 * BOHR * (8 + x)) / (4 + x) ** 2;
    };
    for (const s of [0, 0.1, 0.3, 0.5, 1]) expectRelative(f(s), exact(s), 2e-3);
    for (const s of [3.1, 5, 10]) expectRelative(f(s), exact(s), 1e-3);
  });

  it('Mott-Bethe with the X-ray factors of the International Tables agrees: C at s = 0.5, Au at s = 1', () => {
    const mottBethe = (element: string, s: number) => {
      const { atomicNumber, a, b, c } = xrayFormFactor(element, 'it92');
      const fx = a.reduce((sum, height, i) => sum + height * Math.exp(-(b[i] ?? NaN) * s * s), c);
      return (atomicNumber - fx) / (8 * Math.PI ** 2 * BOHR * s * s);
    };
    expectRelative(mottBethe('C', 0.5), 0.413022, 1e-6);
    expectRelative(mottBethe('Au', 1), 1.2082286, 1e-6);
    expectRelative(factor('C')(0.5), mottBethe('C', 0.5), 2e-3);
    expectRelative(factor('Au')(1), mottBethe('Au', 1), 2e-3);
  });

  it('beyond s = 2 the nucleus is left: no step, 300 times the Gaussians for C at s = 6, Z/(8π² a0 s²) far out', () => {
    for (const element of ['H', 'C', 'Rb', 'Cs', 'Au', 'Cf']) {
      const f = factor(element);
      expectRelative(f(2 * (1 + 1e-9)), f(2 * (1 - 1e-9)), 1e-7);
      expectRelative(f(3 * (1 + 1e-9)), f(3 * (1 - 1e-9)), 1e-7);
      expectRelative(f(6 * (1 + 1e-9)), f(6 * (1 - 1e-9)), 1e-7);
      let last = Infinity;
      for (let s = 0; s < 30; s += 0.05) {
        expect(f(s)).toBeLessThan(last);
        last = f(s);
      }
    }
    expectRelative(factor('C')(6) / 1.25e-5, 318, 3e-3);
    expectRelative(factor('Au')(1e4), (79 * 0.0239336609) / 1e8, 1e-6);
  });

  it('positrons feel the opposite, and mass enters as mu/m_e', () => {
    const { k, twoMuOverHbar2 } = electronAt(2e5);
    const context = { ...AT_REST, twoMuOverHbar2 };
    const at = (projectile: string) =>
      firstBorn([termOf('Al', { ...context, projectile })], twoMuOverHbar2).amplitude(k)?.re ?? NaN;
    const gamma = 1 + 2e5 / ELECTRON_MASS;
    expectRelative(at('electron'), gamma * factor('Al')(k / FOUR_PI), 1e-14);
    expect(at('positron')).toBe(-at('electron'));
  });

  // First-order elastic cross sections of 100 keV electrons from table 4.3.2.2, recomputed by an independent program with the
  // Gaussians carried on beyond their fit; the tail of the nucleus, which they lack, adds what stands beside.
  it.each([
    ['C', 8.061e-3, 0.0079],
    ['Al', 2.549e-2, 0.0135],
    ['Cu', 6.146e-2, 0.025],
    ['Au', 0.2858, 0.033],
  ] as const)(
    'elastic cross section of %s at 100 keV: %d angstrom² from the Gaussians, more with the tail',
    (element, expected, tail) => {
      const { k, twoMuOverHbar2 } = electronAt(1e5);
      const { a, b } = electronScatteringFactor(element);
      const bells = a.map((height, i) => {
        const width = Math.sqrt(b[i] ?? NaN) / (2 * Math.PI);
        const term = unitTerm('gaussian', { a: width });
        return { ...term, strength: { re: -(3.8099821161548593 * height) / term.norm, im: 0 } };
      });
      const gaussians = elastic(bells, k, twoMuOverHbar2);
      expectRelative(gaussians, expected, 2e-4);
      const whole = elastic([termOf(element)], k, twoMuOverHbar2);
      expect(Math.abs(whole / gaussians - 1 - tail)).toBeLessThan(2e-3);
      if (element === 'C') expectRelative(whole, expected, 0.01);
    },
  );

  it('moments, line integral and reach are those of v', () => {
    const term = termOf('Cu');
    const v = term.v ?? (() => NaN);
    const reach = term.reach ?? NaN;
    const over = (f: (r: number) => number, from: number) =>
      integrate(f, from, 1.2 * reach, { breakpoints: [0.1, 0.3, 0.9, 3] }).value;
    expectRelative(
      term.norm,
      over((r) => r * r * v(r), 0),
      1e-11,
    );
    expectRelative(
      term.firstMoment ?? NaN,
      over((r) => r * v(r), 0),
      1e-11,
    );
    expectRelative(term.lineIntegral(0.2) ?? NaN, over(v, 0.2), 1e-11);
    expect(v(1.001 * reach)).toBeLessThan(1e-16 * v(0.01));
  });

  it('refuses other projectiles and unknown atoms in words', () => {
    for (const projectile of ['proton', null, undefined]) {
      const context: FormContext = { twoMuOverHbar2: 1, projectileCharge: 1, targetCharge: 0 };
      if (projectile !== undefined) context.projectile = projectile;
      expect(() => termOf('C', context)).toThrow(/electrons and positrons/);
    }
    expect(() => termOf('Xx')).toThrow(/Xx/);
    expect(() => termOf('c')).toThrow(/C/);
    expect(() => atomicElectron.build({}, AT_REST)).toThrow('element is missing');
  });
});

describe('static potential of hydrogen, -e²(1/r + 1/a0) exp(-2r/a0), as a sum of yukawa and exponential', () => {
  const HARTREE = 27.211386245981;
  const a = BOHR / 2;
  const terms = [
    { ...unitTerm('yukawa', { a }), strength: { re: -2 * HARTREE, im: 0 } },
    { ...unitTerm('exponential', { a }), strength: { re: -HARTREE, im: 0 } },
  ];
  /** 2m/hbar² with hartree·a0² = hbar²/m. */
  const factorOf = 2 / (HARTREE * BOHR ** 2);

  it('f(0) = a0; f at s = 0.1, 0.5, 1 is 0.4527828, 0.0889766, 0.0237690 angstrom', () => {
    const born = firstBorn(terms, factorOf);
    expectRelative(born.amplitude(0)?.re ?? NaN, 0.529177, 5e-7);
    for (const [s, f] of [
      [0.1, 0.4527828],
      [0.5, 0.0889766],
      [1, 0.023769],
    ] as const) {
      expectRelative(born.amplitude(FOUR_PI * s)?.re ?? NaN, f, 1.5e-6);
    }
  });

  // N. F. Mott and H. S. W. Massey: sigma = π a0² (7k⁴ + 18k² + 12)/(3(1 + k²)³), k in 1/a0.
  it.each([
    [0.1, 12.3804589],
    [1, 4.8432887],
    [2, 1.6420058],
    [5, 0.2881938],
  ])('k a0 = %d: sigma = %d a0²', (x, sigma) => {
    const square = x * x;
    const closed = (Math.PI * (7 * square * square + 18 * square + 12)) / (3 * (1 + square) ** 3);
    expectRelative(closed, sigma, 2e-7);
    expectRelative(elastic(terms, x / BOHR, factorOf) / BOHR ** 2, closed, 1e-11);
  });
});
