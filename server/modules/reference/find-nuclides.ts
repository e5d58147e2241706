import { ELEMENTS } from '#server/physics/tables/elements.ts';
import { NUCLIDES } from '#server/physics/tables/nuclides.ts';
import type { Nuclide } from '#server/physics/tables/nuclides.ts';
import { fold } from './match.ts';

const NAME_OF: ReadonlyMap<string, string> = new Map(
  ELEMENTS.map(({ symbol, name }) => [symbol, name]),
);
/** Spellings that people use beside the names of the table. */
export const OTHER_NAMES: Readonly<Record<string, readonly string[]>> = {
  Al: ['aluminum'],
  Cs: ['cesium'],
  S: ['sulphur'],
  W: ['wolfram'],
  Hg: ['quicksilver'],
};
/** Nuclides with names of their own. */
const OWN_NAMES: Readonly<Record<string, readonly string[]>> = {
  'H-1': ['protium'],
  'H-2': ['deuterium', 'd'],
  'H-3': ['tritium', 't'],
};

export const elementName = (symbol: string): string => NAME_OF.get(symbol) ?? symbol;

interface Asked {
  letters: string;
  digits: string;
}

/** `Ca-40`, `40Ca`, `⁴⁰Ca`, `calcium 40`, `ca`, `40`: letters and digits in either order. */
function read(q: string): Asked | null {
  const plain = fold(q).replace(/[\s_‐–−-]+/g, '');
  const match = /^([a-z]*)(\d{0,3})$/.exec(plain) ?? /^(\d{1,3})([a-z]+)$/.exec(plain);
  if (!match || plain === '') return null;
  const [first = '', second = ''] = match.slice(1);
  return /^\d/.test(first)
    ? { letters: second, digits: first }
    : { letters: first, digits: second };
}

/** 0 where the letters are the element's symbol or name, 1 where its name begins with them, null elsewhere. */
function rankOfLetters(letters: string, symbol: string): number | null {
  const names = [elementName(symbol), ...(OTHER_NAMES[symbol] ?? [])].map(fold);
  if (fold(symbol) === letters || names.includes(letters)) return 0;
  return letters.length >= 3 && names.some((name) => name.startsWith(letters)) ? 1 : null;
}

function rankOfDigits(digits: string, massNumber: number): number | null {
  if (digits === String(massNumber)) return 0;
  if (digits === '') return 4;
  return String(massNumber).startsWith(digits) ? 2 : null;
}

/**
 * How well a search fits a nuclide: 0 it is named exactly; higher where only its element, or the beginning of a name or mass number fits;
 * null where it does not. Digits alone are a mass number.
 */
export function rankNuclide(q: string, { name, symbol, massNumber }: Nuclide): number | null {
  if (fold(q) === '') return 0;
  if (OWN_NAMES[name]?.includes(fold(q))) return 0;
  const asked = read(q);
  if (!asked) return null;
  const digits = rankOfDigits(asked.digits, massNumber);
  if (digits === null) return null;
  if (asked.letters === '') return digits === 0 ? 3 : null;
  const letters = rankOfLetters(asked.letters, symbol);
  return letters === null ? null : digits + letters;
}

/** What fits, the best first, and of equals the most abundant, so that isotopes one can buy stand before the exotic ones. */
export function findNuclides(q: string): { nuclide: Nuclide; rank: number }[] {
  return NUCLIDES.flatMap((nuclide) => {
    const found = rankNuclide(q, nuclide);
    return found === null ? [] : [{ nuclide, rank: found }];
  }).sort(
    (one, other) =>
      one.rank - other.rank ||
      (other.nuclide.abundance ?? -1) - (one.nuclide.abundance ?? -1) ||
      one.nuclide.massNumber - other.nuclide.massNumber,
  );
}
