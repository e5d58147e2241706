import { logGamma } from './complex-log-gamma.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';
import { NeumaierSum } from './sum.ts';

export interface CoulombPhases {
  /** sigma_0 … sigma_lMax, rad, not reduced by multiples of 2π. */
  sigma: Float64Array;
  /** Bounds of their errors, rad. */
  error: Float64Array;
}

/**
 * Coulomb phase shifts of all waves.
 *
 * Formula: sigma_0 = arg Γ(1 + i eta), sigma_l = sigma_{l-1} + arctan(eta/l).
 *
 * @param lMax highest order, integer >= 0
 * @param eta Sommerfeld parameter, either sign, no unit
 * @returns lMax + 1 phases; error some u of |eta| ln|eta| and of sigma_l itself
 * @throws RangeError outside the domain
 *
 * Validity: |eta| to 1e9, where the error is 1e-6.
 *
 * Source: DLMF 33.2.10, 5.5.1.
 */
export function coulombPhases(lMax: number, eta: number): CoulombPhases {
  if (!(Number.isInteger(lMax) && lMax >= 0)) throw new RangeError(`order ${lMax} is no count`);
  if (!(Math.abs(eta) <= 1e9)) throw new RangeError(`sigma_l is asked for eta = ${eta}`);
  const first = logGamma(1, eta);
  const sigma = new Float64Array(lMax + 1);
  const error = new Float64Array(lMax + 1);
  const sum = new NeumaierSum();
  sum.add(first.im);
  let lost = first.imError;
  for (let l = 0; l <= lMax; l++) {
    if (l > 0) {
      const step = Math.atan2(eta, l);
      sum.add(step);
      lost += 2 * UNIT_ROUNDOFF * Math.abs(step);
    }
    sigma[l] = sum.value;
    error[l] = lost + 2 * UNIT_ROUNDOFF * Math.abs(sum.value);
  }
  return { sigma, error };
}
