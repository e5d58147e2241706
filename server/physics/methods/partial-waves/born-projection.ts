import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import type { FirstBorn } from '../born1.ts';

const RULE = gaussRule(16);
/** l times the angle of one panel of 16 points. */
const TURN = 14;

/**
 * First-order phases from the first-order amplitude, whatever the tail of the potential.
 *
 * Formula: (k/2) ∫ f1 P_l(cos theta) sin(theta) d theta, 16 points on panels of 14/lMax rad; P_l by the recurrence of differences.
 *
 * @param born amplitude without Coulomb tail
 * @param k 1/angstrom
 * @param lMax highest order
 * @returns lMax + 1 phases, rad; absolute error about 1e-16 k ∫|f1| d cos(theta)
 *
 * Source: L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), sec. 38.
 */
export function projectedBorn(born: FirstBorn, k: number, lMax: number) {
  const re = new Float64Array(lMax + 1);
  const im = new Float64Array(lMax + 1);
  const keep = Float64Array.from(re, (_, l) => l / (l + 1));
  const turn = Float64Array.from(re, (_, l) => (2 * l + 1) / (l + 1));
  const count = Math.max(8, Math.ceil((Math.PI * (lMax + 1)) / TURN));
  const half = Math.PI / count / 2;
  for (let panel = 0; panel < count; panel++) {
    for (let n = 0; n < RULE.nodes.length; n++) {
      const theta = half * (2 * panel + 1 + (RULE.nodes[n] ?? 0));
      const t = Math.sin(theta / 2);
      const back = theta > Math.PI / 2;
      const gap = 2 * (back ? Math.cos(theta / 2) ** 2 : t * t);
      const f = born.shortRange(2 * k * t);
      const weight = (k / 2) * half * (RULE.weights[n] ?? 0) * Math.sin(theta);
      let a = weight * f.re;
      let b = weight * f.im;
      let value = 1;
      let difference = 0;
      for (let l = 0; l <= lMax; l++) {
        re[l] = (re[l] ?? 0) + a * value;
        if (b !== 0) im[l] = (im[l] ?? 0) + b * value;
        difference = (keep[l] ?? 0) * difference - (turn[l] ?? 0) * gap * value;
        value += difference;
        if (back) {
          a = -a;
          b = -b;
        }
      }
    }
  }
  return { re, im };
}
