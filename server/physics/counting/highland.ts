/** g/cm² of material in radiation lengths, and the particle that crosses it. */
export interface Crossing {
  /** Thickness in radiation lengths, above 0. */
  radiationLengths: number;
  /** Momentum times c, eV. */
  momentum: number;
  /** Speed as a fraction of c. */
  beta: number;
  charge: number;
}

const SCALE = 13.6e6;
export const HIGHLAND_RANGE = { least: 1e-3, most: 100 } as const;

/**
 * Plane angle of multiple scattering, rms of the central 98 %.
 *
 * Formula: θ0 = (13.6 MeV/β c p) |z| sqrt(x/X0) [1 + 0.038 ln(x z²/(X0 β²))]; the angle in space is sqrt(2) times that.
 *
 * @param crossing thickness above 0, momentum times c in eV
 * @returns rad, or null outside 1e-3 < x/X0 < 100, where the fit was not made
 *
 * Validity: within 11 % in this range for singly charged particles with β near 1; no tails; slow ions are outside.
 *
 * Source: V. L. Highland, Nucl. Instrum. Methods 129 (1975) 497; G. R. Lynch and O. I. Dahl, Nucl. Instrum. Methods B 58 (1991) 6.
 */
export function highlandAngle({
  radiationLengths: x,
  momentum,
  beta,
  charge,
}: Crossing): number | null {
  if (!(x > HIGHLAND_RANGE.least * (1 - 1e-9) && x < HIGHLAND_RANGE.most)) return null;
  const z = Math.abs(charge);
  const logarithm = 1 + 0.038 * Math.log((x * z * z) / (beta * beta));
  const angle = (SCALE / (beta * momentum)) * z * Math.sqrt(x) * logarithm;
  return angle > 0 ? angle : null;
}
