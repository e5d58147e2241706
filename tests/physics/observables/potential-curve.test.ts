import { expect, test } from 'vitest';
import { potentialCurve } from '#server/physics/observables/potential-curve.ts';
import { build } from '#tests/physics/potentials/build-term.ts';

const well = build('woodsSaxon', { V0: -50, R: 4, a: 0.6 });
const turning = build('spinOrbit', { Vso: 6, Wso: 0, R: 4, a: 0.6 });

test('a spin-orbit term does not change the curve of the central well, and is said to be left out', () => {
  const [alone, both] = [potentialCurve([well], 1), potentialCurve([well, turning], 1)];
  if ('unavailable' in alone || 'unavailable' in both) throw new Error('not drawn');
  expect(both.v).toEqual(alone.v);
  expect(both.r).toEqual(alone.r);
  expect(alone.note).toBeNull();
  expect(both.note).toMatch(/spinOrbit.*l·σ/);
});

test('alone it has no curve, with the reason', () => {
  expect(potentialCurve([turning], 1)).toEqual({
    unavailable: expect.stringMatching(/l·σ/) as unknown,
  });
});
