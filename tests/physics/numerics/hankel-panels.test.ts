import { describe, expect, test } from 'vitest';
import besselj0 from '@stdlib/math-base-special-besselj0';
import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { hankelTransform } from '#server/physics/numerics/hankel-panels.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

function panelsOf(edges: readonly number[], re: (b: number) => number, im: (b: number) => number) {
  return edges.slice(1).map((b, i) => {
    const a = edges[i] ?? 0;
    const at = gaussRule(16).nodes.map((x) => a + ((b - a) / 2) * (1 + x));
    return { a, b, re: at.map(re), im: at.map(im) };
  });
}

const EDGES = [0, 0.5, 1, 1.5, 2, 2.5, 3, 4, 5, 6.5];
const MOMENTA = [0, 1e-6, 1, 5, 9.5, 20, 47, 100, 1000, 1e4, 1e6];

describe('J0 of the package', () => {
  test('published values and zeros (needs.md D 52; A&S 9, DLMF 10)', () => {
    expectRelative(besselj0(1), 0.7651976866, 1e-10);
    expectRelative(besselj0(10), -0.2459357645, 2e-10);
    // j_{0,1} = 2.4048255577, where the slope is -J1 = -0.519.
    expect(Math.abs(besselj0(2.4048255577))).toBeLessThan(1e-10);
    expect(besselj0(0)).toBe(1);
  });
});

describe('Hankel transform of panels', () => {
  test('Gaussians: exp(-b²/w²) becomes (w²/2) exp(-q²w²/4)', () => {
    const g = hankelTransform(
      panelsOf(
        EDGES,
        (b) => Math.exp(-b * b),
        (b) => -Math.exp(-2 * b * b),
      ),
    );
    for (const q of MOMENTA) {
      const { re, im } = g(q);
      expect(Math.abs(re - Math.exp((-q * q) / 4) / 2)).toBeLessThan(1e-15);
      expect(Math.abs(im + Math.exp((-q * q) / 8) / 4)).toBeLessThan(1e-15);
    }
  });

  test('a disc: (R² - b²) becomes 2 R² J2(qR)/q², which falls slowly', () => {
    const R = 2;
    const g = hankelTransform(
      panelsOf(
        [0, R],
        (b) => (R - b) * (R + b),
        () => 0,
      ),
    );
    const j1 = (x: number) => besselIntegral(1, x);
    for (const q of [0.3, 2, 11, 60, 300]) {
      const x = q * R;
      const j2 = (2 / x) * j1(x) - besselj0(x);
      expect(Math.abs(g(q).re - (2 * R * R * j2) / (q * q))).toBeLessThan(2e-14);
    }
  });

  test('one wide panel and many narrow ones give the same', () => {
    const f = (b: number) => b * b * (3 - b);
    const [one, many] = [[0, 3], Array.from({ length: 31 }, (_, i) => i / 10)].map((edges) =>
      hankelTransform(panelsOf(edges, f, () => 0)),
    );
    for (const q of MOMENTA.filter((value) => value <= 1e4)) {
      expect(Math.abs((one?.(q).re ?? NaN) - (many?.(q).re ?? NaN))).toBeLessThan(5e-14);
    }
  });
});

/** J_n by Bessel's integral, trapezoids: converges geometrically once there are more points than x. */
function besselIntegral(n: number, x: number): number {
  const count = Math.ceil(x) + 60;
  let sum = 0;
  for (let i = 0; i < count; i++) {
    const t = (2 * Math.PI * i) / count;
    sum += Math.cos(n * t - x * Math.sin(t));
  }
  return sum / count;
}
