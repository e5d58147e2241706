import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bracketedRoot } from '#server/physics/numerics/root.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

describe('bracketed root', () => {
  it('finds the zeros of j1, tan x = x (Abramowitz and Stegun, table 10.6)', () => {
    const f = (x: number) => Math.sin(x) - x * Math.cos(x);
    expectRelative(bracketedRoot(f, 4, 5).value, 4.4934094579, 2e-11);
    expectRelative(bracketedRoot(f, 7, 8).value, 7.7252518369, 2e-11);
  });

  it('solves x³ - 2x - 5 = 0 (Wallis), from either order of the ends', () => {
    const f = (x: number) => x ** 3 - 2 * x - 5;
    for (const [a, b] of [
      [2, 3],
      [3, 2],
      [-50, 100],
    ] as const) {
      const root = bracketedRoot(f, a, b);
      expect(root.status).toBe('converged');
      expect(Math.abs(root.value - 2.0945514815423265)).toBeLessThanOrEqual(root.error);
      expect(root.error).toBeLessThan(3e-15);
    }
  });

  it('brackets the root of a monotonic function within its error', () => {
    fc.assert(
      fc.property(fc.double({ min: -20, max: 20, noNaN: true }), (x0) => {
        const root = bracketedRoot((x) => Math.sinh(x - x0), -21, 22, 1e-13);
        expect(Math.abs(root.value - x0)).toBeLessThanOrEqual(root.error);
        expect(root.evaluations).toBeLessThan(100);
      }),
    );
  });

  it('converges on a jump and on a root of ninth order', () => {
    const jump = bracketedRoot((x) => (x < 1 / 3 ? -1 : 1), 0, 1);
    expect(Math.abs(jump.value - 1 / 3)).toBeLessThanOrEqual(jump.error);
    const flat = bracketedRoot((x) => (x - 1) ** 9, 0, 1.7);
    expect(Math.abs(flat.value - 1)).toBeLessThanOrEqual(1e-9);
  });

  it('says limited when calls run out and failed when f is no number', () => {
    const limited = bracketedRoot((x) => (x < 1 / 3 ? -1 : 1), 0, 1, 0, 10);
    expect(limited.status).toBe('limited');
    expect(Math.abs(limited.value - 1 / 3)).toBeLessThanOrEqual(limited.error);
    const failed = bracketedRoot((x) => (x === 0 ? -1 : x === 1 ? 1 : NaN), 0, 1);
    expect(failed).toMatchObject({ status: 'failed', value: NaN });
  });

  it('refuses ends without a change of sign', () => {
    expect(() => bracketedRoot((x) => x * x + 1, -1, 1)).toThrow(RangeError);
    expect(() => bracketedRoot(() => NaN, -1, 1)).toThrow(RangeError);
  });
});
