import { describe, expect, it } from 'vitest';
import { BOHR } from '#server/physics/constants/codata2022.ts';
import { screensOf } from '#server/physics/potentials/screening-sum.ts';
import { ionAtomLength, thomasFermiLength } from '#server/physics/tables/screening.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build, CONTEXT, transform, unitTerm } from './build-term.ts';

/** 2 m_e/hbar² times e² is 2/a0: first-order amplitude of an electron at rest mass, angstrom. */
function electronAmplitude(Z: number, q: number): number {
  return ((2 * Z) / BOHR) * transform(unitTerm('moliere', { Z }), 'closed', q).value;
}

describe('screened potentials of atoms', () => {
  // Recomputed from the printed coefficients by an independent program; the coefficients are G. Molière's (1947).
  it.each([
    { element: 'C', Z: 6, forward: 6.4422 },
    { element: 'Al', Z: 13, forward: 8.3361 },
    { element: 'Au', Z: 79, forward: 15.2121 },
  ])('moliere: f(0) of $element is $forward angstrom', ({ Z, forward }) => {
    expectRelative(electronAmplitude(Z, 0), forward, 1.5e-5);
  });

  it('lengths: Thomas-Fermi 0.1091865 (Au) and 0.2578265 (C), universal He on Au 0.1199932 angstrom', () => {
    expectRelative(thomasFermiLength(79), 0.1091865, 5e-7);
    expectRelative(thomasFermiLength(6), 0.2578265, 5e-7);
    expectRelative(ionAtomLength('universalIon', 2, 79), 0.1199932, 5e-7);
    expectRelative(0.88534, Math.cbrt((9 * Math.PI ** 2) / 128), 2e-6);
    // For equal atoms Firsov's length is the one of Thomas and Fermi over 4^(1/3).
    expectRelative(ionAtomLength('krc', 18, 18), thomasFermiLength(18) / Math.cbrt(4), 5e-5);
  });

  it('weights as printed: 1 for Molière and Kr-C, 1.00007 for the universal one', () => {
    const sum = (screens: readonly { weight: number }[]) =>
      screens.reduce((total, { weight }) => total + weight, 0);
    expectRelative(sum(screensOf('moliere')), 1, 1e-15);
    expectRelative(sum(screensOf('krc')), 1, 1e-15);
    expectRelative(sum(screensOf('universalIon')), 1.00007, 1e-14);
  });

  it.each([
    ['moliere', { Z: 79 }, -79, 1],
    ['krc', { Z1: 2, Z2: 79 }, 158, 1],
    ['universalIon', { Z1: 2, Z2: 79 }, 158, 1.00007],
  ] as const)(
    '%s: near the origin and at large q the charges alone are left',
    (form, values, product, rest) => {
      const term = build(form, values);
      const r = 1e-9;
      expectRelative(
        term.strength.re * (term.v?.(r) ?? NaN) * r,
        product * 14.3996454686 * rest,
        1e-7,
      );
      const q = 1e7;
      expectRelative(q ** 2 * transform(term, 'closed', q).value, rest, 1e-9);
      expect(term.coulombTail).toBe(0);
    },
  );

  it('moliere: Z wins over the charge of the target, which stands in where it is left out', () => {
    const context = { ...CONTEXT, targetCharge: 79 };
    const given = build('moliere', { Z: 6 }, context);
    expectRelative(given.strength.re, -6 * 14.3996454686, 1e-10);
    expectRelative(given.range ?? NaN, thomasFermiLength(6) / 0.3, 1e-15);
    const taken = build('moliere', {}, context);
    expect(taken.strength.re).toBe(build('moliere', { Z: 79 }, context).strength.re);
    expect(taken.range).toBe(build('moliere', { Z: 79 }).range);
    for (const targetCharge of [0, -1]) {
      expect(() => build('moliere', {}, { ...CONTEXT, targetCharge })).toThrow(/Z is needed/);
    }
  });

  it('Kr-C and the universal one lie within a fifth of each other where an ion is turned', () => {
    const [one, other] = [
      build('krc', { Z1: 2, Z2: 79 }),
      build('universalIon', { Z1: 2, Z2: 79 }),
    ];
    for (const r of [0.01, 0.1, 0.3]) expectRelative(one.v?.(r) ?? NaN, other.v?.(r) ?? NaN, 0.2);
  });
});
