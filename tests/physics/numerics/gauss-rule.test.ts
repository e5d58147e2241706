import { describe, expect, it } from 'vitest';
import { gaussPanel, gaussRule, type GaussOrder } from '#server/physics/numerics/gauss-rule.ts';
import { legendreArray } from '#server/physics/numerics/legendre.ts';

const ORDERS: GaussOrder[] = [8, 16, 64];

describe('Gauss-Legendre rules', () => {
  it.each(ORDERS)('order %i: nodes are zeros of P_n within one rounding of x', (order) => {
    for (const x of gaussRule(order).nodes) {
      const values = legendreArray(order, x);
      const slope = (order * ((values[order - 1] ?? 0) - x * (values[order] ?? 0))) / (1 - x * x);
      expect(Math.abs((values[order] ?? 1) / slope)).toBeLessThan(3e-16);
    }
  });

  it.each(ORDERS)('order %i: integrates x^m exactly up to m = 2n - 1 and not beyond', (order) => {
    for (const m of [0, 1, 2, 7, 2 * order - 2, 2 * order - 1]) {
      const exact = m % 2 === 0 ? 2 / (m + 1) : 0;
      expect(Math.abs(gaussPanel((x) => x ** m, -1, 1, order).value - exact)).toBeLessThan(1e-15);
    }
    const scaled = gaussPanel((x) => legendreArray(order, x)[order] ?? 0, -1, 1, order);
    expect(scaled.absolute).toBeLessThan(1e-14);
  });

  it('gives the integral of |f| beside that of f', () => {
    const { value, absolute } = gaussPanel((x) => x, -1, 1, 16);
    expect(Math.abs(value)).toBeLessThan(1e-16);
    expect(Math.abs(absolute - 1)).toBeLessThan(1e-2);
  });
});
