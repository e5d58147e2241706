import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatComposed,
  formatNumber,
  formatQuantity,
  fullDigits,
  unitSymbol,
} from '#shared/units/format.ts';
import { readNumber } from '#shared/units/read-number.ts';
import { DIMENSIONS, unitsOf } from '#shared/units/vocabulary.ts';

describe('symbols', () => {
  it.each([
    ['angstrom', 'Å'],
    ['angstrom2', 'Å²'],
    ['1/angstrom', 'Å⁻¹'],
    ['millibarn', 'mb'],
    ['microbarn', 'µb'],
    ['bohr2', 'a₀²'],
    ['eV angstrom3', 'eV Å³'],
    ['angstrom2/sr', 'Å²/sr'],
    ['1/(eV sr)', 'eV⁻¹ sr⁻¹'],
    ['1/(angstrom2 s)', 'Å⁻² s⁻¹'],
    ['1/cm2', 'cm⁻²'],
    ['m/s', 'm/s'],
    ['ug/cm2', 'µg/cm²'],
    ['g/cm3', 'g/cm³'],
    ['MeV fm', 'MeV fm'],
    ['deg', '°'],
  ])('%s is shown as %s', (unit, symbol) => {
    expect(unitSymbol(unit)).toBe(symbol);
  });

  it('has one for every unit', () => {
    for (const dimension of DIMENSIONS) {
      for (const unit of unitsOf(dimension)) expect(unitSymbol(unit)).not.toBe('');
    }
  });
});

describe('numbers', () => {
  it.each([
    [0, 6, '0'],
    [-0, 6, '0'],
    [1.5, 4, '1.500'],
    [100, 3, '100'],
    [123456, 6, '123456'],
    [123456, 3, '1.23 × 10⁵'],
    [999999.9, 6, '1.00000 × 10⁶'],
    [0.00123456, 3, '0.00123'],
    [0.000999999, 3, '0.00100'],
    [0.000123, 3, '1.23 × 10⁻⁴'],
    [-1e-5, 2, '−1.0 × 10⁻⁵'],
    [-2.624684239, 4, '−2.625'],
    [6.02214076e23, 4, '6.022 × 10²³'],
    [NaN, 3, '—'],
    [Infinity, 3, '∞'],
    [-Infinity, 3, '−∞'],
  ])('%d to %d digits is %s', (value, digits, text) => {
    expect(formatNumber(value, digits)).toBe(text);
  });

  it('never says NaN or Infinity and keeps the digits it shows, as the reader of typed numbers finds', () => {
    fc.assert(
      fc.property(fc.double(), fc.integer({ min: 1, max: 17 }), (value, digits) => {
        const text = formatNumber(value, digits);
        expect(text).not.toMatch(/NaN|Infinity|e/);
        if (!Number.isFinite(value) || Math.abs(value) > 1e308) return;
        const back = readNumber(text);
        expect(back.ok && back.rest === '').toBe(true);
        if (back.ok) expect(back.value).toBe(Number(value.toPrecision(digits)) + 0);
      }),
      { numRuns: 500 },
    );
  });

  it('full digits read back as the same number, and are empty for what is none', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(Number(fullDigits(value))).toBe(value + 0);
      }),
    );
    expect(fullDigits(NaN)).toBe('');
    expect(fullDigits(Infinity)).toBe('');
  });

  it('sets number and unit apart by a no-break space, but for degrees', () => {
    expect(formatQuantity({ value: 10, unit: 'keV' }, 3)).toBe('10.0\u00a0keV');
    expect(formatComposed(6.888967358, 'angstrom2/sr', 4)).toBe('6.889\u00a0Å²/sr');
    expect(formatQuantity({ value: 30, unit: 'deg' }, 2)).toBe('30°');
    expect(formatComposed(NaN, 'm/s')).toBe('—');
  });
});
