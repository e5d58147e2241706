/** A cubic on [start, start + width]: Σ c_k t^k, t = x - start. */
export interface CubicPiece {
  start: number;
  width: number;
  c: readonly [number, number, number, number];
}

/** Slopes at the points from the tridiagonal system of a twice continuous spline, not-a-knot at both ends. */
function slopesOf(h: readonly number[], delta: readonly number[]): number[] {
  const last = h.length;
  const at = (list: readonly number[], i: number) => list[i] ?? NaN;
  const diagonal: number[] = [at(h, 1)];
  const first = at(h, 0) + at(h, 1);
  const upper: number[] = [first];
  const right: number[] = [
    ((at(h, 0) + 2 * first) * at(h, 1) * at(delta, 0) + at(h, 0) ** 2 * at(delta, 1)) / first,
  ];
  const eliminate = (lower: number, middle: number, above: number, rhs: number) => {
    const i = diagonal.length - 1;
    const factor = lower / at(diagonal, i);
    diagonal.push(middle - factor * at(upper, i));
    upper.push(above);
    right.push(rhs - factor * at(right, i));
  };
  for (let i = 1; i < last; i++) {
    const [before, after] = [at(h, i - 1), at(h, i)];
    const rhs = 3 * (after * at(delta, i - 1) + before * at(delta, i));
    eliminate(after, 2 * (before + after), before, rhs);
  }
  const [a, b] = [at(h, last - 1), at(h, last - 2)];
  const end = a + b;
  const rhs = (a ** 2 * at(delta, last - 2) + (2 * end + a) * b * at(delta, last - 1)) / end;
  eliminate(end, b, 0, rhs);
  const slopes = Array.from<number>({ length: last + 1 });
  slopes[last] = at(right, last) / at(diagonal, last);
  for (let i = last - 1; i >= 0; i--) {
    slopes[i] = (at(right, i) - at(upper, i) * at(slopes, i + 1)) / at(diagonal, i);
  }
  return slopes;
}

/**
 * Interpolating cubic spline with the not-a-knot condition: the third derivative is continuous at the second and at the last
 * but one point, so that a cubic is reproduced.
 *
 * Formula: on each interval the cubic with the given values and slopes at its ends; slopes from h_i s_{i-1} + 2(h_{i-1} + h_i) s_i
 * + h_{i-1} s_{i+1} = 3(h_i d_{i-1} + h_{i-1} d_i), h widths, d slopes of the chords.
 *
 * @param x at least four points, ascending, finite
 * @param y values
 * @returns pieces in order, coefficients in powers of the distance from the left end; rounding some 30 u of the values nearby
 * @throws RangeError for fewer than four points or points that do not ascend
 *
 * Source: C. de Boor, A Practical Guide to Splines (1978), ch. IV.
 */
export function cubicSpline(x: readonly number[], y: readonly number[]): CubicPiece[] {
  if (!(x.length >= 4 && y.length === x.length)) {
    throw new RangeError(`a spline through ${x.length} points; at least four are needed`);
  }
  const h = x.slice(1).map((right, i) => right - (x[i] ?? NaN));
  if (!h.every((width) => width > 0 && width < Infinity)) {
    throw new RangeError('the points of a spline must ascend');
  }
  const delta = h.map((width, i) => ((y[i + 1] ?? NaN) - (y[i] ?? NaN)) / width);
  const slopes = slopesOf(h, delta);
  return h.map((width, i): CubicPiece => {
    const [left, right, chord] = [slopes[i] ?? NaN, slopes[i + 1] ?? NaN, delta[i] ?? NaN];
    const c2 = (3 * chord - 2 * left - right) / width;
    const c3 = (left + right - 2 * chord) / width / width;
    return { start: x[i] ?? NaN, width, c: [y[i] ?? NaN, left, c2, c3] };
  });
}

/** The straight lines through the same points. */
export function linearSpline(x: readonly number[], y: readonly number[]): CubicPiece[] {
  return x.slice(1).map((right, i): CubicPiece => {
    const [start, value] = [x[i] ?? NaN, y[i] ?? NaN];
    const width = right - start;
    return { start, width, c: [value, ((y[i + 1] ?? NaN) - value) / width, 0, 0] };
  });
}

/** Index of the piece that holds x; the outermost ones hold what lies beyond. */
export function pieceAt(pieces: readonly CubicPiece[], x: number): number {
  let low = 0;
  let high = pieces.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((pieces[middle]?.start ?? Infinity) <= x) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Value of a piece at x. */
export function pieceValue({ start, c }: CubicPiece, x: number): number {
  const t = x - start;
  return c[0] + t * (c[1] + t * (c[2] + t * c[3]));
}
