import { describe, expect, it } from 'vitest';
import { bracketedRoot } from '#server/physics/numerics/root.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { transform, unitTerm } from './build-term.ts';

/** The transforms are scale-free: here lengths are in fm. */
function formFactor(form: string, lengths: Record<string, number>) {
  const term = unitTerm(form, lengths);
  return (q: number) => transform(term, 'closed', q).value / term.norm;
}

/** rms radius from F(q) = 1 - q²<r²>/6 + …, the next order taken out with two values of q. */
function rmsRadius(F: (q: number) => number, radius: number): number {
  const curvature = (q: number) => (6 * (1 - F(q))) / q ** 2;
  const q = 0.03 / radius;
  return Math.sqrt((4 * curvature(q / 2) - curvature(q)) / 3);
}

describe('shapes against published charge distributions', () => {
  it('uniform sphere: F(1) = 0.9035060368, F(2) = 0.6530966625, first zero at qR = 4.4934', () => {
    const F = formFactor('squareWell', { R: 1 });
    expectRelative(F(1), 0.9035060368, 1e-10);
    expectRelative(F(2), 0.6530966625, 1e-10);
    // Abramowitz and Stegun, table 10.6: tan x = x.
    expectRelative(bracketedRoot(F, 4, 5).value, 4.4934094579, 2e-11);
  });

  // H. de Vries, C. W. de Jager and C. de Vries, At. Data Nucl. Data Tables 36 (1987) 495, two-parameter Fermi fits.
  it.each([
    { nucleus: 'Au-197', R: 6.38, a: 0.535, printed: 5.33, computed: 5.3271 },
    { nucleus: 'Pb', R: 6.624, a: 0.549, printed: 5.521, computed: 5.5219 },
  ])('woodsSaxon: rms radius of $nucleus is $printed fm', ({ R, a, printed, computed }) => {
    const rms = rmsRadius(formFactor('woodsSaxon', { R, a }), R);
    expectRelative(rms, computed, 1e-5);
    expectRelative(rms, printed, 6e-4);
  });

  it('rms radii of the other shapes are the textbook ones', () => {
    expectRelative(rmsRadius(formFactor('squareWell', { R: 1 }), 1), Math.sqrt(0.6), 1e-7);
    expectRelative(rmsRadius(formFactor('gaussian', { a: 1 }), 1), Math.sqrt(1.5), 1e-7);
    expectRelative(rmsRadius(formFactor('exponential', { a: 1 }), 1), Math.sqrt(12), 1e-5);
    expectRelative(rmsRadius(formFactor('deltaShell', { R: 1 }), 1), 1, 1e-7);
    expect(rmsRadius(formFactor('woodsSaxon', { R: 1, a: 1e-4 }), 1)).toBeGreaterThan(
      Math.sqrt(0.6),
    );
  });
});
