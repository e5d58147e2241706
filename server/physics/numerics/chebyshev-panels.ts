interface ComplexNumber {
  re: number;
  im: number;
}

interface Panel {
  a: number;
  b: number;
  re: Float64Array;
  im: Float64Array;
}

/** An interpolant that is computed where it is asked. */
export interface ChebyshevInterpolant {
  at: (x: number) => ComplexNumber;
  /** Calls of the function so far. */
  evaluations: () => number;
}

const ORDER = 24;
const NODES = Float64Array.from({ length: ORDER }, (_, i) =>
  Math.cos(((2 * i + 1) * Math.PI) / (2 * ORDER)),
);
const PROJECTION = Array.from({ length: ORDER }, (_, n) =>
  Float64Array.from({ length: ORDER }, (_unused, i) => {
    const turns = (n * (2 * i + 1)) % (4 * ORDER);
    return ((n === 0 ? 1 : 2) / ORDER) * Math.cos((turns * Math.PI) / (2 * ORDER));
  }),
);
/** Coefficients at the end whose size says what is missing. */
const LAST = 3;
const DEEPEST = 24;

const project = (values: Float64Array): Float64Array =>
  Float64Array.from(PROJECTION, (row) =>
    row.reduce((sum, weight, i) => sum + weight * (values[i] ?? 0), 0),
  );

function tailOf(c: Float64Array): number {
  let tail = 0;
  for (let n = ORDER - LAST; n < ORDER; n++) tail += Math.abs(c[n] ?? 0);
  return tail;
}

function clenshaw(c: Float64Array, t: number): number {
  let above = 0;
  let value = 0;
  for (let n = ORDER - 1; n > 0; n--) {
    const next = (c[n] ?? 0) + 2 * t * value - above;
    above = value;
    value = next;
  }
  return (c[0] ?? 0) + t * value - above;
}

/** Index of the panel that holds x. */
function find(ends: readonly number[], x: number): number {
  let [low, high] = [0, ends.length - 1];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (x <= (ends[middle] ?? Infinity)) high = middle;
    else low = middle + 1;
  }
  return low;
}

/**
 * Interpolant of a costly smooth complex function, piece by piece, each computed when it is first asked.
 *
 * Formula: Chebyshev sums of degree 23 on panels that are bisected until their last three coefficients are below the tolerance.
 *
 * @param f finite on every interval between edges
 * @param edges ascending, the first and the last the ends of the domain; intervals are computed one by one
 * @param tolerance absolute, of either part; not below the noise of f
 * @returns interpolant, within about twice the tolerance of f
 *
 * Source: textbook; L. N. Trefethen, Approximation Theory and Approximation Practice (2013).
 */
export function chebyshevInterpolant(
  f: (x: number) => ComplexNumber,
  edges: readonly number[],
  tolerance: number,
): ChebyshevInterpolant {
  let evaluations = 0;
  const fit = (a: number, b: number, depth: number): Panel[] => {
    const half = (b - a) / 2;
    const values = Array.from(NODES, (t) => f(a + half + half * t));
    evaluations += ORDER;
    const re = project(Float64Array.from(values, (value) => value.re));
    const im = project(Float64Array.from(values, (value) => value.im));
    if (depth === 0 || (tailOf(re) <= tolerance && tailOf(im) <= tolerance)) {
      return [{ a, b, re, im }];
    }
    const middle = a + half;
    return [...fit(a, middle, depth - 1), ...fit(middle, b, depth - 1)];
  };
  const pieces = edges.slice(1).map((b, i) => ({
    a: edges[i] ?? b,
    b,
    found: null as { panels: Panel[]; ends: number[] } | null,
  }));
  const ends = pieces.map(({ b }) => b);
  return {
    evaluations: () => evaluations,
    at: (x) => {
      const piece = pieces[find(ends, x)];
      if (!piece) return f(x);
      if (piece.found === null) {
        const panels = fit(piece.a, piece.b, DEEPEST);
        piece.found = { panels, ends: panels.map(({ b }) => b) };
      }
      const panel = piece.found.panels[find(piece.found.ends, x)];
      if (!panel) return f(x);
      const half = (panel.b - panel.a) / 2;
      const t = (x - panel.a - half) / half;
      return { re: clenshaw(panel.re, t), im: clenshaw(panel.im, t) };
    },
  };
}
