import type { LegendrePanel } from './legendre-panels.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';
import { sphericalBesselArray } from './spherical-bessel.ts';

/** Measured against 60 digits for orders to 63: below 24 u of the envelope, 12 u of the value beyond it. */
const BESSEL_ROUNDING = 32;

/**
 * Spherical Fourier transform of a function given by panels, without sampling it again.
 *
 * Formula: ∫ f(x) sin(qx)/q dx = Σ (2h/q) Σ_n c_n [sin(qm) Re i^n + cos(qm) Im i^n] j_n(qh), since ∫_{-1}^{1} P_n(t) e^{iwt} dt = 2 i^n j_n(w).
 *
 * @param panels of f, x >= 0
 * @param q wave number, >= 0; at 0 the integral of x f(x)
 * @returns value with a bound of its error: that of the panels, rounding (of the phase too)
 *
 * Source: N. S. Bakhvalov and L. G. Vasil'eva, USSR Comput. Math. Math. Phys. 8 (1968) 241; DLMF 18.17.19.
 */
export function panelSineTransform(
  panels: readonly LegendrePanel[],
  q: number,
): { value: number; error: number } {
  let value = 0;
  let error = 0;
  for (const { middle, half, c, truncation, noise, noiseMoment } of panels) {
    const reach = q * (middle + half) < 1 ? middle + half : 1 / q;
    error += truncation * 2 * half * reach + (q * noiseMoment > noise ? noise / q : noiseMoment);
    const w = q * half;
    if (q * (middle + half) < 1e-100) {
      const [c0 = 0, c1 = 0] = c;
      value += 2 * half * (middle * c0 + (half * c1) / 3);
      error += 8 * UNIT_ROUNDOFF * 2 * half * (middle * Math.abs(c0) + half * Math.abs(c1));
      continue;
    }
    const j = sphericalBesselArray(c.length - 1, w);
    const envelope = 1 / Math.max(1, w);
    const sums: [number, number] = [0, 0];
    const sizes: [number, number] = [0, 0];
    for (let n = 0; n < c.length; n++) {
      const [coefficient, bessel] = [c[n] ?? 0, j[n] ?? 0];
      const odd = n % 2 === 0 ? 0 : 1;
      sums[odd] += n % 4 < 2 ? coefficient * bessel : -coefficient * bessel;
      sizes[odd] += Math.abs(coefficient) * (n <= w ? envelope : Math.abs(bessel));
    }
    const phase = q * middle;
    value += (2 * half * (Math.sin(phase) * sums[0] + Math.cos(phase) * sums[1])) / q;
    const sine = Math.min(1, phase);
    const functions = BESSEL_ROUNDING * (sine * sizes[0] + sizes[1]);
    const ofPhase = 3 * phase * (sizes[0] + sine * sizes[1]);
    error += ((2 * half) / q) * UNIT_ROUNDOFF * (functions + ofPhase);
  }
  return { value, error };
}
