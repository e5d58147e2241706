import { caseSlips, isUnit, unitsOf } from './vocabulary.ts';
import type { Dimension } from './vocabulary.ts';

/** Spellings people type for a unit, after `simplify`; each list belongs to one dimension, so `A` may be a length in one field and a current in another. */
const SPELLINGS: { readonly [D in Dimension]?: Readonly<Record<string, string>> } = {
  energy: { Ha: 'hartree', Eh: 'hartree', E_h: 'hartree', Hartree: 'hartree', 'a.u.': 'hartree' },
  length: {
    Å: 'angstrom',
    A: 'angstrom',
    Ang: 'angstrom',
    ang: 'angstrom',
    Angstrom: 'angstrom',
    angstroms: 'angstrom',
    ångström: 'angstrom',
    a0: 'bohr',
    a_0: 'bohr',
    Bohr: 'bohr',
    micron: 'um',
    microns: 'um',
    fermi: 'fm',
  },
  mass: {
    amu: 'u',
    Da: 'u',
    'eV/c2': 'eV',
    'keV/c2': 'keV',
    'MeV/c2': 'MeV',
    'GeV/c2': 'GeV',
  },
  angle: { '°': 'deg', degree: 'deg', degrees: 'deg', radian: 'rad', radians: 'rad' },
  area: {
    b: 'barn',
    barns: 'barn',
    mb: 'millibarn',
    mbarn: 'millibarn',
    ub: 'microbarn',
    ubarn: 'microbarn',
    Å2: 'angstrom2',
    A2: 'angstrom2',
    a02: 'bohr2',
  },
  volume: { Å3: 'angstrom3', A3: 'angstrom3', a03: 'bohr3' },
  energyLength: { 'eV Å': 'eV angstrom', 'eV A': 'eV angstrom' },
  time: {
    sec: 's',
    second: 's',
    seconds: 's',
    minute: 'min',
    minutes: 'min',
    hour: 'h',
    hours: 'h',
    hr: 'h',
  },
  rate: { Hz: '1/s', '/s': '1/s', 's-1': '1/s', cps: '1/s', 's^-1': '1/s' },
  density: { 'g cm-3': 'g/cm3', 'kg m-3': 'kg/m3', 'g/cc': 'g/cm3' },
  arealDensity: {
    'cm-2': '1/cm2',
    '/cm2': '1/cm2',
    'm-2': '1/m2',
    '/m2': '1/m2',
    'Å-2': '1/angstrom2',
    '1/Å2': '1/angstrom2',
    'ug cm-2': 'ug/cm2',
    'mg cm-2': 'mg/cm2',
    'g cm-2': 'g/cm2',
  },
  temperature: { kelvin: 'K', Kelvin: 'K' },
};

/** One spelling for what looks the same: the Greek and the micro sign, both angstrom letters, raised digits, ^2, middle dots. */
export function simplify(text: string): string {
  return text
    .normalize('NFC')
    .replace(/[µμ]/g, 'u')
    .replace(/\u2212|⁻/g, '-')
    .replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹₀]/g, (digit) => digit.normalize('NFKC'))
    .replace(/\^(-?\d)/g, '$1')
    .replace(/\s*[·*⋅]\s*/g, ' ')
    .replace(/\s*\/\s*/g, '/')
    .replace(/\s+/g, ' ')
    .trim();
}

export interface UnitReading {
  unit: string;
  /** Set where a slip of the pen was mended. */
  note?: string;
}

/**
 * A typed unit as a name of the vocabulary, or null. A slip of case is mended where only one unit can be meant
 * and no m (milli) or M (mega) is at stake.
 */
export function readUnit(text: string, dimension: Dimension): UnitReading | null {
  const word = simplify(text);
  if (isUnit(word, dimension)) return { unit: word };
  const table = SPELLINGS[dimension] ?? {};
  const spelled = Object.hasOwn(table, word) ? table[word] : undefined;
  if (spelled !== undefined) return { unit: spelled };
  const [slip, ...others] = caseSlips(word, dimension);
  if (slip === undefined || others.length > 0) return null;
  if (/^[mM]/.test(slip) && slip[0] !== word[0]) return null;
  return { unit: slip, note: `\`${word}\` is read as ${slip}.` };
}

/** Units of every dimension that this text spells, for saying what it is instead. */
export function spellsUnitOf(text: string, dimensions: readonly Dimension[]): Dimension[] {
  const word = simplify(text);
  return dimensions.filter(
    (dimension) =>
      unitsOf(dimension).includes(word) || Object.hasOwn(SPELLINGS[dimension] ?? {}, word),
  );
}
