import { describe, expect, test } from 'vitest';
import { besselProducts, besselProductsFor } from '#server/physics/numerics/bessel-products.ts';
import { sphericalBesselArray } from '#server/physics/numerics/spherical-bessel.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

/** x² j_l y_l by mpmath 1.3, sqrt(pi/2x) besselj and bessely at 30 digits. */
const MIXED: [number, number, number][] = [
  [1e-4, 0, -9.999999933333335e-5],
  [1e-4, 7, -6.666666667269985e-6],
  [0.3, 3, -0.04303000571818937],
  [5.5, 0, 0.49999510327535174],
  [5.5, 35, -0.07841237676969476],
  [50, 20, -0.5429865324919635],
  [50, 80, -0.39632020433839604],
  [300, 330, -1.0826002893658602],
];

function productsAt(x: number, lMax: number) {
  const into = besselProductsFor(lMax);
  besselProducts(x, lMax, into);
  return into;
}

describe('products of spherical Bessel functions', () => {
  test.each(MIXED)('x² j_l y_l at x = %f, l = %i', (x, l, expected) => {
    const { mixed } = productsAt(x, 400);
    expect(Math.abs((mixed[l] ?? NaN) - expected)).toBeLessThan(
      1e-13 * Math.min(1, 100 * Math.abs(expected)),
    );
  });

  test('x² j_l² is that of the functions themselves', () => {
    for (const x of [1e-4, 0.3, 1, 3.7, 50, 300]) {
      const { square, length } = productsAt(x, 400);
      const j = sphericalBesselArray(400, x);
      for (let l = 0; l < length; l++) {
        const expected = (x * (j[l] ?? 0)) ** 2;
        if (expected < 1e-290) break;
        const scale = l <= x ? Math.max(expected, 0.1) : expected;
        expect(Math.abs((square[l] ?? NaN) - expected)).toBeLessThan(2e-13 * scale);
      }
    }
  });

  test('closed forms of l = 0 and 1, and the limit -x/(2l+1) of high orders', () => {
    const x = 2.3;
    const { square, mixed, length } = productsAt(x, 500);
    expectRelative(square[0] ?? NaN, Math.sin(x) ** 2, 1e-14);
    expectRelative(mixed[0] ?? NaN, -Math.sin(x) * Math.cos(x), 1e-14);
    expectRelative(
      mixed[1] ?? NaN,
      -(Math.sin(x) / x - Math.cos(x)) * (Math.cos(x) / x + Math.sin(x)),
      1e-14,
    );
    const l = length - 1;
    // -x/(2l+1) (1 + x²/(2 (l-½)(l+3/2)) + …)
    const next = x ** 2 / (2 * (l - 0.5) * (l + 1.5));
    expectRelative(mixed[l] ?? NaN, (-x / (2 * l + 1)) * (1 + next), 1e-5);
  });

  test('ends where nothing is left, at the order asked, and beyond it is zero', () => {
    expect(productsAt(0.01, 400).length).toBeLessThan(80);
    const { square, length } = productsAt(100, 120);
    expect(length).toBe(121);
    expect(square.every(Number.isFinite)).toBe(true);
    const short = productsAt(0.01, 400);
    expect(short.square[short.length + 1]).toBe(0);
  });
});
