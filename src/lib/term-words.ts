import type { InteractionTerm, Projectile, Target } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { isNamedQuantities, isPoints, isQuantity } from '#shared/contracts/terms.ts';
import type { TablePoints, TermValue } from '#shared/contracts/terms.ts';
import { fullDigits, unitSymbol } from '#shared/units/format.ts';
import type { Quantity } from '#shared/units/quantity.ts';

/** Values that the register lists by a key, as people say them. */
const CHOICE_NAMES: Readonly<Record<string, string>> = {
  uniformSphere: 'uniform sphere',
  gaussian: 'Gaussian',
  fermi: 'two-parameter Fermi',
  helm: 'Helm',
  dipole: 'dipole',
  zero: 'nothing',
  exponential: 'exponential',
  coulomb: 'falling as 1/r',
};

export function choiceName(key: string): string | undefined {
  return CHOICE_NAMES[key];
}

/** A number with every digit it has, as prose shows it: 1e-7 stays readable, the minus is a minus. */
export function digits(value: number): string {
  return fullDigits(value).replaceAll('-', '−');
}

/** A value for reading in a line: six digits at most, none that nobody wrote. */
export function brief(value: number, figures = 6): string {
  return digits(Number(value.toPrecision(figures)));
}

export function briefQuantity({ value, unit }: Quantity, figures = 6): string {
  const symbol = unitSymbol(unit);
  return symbol === '°' ? `${brief(value, figures)}°` : `${brief(value, figures)} ${symbol}`;
}

export function quantityText(quantity: Quantity): string {
  const symbol = unitSymbol(quantity.unit);
  return symbol === '°' ? `${digits(quantity.value)}°` : `${digits(quantity.value)} ${symbol}`;
}

export function projectileText(projectile: Projectile): string {
  if ('nuclide' in projectile) return `${projectile.nuclide} nucleus`;
  if (projectile.species !== 'custom') return projectile.species;
  const { mass, charge, spin } = projectile;
  return `custom particle (${quantityText(mass)}, charge ${digits(charge)}, spin ${digits(spin)})`;
}

export function targetText(target: Target): string {
  switch (target.kind) {
    case 'fixed':
      return `fixed centre, charge ${digits(target.charge)}`;
    case 'nuclide':
      return `${target.nuclide}, recoiling`;
    case 'species':
      return `${target.species}, recoiling`;
    case 'custom':
      return `custom (${quantityText(target.mass)}, charge ${digits(target.charge)}, spin ${digits(target.spin)})`;
  }
}

export function formLabel(key: string, forms: readonly FormInfo[]): string {
  return forms.find((form) => form.key === key)?.label ?? key;
}

export function termValueText(value: TermValue | undefined): string {
  if (value === undefined) return 'not given';
  if (typeof value === 'string') return choiceName(value) ?? value;
  if (typeof value === 'number') return digits(value);
  if (isQuantity(value)) return quantityText(value);
  if (isPoints(value)) return tableText(value);
  if (!isNamedQuantities(value)) return `${value.name}, ${value.text.length} characters`;
  return Object.entries(value)
    .map(
      ([name, inner]) =>
        `${name} = ${typeof inner === 'number' ? digits(inner) : quantityText(inner)}`,
    )
    .join(', ');
}

function tableText(points: TablePoints): string {
  const [first, last] = [points[0], points.at(-1)];
  if (!first || !last) return 'no points';
  return `${points.length} points, r ${brief(first[0])} to ${brief(last[0])}`;
}

/** The parameters of a term in the order of the register, then whatever the register does not know. */
export function termEntries(
  term: InteractionTerm,
  forms: readonly FormInfo[],
): { key: string; symbol: string; label: string; value: TermValue }[] {
  const parameters = forms.find((form) => form.key === term.form)?.parameters ?? [];
  const known = parameters.map(({ key, symbol, label }) => ({ key, symbol, label }));
  const extra = Object.keys(term)
    .filter((key) => key !== 'form' && !known.some((parameter) => parameter.key === key))
    .map((key) => ({ key, symbol: key, label: key }));
  return [...known, ...extra].flatMap((parameter) => {
    const value = term[parameter.key];
    return value === undefined ? [] : [{ ...parameter, value }];
  });
}

export function termText(term: InteractionTerm, forms: readonly FormInfo[]): string {
  const parts = termEntries(term, forms).map(
    ({ key, value }) => `${key} = ${termValueText(value)}`,
  );
  return [formLabel(term.form, forms), ...parts].join(', ');
}
