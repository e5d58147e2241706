import type { Estimate, GoldenRule } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { HBAR_C_EV_ANGSTROM, PLANCK_J_S, ELEMENTARY_CHARGE_C } from '#shared/units/codata.ts';
import { texComplex, texNumber, texQuantity, texUnit } from './tex.ts';

/** One line of the golden-rule chain: what it is, its law, the same with numbers, and the value. */
export interface ChainStep {
  key: string;
  name: string;
  law: string;
  substituted: string;
  value: { value: number; unit: string } | { re: number; im: number; unit: string };
  /** Set for the line that must not depend on the box. */
  final?: boolean;
}

const HBAR_EV_S = PLANCK_J_S / (2 * Math.PI * ELEMENTARY_CHARGE_C);

/** Transforms of the terms, S(q), as the register writes them. */
export function transformTex(
  terms: readonly InteractionTerm[],
  forms: readonly FormInfo[],
): string[] {
  return terms.flatMap(({ form }) => {
    const found = forms.find(({ key }) => key === form);
    return found ? [found.transformFormula] : [];
  });
}

/** The chain from matrix element to cross section, with the numbers of this case. */
export function chainOf(rule: GoldenRule, estimate: Estimate): ChainStep[] {
  const { kinematics, units } = estimate;
  const { k, reducedMass } = kinematics;
  const angle =
    units.angle === 'deg'
      ? `${texNumber(rule.theta)}^{\\circ}`
      : `${texNumber(rule.theta)}\\,\\text{${units.angle}}`;
  const box = rule.boxSide;
  const element = rule.matrixElementTimesVolume;
  const sideInLength = box.value * composedFactor(box.unit, units.length);
  const volume = sideInLength ** 3;
  const single = { re: element.re / volume, im: element.im / volume };
  const size2 = (single.re ** 2 + single.im ** 2) * composedFactor(units.energy, 'eV') ** 2;
  const hbarc = `${texNumber(HBAR_C_EV_ANGSTROM, 8)}\\,\\text{eV}\\,\\text{Å}`;
  const hbar = `${texNumber(HBAR_EV_S, 8)}\\,\\text{eV}\\,\\text{s}`;
  return [
    {
      key: 'q',
      name: 'Momentum transfer',
      law: 'q = 2k\\,\\sin(\\theta/2)',
      substituted: `2 \\times ${texQuantity(k)} \\times \\sin(${angle}/2)`,
      value: rule.q,
    },
    {
      key: 'element',
      name: 'Matrix element times volume',
      law: 'L^3 V_{fi} = \\int V(r)\\, e^{i\\mathbf{q}\\cdot\\mathbf{r}}\\, d^3r = 4\\pi \\sum_n V_n\\, S_n(q)',
      substituted: `V_{fi} = ${texComplex(single)}\\,${texUnit(units.energy)} \\quad\\text{for}\\quad L = ${texQuantity(box)}`,
      value: element,
    },
    {
      key: 'density',
      name: 'Density of final states, per steradian',
      law: '\\rho(E) = \\dfrac{L^3\\, \\mu c^2\\, k}{8\\pi^3\\, (\\hbar c)^2}',
      substituted: `\\dfrac{(${texQuantity(box)})^3 \\times ${texQuantity(reducedMass)} \\times ${texQuantity(k)}}{8\\pi^3 \\times (${hbarc})^2}`,
      value: rule.densityOfStates,
    },
    {
      key: 'rate',
      name: 'Transition rate, per steradian',
      law: 'w = \\dfrac{2\\pi}{\\hbar}\\, |V_{fi}|^2\\, \\rho(E)',
      substituted: `\\dfrac{2\\pi}{${hbar}} \\times ${texNumber(size2)}\\,\\text{eV}^{2} \\times ${texQuantity(rule.densityOfStates)}`,
      value: rule.rate,
    },
    {
      key: 'flux',
      name: 'Incoming flux, one particle in the box',
      law: 'j = \\dfrac{\\hbar c\\, k\\, c}{\\mu c^2\\, L^3}',
      substituted: `\\dfrac{${hbarc} \\times ${texQuantity(k)} \\times c}{${texQuantity(reducedMass)} \\times (${texQuantity(box)})^3}`,
      value: rule.flux,
    },
    {
      key: 'dcs',
      name: 'Differential cross section',
      law: '\\dfrac{d\\sigma}{d\\Omega} = \\dfrac{w}{j}',
      substituted: `\\dfrac{${texQuantity(rule.rate)}}{${texQuantity(rule.flux)}}`,
      value: rule.dcs,
      final: true,
    },
  ];
}
