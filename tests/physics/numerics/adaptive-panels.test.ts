import { describe, expect, test } from 'vitest';
import { chebyshevInterpolant } from '#server/physics/numerics/chebyshev-panels.ts';
import { gaussPanel } from '#server/physics/numerics/gauss-rule.ts';
import { resolvePanels } from '#server/physics/numerics/resolved-panels.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const integralOn = (f: (x: number) => number, edges: readonly number[]) =>
  edges.slice(1).reduce((sum, b, i) => sum + gaussPanel(f, edges[i] ?? b, b, 16).value, 0);

describe('panels on which functions are polynomials', () => {
  test('a narrow step, a kink off the edges and a logarithm are found by bisection', () => {
    const cases: [(x: number) => number, number][] = [
      [(x) => 1 / (1 + Math.exp((x - 1.234) / 0.01)), 1.234],
      [(x) => Math.max(0, 1 - x / 0.7), 0.35],
      [(x) => -Math.log(x) * Math.exp(-x), 0],
    ];
    for (const [f, expected] of cases) {
      const { edges, resolved } = resolvePanels([f], [0, 4]);
      expect(resolved).toBe(true);
      if (expected > 0) expectRelative(integralOn(f, edges), expected, 1e-13);
      // ∫_0^∞ e^{-x} ln x dx = -γ; the rest beyond 4 is E1(4) + e^{-4} ln 4.
      else
        expectRelative(
          integralOn(f, edges),
          0.5772156649015329 + 0.003779352409848907 + Math.exp(-4) * Math.log(4),
          1e-13,
        );
    }
  });

  test('what has little weight is not followed', () => {
    const wild = (x: number) => Math.cos(300 * x);
    const all = resolvePanels([wild], [0, 1, 2]);
    const half = resolvePanels([wild], [0, 1, 2], { weight: (a) => (a < 1 ? 1 : 1e-18) });
    expect(half.edges.length).toBeLessThan(0.6 * all.edges.length);
  });

  test('noise is not followed', () => {
    const noisy = (x: number) => Math.exp(-x) + 1e-9 * Math.sin(1e9 * x);
    expect(resolvePanels([noisy], [0, 4], { absoluteNoise: () => 1e-9 }).edges.length).toBeLessThan(
      12,
    );
    expect(resolvePanels([noisy], [0, 4], { maxPanels: 50 }).resolved).toBe(false);
  });

  test('a function that is not finite, or needs too many panels, is said', () => {
    expect(resolvePanels([() => NaN], [0, 1]).resolved).toBe(false);
    expect(resolvePanels([(x) => Math.sin(1e6 * x)], [0, 1], { maxPanels: 20 }).resolved).toBe(
      false,
    );
  });
});

describe('interpolant', () => {
  const f = (x: number) => ({ re: Math.cos(40 * x) / (1 + x), im: Math.exp(-x) });

  test('is within its error of the function, and asks it once only', () => {
    const found = chebyshevInterpolant(f, [0, 1, 4], () => 1e-13);
    for (let i = 0; i <= 200; i++) {
      const { re, im, error } = found.at(i / 50);
      expect(error).toBeLessThanOrEqual(2e-13);
      expect(Math.abs(re - f(i / 50).re)).toBeLessThan(error + 3e-15);
      expect(Math.abs(im - f(i / 50).im)).toBeLessThan(error + 3e-15);
    }
    const calls = found.evaluations();
    for (let i = 0; i <= 100; i++) found.at(i / 25);
    expect(found.evaluations()).toBe(calls);
  });

  test('works out only the panels that are asked', () => {
    const found = chebyshevInterpolant(f, [0, 0.1, 4], () => 1e-13);
    found.at(0.05);
    expect(found.evaluations()).toBe(24);
    found.at(0.07);
    expect(found.evaluations()).toBe(24);
  });

  test('is the function itself once too many calls are spent', () => {
    const found = chebyshevInterpolant(f, [0, 4], () => 1e-13, 48);
    const value = found.at(1);
    expect(value).toEqual({ ...f(1), error: 0 });
    expect(found.evaluations()).toBe(49);
  });
});
