import type { Estimate, Integral } from '#shared/contracts/estimates.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { texNumber, texQuantity, texUnit } from '../../model/tex.ts';
import { amplitudeSteps, factorsBeyond } from './meaning-amplitude.ts';
import type { Given, Meaning, MeaningStep } from './meaning-amplitude.ts';
import { ERROR_OF_INTEGRAL, errorText, errorsOf, facts } from './meaning-facts.ts';

export const FIGURES = ['elastic', 'absorption', 'total', 'momentumTransfer', 'viscosity'] as const;
export type FigureKind = (typeof FIGURES)[number];

const NAMES: Record<FigureKind, string> = {
  elastic: 'Elastic cross section',
  absorption: 'Absorption cross section',
  total: 'Total cross section',
  momentumTransfer: 'Momentum-transfer cross section',
  viscosity: 'Viscosity cross section',
};

const LAWS: Record<'elastic' | 'momentumTransfer' | 'viscosity', { law: string; weight: string }> =
  {
    elastic: { law: '\\sigma = \\int \\dfrac{d\\sigma}{d\\Omega}\\,d\\Omega', weight: '' },
    momentumTransfer: {
      law: '\\sigma_m = \\int \\dfrac{d\\sigma}{d\\Omega}\\,(1-\\cos\\theta)\\,d\\Omega',
      weight: '\\,2t^2',
    },
    viscosity: {
      law: '\\sigma_v = \\int \\dfrac{d\\sigma}{d\\Omega}\\,\\sin^2\\theta\\,d\\Omega',
      weight: '\\,4t^2(1-t^2)',
    },
  };

type Answered = Extract<NonNullable<Estimate['methods']['born1']>, { elastic: unknown }>;

function answered({ methods }: Estimate): Answered | null {
  const born = methods.born1;
  return !born || 'unavailable' in born ? null : born;
}

function texIntegral(integral: Integral): string {
  return 'divergent' in integral ? '\\infty' : texQuantity(integral, 6);
}

function stepOf(kind: FigureKind, born: Answered, estimate: Estimate): MeaningStep {
  const { k } = estimate.kinematics;
  if (kind === 'total') {
    return {
      name: NAMES.total,
      law: '\\sigma_\\text{total} = \\sigma_\\text{elastic} + \\sigma_\\text{absorption}',
      substituted: `${texIntegral(born.elastic)} + ${texIntegral(born.absorption)} = ${texIntegral(born.total)}`,
    };
  }
  if (kind === 'absorption') {
    const forward = born.differential.find(({ theta }) => theta === 0)?.amplitude;
    const im = forward
      ? `${texNumber(forward.im)}\\,${texUnit(estimate.units.length)}`
      : '\\operatorname{Im} f_1(0)';
    return {
      name: NAMES.absorption,
      law: '\\sigma_\\text{absorption} = \\dfrac{4\\pi}{k}\\operatorname{Im} f_1(0)',
      substituted: `\\dfrac{4\\pi}{${texQuantity(k)}} \\times ${im} = ${texIntegral(born.absorption)}`,
    };
  }
  const { law, weight } = LAWS[kind];
  const half = estimate.identical ? '\\tfrac{1}{2}' : '';
  const isSquare = !estimate.identical && factorsBeyond(estimate).length === 0;
  const square = isSquare ? '|f_1(2kt)|^2' : '\\dfrac{d\\sigma}{d\\Omega}';
  return {
    name: NAMES[kind],
    law: estimate.identical ? law.replace('= ', '= \\tfrac{1}{2}') : law,
    substituted: `${half} 8\\pi\\int_0^1 ${square}${weight}\\,t\\,dt = ${texIntegral(born[kind])}, \\quad t = \\sin(\\theta/2),\\; k = ${texQuantity(k)}`,
  };
}

/** What a printed table is likely to say otherwise. */
function againstTables(kind: FigureKind, { document }: Given): Meaning['facts'] {
  const atoms = document.interaction.terms.some(({ form }) => form === 'atomicElectron');
  if (!atoms || kind === 'absorption') return [];
  const large = kind === 'momentumTransfer' || kind === 'viscosity';
  const share = large
    ? 'which at 100 keV doubles to triples this cross section, for it lives on large angles'
    : 'which at 100 keV adds 0.8 % for C, 1.3 % for Al, 2.4 % for Cu and 3.2 % for Au';
  return [
    {
      name: 'Against tables',
      text: `Beyond s = 2 per angstrom the scattering factor goes on by the Mott–Bethe formula, ${share}. A value made from the five Gaussians alone is lower by that much.`,
    },
  ];
}

/** What one of the headline figures is. */
export function meaningOfFigure(kind: FigureKind, given: Given): Meaning | null {
  const born = answered(given.estimate);
  if (!born) return null;
  const integral = born[kind];
  const unit =
    'divergent' in integral
      ? 'None: the integral has no finite value.'
      : `${unitSymbol(integral.unit)} per target particle; a total, not per steradian.`;
  const error =
    'divergent' in integral ? integral.reason : errorText(errorsOf(integral), ERROR_OF_INTEGRAL);
  const identical = given.estimate.identical
    ? ' Of identical particles half of the sphere is counted, so that it counts collisions.'
    : '';
  return {
    title: NAMES[kind],
    steps: [stepOf(kind, born, given.estimate), ...amplitudeSteps(given)],
    facts: [
      ...facts(
        given,
        unit,
        `Weights use the angle of the centre of mass; a total is the same in every frame.${identical}`,
        error,
      ),
      ...againstTables(kind, given),
    ],
  };
}
