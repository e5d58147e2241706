import type { DifferentialPoint } from '#shared/contracts/estimates.ts';
import type { CmPoint, Curve, LabPoint } from '#server/physics/observables/differential.ts';
import { reasonAt } from '#server/physics/observables/differential.ts';
import type { AnswerUnits } from './answer-units.ts';
import { errorOf } from './answer-units.ts';

function amplitudeOf({ amplitude }: CmPoint, units: AnswerUnits) {
  return amplitude && { re: units.lengthOf(amplitude.re), im: units.lengthOf(amplitude.im) };
}

function dcsOf({ dcs }: CmPoint, units: AnswerUnits) {
  if (dcs === null) return { dcs: null };
  const value = units.areaOf(dcs.value);
  return { dcs: value, ...errorOf(value, units.areaOf(dcs.error), dcs.belowFloor) };
}

/** The analysing power, where there is one; null where there is no cross section. */
function powerOf({ analysingPower, dcs }: CmPoint) {
  if (analysingPower === undefined) return {};
  return { analysingPower: dcs === null ? null : analysingPower };
}

function single(theta: number, point: CmPoint, units: AnswerUnits): DifferentialPoint {
  return {
    theta,
    q: units.inverseLengthOf(point.q),
    ...dcsOf(point, units),
    ...(point.dcs === null && { reason: reasonAt(point) }),
    amplitude: amplitudeOf(point, units),
    ...powerOf(point),
  };
}

/** Two ways to one lab angle: their sum, and each by itself. */
function double(theta: number, points: readonly CmPoint[], units: AnswerUnits): DifferentialPoint {
  const diverging = points.find(({ dcs }) => dcs === null);
  const parts = points.flatMap(({ dcs }) => (dcs ? [dcs] : []));
  const sum = {
    value: parts.reduce((total, { value }) => total + value, 0),
    error: parts.reduce((total, { error }) => total + error, 0),
    belowFloor: parts.every(({ belowFloor }) => belowFloor),
  };
  const whole = diverging
    ? { dcs: null, reason: reasonAt(diverging) }
    : dcsOf({ dcs: sum, thetaCm: 0, q: 0, amplitude: null }, units);
  const branches = points.map((point) => ({
    thetaCm: units.angleOf(point.thetaCm),
    q: units.inverseLengthOf(point.q),
    ...dcsOf(point, units),
    amplitude: amplitudeOf(point, units),
    ...powerOf(point),
  }));
  return { theta, ...whole, branches };
}

function labPointOf(theta: number, point: LabPoint, units: AnswerUnits): DifferentialPoint {
  const [first, second] = point.branches;
  if (!first) return { theta, dcs: null, reason: point.reason ?? 'This angle cannot be reached.' };
  return second ? double(theta, point.branches, units) : single(theta, first, units);
}

export function presentDifferential(
  differential: Curve,
  typed: readonly number[],
  units: AnswerUnits,
): DifferentialPoint[] {
  if (differential.frame === 'cm') {
    return differential.points.map((point, i) => single(typed[i] ?? 0, point, units));
  }
  return differential.points.map((point, i) => labPointOf(typed[i] ?? 0, point, units));
}
