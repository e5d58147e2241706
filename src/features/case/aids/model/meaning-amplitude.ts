import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DifferentialPoint, Estimate } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm, TermValue } from '#shared/contracts/terms.ts';
import { HBAR_C_EV_ANGSTROM } from '#shared/units/codata.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { texComplex, texNumber, texQuantity, texUnit } from '../../model/tex.ts';
import { termText } from '../../model/words.ts';
import { rightHandSide, substituted } from './substitute.ts';

/** A law and the same law with the numbers of the case. */
export interface MeaningStep {
  name: string;
  law: string;
  substituted: string;
}

/** What a number is: laws with values, then facts in words. */
export interface Meaning {
  title: string;
  steps: MeaningStep[];
  facts: { name: string; text: string }[];
}

export interface Given {
  estimate: Estimate;
  document: CaseDocument;
  forms: readonly FormInfo[];
}
export type PointLike = Pick<
  DifferentialPoint,
  'theta' | 'q' | 'dcs' | 'relativeError' | 'absoluteError' | 'amplitude'
>;

/** What the curve holds beside the squared amplitude, by name: spin, correction, incoherent scattering, exchange. */
export function factorsBeyond({ goldenRule }: Estimate): string[] {
  return 'unavailable' in goldenRule ? [] : goldenRule.factorsAfter.map(({ name }) => name);
}

/** 2µ/ħ² in units of the answer. */
function strengthFactor({ kinematics, units }: Estimate): { value: number; unit: string } {
  const { reducedMass } = kinematics;
  const perEnergy =
    (2 * reducedMass.value * composedFactor(reducedMass.unit, 'eV')) / HBAR_C_EV_ANGSTROM ** 2;
  const unit = `1/(${units.energy} ${units.length}2)`;
  return { value: perEnergy * composedFactor('1/(eV angstrom2)', unit), unit };
}

function texValue(value: TermValue | undefined): string | null {
  if (typeof value === 'number') return texNumber(value, 6);
  return isQuantity(value) ? texQuantity(value, 6) : null;
}

/** Values of the parameters of a term by their symbols; an absorbing depth that is not given is none. */
function valuesOf(term: InteractionTerm, form: FormInfo, q: string | null): Map<string, string> {
  const values = new Map<string, string>();
  for (const { key, symbol } of form.parameters) {
    const value = texValue(term[key]) ?? (key === 'W0' ? '0' : null);
    if (value !== null) values.set(symbol, value);
  }
  if (q !== null) values.set('q', q);
  return values;
}

/** The transform of every term as its form writes it; at an angle with the values in it, and what it comes to. */
function transformSteps({ estimate, document, forms }: Given, point?: PointLike): MeaningStep[] {
  const { terms } = document.interaction;
  const { length, energy } = estimate.units;
  const factor = strengthFactor(estimate);
  const unit = texUnit(`${energy} ${length}3`);
  return terms.flatMap((term) => {
    const form = forms.find(({ key }) => key === term.form);
    if (!form) return [];
    const name = `Transform: ${termText(term, forms)}`;
    const law = form.transformFormula;
    if (point?.q === undefined || !law.includes('=')) return [{ name, law, substituted: '' }];
    const q = `${texNumber(point.q, 6)}\\,${texUnit(`1/${length}`)}`;
    const { amplitude } = point;
    const value =
      terms.length === 1 && amplitude && law.includes('\\int')
        ? ` = ${texComplex({ re: -amplitude.re / factor.value, im: -amplitude.im / factor.value }, 6)}\\,${unit}`
        : '';
    const numbers = substituted(rightHandSide(law), valuesOf(term, form, q));
    return [{ name, law, substituted: `${numbers}${value}` }];
  });
}

/** From the potential to the amplitude: the law of first order, then the transform of every term. */
export function amplitudeSteps(given: Given, point?: PointLike): MeaningStep[] {
  const { estimate } = given;
  const factor = strengthFactor(estimate);
  const amplitude = point?.amplitude;
  const value = amplitude
    ? `,\\quad f_1 = ${texComplex(amplitude, 6)}\\,${texUnit(estimate.units.length)}`
    : '';
  return [
    ...transformSteps(given, point),
    {
      name: 'Amplitude of first order',
      law: 'f_1(q) = -\\dfrac{2\\mu}{\\hbar^2}\\int_0^\\infty r^2\\,V(r)\\,j_0(qr)\\,dr,\\quad j_0(x) = \\dfrac{\\sin x}{x}',
      substituted: `\\dfrac{2\\mu}{\\hbar^2} = \\dfrac{2\\times ${texQuantity(estimate.kinematics.reducedMass, 6)}}{(${texNumber(HBAR_C_EV_ANGSTROM, 8)}\\,\\text{eV}\\,\\text{Å})^2} = ${texNumber(factor.value, 6)}\\,${texUnit(factor.unit)}${value}`,
    },
  ];
}
