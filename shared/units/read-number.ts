export type NumberReading =
  { ok: true; value: number; rest: string; note?: string } | { ok: false; message: string };

const SUPERSCRIPTS: Readonly<Record<string, string>> = Object.fromEntries(
  [...'⁰¹²³⁴⁵⁶⁷⁸⁹'].map((digit, index) => [digit, String(index)]),
);
const MANTISSA = /^([+-]?)(\d+(?:[.,]\d*)*|[.,]\d+)/;
const EXPONENT = /^(?:[eE]([+-]?\d+)|\s*[×x*·⋅]\s*10\s*\^?\s*\(?([+-]?\d+)\)?)/;
const POWER_OF_TEN = /^([+-]?)10\s*\^\s*\(?([+-]?\d+)\)?/;

/** Typed minus signs and raised exponents in plain characters, so that 10⁴ becomes 10^4 and never 104. */
function plain(text: string): string {
  return text
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/10(⁻?)([⁰¹²³⁴⁵⁶⁷⁸⁹]+)/g, (_, sign: string, digits: string) => {
      const power = [...digits].map((digit) => SUPERSCRIPTS[digit] ?? '').join('');
      return `10^${sign === '' ? '' : '-'}${power}`;
    })
    .trim();
}

/** Mantissa with its decimal sign settled, or why it cannot be. */
function settle(digits: string): { text: string; note?: string } | { message: string } {
  const commas = digits.split(',').length - 1;
  const points = digits.split('.').length - 1;
  if (commas === 0 && points <= 1) return { text: digits };
  if (commas === 0 || points > 0 || commas > 1) {
    return {
      message: `\`${digits}\` is not one number: leave out separators of thousands and use one decimal point.`,
    };
  }
  const [whole = '', fraction = ''] = digits.split(',');
  // 1,500 may be one and a half or fifteen hundred; 0,500 and 1,50 can only be decimals.
  if (fraction.length === 3 && /^[1-9]\d{0,2}$/.test(whole)) {
    return {
      message: `\`${digits}\` may mean ${whole}.${fraction} or ${whole}${fraction}: write the one you mean, with a point.`,
    };
  }
  const text = `${whole}.${fraction}`;
  return { text, note: `The comma is read as a decimal point: ${Number(text)}.` };
}

/**
 * The number at the start of what a person typed, and what follows it: 10, 1.5e4, 1,5, 2×10⁻³, 10^4, −0.5.
 * Refused in words, never guessed: separators of thousands, and numbers beyond double precision.
 */
export function readNumber(input: string): NumberReading {
  const text = plain(input);
  const power = POWER_OF_TEN.exec(text);
  if (power) {
    return finish(Number(`${power[1] ?? ''}1e${power[2] ?? ''}`), text.slice(power[0].length));
  }
  const match = MANTISSA.exec(text);
  if (!match) {
    return { ok: false, message: 'Begin with a number, then its unit.' };
  }
  const settled = settle(match[2] ?? '');
  if ('message' in settled) return { ok: false, message: settled.message };
  const after = text.slice(match[0].length);
  const exponent = EXPONENT.exec(after);
  const digits = exponent ? (exponent[1] ?? exponent[2] ?? '0') : '0';
  const value = Number(`${match[1] ?? ''}${settled.text}e${digits}`);
  return finish(value, after.slice(exponent?.[0].length ?? 0), settled.note);
}

function finish(value: number, rest: string, note?: string): NumberReading {
  if (!Number.isFinite(value)) {
    return { ok: false, message: 'The number is too large for a double-precision number.' };
  }
  if (/^\s+(?!1\/)[\d.,]/.test(rest)) {
    return { ok: false, message: 'There are spaces inside the number: write it in one piece.' };
  }
  const unit = rest.trim();
  return note === undefined
    ? { ok: true, value, rest: unit }
    : { ok: true, value, rest: unit, note };
}
