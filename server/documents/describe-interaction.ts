import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { enteredQuantity, plainNumber } from './plain-quantity.ts';

const FORM_NAMES: Partial<Record<string, string>> = {
  coulomb: 'Coulomb',
  screenedCoulomb: 'screened Coulomb',
  woodsSaxon: 'Woods–Saxon',
};
const SYMBOLS: Partial<Record<string, string>> = {
  V0: 'V₀',
  W0: 'W₀',
  chargeProduct: 'Z₁Z₂',
  Z1: 'Z₁',
  Z2: 'Z₂',
};

/** Strengths before lengths, as papers write them: the database keeps no order of members. */
const ORDER = ['V0', 'W0', 'g', 'b', 'nuclide', 'element', 'chargeProduct', 'Z1', 'Z2', 'R', 'a'];
const rank = (key: string): number => (ORDER.includes(key) ? ORDER.indexOf(key) : ORDER.length);

/** The form's name in words: `squareWell` → square well, so that a form of tomorrow reads well too. */
export function formName(form: string): string {
  return FORM_NAMES[form] ?? form.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`).trim();
}

function describeParameter(
  key: string,
  value: InteractionTerm[string],
  entered: string | undefined,
): string {
  const symbol = SYMBOLS[key] ?? key;
  if (typeof value === 'object') return `${symbol} ${enteredQuantity(value, entered)}`;
  if (typeof value === 'number') return `${symbol} ${plainNumber(value)}`;
  return key === 'nuclide' || key === 'element' ? value : `${symbol} ${value}`;
}

/** One term: form, then its parameters. `entered` is asked by JSON Pointer. */
export function describeTerm(
  term: InteractionTerm,
  index: number,
  entered: Readonly<Record<string, string>>,
): string {
  const parameters = Object.entries(term)
    .filter(([key]) => key !== 'form')
    .sort(([one], [other]) => rank(one) - rank(other))
    .map(([key, value]) =>
      describeParameter(key, value, entered[`/interaction/terms/${index}/${key}`]),
    );
  return [formName(term.form), ...parameters].join(', ');
}
