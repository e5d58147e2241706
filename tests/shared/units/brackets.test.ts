import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { plainDecimal, withBrackets } from '#shared/units/brackets.ts';

describe('plainDecimal', () => {
  it.each([
    [0, '0'],
    [12.5, '12.5'],
    [1e-7, '0.0000001'],
    [2.5e-9, '0.0000000025'],
    [-3.25e-8, '-0.0000000325'],
    [1e21, '1000000000000000000000'],
    [1.5e22, '15000000000000000000000'],
  ])('%d is written %s', (value, text) => {
    expect(plainDecimal(value)).toBe(text);
  });

  it('reads back as the same number, and never holds an exponent', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const text = plainDecimal(value);
        expect(text).not.toContain('e');
        expect(Number(text)).toBe(value === 0 ? 0 : value);
      }),
    );
  });
});

describe('withBrackets', () => {
  it.each([
    [-3.7409, 0.0011, '−3.7409(11)'],
    [938.27208943, 2.9e-7, '938.27208943(29)'],
    [0.51099895069, 1.6e-10, '0.51099895069(16)'],
    [10.3, 0.1, '10.3(1)'],
    [7.9, 0.07, '7.90(7)'],
    [49700, 125, '49700(125)'],
    [5.6, 0.5, '5.6(5)'],
    [5.6, 1.2, '5.6(12)'],
    [0, 0.008, '0.000(8)'],
  ])('%d with %d is %s', (value, uncertainty, text) => {
    expect(withBrackets(value, uncertainty)).toBe(text);
  });

  it('stands alone without an uncertainty, or where it is no number', () => {
    expect(withBrackets(1.008)).toBe('1.008');
    expect(withBrackets(-6e-6)).toBe('−0.000006');
    expect(withBrackets(2, 0)).toBe('2');
    expect(withBrackets(2, NaN)).toBe('2');
  });
});
