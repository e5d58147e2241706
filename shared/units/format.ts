import { splitUnit } from './composed.ts';
import type { Quantity } from './quantity.ts';

const SYMBOLS: Readonly<Record<string, string>> = {
  angstrom: 'Å',
  um: 'µm',
  us: 'µs',
  uA: 'µA',
  ug: 'µg',
  bohr: 'a₀',
  hartree: 'Eₕ',
  barn: 'b',
  millibarn: 'mb',
  microbarn: 'µb',
  deg: '°',
};
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
export const NO_VALUE = '—';

function superscript(power: number): string {
  const digits = [...String(Math.abs(power))].map((digit) => SUPERSCRIPTS[Number(digit)] ?? '');
  return `${power < 0 ? '⁻' : ''}${digits.join('')}`;
}

function atomSymbol(atom: string, sign: 1 | -1): string {
  const match = /^([A-Za-z]+)([23])?$/.exec(atom);
  const name = match?.[1] ?? atom;
  const power = sign * Number(match?.[2] ?? 1);
  return (SYMBOLS[name] ?? name) + (power === 1 ? '' : superscript(power));
}

/** Unit as people read it: angstrom2 → Å², 1/angstrom → Å⁻¹, `eV angstrom3` → eV Å³, angstrom2/sr → Å²/sr, 1/(eV sr) → eV⁻¹ sr⁻¹. */
export function unitSymbol(unit: string): string {
  const { above, below } = splitUnit(unit);
  const top = above.map((atom) => atomSymbol(atom, 1));
  const [only, ...more] = below;
  if (top.length > 0 && only !== undefined && more.length === 0) {
    return `${top.join(' ')}/${atomSymbol(only, 1)}`;
  }
  return [...top, ...below.map((atom) => atomSymbol(atom, -1))].join(' ');
}

const withMinus = (text: string): string => text.replace('-', '−');

/**
 * A number for reading, rounded to `significantDigits` (1 to 17): plain from 1e-3 to below 1e6, `1.23 × 10⁻⁵` beyond.
 * What is not a number is shown as a dash, infinities as ∞: a missing result must never look like one.
 */
export function formatNumber(value: number, significantDigits = 6): string {
  if (Number.isNaN(value)) return NO_VALUE;
  if (!Number.isFinite(value)) return value > 0 ? '∞' : '−∞';
  if (value === 0) return '0';
  const digits = Math.min(17, Math.max(1, Math.round(significantDigits)));
  const [mantissa = '', exponentText = '0'] = value.toExponential(digits - 1).split('e');
  const exponent = Number(exponentText);
  // Digits that were not asked for must not be invented: 123456 to 3 digits is 1.23 × 10⁵, never 123000.
  if (exponent < -3 || exponent >= 6 || exponent >= digits) {
    return `${withMinus(mantissa)} × 10${superscript(exponent)}`;
  }
  const rounded = Number(`${mantissa}e${exponent}`);
  return withMinus(rounded.toFixed(Math.max(0, digits - 1 - exponent)));
}

/** Every digit that a double holds and no more: reading it back gives the same number. Plain ASCII, for copying and for files. */
export function fullDigits(value: number): string {
  return Number.isFinite(value) ? String(value) : '';
}

/** Number and symbol, with a no-break space between (none before a degree sign). */
export function formatQuantity(quantity: Quantity, significantDigits = 6): string {
  return formatComposed(quantity.value, quantity.unit, significantDigits);
}

/** Same for a value in a composed unit such as angstrom2/sr. */
export function formatComposed(value: number, unit: string, significantDigits = 6): string {
  const number = formatNumber(value, significantDigits);
  const symbol = unitSymbol(unit);
  if (number === NO_VALUE) return number;
  return symbol === '°' ? `${number}°` : `${number}\u00a0${symbol}`;
}
