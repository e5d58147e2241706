import { describe, expect, it } from 'vitest';
import {
  cmToLab,
  kinematicFactor,
  labToCm,
  recoilAngle,
} from '#server/physics/kinematics/frames.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import type { Regime } from '#server/physics/kinematics/two-body.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import table from './two-body.json' with { type: 'json' };

/** A few ulps: the promise of the docstrings. The worst seen is 4.4e-16 (values and angles) and 8.9e-16 (Jacobians away from the edge of a cone). */
const VALUES = 1e-15;
const ANGLES = 1e-15;
const JACOBIANS = 2e-15;

describe.each(table.cases)('$name', ({ input, values, thetaMax, cm, lab }) => {
  const result = twoBody({
    ...input,
    regime: input.regime as Regime,
    targetMass: input.targetMass ?? Infinity,
  });

  it.each(Object.entries(values))('%s', (key, value) => {
    expectRelative(result[key as keyof typeof values], value, VALUES);
  });

  it('angles from the centre of mass', () => {
    for (const { thetaCm, thetaLab, jacobian, kept, recoilAngle: recoil } of cm) {
      const mine = cmToLab(thetaCm, result.frame);
      expectRelative(mine.thetaLab, thetaLab, ANGLES);
      expectRelative(mine.jacobian, jacobian, JACOBIANS);
      expectRelative(kinematicFactor(thetaCm, result.frame), kept, VALUES);
      if (recoil !== null) expectRelative(recoilAngle(thetaCm, result.frame), recoil, ANGLES);
    }
  });

  it('angles from the lab, every branch', () => {
    for (const { thetaLab, branches } of lab) {
      const mine = labToCm(thetaLab, result.frame);
      expect(mine).toHaveLength(branches.length);
      // One ulp of the given angle or of the edge moves an angle near the edge by as much as the solid angle is stretched.
      const gap = thetaMax === null ? 1 : (thetaMax - thetaLab) / thetaMax;
      branches.forEach(({ thetaCm, jacobian }, index) => {
        expectRelative(mine[index]?.thetaCm ?? NaN, thetaCm, ANGLES);
        expectRelative(mine[index]?.jacobian ?? NaN, jacobian, JACOBIANS + 3e-16 / gap);
      });
    }
    if (thetaMax !== null) expectRelative(result.frame.thetaMax, thetaMax, ANGLES);
  });
});
