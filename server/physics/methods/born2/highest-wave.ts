import { fallAt } from '#server/physics/numerics/bessel-products.ts';
import type { MeshPanel } from './radial-mesh.ts';

/** ln of what the last wave may be of the first: 1e-19. */
const FADED = Math.log(1e-19);
const MOST = 1_000_000;

/**
 * Highest wave that counts in second order.
 *
 * Formula: the smallest l with (2l+1) max_r |w U|² x² j_l² below 1e-19 of the same for l = 0, x² j_l² = exp(-2(ν acosh(ν/x) -
 *   sqrt(ν² - x²))) beyond the turning point, ν = l + ½.
 *
 * @param panels of w U
 * @param k wave number, 1/angstrom
 */
export function highestWave(panels: readonly MeshPanel[], k: number): number {
  const points = panels.flatMap(({ r, re, im }) =>
    Array.from(r, (at, i) => ({
      x: k * at,
      weight: 2 * Math.log(Math.hypot(re[i] ?? 0, im?.[i] ?? 0)),
    })),
  );
  const size = (l: number) => {
    let most = -Infinity;
    for (const { x, weight } of points) most = Math.max(most, weight - 2 * fallAt(l, x));
    return most + Math.log(2 * l + 1);
  };
  const enough = size(0) + FADED;
  let high = 1;
  while (size(high) > enough && high < MOST) high *= 2;
  let low = high >> 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (size(middle) > enough) low = middle;
    else high = middle;
  }
  return high;
}
