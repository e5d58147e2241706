import { describe, expect, it } from 'vitest';
import { fitPanels } from '#server/physics/numerics/legendre-panels.ts';
import { panelSineTransform } from '#server/physics/numerics/panel-sine.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const plain = (f: (x: number) => number, edges: number[], checks: number[] = []) =>
  fitPanels(f, edges, {
    moment: 1e-16,
    noise: (x) => 2 * UNIT_ROUNDOFF * Math.abs(f(x)),
    checks,
    maxEvaluations: 200_000,
  });
const WAVES = [0, 1e-9, 0.01, 0.3, 1, 4.7, 33, 210, 5000];

describe('panels of Legendre polynomials', () => {
  it('holds a polynomial exactly: x³ is (2 P_3 + 3 P_1)/5', () => {
    const { panels } = plain((x) => (x - 1) ** 3, [0, 2]);
    expect(panels).toHaveLength(1);
    const [panel] = panels;
    [0, 0.6, 0, 0.4].forEach((share, n) =>
      expect(Math.abs((panel?.c[n] ?? NaN) - share)).toBeLessThan(1e-15),
    );
  });

  it.each(WAVES)('exp(-x) x sin(qx)/q at q = %s: 2/(1 + q²)² and its bound', (q) => {
    const { panels } = plain((x) => x * Math.exp(-x), [0, 1, 2, 4, 8, 16, 32, 60]);
    const { value, error } = panelSineTransform(panels, q);
    const expected = 2 / (1 + q * q) ** 2;
    expect(Math.abs(value - expected)).toBeLessThanOrEqual(error + 1e-22);
    expect(error).toBeLessThan(2e-14 * Math.max(expected, 2 / (1 + q)));
  });

  it('a step is cut out to the last digit, told or not told where it is', () => {
    const step = (x: number) => (x < 0.7 ? 1 : 0);
    for (const edges of [
      [0, 0.7, 2],
      [0, 2],
    ]) {
      const { panels } = plain(step, edges);
      for (const q of WAVES.slice(1)) {
        const { value, error } = panelSineTransform(panels, q);
        const expected = (2 * Math.sin((q * 0.7) / 2) ** 2) / (q * q);
        expect(Math.abs(value - expected)).toBeLessThanOrEqual(error + 4e-16 * expected);
      }
    }
  });

  it('a root at the origin is refined there alone', () => {
    const { panels } = plain((x) => 1 / Math.sqrt(x), [0, 1]);
    const { value, error } = panelSineTransform(panels, 0);
    expectRelative(value, 2 / 3, 1e-13);
    expect(Math.abs(value - 2 / 3)).toBeLessThanOrEqual(error);
    expect(panels.filter(({ middle }) => middle > 0.5).length).toBeLessThan(3);
  });

  it('a peak between its own points is seen by those it is given', () => {
    const peak = (x: number) => Math.exp(-(((x - 0.3) / 1e-5) ** 2));
    const near = [0.3, 0.300005, 0.29999];
    expect(plain(peak, [0, 1]).panels).toHaveLength(1);
    const { panels } = plain(peak, [0, 1], near.sort());
    expectRelative(panelSineTransform(panels, 0).value, 0.3e-5 * Math.sqrt(Math.PI), 1e-9);
  });

  it('says where a function is not finite, and gives up on one that is too wild', () => {
    const hole = plain((x) => (x > 0.5 ? NaN : 1), [0, 1]);
    expect(hole.panels).toHaveLength(0);
    expect(hole.failure?.finite).toBe(false);
    expect(hole.failure?.at).toBeGreaterThan(0.5);
    const wild = plain((x) => Math.sin(1 / x ** 3), [1e-4, 1]);
    expect(wild.failure?.finite).toBe(true);
    expect(wild.evaluations).toBeLessThan(201_000);
  });
});
