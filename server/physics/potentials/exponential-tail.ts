/** exp(-x) is below 1e-17, also of one half, from here. */
export const E_FOLDINGS = 40;

/** Where integrals of exp(-r/a) are cut, in a, and the edges of their panels. */
const CUT = 48;
const EDGES = [0, 6, 18, CUT];

export function exponentialEdges(a: number): number[] {
  return EDGES.map((x) => x * a);
}

/** Bound of ∫ r² exp(-r/a) dr beyond the last edge: a³(x² + 2x + 2) e^{-x}. */
export function exponentialRemainder(a: number): number {
  return a ** 3 * (CUT ** 2 + 2 * CUT + 2) * Math.exp(-CUT);
}
