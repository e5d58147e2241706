import type { KinematicsRow } from '#shared/contracts/aids.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { texComplex, texNumber, texQuantity, texUnit } from '../../model/tex.ts';
import { FRAME_NAMES } from '../../model/words.ts';
import { amplitudeSteps, factorsBeyond } from './meaning-amplitude.ts';
import type { Given, Meaning, MeaningStep, PointLike } from './meaning-amplitude.ts';
import { ERROR_OF_POINT, errorText, errorsOf, facts } from './meaning-facts.ts';

/** What the kinematics of one angle and the exchanged amplitude add, once they are known. */
export interface PointExtras {
  way: KinematicsRow | null;
  exchanged: { re: number; im: number } | null;
}

interface PointGiven extends Given, PointExtras {
  point: PointLike;
}

const texAngle = (value: number, unit: string) =>
  unit === 'deg' ? `${texNumber(value, 6)}^{\\circ}` : `${texNumber(value, 6)}\\,\\text{${unit}}`;

function transferStep({ point, way, estimate }: PointGiven): MeaningStep[] {
  if (point.q === undefined) return [];
  const { k } = estimate.kinematics;
  const { angle, length } = estimate.units;
  const thetaCm = way?.thetaCm ?? point.theta;
  return [
    {
      name: 'Momentum transfer, centre of mass',
      law: 'q = 2k\\,\\sin(\\theta_\\text{cm}/2)',
      substituted: `2\\times ${texQuantity(k)} \\times \\sin(${texAngle(thetaCm, angle)}/2) = ${texNumber(point.q)}\\,${texUnit(`1/${length}`)}`,
    },
  ];
}

function squareStep({ point, exchanged, estimate }: PointGiven): MeaningStep[] {
  const { amplitude } = point;
  if (!amplitude) return [];
  const { length, area } = estimate.units;
  const unit = texUnit(length);
  const size = (amplitude.re ** 2 + amplitude.im ** 2) * composedFactor(`${length}2`, area);
  if (!estimate.identical) {
    return [
      {
        name: 'Cross section in the centre of mass',
        law: '\\left(\\dfrac{d\\sigma}{d\\Omega}\\right)_\\text{cm} = |f_1(q)|^2',
        substituted: `\\left|${texComplex(amplitude)}\\,${unit}\\right|^2 = ${texNumber(size)}\\,${texUnit(`${area}/sr`)}`,
      },
    ];
  }
  return [
    {
      name: 'Cross section of identical particles, both counted',
      law: '\\dfrac{d\\sigma}{d\\Omega} = |f(\\theta)|^2 + |f(\\pi-\\theta)|^2 + \\dfrac{2(-1)^{2s}}{2s+1}\\operatorname{Re} f(\\theta) f^*(\\pi-\\theta)',
      substituted: `f(\\theta) = ${texComplex(amplitude)}\\,${unit}${exchanged ? `,\\quad f(\\pi-\\theta) = ${texComplex(exchanged)}\\,${unit}` : ''}`,
    },
  ];
}

function frameStep({ point, way, estimate }: PointGiven): MeaningStep[] {
  if (estimate.frame !== 'lab' || !way || way.jacobian === null || point.dcs === null) return [];
  const { angle, area } = estimate.units;
  return [
    {
      name: 'From the centre of mass to the lab',
      law: '\\left(\\dfrac{d\\sigma}{d\\Omega}\\right)_\\text{lab} = \\left(\\dfrac{d\\sigma}{d\\Omega}\\right)_\\text{cm}\\,\\dfrac{d\\Omega_\\text{cm}}{d\\Omega_\\text{lab}}',
      substituted: `\\theta_\\text{lab} = ${texAngle(way.thetaLab, angle)} \\to \\theta_\\text{cm} = ${texAngle(way.thetaCm, angle)},\\quad \\dfrac{d\\Omega_\\text{cm}}{d\\Omega_\\text{lab}} = ${texNumber(way.jacobian, 6)},\\quad \\dfrac{d\\sigma}{d\\Omega} = ${texNumber(point.dcs)}\\,${texUnit(`${area}/sr`)}`,
    },
  ];
}

/** Whatever stands between |f|² and the value and is no change of frame: spin and incoherent scattering. */
function restStep({ point, way, estimate }: PointGiven): MeaningStep[] {
  const { amplitude, dcs } = point;
  if (!amplitude || !dcs || estimate.identical) return [];
  const { length, area } = estimate.units;
  const size = (amplitude.re ** 2 + amplitude.im ** 2) * composedFactor(`${length}2`, area);
  const jacobian = estimate.frame === 'lab' ? (way?.jacobian ?? null) : 1;
  if (jacobian === null) return [];
  const names = factorsBeyond(estimate);
  const rest = dcs / (size * jacobian);
  if (!(Math.abs(rest - 1) > 1e-9)) return [];
  return [
    {
      name: `What the curve has beside |f|²${names.length > 0 ? `: ${names.join(', ')}` : ''}`,
      law: '\\dfrac{d\\sigma}{d\\Omega} = |f_1|^2 \\times \\text{factors}',
      substituted: `\\text{factors} = ${texNumber(rest, 6)},\\quad \\dfrac{d\\sigma}{d\\Omega} = ${texNumber(dcs)}\\,${texUnit(`${area}/sr`)}`,
    },
  ];
}

/** What the cross section at one angle is. */
export function meaningOfPoint(given: PointGiven): Meaning {
  const { point, estimate } = given;
  const { angle, area } = estimate.units;
  const at = angle === 'deg' ? `${point.theta}°` : `${point.theta} ${angle}`;
  return {
    title: `dσ/dΩ at ${at}`,
    steps: [
      ...transferStep(given),
      ...amplitudeSteps(given, point),
      ...squareStep(given),
      ...frameStep(given),
      ...restStep(given),
    ],
    facts: facts(
      given,
      `${unitSymbol(`${area}/sr`)}: per target particle and per steradian.`,
      `Angle and solid angle of the ${FRAME_NAMES[estimate.frame]}; q and amplitude of the centre of mass.`,
      errorText(errorsOf(point), ERROR_OF_POINT),
    ),
  };
}
