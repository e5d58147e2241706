import type { FoilSent, GasSent } from '#shared/contracts/run-plans.ts';
import type { Faults } from '#server/modules/estimates/faults.ts';
import type { Particle } from '#server/physics/problem.ts';
import type { Formula, FormulaPart } from '#server/physics/tables/formula.ts';
import { naturalIsotopes, nuclide } from '#server/physics/tables/nuclides.ts';

type Fractions = Readonly<Record<string, number>>;
const WHOLE = 1e-6;

const escaped = (key: string): string => key.replaceAll('~', '~0').replaceAll('/', '~1');

/** The isotopes of one element of the formula, in place of its natural mixture. */
function enriched(part: FormulaPart, fractions: Fractions): FormulaPart[] {
  return Object.entries(fractions).flatMap(([name, fraction]) => {
    const { symbol, massNumber, atomicMass } = nuclide(name);
    if (symbol !== part.symbol || fraction === 0) return [];
    return [{ name, symbol, massNumber, count: part.count * fraction, molarMass: atomicMass }];
  });
}

function checkSums(fractions: Fractions, formula: Formula, path: string, faults: Faults): void {
  const sums = new Map<string, number>();
  for (const [name, fraction] of Object.entries(fractions)) {
    const at = `${path}/isotopes/${escaped(name)}`;
    const known = faults.within(at, () => nuclide(name));
    if (!known) continue;
    if (
      !formula.parts.some(
        ({ symbol, massNumber }) => symbol === known.symbol && massNumber === null,
      )
    ) {
      faults.add(
        at,
        `\`${formula.text}\` has no natural ${known.symbol} whose isotopes could be given.`,
      );
    }
    sums.set(known.symbol, (sums.get(known.symbol) ?? 0) + fraction);
  }
  for (const [symbol, sum] of sums) {
    if (Math.abs(sum - 1) <= WHOLE) continue;
    faults.add(
      `${path}/isotopes`,
      `The fractions of ${symbol} add up to ${Number(sum.toPrecision(6))}; mole fractions of one element add up to 1.`,
    );
  }
}

/** A formula with the mixtures of isotopes that were given; faults where they make none. */
export function withIsotopes(
  formula: Formula,
  fractions: Fractions | undefined,
  path: string,
  faults: Faults,
): Formula | undefined {
  if (!fractions || Object.keys(fractions).length === 0) return formula;
  const before = faults.errors.length;
  checkSums(fractions, formula, path, faults);
  if (faults.errors.length > before) return undefined;
  const parts = formula.parts.flatMap((part) => {
    const own = part.massNumber === null ? enriched(part, fractions) : [];
    return own.length > 0 ? own : [part];
  });
  const molarMass = parts.reduce((sum, { count, molarMass: mass }) => sum + count * mass, 0);
  return { ...formula, parts, molarMass };
}

/** Nuclei of this name in a formula unit: all isotopes of an element, or one of them by its share. Null where there are none. */
export function countOfNuclei({ parts }: Formula, name: string): number | null {
  const [symbol = '', mass] = name.split('-');
  const own = parts.filter((part) => part.symbol === symbol);
  if (own.length === 0) return null;
  if (mass === undefined) return own.reduce((sum, { count }) => sum + count, 0);
  const named = own.find((part) => part.name === name);
  if (named) return named.count;
  const natural = own.find(({ massNumber }) => massNumber === null);
  const isotope = naturalIsotopes(symbol).find((entry) => entry.name === name);
  return natural && isotope ? natural.count * (isotope.abundance ?? 0) : null;
}

/** The kind of nucleus a run is about, and how many a formula unit has: the one named, the target's own, or the only one there is. */
export function nucleiOf(
  {
    sent,
    formula,
    target,
    path,
  }: {
    sent: FoilSent | GasSent;
    formula: Formula;
    target: Particle | undefined;
    path: string;
  },
  faults: Faults,
): { scatterer: string; count: number } | null {
  const names = formula.parts.map(({ name }) => name);
  const elements = [...new Set(formula.parts.map(({ symbol }) => symbol))];
  const [only, ...others] = elements;
  const own = target?.identity ?? '';
  const guess = [own, own.split('-')[0] ?? ''].find(
    (name) => name !== '' && (names.includes(name) || elements.includes(name)),
  );
  const scatterer = sent.scatterer ?? guess ?? (others.length === 0 ? only : undefined);
  if (scatterer === undefined) {
    faults.add(
      `${path}/scatterer`,
      `Say which nuclei of ${formula.text} the estimate describes: ${names.join(', ')}.`,
    );
    return null;
  }
  const count = countOfNuclei(formula, scatterer);
  if (count !== null && count > 0) return { scatterer, count };
  faults.add(
    `${path}/scatterer`,
    `\`${formula.text}\` contains no ${scatterer}: choose one of ${names.join(', ')}.`,
  );
  return null;
}
