import { integratePanels } from '#server/physics/numerics/panel-quadrature.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { ChargeShape } from './charge-shapes.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { Q_ALLOWANCE } from './transform-error.ts';

/** Share of <r²>/6 that a way may lose before the next one is tried. */
const LOST = 1e-12;
/** Terms of the power series, the last of which bounds what is left out. */
const TERMS = 6;

type Transform = (q: number) => NumericalResult;

/** ∫ r^{2n+1} (1 - r s) dr/(2n+1)!, computed when they are first asked for. */
function momentsOf({ missing }: ChargeShape): () => readonly NumericalResult[] {
  let found: NumericalResult[] | undefined;
  const { integrand, edges } = missing;
  const last = edges.at(-1) ?? 0;
  return () => {
    found ??= Array.from({ length: TERMS }, (_, n) => {
      const weighted = (r: number) => {
        let power = r;
        for (let k = 2; k <= 2 * n; k += 2) power *= (r / k) * (r / (k + 1));
        return power * integrand(r);
      };
      return integratePanels(weighted, 0, last, Infinity, { breakpoints: edges });
    });
    return found;
  };
}

/** -Σ (-q²)^n M_n: for small q, where the sine is its power series. */
function bySeries(shape: ChargeShape): Transform {
  const moments = momentsOf(shape);
  return (q) => {
    let value = 0;
    let error = shape.missing.tail;
    let power = -1;
    let term = Infinity;
    let slope = 0;
    moments().forEach((moment, n) => {
      term = power * moment.value;
      value += term;
      slope += 2 * n * Math.abs(term);
      error += Math.abs(power) * moment.error + 4 * UNIT_ROUNDOFF * Math.abs(term);
      power *= -q * q;
    });
    error += Math.abs(term) + Q_ALLOWANCE * slope;
    return { value, error, evaluations: 0, status: 'converged' };
  };
}

/** (F - 1)/q², for q at which the form factor has left 1. */
function byDifference({ formFactor }: ChargeShape): Transform {
  return (q) => {
    const point = 1 / (q * q);
    const F = formFactor(q);
    const missing = F.value - 1;
    const rounding = (4 * UNIT_ROUNDOFF + 2 * Q_ALLOWANCE) * Math.abs(missing);
    return { ...F, value: missing * point, error: (F.error + rounding) * point };
  };
}

function byQuadrature({ missing, meanSquare }: ChargeShape): Transform {
  const rest = radialQuadrature(missing, meanSquare / 6);
  return (q) => {
    const part = rest(q);
    return { ...part, value: -part.value };
  };
}

/**
 * What its Coulomb tail leaves of the transform of an extended charge.
 *
 * Formula: (F(q) - 1)/q² = -∫ (1 - r s(r)) sin(qr)/q dr; the power series of the integral where q is small, the difference where F has
 * left 1, quadrature where neither will do.
 *
 * @param shape distribution of one unit of charge
 * @returns angstrom² as a function of q in 1/angstrom, >= 0, with a bound of its error; -<r²>/6 at q = 0
 *
 * Source: textbook; R. Hofstadter, Rev. Mod. Phys. 28 (1956) 214.
 */
export function chargeRemainder(shape: ChargeShape): Transform {
  const allowed = (LOST * shape.meanSquare) / 6;
  const ways = [bySeries(shape), byDifference(shape)];
  const last = byQuadrature(shape);
  return (q) => {
    for (const way of ways) {
      const found = way(q);
      if (found.error <= allowed) return found;
    }
    return last(q);
  };
}
