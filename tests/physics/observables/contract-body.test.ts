import { expect, test } from 'vitest';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTRACT_BODY, Q, answer, born1, dcsAt, integral } from './bodies.ts';

/** The numbers that the contract prints beside its body. */
test('the body of the contract gives its digits', () => {
  const estimate = answer(CONTRACT_BODY);
  const { k, beta } = estimate.kinematics;
  expect(k.unit).toBe('1/angstrom');
  expectRelative(k.value, 5.12316722, 1e-9);
  expectRelative(beta, 0.0197836, 3e-6);
  const [forward] = born1(estimate).differential;
  expect(forward).toMatchObject({ theta: 0, q: 0 });
  expectRelative(forward?.dcs ?? NaN, 6.888967358, 1e-10);
  expectRelative(forward?.amplitude?.re ?? NaN, 2.624684239, 4e-10);
  expect(forward?.amplitude?.im).toBe(0);
  expect(forward?.relativeError).toBeLessThan(1e-14);
  const { value, error } = integral(born1(estimate).elastic);
  expectRelative(value, 0.816789, 1e-8);
  expect(error).toBeLessThan(1e-14);
  expect(born1(estimate).absorption).toEqual({ value: 0, unit: 'angstrom2', absoluteError: 0 });
});

test('golden-rule sheet and verdict of the same body', () => {
  const { goldenRule, validity, potential } = answer(CONTRACT_BODY);
  if ('unavailable' in goldenRule || 'unavailable' in potential) throw new Error('unavailable');
  const { matrixElementTimesVolume: element, quadratureCheck } = goldenRule;
  expect(goldenRule.theta).toBe(60);
  expect(goldenRule.boxSide).toEqual(Q(100, 'angstrom'));
  expect(element.unit).toBe('eV angstrom3');
  expectRelative(element.re, -4.612046575, 2e-10);
  expect(Math.abs((quadratureCheck?.re ?? NaN) - element.re)).toBeLessThan(1e-12);
  const fast = validity.criteria.find(({ name }) => name === 'fast');
  expect(fast?.value.toFixed(2)).toBe('0.32');
  expect(validity).toMatchObject({ verdict: 'usable', basis: 'criteria' });
  expect(potential.r.slice(0, 2)).toEqual([0.01, 0.02]);
  expectRelative(Number(potential.v[0]), -990.05, 1e-6);
  expectRelative(Number(potential.v[1]), -490.1, 1e-5);
});

test('what is left out is nonrelativistic, 181 angles, centre of mass, a box of a thousand ranges at the middle angle', () => {
  const { projectile, target, energy, interaction, methods } = CONTRACT_BODY;
  const bare = answer({ projectile, target, energy, interaction, methods });
  expect(born1(bare).differential.map(({ theta }) => theta)).toEqual(
    Array.from({ length: 181 }, (_, i) => i),
  );
  expect(bare.goldenRule).toMatchObject({ theta: 90, boxSide: Q(1000, 'angstrom') });
  expect(dcsAt(bare, 60)).toBe(dcsAt(answer(CONTRACT_BODY), 60));
  expect(bare.units).toEqual({ length: 'angstrom', area: 'angstrom2', energy: 'eV', angle: 'deg' });
});
