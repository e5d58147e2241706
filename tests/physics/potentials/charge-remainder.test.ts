import { describe, expect, test } from 'vitest';
import { chargeRemainder } from '#server/physics/potentials/charge-remainder.ts';
import type { ChargeShape } from '#server/physics/potentials/charge-shapes.ts';
import {
  dipoleCharge,
  gaussianCharge,
  uniformSphere,
} from '#server/physics/potentials/charge-shapes.ts';
import { fermiCharge } from '#server/physics/potentials/fermi-charge.ts';
import { helmCharge } from '#server/physics/potentials/helm-charge.ts';
import { radialQuadrature } from '#server/physics/potentials/radial-quadrature.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const SHAPES: [string, ChargeShape][] = [
  ['sphere', uniformSphere(3)],
  ['Gaussian', gaussianCharge(2)],
  ['exponential', dipoleCharge(0.8)],
  ['Fermi', fermiCharge(4, 0.5)],
  ['Fermi all surface', fermiCharge(0.1, 0.5)],
  ['Helm', helmCharge(4, 0.9)],
  ['Helm all surface', helmCharge(0.2, 0.9)],
];

describe.each(SHAPES)('what the Coulomb tail of a %s leaves', (_, shape) => {
  const remainder = chargeRemainder(shape);
  const norm = shape.meanSquare / 6;
  const quadrature = radialQuadrature(shape.missing, norm);

  test('is minus a sixth of the mean square radius forwards', () => {
    expectRelative(remainder(0).value, -norm, 1e-12);
  });

  test('is the integral over the potential, whichever way it is reached, within both errors', () => {
    for (let x = 1e-6; x < 30; x *= 1.7) {
      const q = x / Math.sqrt(shape.meanSquare);
      const [here, there] = [remainder(q), quadrature(q)];
      const apart = Math.abs(here.value + there.value);
      expect(apart, `at ${q}`).toBeLessThanOrEqual(here.error + there.error);
      expect(here.error, `at ${q}`).toBeLessThan(2e-12 * norm);
    }
  });
});

test('the errors bound the distance from the closed form of a Gaussian charge', () => {
  const rms = 2;
  const remainder = chargeRemainder(gaussianCharge(rms));
  for (let q = 1e-5; q < 10; q *= 1.3) {
    const { value, error } = remainder(q);
    const exact = Math.expm1(-((q * rms) ** 2) / 6) / q ** 2;
    expect(Math.abs(value - exact)).toBeLessThanOrEqual(
      error + 8 * Number.EPSILON * Math.abs(exact),
    );
  }
});
