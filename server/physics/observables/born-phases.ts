import type { ConeSamples } from './cone-samples.ts';

export interface LargestPhase {
  /** max_l |T_l| */
  value: number;
  /** The l it belongs to. */
  l: number;
  /** Highest l looked at, or known to be smaller. */
  lMax: number;
}

/** Phase a Legendre polynomial may run through on one half panel of 16 nodes; what turns faster averages to nothing. */
const RESOLVED = 24;
const MAX_PRODUCTS = 3e7;
/** Waves taken at a time. */
const CHUNK = 64;

/** Nodes on one side of 90 degrees, finest panels first, with the recurrence of their Legendre polynomials. */
interface Side {
  /** 2 t k weight f, real and imaginary part. */
  re: Float64Array;
  im: Float64Array;
  /** 1 - |cos(theta)| */
  gap: Float64Array;
  /** Angle between the ends of the half panel, rad. */
  width: Float64Array;
  /** |P_l| and P_l - P_{l-1} for the next l. */
  value: Float64Array;
  difference: Float64Array;
  /** Nodes that still resolve P_l. */
  active: number;
  /** (-1)^l where cos(theta) < 0. */
  alternates: boolean;
}

function sideOf(samples: ConeSamples, alternates: boolean): Side {
  const { k, t, weight, width, re, im } = samples;
  const at = (list: readonly number[], i: number) => list[i] ?? 0;
  // d theta = 2 dt/sqrt(1-t²): what is fine in t is coarse backwards.
  const angle = (i: number) => (2 * at(width, i)) / Math.sqrt((1 - at(t, i)) * (1 + at(t, i)));
  const order = [...t.keys()]
    .filter((i) => at(t, i) > Math.SQRT1_2 === alternates)
    .sort((a, b) => angle(a) - angle(b));
  const pick = (value: (i: number) => number) => Float64Array.from(order, value);
  const factor = (i: number) => 2 * k * at(t, i) * at(weight, i);
  return {
    re: pick((i) => factor(i) * at(re, i)),
    im: pick((i) => factor(i) * at(im, i)),
    gap: pick((i) => 2 * (alternates ? (1 - at(t, i)) * (1 + at(t, i)) : at(t, i) ** 2)),
    width: pick(angle),
    value: new Float64Array(order.length).fill(1),
    difference: new Float64Array(order.length),
    active: order.length,
    alternates,
  };
}

/** Factors of (l+1) d_{l+1} = l d_l - (2l+1)(1-x) P_l for a chunk of l. */
function recurrence(first: number): { keep: Float64Array; turn: Float64Array } {
  const keep = new Float64Array(CHUNK);
  const turn = new Float64Array(CHUNK);
  for (let j = 0; j < CHUNK; j++) {
    const l = first + j;
    keep[j] = l / (l + 1);
    turn[j] = (2 * l + 1) / (l + 1);
  }
  return { keep, turn };
}

/** Adds one side's part of T_l for a chunk of l. */
function addChunk(side: Side, first: number, sums: { re: Float64Array; im: Float64Array }): void {
  const { keep, turn } = recurrence(first);
  const { re, im, gap, width, value, difference } = side;
  while (side.active > 0 && first * (width[side.active - 1] ?? 0) > RESOLVED) side.active -= 1;
  for (let i = 0; i < side.active; i++) {
    let a = re[i] ?? 0;
    let b = im[i] ?? 0;
    const g = gap[i] ?? 0;
    let p = value[i] ?? 0;
    let d = difference[i] ?? 0;
    const flip = side.alternates ? -1 : 1;
    for (let j = 0; j < CHUNK; j++) {
      sums.re[j] = (sums.re[j] ?? 0) + a * p;
      if (b !== 0) sums.im[j] = (sums.im[j] ?? 0) + b * p;
      d = (keep[j] ?? 0) * d - (turn[j] ?? 0) * g * p;
      p += d;
      a *= flip;
      b *= flip;
    }
    value[i] = p;
    difference[i] = d;
  }
}

/** |P_l(cos theta)| <= min(1, sqrt(2/(pi l sin theta))) bounds what all higher waves can be. */
function boundFrom(sides: readonly Side[], l: number): number {
  let bound = 0;
  for (const { re, im, gap, active } of sides) {
    for (let i = 0; i < active; i++) {
      const g = gap[i] ?? 0;
      const sine = Math.sqrt(g * (2 - g));
      const polynomial = Math.min(1, Math.sqrt(2 / (Math.PI * l * sine)));
      bound += Math.hypot(re[i] ?? 0, im[i] ?? 0) * polynomial;
    }
  }
  return bound;
}

/**
 * Largest partial-wave amplitude of first order.
 *
 * Formula: T_l = -k ∫ j_l(kr)² U r² dr = (k/2) ∫_{-1}^{1} f1 P_l(cos theta) d cos(theta); the projection is summed over the
 * nodes of the angular integrals, P_l by the recurrence of differences that keeps the forward cone.
 *
 * @param samples short-range amplitude at the nodes of a composite rule
 * @param range largest radius at which the interaction is felt, angstrom; waves up to 1.2 k·range are looked at
 * @returns max |T_l|, good to half a percent; unitarity asks for at most 1
 *
 * Source: textbook; e.g. L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), secs. 19, 38. Bound of P_l: DLMF 18.14.7.
 */
export function largestBornPhase(samples: ConeSamples, range: number): LargestPhase {
  const sides = [sideOf(samples, false), sideOf(samples, true)];
  const wanted = Math.ceil(1.2 * samples.k * range) + 10;
  const best: LargestPhase = { value: 0, l: 0, lMax: wanted };
  let products = 0;
  for (let first = 0; first <= wanted; first += CHUNK) {
    if (first > 0 && boundFrom(sides, first) <= best.value) break;
    const sums = { re: new Float64Array(CHUNK), im: new Float64Array(CHUNK) };
    for (const side of sides) {
      addChunk(side, first, sums);
      products += side.active * CHUNK;
    }
    for (let j = 0; j < CHUNK && first + j <= wanted; j++) {
      const size = Math.hypot(sums.re[j] ?? 0, sums.im[j] ?? 0);
      if (size > best.value) Object.assign(best, { value: size, l: first + j });
    }
    if (products > MAX_PRODUCTS) return { ...best, lMax: first + CHUNK - 1 };
  }
  return best;
}
