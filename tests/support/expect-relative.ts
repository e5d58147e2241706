import { expect } from 'vitest';

/** |actual - expected| <= tolerance·|expected|; NaN always fails, and an expected zero must be met exactly. */
export function expectRelative(actual: number, expected: number, tolerance: number): void {
  const deviation = expected === 0 ? Math.abs(actual) : Math.abs(actual / expected - 1);
  const met = expected === 0 ? actual === 0 : deviation <= tolerance;
  expect(
    met,
    `${actual} differs from ${expected} by ${deviation} of it, more than ${tolerance}`,
  ).toBe(true);
}
