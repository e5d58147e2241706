import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NeumaierSum, neumaierSum } from '#server/physics/numerics/sum.ts';

describe('Neumaier summation', () => {
  it('keeps what plain addition loses (the example of Neumaier 1974)', () => {
    expect(neumaierSum([1, 1e100, 1, -1e100])).toBe(2);
    expect([1, 1e100, 1, -1e100].reduce((sum, x) => sum + x)).toBe(0);
  });

  it('is exact for integers that cancel', () => {
    const numbers = fc.array(fc.integer({ min: -(2 ** 40), max: 2 ** 40 }), { maxLength: 200 });
    fc.assert(
      fc.property(numbers, (terms) => {
        const scaled = terms.flatMap((x) => [x * 2 ** 30, x]);
        const mirrored = terms.map((x) => -x * 2 ** 30);
        const expected = terms.reduce((sum, x) => sum + BigInt(x), 0n);
        expect(neumaierSum([...scaled, ...mirrored])).toBe(Number(expected));
      }),
    );
  });

  it('answers an infinite sum as infinity, not as NaN', () => {
    const sum = new NeumaierSum();
    for (const term of [1, Infinity, 2]) sum.add(term);
    expect(sum.value).toBe(Infinity);
  });
});
