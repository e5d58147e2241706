import { integratePanels } from './panel-quadrature.ts';
import type { NumericalResult } from './result.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

/** exp(-t) ends here. */
const CUT = 48;
const WIDEST = 12;

/** Panels that double from the scale of g on, none wider than exp(-t) allows. */
function edgesOf(scale: number): number[] {
  const edges = [];
  for (let t = Math.min(scale, WIDEST); t < CUT; t += Math.min(t, WIDEST)) edges.push(t);
  return edges;
}

/**
 * Oscillating tail of a sine transform whose integrand falls off too slowly to be cut.
 *
 * Formula: ∫_R^∞ g(r) sin(qr)/q dr = (1/q²) ∫_0^∞ Re[e^{iqR} g(R + it/q)] e^{-t} dt: the path is turned into the direction in
 * which e^{iqr} decays.
 *
 * @param g analytic continuation of g(r) into Re r > 0, Im r > 0, where it must have no singularity and vanish at infinity;
 *   gives [Re g, Im g]
 * @param R start of the tail, > 0; g must vary over no less than R
 * @param q wave number, > 0
 * @returns the tail with a bound of its error: two rules, rounding (of the phase qR too), the cut at e^{-48}
 *
 * Source: textbook (steepest descent); P. J. Davis and P. Rabinowitz, Methods of Numerical Integration, 2nd ed. (1984), sec. 3.
 */
export function sineTail(
  g: (re: number, im: number) => readonly [number, number],
  R: number,
  q: number,
): NumericalResult {
  const phase = q * R;
  const [cosine, sine] = [Math.cos(phase), Math.sin(phase)];
  const turned = (t: number) => {
    const [re, im] = g(R, t / q);
    return (cosine * re - sine * im) * Math.exp(-t);
  };
  const result = integratePanels(turned, 0, CUT, Infinity, { breakpoints: edgesOf(phase) });
  const [re, im] = g(R, 0);
  const size = Math.hypot(re, im);
  const lost = size * (2 * Math.exp(-CUT) + UNIT_ROUNDOFF * (4 + 2 * phase));
  return { ...result, value: result.value / q / q, error: (result.error + lost) / q / q };
}
