/** Uniform and normal random numbers that a seed decides. */
export interface Generator {
  /** 32 random bits. */
  bits: () => number;
  /** Above 0, below 1. */
  uniform: () => number;
  /** Standard normal. */
  normal: () => number;
}

const rotated = (x: number, by: number): number => (x << by) | (x >>> (32 - by));

/** Four words from one seed: a counter, mixed until no trace of its steps is left. */
function stateOf(seed: number): [number, number, number, number] {
  let counter = seed >>> 0;
  const next = () => {
    counter = (counter + 0x9e3779b9) | 0;
    let z = counter;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return z ^ (z >>> 16);
  };
  return [next(), next(), next(), next()];
}

/** The generator xoshiro128** from a state of four 32-bit words, not all zero. */
export function generatorFrom(state: readonly [number, number, number, number]): Generator {
  let [a, b, c, d] = state;
  let spare: number | null = null;
  const bits = () => {
    const result = Math.imul(rotated(Math.imul(b, 5), 7), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotated(d, 11);
    return result;
  };
  const uniform = () => ((bits() >>> 5) * 67_108_864 + (bits() >>> 6) + 0.5) / 2 ** 53;
  const normal = () => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const s = x * x + y * y;
      if (s > 0 && s < 1) {
        const scale = Math.sqrt((-2 * Math.log(s)) / s);
        spare = y * scale;
        return x * scale;
      }
    }
  };
  return { bits, uniform, normal };
}

/**
 * Random numbers of a seed, the same on every machine.
 *
 * Formula: xoshiro128** (period 2^128 - 1), seeded by a mixed counter; uniform numbers carry 53 bits; normal ones by the polar method.
 *
 * @param seed a whole number from 0 to 2^32 - 1
 * @throws RangeError for another seed
 *
 * Source: D. Blackman and S. Vigna, ACM Trans. Math. Softw. 47 (2021) 36; G. Marsaglia and T. A. Bray, SIAM Rev. 6 (1964) 260.
 */
export function generator(seed: number): Generator {
  if (!(Number.isInteger(seed) && seed >= 0 && seed < 2 ** 32)) {
    throw new RangeError(`a seed is a whole number from 0 to 4294967295, not ${seed}`);
  }
  return generatorFrom(stateOf(seed));
}
