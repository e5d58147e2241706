import { describe, expect, test } from 'vitest';
import { DomainError } from '#shared/errors.ts';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { transform } from '#server/physics/methods/transform.ts';
import { formByKey } from '#server/physics/potentials/register.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const CONTEXT = { twoMuOverHbar2: 0.25, projectileCharge: 2, targetCharge: 3 };
function term(form: string, values: Record<string, number>): Term {
  const found = formByKey(form);
  if (!found) throw new Error(form);
  return found.build(values, CONTEXT);
}
const WELL = term('squareWell', { V0: -3, W0: -1, R: 2 });
const YUKAWA = term('yukawa', { V0: 5, a: 0.5 });
const size = ({ re, im }: { re: number; im: number }) => Math.hypot(re, im);

describe('the amplitude', () => {
  test('attraction gives a positive one, absorption a positive imaginary part', () => {
    const f = firstBorn([WELL], 0.25).amplitude(0);
    const volume = 8 / 3;
    expectRelative(f?.re ?? NaN, 0.25 * 3 * volume, 1e-14);
    expectRelative(f?.im ?? NaN, 0.25 * volume, 1e-14);
  });

  test('of a sum is the sum, with the errors added', () => {
    for (const q of [0, 0.3, 2, 40]) {
      const parts = [WELL, YUKAWA].map((one) => firstBorn([one], 0.25).amplitude(q));
      const whole = firstBorn([WELL, YUKAWA], 0.25).amplitude(q);
      const re = parts.reduce((sum, f) => sum + (f?.re ?? NaN), 0);
      const error = parts.reduce((sum, f) => sum + (f?.error ?? NaN), 0);
      expect(Math.abs((whole?.re ?? NaN) - re)).toBeLessThanOrEqual(error);
      expectRelative(whole?.error ?? NaN, error, 1e-9);
    }
  });

  test('a blur of q adds its slope to the error', () => {
    const born = firstBorn([YUKAWA], 0.25);
    const sharp = born.amplitude(3)?.error ?? NaN;
    const blurred = born.amplitude(3, 1e-6)?.error ?? NaN;
    // |d ln f/d ln q| = 2 q²a²/(1 + q²a²)
    const slope = (2 * 2.25) / 3.25;
    expectRelative(
      blurred - sharp,
      1e-6 * slope * size(born.amplitude(3) ?? { re: NaN, im: 0 }),
      1e-5,
    );
  });

  test('the floor is 1e-14 of (2mu/hbar²) ∫ r²|V| dr without the tail', () => {
    const bare = term('coulomb', {});
    expectRelative(
      firstBorn([WELL, bare], 0.25).floor,
      1e-14 * 0.25 * Math.sqrt(10) * (8 / 3),
      1e-14,
    );
    expect(firstBorn([bare], 0.25).floor).toBe(0);
  });
});

describe('a Coulomb tail', () => {
  const bare = term('coulomb', {});
  const tail = 0.25 * 6 * 14.39964546860267;

  test('is closed, diverges forward only, and is cut off for the rest', () => {
    const born = firstBorn([bare, YUKAWA], 0.25);
    expectRelative(born.tail.re, tail, 1e-14);
    expect(born.amplitude(0)).toBeNull();
    const rest = firstBorn([YUKAWA], 0.25);
    for (const q of [1e-6, 0.1, 5]) {
      const expected = -tail / q ** 2 + (rest.amplitude(q)?.re ?? NaN);
      expectRelative(born.amplitude(q)?.re ?? NaN, expected, 1e-14);
      expectRelative(born.shortRange(q).re, rest.amplitude(q)?.re ?? NaN, 1e-14);
    }
    expectRelative(born.shortRange(0).re, rest.amplitude(0)?.re ?? NaN, 1e-14);
  });

  test('opposite ones leave nothing, forward too', () => {
    const opposite = term('coulomb', { chargeProduct: -6 });
    const born = firstBorn([bare, opposite], 0.25);
    expect(born.tail).toEqual({ re: 0, im: 0 });
    expect(born.amplitude(0)).toMatchObject({ re: 0, im: 0, error: 0 });
  });
});

describe('the two routes', () => {
  const result = (value: number, error: number) => () => ({
    value,
    error,
    evaluations: 1,
    status: 'converged' as const,
  });

  test('the closed form while it is good, else the better of the two', () => {
    const closed = { ...YUKAWA, closed: result(1, 1e-10), quadrature: result(2, 1e-12) };
    expect(transform(closed, 1).value).toBe(1);
    expect(transform({ ...closed, closed: result(1, 1e-6) }, 1).value).toBe(2);
    expect(
      transform({ ...closed, closed: result(1, 1e-6), quadrature: result(2, 1e-3) }, 1).value,
    ).toBe(1);
    expect(transform({ ...closed, closed: null }, 1).value).toBe(2);
  });

  test('without any value the input is refused, naming the form', () => {
    const lost = { ...YUKAWA, closed: null, quadrature: result(NaN, Infinity) };
    expect(() => transform(lost, 7)).toThrow(DomainError);
    expect(() => transform(lost, 7)).toThrow(/yukawa.*q = 7\.000/);
  });
});
