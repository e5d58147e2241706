import { splitUnit } from '#shared/units/composed.ts';

/** A number as TeX, to `digits` significant ones. */
export function texNumber(value: number, digits = 5): string {
  if (value === 0) return '0';
  const [mantissa = '', power = '0'] = value.toExponential(digits - 1).split('e');
  const exponent = Number(power);
  if (exponent >= -3 && exponent < 5) return String(Number(value.toPrecision(digits)));
  return `${mantissa}\\times 10^{${exponent}}`;
}

const NAMES: Readonly<Record<string, string>> = {
  angstrom: 'Å',
  bohr: 'a_0',
  um: '\\mu m',
  barn: 'b',
  millibarn: 'mb',
  microbarn: '\\mu b',
  deg: '°',
};

function atom(name: string, sign: 1 | -1): string {
  const match = /^([A-Za-z]+)([23])?$/.exec(name);
  const base = match?.[1] ?? name;
  const power = sign * Number(match?.[2] ?? 1);
  const word = NAMES[base] ?? base;
  const symbol =
    word.includes('\\') || word.includes('_') ? `\\mathrm{${word}}` : `\\text{${word}}`;
  return power === 1 ? symbol : `${symbol}^{${power}}`;
}

/** A unit of the vocabulary as TeX: 1/(eV sr) → eV^{-1} sr^{-1}. */
export function texUnit(unit: string): string {
  const { above, below } = splitUnit(unit);
  return [...above.map((name) => atom(name, 1)), ...below.map((name) => atom(name, -1))].join(
    '\\,',
  );
}

export function texQuantity(quantity: { value: number; unit: string }, digits = 5): string {
  return `${texNumber(quantity.value, digits)}\\,${texUnit(quantity.unit)}`;
}

export function texComplex(value: { re: number; im: number }, digits = 5): string {
  if (value.im === 0) return texNumber(value.re, digits);
  const sign = value.im < 0 ? '-' : '+';
  return `\\left(${texNumber(value.re, digits)} ${sign} ${texNumber(Math.abs(value.im), digits)}\\,i\\right)`;
}
