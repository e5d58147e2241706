interface ComplexNumber {
  re: number;
  im: number;
}

/** A value of the interpolant, and what its last coefficients leave open. */
export interface Interpolated extends ComplexNumber {
  error: number;
}

/** An interpolant that is computed where it is asked. */
export interface ChebyshevInterpolant {
  at: (x: number) => Interpolated;
  /** Calls of the function so far. */
  evaluations: () => number;
}

interface Fit {
  re: Float64Array;
  im: Float64Array;
  /** Sum of the last coefficients. */
  tail: number;
}
interface Panel {
  a: number;
  b: number;
  /** Tail of the panel that was cut. */
  before: number;
  fit: Fit | null;
  halves: [Panel, Panel] | null;
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
/** A tail that a cut has not made smaller than this share, and that is not far above the tolerance, is noise. */
const STUCK = 0.25;
const NEAR = 1000;
/** Tails to the error: what the coefficients leave, or their noise. */
const SAFETY = 4;

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

function fitOn(f: (x: number) => ComplexNumber, a: number, b: number): Fit {
  const half = (b - a) / 2;
  const values = Array.from(NODES, (t) => f(a + half + half * t));
  const re = project(Float64Array.from(values, (value) => value.re));
  const im = project(Float64Array.from(values, (value) => value.im));
  return { re, im, tail: tailOf(re) + tailOf(im) };
}

function halvesOf(panel: Panel, before: number): [Panel, Panel] {
  const middle = panel.a + (panel.b - panel.a) / 2;
  return (panel.halves ??= [
    { a: panel.a, b: middle, before, fit: null, halves: null },
    { a: middle, b: panel.b, before, fit: null, halves: null },
  ]);
}

function isGood({ fit, before }: Panel, tolerance: number): boolean {
  const tail = fit?.tail ?? Infinity;
  return tail <= tolerance || (tail > STUCK * before && tail <= NEAR * tolerance);
}

/** Index of the panel that holds x. */
function find(panels: readonly Panel[], x: number): number {
  let [low, high] = [0, panels.length - 1];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (x <= (panels[middle]?.b ?? Infinity)) high = middle;
    else low = middle + 1;
  }
  return low;
}

/**
 * Interpolant of a costly smooth complex function, piece by piece, each computed when it is first asked.
 *
 * Formula: Chebyshev sums of degree 23 on panels that are bisected about the point asked until their last three coefficients are below
 *   the tolerance; the function itself once too many calls have been spent on panels.
 *
 * @param f finite on every interval between edges
 * @param edges ascending, the first and the last the ends of the domain
 * @param tolerance absolute, for arguments up to x; where cuts no longer help, the noise of f is met and said in the error
 * @param mostCalls calls of f to be spent on panels
 *
 * Source: textbook; L. N. Trefethen, Approximation Theory and Approximation Practice (2013).
 */
export function chebyshevInterpolant(
  f: (x: number) => ComplexNumber,
  edges: readonly number[],
  tolerance: (x: number) => number,
  mostCalls = 10_000,
): ChebyshevInterpolant {
  let evaluations = 0;
  const pieces = edges
    .slice(1)
    .map((b, i): Panel => ({ a: edges[i] ?? b, b, before: Infinity, fit: null, halves: null }));
  return {
    evaluations: () => evaluations,
    at: (x) => {
      let panel = pieces[find(pieces, x)];
      while (panel) {
        const { a, b } = panel;
        if (panel.fit === null) {
          if (evaluations >= mostCalls) break;
          panel.fit = fitOn(f, a, b);
          evaluations += ORDER;
        }
        const { re, im, tail } = panel.fit;
        const half = (b - a) / 2;
        if (isGood(panel, tolerance(b))) {
          const t = (x - a - half) / half;
          return { re: clenshaw(re, t), im: clenshaw(im, t), error: SAFETY * tail };
        }
        panel = halvesOf(panel, tail)[x <= a + half ? 0 : 1];
      }
      evaluations += 1;
      return { ...f(x), error: 0 };
    },
  };
}
