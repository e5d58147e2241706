import { fermiDirac } from '#server/physics/numerics/fermi-dirac.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { type ChargeShape, withinFrom } from './charge-shapes.ts';
import { surfaceEdges } from './woods-saxon.ts';
import { woodsSaxonTransform } from './woods-saxon-transform.ts';

/**
 * Two-parameter Fermi distribution, rho ∝ 1/(1 + exp((r-c)/a)).
 *
 * Formula: F(q) = W(q)/W(0), W the transform of the Woods-Saxon shape;
 *   1 - r s(r) = [a² r F2(eta) + 2a³ F3(eta)]/W(0), eta = (c-r)/a, with Fermi-Dirac integrals of order 2 and 3;
 *   <r²> = 12 a² F5(c/a)/F3(c/a).
 *
 * @param c half-density radius, angstrom, > 0
 * @param a diffuseness, angstrom, > 0
 *
 * Source: H. de Vries, C. W. de Jager and C. de Vries, At. Data Nucl. Data Tables 36 (1987) 495; integrals derived here from
 * 1 - r s(r) = ∫_r^∞ 4π rho r' (r' - r) dr'.
 */
export function fermiCharge(c: number, a: number): ChargeShape {
  const transform = woodsSaxonTransform(c, a);
  const whole = transform(0);
  const range = Math.max(c, a);
  const missing = (r: number) => {
    const eta = (c - r) / a;
    const [first, second] = [fermiDirac(2, eta).value, fermiDirac(3, eta).value];
    return (a ** 2 * (r * first + 2 * a * second)) / whole.value;
  };
  const edges = surfaceEdges(c, a);
  const last = edges[edges.length - 1] ?? 0;
  const beyond = a ** 3 * (last ** 2 + 4 * last * a + 4 * a ** 2) * Math.exp((c - last) / a);
  return {
    formFactor: (q) => {
      const part = transform(q);
      const value = part.value / whole.value;
      const error = (part.error + Math.abs(value) * whole.error) / whole.value;
      return { ...part, value, error: error + 2 * UNIT_ROUNDOFF * Math.abs(value) };
    },
    within: withinFrom(missing, range),
    missing: { integrand: missing, edges, tail: beyond / whole.value },
    meanSquare: (12 * a ** 2 * fermiDirac(5, c / a).value) / fermiDirac(3, c / a).value,
    range,
    breakpoints: [],
  };
}
