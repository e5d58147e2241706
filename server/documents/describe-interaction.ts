import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { isNamedQuantities, isPoints, isQuantity } from '#shared/contracts/terms.ts';
import { enteredQuantity, plainNumber } from './plain-quantity.ts';

const FORM_NAMES: Partial<Record<string, string>> = {
  yukawa: 'Yukawa',
  coulomb: 'Coulomb',
  screenedCoulomb: 'screened Coulomb',
  moliere: 'Molière',
  krc: 'Kr-C screening',
  universalIon: 'universal screening',
  atomicElectron: 'neutral atom',
  woodsSaxon: 'Woods–Saxon',
  hulthen: 'Hulthén',
  tabulated: 'table',
  expression: 'formula',
};
const CHOICE_NAMES: Partial<Record<string, string>> = {
  uniformSphere: 'uniform sphere',
  gaussian: 'Gaussian',
  fermi: 'Fermi',
  helm: 'Helm',
};
const SYMBOLS: Partial<Record<string, string>> = {
  V0: 'V₀',
  W0: 'W₀',
  chargeProduct: 'Z₁Z₂',
  Z1: 'Z₁',
  Z2: 'Z₂',
  alpha: 'α',
  radius: 'R',
  diffuseness: 'a',
};

/** Strengths before lengths, as papers write them: the database keeps no order of members. */
const ORDER = [
  ...['kind', 'formula', 'points', 'V0', 'W0', 'g', 'b', 'nuclide', 'element'],
  ...['chargeProduct', 'Z1', 'Z2', 'R', 'radius', 'a', 'diffuseness'],
];
/** Members that say how a table is written, which a line about the potential need not repeat. */
const UNSAID = ['form', 'original', 'lengthUnit', 'energyUnit'];
/** Members whose text says by itself what it is. */
const UNNAMED = ['nuclide', 'element', 'kind'];
const LONGEST_FORMULA = 60;
const rank = (key: string): number => (ORDER.includes(key) ? ORDER.indexOf(key) : ORDER.length);

/** The form's name in words: `squareWell` → square well, so that a form of tomorrow reads well too. */
export function formName(form: string): string {
  return FORM_NAMES[form] ?? form.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`).trim();
}

function describeFormula(formula: string): string {
  const line = formula.replace(/\s+/g, ' ').trim();
  return line.length <= LONGEST_FORMULA ? line : `${line.slice(0, LONGEST_FORMULA - 2)} …`;
}

function describeParameter(
  key: string,
  value: InteractionTerm[string],
  enteredAt: (suffix: string) => string | undefined,
): string {
  const symbol = SYMBOLS[key] ?? key;
  if (typeof value === 'number') return `${symbol} ${plainNumber(value)}`;
  if (typeof value === 'string') {
    if (key === 'formula') return describeFormula(value);
    return UNNAMED.includes(key) ? (CHOICE_NAMES[value] ?? value) : `${symbol} ${value}`;
  }
  if (isPoints(value)) return `${value.length} points`;
  if (isQuantity(value)) return `${symbol} ${enteredQuantity(value, enteredAt(''))}`;
  if (!isNamedQuantities(value)) return value.name;
  return Object.entries(value)
    .map(([name, inner]) =>
      typeof inner === 'number'
        ? `${SYMBOLS[name] ?? name} ${plainNumber(inner)}`
        : `${SYMBOLS[name] ?? name} ${enteredQuantity(inner, enteredAt(`/${name}`))}`,
    )
    .join(', ');
}

/** One term: form, then its parameters. `entered` is asked by JSON Pointer. */
export function describeTerm(
  term: InteractionTerm,
  index: number,
  entered: Readonly<Record<string, string>>,
): string {
  const parameters = Object.entries(term)
    .filter(([key]) => !UNSAID.includes(key))
    .sort(([one], [other]) => rank(one) - rank(other))
    .map(([key, value]) =>
      describeParameter(
        key,
        value,
        (suffix) => entered[`/interaction/terms/${index}/${key}${suffix}`],
      ),
    )
    .filter((text) => text !== '');
  return [formName(term.form), ...parameters].join(', ');
}
