import { describe, expect, it } from 'vitest';
import { erf, erfc } from '#server/physics/numerics/error-function.ts';
import { fermiDirac, type FermiOrder } from '#server/physics/numerics/fermi-dirac.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { deviation, readReference, type Split } from './reference-table.ts';

interface Tables {
  errorFunctions: { x: number; erfc: Split; erf: Split }[];
  fermiDirac: (Split & { order: FermiOrder; eta: number })[];
}
const tables = readReference<Tables>('numerics/error-and-fermi.json');

describe('error functions', () => {
  it.each(tables.errorFunctions)('x = $x: within their errors of 30 digits', (row) => {
    const [complement, whole] = [erfc(row.x), erf(row.x)];
    expect(deviation(complement.value, row.erfc)).toBeLessThanOrEqual(complement.error);
    expect(deviation(whole.value, row.erf)).toBeLessThanOrEqual(whole.error);
    const allowed = (2 + row.x ** 2) * 1e-15;
    expect(complement.error).toBeLessThanOrEqual(allowed * row.erfc.high);
    expect(whole.error).toBeLessThanOrEqual(2e-15 * row.erf.high + 1e-300);
  });

  it('erf(1) = 0.8427007929 (Abramowitz and Stegun, table 7.1)', () => {
    expectRelative(erf(1).value, 0.8427007929, 1e-10);
  });

  it('are odd, and even about 1; meet where their methods meet; end at 0 and 2', () => {
    for (const x of [0, 0.2, 0.49, 0.51, 3, 9]) {
      expect(erf(-x).value + erf(x).value).toBe(0);
      expectRelative(erfc(-x).value + erfc(x).value, 2, 1e-15);
      expectRelative(erf(x).value + erfc(x).value, 1, 3e-16);
    }
    const [below, above] = [erfc(0.5 - 2e-12), erfc(0.5 + 2e-12)];
    const slope = (-2 / Math.sqrt(Math.PI)) * Math.exp(-0.25);
    expect(Math.abs(above.value - below.value - 4e-12 * slope)).toBeLessThan(1e-15);
    expect([erfc(30).value, erfc(Infinity).value, erfc(-Infinity).value]).toEqual([0, 0, 2]);
    expect(() => erfc(NaN)).toThrow(RangeError);
    expect(() => erf(NaN)).toThrow(RangeError);
  });
});

describe('Fermi-Dirac integrals', () => {
  it.each(tables.fermiDirac)('order $order, eta = $eta: within its error of 30 digits', (row) => {
    const { value, error } = fermiDirac(row.order, row.eta);
    expect(deviation(value, row)).toBeLessThanOrEqual(error);
    expect(error).toBeLessThanOrEqual((4 + Math.abs(Math.min(row.eta, 0))) * 1e-15 * row.high);
  });

  it('eta(2) = 0.8224670334, eta(3) = 0.9015426774 (Abramowitz and Stegun, table 23.3)', () => {
    expectRelative(fermiDirac(2, 0).value, 0.8224670334, 1e-10);
    expectRelative(fermiDirac(3, 0).value, 0.9015426774, 1e-10);
  });

  it('is the integral it stands for, and grows by the next lower order', () => {
    const direct = integrate((t) => t / (1 + Math.exp(t - 1.3)), 0, 60, {
      breakpoints: [1, 4, 16],
    });
    expectRelative(fermiDirac(2, 1.3).value, direct.value, 1e-13);
    for (const eta of [-1.3, -0.4, 0.7, 5]) {
      const h = 1e-4;
      const slope = (fermiDirac(3, eta + h).value - fermiDirac(3, eta - h).value) / (2 * h);
      expectRelative(slope, fermiDirac(2, eta).value, 1e-8);
    }
    expect(() => fermiDirac(2, NaN)).toThrow(RangeError);
  });
});
