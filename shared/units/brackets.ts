/** A number without an exponent, with every digit a double holds and no more. */
export function plainDecimal(value: number): string {
  const text = String(value);
  const match = /^(-?)(\d)(?:\.(\d+))?e([+-]\d+)$/.exec(text);
  if (!match) return text;
  const [, sign = '', first = '', rest = '', power = '0'] = match;
  const digits = first + rest;
  const place = 1 + Number(power);
  if (place <= 0) return `${sign}0.${'0'.repeat(-place)}${digits}`;
  return sign + digits.padEnd(place, '0');
}

const minus = (text: string): string => text.replace('-', '−');

/**
 * A measured number as the trade prints it: the standard uncertainty in units of the last digit, in brackets, as in 938.27208943(29).
 * Without an uncertainty the number stands alone.
 */
export function withBrackets(value: number, uncertainty?: number): string {
  if (uncertainty === undefined || !(uncertainty > 0)) return minus(plainDecimal(value));
  // A conversion of units leaves digits that nobody measured.
  const size = plainDecimal(Number(uncertainty.toPrecision(3)));
  const decimals = size.split('.')[1]?.length ?? 0;
  const bracket = decimals === 0 ? size : size.replace('.', '').replace(/^0+/, '');
  return `${minus(value.toFixed(Math.min(decimals, 20)))}(${bracket})`;
}
