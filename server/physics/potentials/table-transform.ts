import type { CubicPiece } from '#server/physics/numerics/cubic-spline.ts';
import { gaussPanel } from '#server/physics/numerics/gauss-rule.ts';
import type { QuarticPiece } from '#server/physics/numerics/polynomial-sine.ts';
import { polynomialSine } from '#server/physics/numerics/polynomial-sine.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import type { Table } from './table-shape.ts';
import { shapeOf } from './table-shape.ts';
import { exponentialTailPanels, exponentialTailTransform } from './table-tail.ts';
import { Q_ALLOWANCE } from './transform-error.ts';

/** r V(r) - c on one piece, in powers of the distance from its left end over its width, times the width. */
function weighted({ start, width, c }: CubicPiece, coulomb: number): QuarticPiece {
  const [c0, c1, c2, c3] = c;
  const h = width;
  return {
    start,
    width,
    scaled: [
      (start * c0 - coulomb) * h,
      (start * c1 + c0) * h ** 2,
      (start * c2 + c1) * h ** 3,
      (start * c3 + c2) * h ** 4,
      c3 * h ** 5,
    ],
  };
}

const NOTHING = { value: 0, rounding: 0 };

/** A Coulomb tail diverges forwards. */
function divergent(coulomb: number): NumericalResult {
  const value = Math.sign(coulomb) * Infinity;
  return { value, error: 0, evaluations: 0, status: 'converged' };
}

/** Below it sin(qr)/q is r to all digits. */
const isForward = (q: number, { R }: Table) => q < 1e-100 / R;

/**
 * Transform of the spline, exact but for rounding; without its Coulomb tail where that is asked.
 *
 * Formula: S(q) = c/q² + ∫_0^R (r V - c) sin(qr)/q dr + tail; polynomials of degree four times a sine on each piece, see
 *   polynomialSine, and the exponential beyond R in closed form. c is that of a Coulomb tail, 0 otherwise.
 *
 * @param table pieces and tail
 * @param norm ∫ r² |V - c/r| dr
 * @param cutTail leaves c/q² out
 * @returns S in eV·angstrom³ as a function of q in 1/angstrom; Infinity at q = 0 with a Coulomb tail
 */
export function closedTransform(
  table: Table,
  norm: number,
  cutTail = false,
): (q: number) => NumericalResult {
  const { pieces, exponential, coulomb, R } = table;
  const quartics = pieces.map((piece) => weighted(piece, coulomb));
  const v = shapeOf(table);
  const forward = pieces.reduce(
    (sum, { start, width }) =>
      sum + gaussPanel((r) => r * (r * v(r) - coulomb), start, start + width, 8).value,
    0,
  );
  const last = exponential ? R + 3 * exponential.length : R;
  return (q) => {
    const still = isForward(q, table);
    const hasTail = coulomb !== 0 && !cutTail;
    if (still && hasTail) return divergent(coulomb);
    const inner = still
      ? { value: forward, rounding: 8 * UNIT_ROUNDOFF * norm }
      : polynomialSine(quartics, q);
    const outer = exponential ? exponentialTailTransform(exponential, still ? 0 : q) : NOTHING;
    const point = hasTail ? coulomb / (q * q) : 0;
    const value = point + inner.value + outer.value;
    const slope = norm * Math.min(1.3, (q * last) ** 2) + 2 * Math.abs(point);
    const rounding = inner.rounding + outer.rounding + table.splineRounding;
    const error =
      rounding +
      (Q_ALLOWANCE + 2 * UNIT_ROUNDOFF) * slope +
      3 * UNIT_ROUNDOFF * (Math.abs(value) + Math.abs(point)) +
      SMALLEST_NORMAL;
    return { value, error, evaluations: 0, status: 'converged' };
  };
}

/** The same by quadrature between the rows, the Coulomb tail closed. */
export function tableQuadrature(table: Table, norm: number): (q: number) => NumericalResult {
  const { pieces, exponential, coulomb } = table;
  const v = shapeOf(table);
  const knots = pieces.map(({ start }) => start);
  const tail = exponential ? exponentialTailPanels(exponential) : { edges: [], remainder: 0 };
  const rest = radialQuadrature(
    {
      integrand: (r) => r * v(r) - coulomb,
      edges: [...knots, table.R, ...tail.edges],
      tail: tail.remainder,
    },
    norm,
  );
  return (q) => {
    if (isForward(q, table) && coulomb !== 0) return divergent(coulomb);
    const part = rest(q);
    const point = coulomb === 0 ? 0 : coulomb / (q * q);
    const error =
      part.error +
      table.splineRounding +
      (4 * UNIT_ROUNDOFF + 2 * Q_ALLOWANCE) * Math.abs(point) +
      12 * UNIT_ROUNDOFF * norm;
    return { ...part, value: point + part.value, error };
  };
}
