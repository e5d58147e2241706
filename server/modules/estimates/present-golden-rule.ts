import type { Estimate, GoldenRule } from '#shared/contracts/estimates.ts';
import type { EstimateResult } from '#server/physics/estimate.ts';
import type { GoldenRuleSheet } from '#server/physics/golden-rule-sheet.ts';
import type { MatrixElement } from '#server/physics/observables/golden-rule.ts';
import type { AnswerUnits } from './answer-units.ts';
import { errorOf, finite } from './answer-units.ts';

function elementOf({ re, im, error }: MatrixElement, units: AnswerUnits) {
  const shown = { re: units.volumeEnergyOf(re), im: units.volumeEnergyOf(im) };
  return {
    ...shown,
    unit: units.volumeEnergyUnit,
    ...errorOf(Math.hypot(shown.re, shown.im), units.volumeEnergyOf(error)),
  };
}

function checkOf({ re, im, error, evaluations }: MatrixElement, units: AnswerUnits) {
  return {
    re: units.volumeEnergyOf(re),
    im: units.volumeEnergyOf(im),
    unit: units.volumeEnergyUnit,
    absoluteError: units.volumeEnergyOf(error),
    evaluations,
  };
}

function windowOf({ window }: GoldenRuleSheet): GoldenRule['window'] {
  if ('none' in window) return window;
  return {
    t0Min: { value: finite(window.t0Min), unit: 's' },
    t0Max: { value: finite(window.t0Max), unit: 's' },
  };
}

export function presentGoldenRule(
  { goldenRule: sheet }: EstimateResult,
  theta: number,
  units: AnswerUnits,
): Estimate['goldenRule'] {
  if ('unavailable' in sheet) return { unavailable: true, reason: sheet.unavailable };
  const density = `1/(${units.energy} sr)`;
  return {
    theta,
    boxSide: units.lengthQuantity(sheet.boxSide),
    q: units.inverseLengthQuantity(sheet.q),
    matrixElementTimesVolume: elementOf(sheet.matrixElementTimesVolume, units),
    ...(sheet.quadratureCheck && { quadratureCheck: checkOf(sheet.quadratureCheck, units) }),
    densityOfStates: units.composed(sheet.densityOfStates, '1/(eV sr)', density),
    rate: { value: finite(sheet.rate), unit: '1/(s sr)' },
    flux: units.composed(sheet.flux, '1/(angstrom2 s)', `1/(${units.area} s)`),
    dcs: units.dcsQuantity(sheet.dcs),
    factorsAfter: sheet.factorsAfter.map(({ name, dcs }) => ({
      name,
      dcs: units.dcsQuantity(dcs),
    })),
    window: windowOf(sheet),
  };
}
