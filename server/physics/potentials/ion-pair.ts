import type { FormParameter } from './types.ts';

function atomicNumberParameter(
  key: 'Z1' | 'Z2',
  label: string,
  symbol: string,
  start: number,
): FormParameter {
  return {
    key,
    label,
    symbol,
    dimension: 'number',
    min: 1,
    max: 200,
    integer: true,
    default: start,
    description: `Atomic number: strength and screening length rest on both, whatever charge state the beam has.`,
  };
}

/** The two atoms of a potential between neutral atoms. */
export const ionPairParameters: FormParameter[] = [
  atomicNumberParameter('Z1', 'Atomic number of the projectile', 'Z_1', 2),
  atomicNumberParameter('Z2', 'Atomic number of the target', 'Z_2', 79),
];
