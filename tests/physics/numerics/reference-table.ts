import { readFileSync } from 'node:fs';

/** A reference value of 30 digits, kept as the sum of two doubles. */
export interface Split {
  high: number;
  low: number;
}

/** computed - true, without losing the digits beyond a double. */
export function deviation(computed: number, { high, low }: Split): number {
  return Math.abs(computed - high - low);
}

export interface SpecialFunctions {
  exponentialIntegral: (Split & { x: number })[];
  legendre: (Split & { l: number; x: number })[];
  sphericalBessel: (Split & { l: number; x: number })[];
}

export function readReference<T>(path: string): T {
  const file = new URL(`../../reference/${path}`, import.meta.url);
  return JSON.parse(readFileSync(file, 'utf8')) as T;
}
