import { formatNumber } from '#shared/units/format.ts';
import type { Estimate, Integral, Validity } from '#shared/contracts/estimates.ts';
import { angleText } from '../../model/abscissa-axis.ts';
import { computedOf } from './methods.ts';

/** A share in per cent: `13.9 %`; very small ones keep their power of ten. */
export function percent(share: number, digits = 3): string {
  return `${formatNumber(100 * share, digits)}\u00a0%`;
}

/** With its sign: `+13.9 %`. */
export function signedPercent(share: number, digits = 3): string {
  return `${share > 0 ? '+' : ''}${percent(share, digits)}`;
}

/** How far one integral is off another; nothing where either diverges. */
export function offBy(value: Integral, reference: Integral): number | null {
  if ('divergent' in value || 'divergent' in reference || reference.value === 0) return null;
  return value.value / reference.value - 1;
}

export interface DeviationFigure {
  key: 'elastic' | 'weighted' | 'largest';
  name: string;
  text: string;
  detail: string;
  decides: boolean;
}

/** The elastic total with its sign, where both totals are there to take it from. */
function elasticText(estimate: Estimate, size: number): { text: string; detail: string } {
  const [born, exact] = [computedOf(estimate, 'born1'), computedOf(estimate, 'partialWaves')];
  const signed = born && exact ? offBy(born.elastic, exact.elastic) : null;
  // Factors of a lepton's spin and incoherent scattering stand in the total and not in the deviation.
  const same = signed !== null && Math.abs(Math.abs(signed) - size) <= 1e-6 * size + 1e-12;
  if (!same || size === 0) return { text: percent(size), detail: 'of the elastic total' };
  return {
    text: signedPercent(signed),
    detail: `first Born ${signed > 0 ? 'above' : 'below'} the exact elastic total`,
  };
}

/** First order against the exact calculation, in three figures; none where no exact curve was computed. */
export function deviationFigures(estimate: Estimate): DeviationFigure[] {
  const { deviations } = estimate.validity;
  if (!deviations) return [];
  const { elastic, weighted, largest, largestAt, decides } = deviations;
  return [
    {
      key: 'elastic',
      name: 'Elastic total',
      ...(elastic === undefined
        ? { text: 'divergent', detail: 'the weighted deviation decides instead' }
        : elasticText(estimate, elastic)),
      decides: decides === 'elastic',
    },
    {
      key: 'weighted',
      name: 'Weighted by solid angle',
      text: percent(weighted),
      detail: 'mean over the sphere, without sign',
      decides: decides === 'weighted',
    },
    {
      key: 'largest',
      name: 'Largest',
      text: percent(largest),
      detail: `at ${angleText(Number(largestAt.toPrecision(4)), estimate.units.angle)}, centre of mass`,
      decides: false,
    },
  ];
}

/** What the verdict means for the number on the page. */
export const VERDICT_MEANINGS: Record<Validity['verdict'], string> = {
  sound: 'First Born may be quoted as it stands.',
  usable: 'First Born may be used if its deviation is stated beside it.',
  notValid: 'First Born is not to be quoted for this case.',
  unassessed: 'Nothing here says whether first Born may be trusted.',
};
