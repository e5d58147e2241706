import { describe, expect, test } from 'vitest';
import { riccatiBessel, riccatiRatio } from '#server/physics/numerics/riccati-bessel.ts';
import { sphericalBesselArray } from '#server/physics/numerics/spherical-bessel.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

function tableAt(x: number, lMax: number) {
  const [F, G] = [new Float64Array(lMax + 1), new Float64Array(lMax + 1)];
  const top = riccatiBessel(x, F, G);
  return { F, G, top };
}

describe('Riccati-Bessel functions', () => {
  test('printed values at x = 1', () => {
    // M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions (1964), table 10.1
    const { F, G } = tableAt(1, 3);
    const printed = [0.8414709848, 0.3011686789, 0.062035052, 0.0090065811];
    for (const [l, value] of printed.entries()) expectRelative(F[l] ?? NaN, value, 1e-8);
    expectRelative(G[0] ?? NaN, 0.5403023059, 1e-9);
    expectRelative(G[1] ?? NaN, 1.3817732907, 1e-9);
  });

  test('F_1 vanishes where tan x = x', () => {
    // The same source: first two zeros of j_1.
    for (const zero of [4.493409457909064, 7.725251836937707]) {
      expect(Math.abs(tableAt(zero, 1).F[1] ?? NaN)).toBeLessThan(1e-14);
    }
  });

  test.each([1e-9, 0.02, 0.9, 1, 3, 17.3, 100, 999])(
    'x = %s: the spherical Bessel functions times x, by another recurrence',
    (x) => {
      const lMax = Math.min(140, Math.ceil(2 * x + 12));
      const { F, top } = tableAt(x, lMax);
      const j = sphericalBesselArray(lMax, x);
      for (let l = 0; l <= top; l++) {
        const size = l < x ? 1 : Math.abs(x * (j[l] ?? NaN));
        expect(Math.abs((F[l] ?? NaN) - x * (j[l] ?? NaN)) / size, `l = ${l}`).toBeLessThan(2e-13);
      }
    },
  );

  test.each([1e-9, 0.3, 6, 41, 400])('x = %s: the Wronskian is one for every l', (x) => {
    const { F, G, top } = tableAt(x, Math.ceil(1.4 * x + 30));
    expect(top).toBeGreaterThan(1);
    for (let l = 0; l < top; l++) {
      const [f, g, f1, g1] = [F[l] ?? NaN, G[l] ?? NaN, F[l + 1] ?? NaN, G[l + 1] ?? NaN];
      expectRelative(f * g1 - f1 * g, 1, 1e-13 * (1 + Math.sqrt(x)));
    }
  });

  test('orders beyond the range of numbers are left out, not made infinite', () => {
    const { F, G, top } = tableAt(0.01, 200);
    expect(top).toBeLessThan(70);
    expect(Number.isFinite(G[top])).toBe(true);
    expect(F[top]).toBeGreaterThan(0);
  });

  test('the ratio belongs to the solution that dies out with l', () => {
    const { F } = tableAt(8, 20);
    for (const l of [9, 12, 18])
      expectRelative(riccatiRatio(l, 8), (F[l + 1] ?? NaN) / (F[l] ?? NaN), 1e-12);
  });

  test.each([0, -1, NaN, Infinity])('refuses x = %s', (x) => {
    expect(() => tableAt(x, 3)).toThrow(RangeError);
  });
});
