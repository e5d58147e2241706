import { describe, expect, it } from 'vitest';
import { exponentialIntegralE1 } from '#server/physics/numerics/exponential-integral.ts';
import { legendreArray } from '#server/physics/numerics/legendre.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { sphericalBesselArray } from '#server/physics/numerics/spherical-bessel.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { deviation, readReference, type SpecialFunctions } from './reference-table.ts';

const table = readReference<SpecialFunctions>('numerics/special-functions.json');

describe('exponential integral E1', () => {
  it.each(table.exponentialIntegral)('x = $x: within its error of 30 digits', (row) => {
    const { value, error } = exponentialIntegralE1(row.x);
    expect(deviation(value, row)).toBeLessThanOrEqual(error);
    expect(error).toBeLessThanOrEqual(5e-15 * row.high);
  });

  it('E1(1) = 0.2193839344 (Abramowitz and Stegun, table 5.1)', () => {
    expectRelative(exponentialIntegralE1(1).value, 0.2193839344, 3e-10);
  });

  it('is the integral it stands for, and vanishes far out', () => {
    const direct = integrate((t) => Math.exp(-t) / t, 0.3, 60, { breakpoints: [1, 4, 16] });
    expectRelative(exponentialIntegralE1(0.3).value, direct.value, 1e-13);
    expect(exponentialIntegralE1(800).value).toBe(0);
    expect(exponentialIntegralE1(Infinity).value).toBe(0);
  });

  it.each([0, -1, NaN])('refuses %d', (x) => {
    expect(() => exponentialIntegralE1(x)).toThrow(RangeError);
  });
});

describe('Legendre polynomials', () => {
  it.each(table.legendre)('P_$l($x)', (row) => {
    const value = legendreArray(row.l, row.x)[row.l] ?? NaN;
    expect(deviation(value, row)).toBeLessThanOrEqual(5e-15);
  });

  it('P5(1/2) = 0.08984375 and P10(1/2) = -0.1882286072 (Abramowitz and Stegun, table 8.1)', () => {
    const values = legendreArray(10, 0.5);
    expect(values[5]).toBe(0.08984375);
    expectRelative(values[10] ?? NaN, -0.1882286072, 3e-10);
  });

  it('uses a forward cone that is known better than 1 - cos', () => {
    // P_l(1 - d) = 1 - l(l+1)d/2 + …, with d below the rounding of 1.
    const d = 1e-20;
    expect(legendreArray(1000, 1, d)[1000]).toBeLessThanOrEqual(1);
    expectRelative(
      legendreArray(1000, 1, 1e-10)[1000] ?? NaN,
      1 - 1001e3 * 0.5e-10 + 6.2e-10,
      1e-9,
    );
  });

  it('refuses what is outside its domain', () => {
    for (const x of [1.0000001, -2, NaN]) expect(() => legendreArray(3, x)).toThrow(RangeError);
    for (const l of [-1, 0.5, NaN]) expect(() => legendreArray(l, 0)).toThrow(RangeError);
  });
});

describe('spherical Bessel functions', () => {
  it.each([0, 60, 1200, 10500])('agree with 30 digits in an array up to order %i', (lMax) => {
    for (const row of table.sphericalBessel.filter(({ l }) => l <= lMax)) {
      const value = sphericalBesselArray(lMax, row.x)[row.l] ?? NaN;
      const envelope = row.l < row.x ? Math.max(Math.abs(row.high), 1 / row.x) : Math.abs(row.high);
      expect(deviation(value, row), `j_${row.l}(${row.x})`).toBeLessThanOrEqual(1e-13 * envelope);
    }
  });

  it('j0..j3 of 1 and the zeros of j1 (Abramowitz and Stegun, tables 10.1 and 10.6)', () => {
    const [j0, j1, j2, j3] = sphericalBesselArray(3, 1);
    expectRelative(j0 ?? NaN, 0.8414709848, 1e-10);
    expectRelative(j1 ?? NaN, 0.3011686789, 2e-10);
    expectRelative(j2 ?? NaN, 0.062035052, 1e-9);
    expectRelative(j3 ?? NaN, 0.0090065811, 5e-9);
    for (const zero of [4.4934094579, 7.7252518369]) {
      expect(Math.abs(sphericalBesselArray(1, zero)[1] ?? NaN)).toBeLessThan(1e-11);
    }
  });

  it.each([1e-5, 0.3, 1, 17.5, 400, 10_000])('sum (2l+1) j_l(%d)² is 1', (x) => {
    const values = sphericalBesselArray(Math.ceil(x + 12 * Math.cbrt(x) + 12), x);
    const sum = values.reduce((total, j, l) => total + (2 * l + 1) * j * j, 0);
    expectRelative(sum, 1, 1e-13);
  });

  it('is a plane wave at the origin and refuses what is outside its domain', () => {
    expect([...sphericalBesselArray(3, 0)]).toEqual([1, 0, 0, 0]);
    for (const x of [-1, NaN, Infinity])
      expect(() => sphericalBesselArray(2, x)).toThrow(RangeError);
    for (const l of [-1, 1.5, NaN]) expect(() => sphericalBesselArray(l, 1)).toThrow(RangeError);
  });
});
