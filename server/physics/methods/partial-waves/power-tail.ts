import { riccatiBessel } from '#server/physics/numerics/riccati-bessel.ts';
import type { RadialField } from '#server/physics/numerics/radial-trial.ts';

/** Points on [-1, 1] where a smooth function is differentiated, and the matrix that does it. */
const COUNT = 14;
const NODES = Float64Array.from(
  { length: COUNT },
  (_, i) => -Math.cos((i * Math.PI) / (COUNT - 1)),
);
const SLOPES = slopeMatrix();
function slopeMatrix(): Float64Array[] {
  const weight = (i: number) => (i % 2 === 0 ? 1 : -1) * (i === 0 || i === COUNT - 1 ? 0.5 : 1);
  return Array.from(NODES, (x, i) => {
    const row = Float64Array.from(NODES, (y, j) => (i === j ? 0 : weight(j) / weight(i) / (x - y)));
    // What a constant must give.
    row[i] = -row.reduce((sum, one) => sum + one, 0);
    return row;
  });
}
const MOST_ROUNDS = 12;

/**
 * Integral of a smooth tail times the square of the outgoing wave.
 *
 * Formula: ∫_R^∞ U h_l² dr = -g h_l² at R, h = G + iF, g' + 2 (h'/h) g = U, where g does not oscillate: g = (U - g')/(2 h'/h), again and
 *   again, on Chebyshev points of [R, 1.5 R].
 *
 * @param field U, first component
 * @param k 1/angstrom
 * @param R angstrom, at least twice the turning point of lMax and 40/k
 * @param lMax highest order
 * @returns real and imaginary part by l, 1/angstrom, relative error about 1e-8 at worst
 *
 * Source: D. Levin, Math. Comput. 38 (1982) 531, with the rounds of an asymptotic series in place of a collocation.
 */
export function tailOfSquare(field: RadialField, k: number, R: number, lMax: number) {
  const half = R / 4;
  const out = new Float64Array(field.components);
  const radii = Float64Array.from(NODES, (x) => R + half * (1 + x));
  const U = Float64Array.from(radii, (r) => {
    field.at(r, out);
    return out[0] ?? 0;
  });
  const waves = Array.from(radii, (r) => {
    const F = new Float64Array(lMax + 2);
    const G = new Float64Array(lMax + 2);
    riccatiBessel(k * r, F, G);
    return { F, G };
  });
  const re = new Float64Array(lMax + 1);
  const im = new Float64Array(lMax + 1);
  for (let l = 0; l <= lMax; l++) {
    // 1/(2 h'/h), h' = k [(l+1)/x h_l - h_{l+1}]
    const inverse = Array.from(radii, (r, i) => {
      const { F, G } = waves[i] ?? { F: out, G: out };
      const [f, g, f1, g1] = [F[l] ?? 0, G[l] ?? 0, F[l + 1] ?? 0, G[l + 1] ?? 0];
      const slope = (l + 1) / (k * r);
      const [dRe, dIm] = [k * (slope * g - g1), k * (slope * f - f1)];
      const size = 2 * (dRe * dRe + dIm * dIm);
      return { re: (g * dRe + f * dIm) / size, im: (f * dRe - g * dIm) / size };
    });
    const g = smoothSolution(U, inverse, half);
    const { F, G } = waves[0] ?? { F: out, G: out };
    const [f, h] = [F[l] ?? 0, G[l] ?? 0];
    const [sRe, sIm] = [(h - f) * (h + f), 2 * h * f];
    re[l] = -(g.re * sRe - g.im * sIm);
    im[l] = -(g.re * sIm + g.im * sRe);
  }
  return { re, im };
}

/** g at the first point; the rounds end when they no longer gain. */
function smoothSolution(
  U: Float64Array,
  inverse: readonly { re: number; im: number }[],
  half: number,
): { re: number; im: number } {
  let re = Float64Array.from(U, (u, i) => u * (inverse[i]?.re ?? 0));
  let im = Float64Array.from(U, (u, i) => u * (inverse[i]?.im ?? 0));
  let change = Infinity;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const [dRe, dIm] = [slopes(re, half), slopes(im, half)];
    const next = Array.from(U, (u, i) => {
      const { re: a, im: b } = inverse[i] ?? { re: 0, im: 0 };
      const [x, y] = [u - (dRe[i] ?? 0), -(dIm[i] ?? 0)];
      return { re: a * x - b * y, im: a * y + b * x };
    });
    const [first] = next;
    const moved = Math.hypot((first?.re ?? 0) - (re[0] ?? 0), (first?.im ?? 0) - (im[0] ?? 0));
    if (!(moved < change)) break;
    change = moved;
    re = Float64Array.from(next, (one) => one.re);
    im = Float64Array.from(next, (one) => one.im);
  }
  return { re: re[0] ?? 0, im: im[0] ?? 0 };
}

function slopes(values: Float64Array, half: number): Float64Array {
  return Float64Array.from(SLOPES, (row) =>
    row.reduce((sum, factor, j) => sum + (factor * (values[j] ?? 0)) / half, 0),
  );
}
