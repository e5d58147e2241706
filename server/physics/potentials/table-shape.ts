import type { CubicPiece } from '#server/physics/numerics/cubic-spline.ts';
import {
  cubicSpline,
  linearSpline,
  pieceAt,
  pieceValue,
} from '#server/physics/numerics/cubic-spline.ts';
import { gaussPanel } from '#server/physics/numerics/gauss-rule.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { ExponentialTail, TableTail } from './table-tail.ts';
import { exponentialTailOf, exponentialTailPanels } from './table-tail.ts';

/** Everything about a table that its transform needs. */
export interface Table {
  pieces: CubicPiece[];
  R: number;
  exponential: ExponentialTail | null;
  /** c of a tail c/r. */
  coulomb: number;
  /** Bound of what the rounding of the spline does to S. */
  splineRounding: number;
}

/** V keeps its first value inside the first point. */
function withCore(pieces: CubicPiece[]): CubicPiece[] {
  const [first] = pieces;
  if (!first || first.start === 0) return pieces;
  return [{ start: 0, width: first.start, c: [first.c[0], 0, 0, 0] }, ...pieces];
}

/** The coefficients of a piece are good to some 40 u of the values about it. */
function splineRounding(pieces: readonly CubicPiece[]): number {
  const size = (i: number) => Math.abs(pieces[i]?.c[0] ?? 0);
  return pieces.reduce((sum, { start, width }, i) => {
    const largest = Math.max(size(i - 1), size(i), size(i + 1), size(i + 2));
    const shell = width * (start * start + start * width + (width * width) / 3);
    return sum + 40 * UNIT_ROUNDOFF * largest * shell;
  }, 0);
}

export function tableOf(r: readonly number[], V: readonly number[], tail: TableTail): Table {
  const R = r.at(-1) ?? NaN;
  const pieces = withCore(cubicSpline(r, V));
  return {
    pieces,
    R,
    exponential: tail === 'exponential' ? exponentialTailOf(r, V) : null,
    coulomb: tail === 'coulomb' ? R * (V.at(-1) ?? NaN) : 0,
    splineRounding: splineRounding(pieces),
  };
}

/** The same table with straight lines between its rows. */
export function straightened(table: Table, r: readonly number[], V: readonly number[]): Table {
  return { ...table, pieces: withCore(linearSpline(r, V)) };
}

export function shapeOf({ pieces, R, exponential, coulomb }: Table): (r: number) => number {
  return (r) => {
    if (r < R) {
      const piece = pieces[pieceAt(pieces, r)];
      return piece ? pieceValue(piece, r) : NaN;
    }
    if (exponential) return exponential.V * Math.exp((R - r) / exponential.length);
    return coulomb / r;
  };
}

/** ∫ f over the table and its exponential tail, for integrands that are polynomials on each piece. */
export function integral({ pieces, R, exponential }: Table, f: (r: number) => number): number {
  const inner = pieces.reduce(
    (sum, { start, width }) => sum + gaussPanel(f, start, start + width, 16).value,
    0,
  );
  if (!exponential) return inner;
  const { edges } = exponentialTailPanels(exponential);
  return edges.reduce(
    (sum, edge, i) => sum + gaussPanel(f, i === 0 ? R : (edges[i - 1] ?? R), edge, 64).value,
    inner,
  );
}

/** ∫_from^∞ V dr. */
export function lineOf(table: Table): (from: number) => number | null {
  const { pieces, R, exponential, coulomb } = table;
  const v = shapeOf(table);
  return (from) => {
    if (coulomb !== 0) return null;
    const inner = pieces.reduce((sum, { start, width }) => {
      const [a, b] = [Math.max(from, start), start + width];
      return a < b ? sum + gaussPanel(v, a, b, 8).value : sum;
    }, 0);
    const outer = exponential
      ? exponential.V * exponential.length * Math.exp((R - Math.max(from, R)) / exponential.length)
      : 0;
    return inner + outer;
  };
}
