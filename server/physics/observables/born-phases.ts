import type { ConeSamples } from './cone-samples.ts';

/** Phase a Legendre polynomial may run through on one half panel of 16 nodes; what turns faster averages to nothing. */
const RESOLVED = 24;
const MAX_PRODUCTS = 3e7;

export interface LargestPhase {
  /** max_l |T_l| */
  value: number;
  /** The l it belongs to. */
  l: number;
  /** Highest l looked at. */
  lMax: number;
}

interface Beam {
  /** 2 t k weight f, real and imaginary. */
  re: Float64Array;
  im: Float64Array;
  /** 1 - |cos(theta)|, and whether cos(theta) is negative. */
  gap: Float64Array;
  behind: Uint8Array;
  width: Float64Array;
}

function beamOf({ k, t, weight, width, re, im }: ConeSamples): Beam {
  const order = [...t.keys()].sort((a, b) => (width[a] ?? 0) - (width[b] ?? 0));
  const pick = (value: (i: number) => number) => Float64Array.from(order, value);
  const factor = (i: number) => 2 * k * (t[i] ?? 0) * (weight[i] ?? 0);
  const isBehind = (i: number) => (t[i] ?? 0) > Math.SQRT1_2;
  return {
    re: pick((i) => factor(i) * (re[i] ?? 0)),
    im: pick((i) => factor(i) * (im[i] ?? 0)),
    gap: pick((i) => 2 * (isBehind(i) ? (1 - (t[i] ?? 0)) * (1 + (t[i] ?? 0)) : (t[i] ?? 0) ** 2)),
    behind: Uint8Array.from(order, (i) => (isBehind(i) ? 1 : 0)),
    width: pick((i) => width[i] ?? 0),
  };
}

/**
 * Largest partial-wave amplitude of first order.
 *
 * Formula: T_l = -k ∫ j_l(kr)² U r² dr = (k/2) ∫_{-1}^{1} f1 P_l(cos theta) d cos(theta); the projection is summed over the
 * nodes of the angular integrals, P_l by the recurrence of differences that keeps the forward cone.
 *
 * @param samples short-range amplitude at the nodes of a composite rule
 * @param range largest radius at which the interaction is felt, angstrom; waves up to 1.2 k·range are looked at
 * @returns max |T_l|, good to a part in a thousand; unitarity asks for at most 1
 *
 * Source: textbook; e.g. L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), secs. 19, 38.
 */
export function largestBornPhase(samples: ConeSamples, range: number): LargestPhase {
  const { re, im, gap, behind, width } = beamOf(samples);
  const wanted = Math.ceil(1.2 * samples.k * range) + 10;
  const value = new Float64Array(re.length).fill(1);
  const difference = new Float64Array(re.length);
  const best: LargestPhase = { value: 0, l: 0, lMax: 0 };
  let active = re.length;
  let products = 0;
  for (let l = 0; l <= wanted && active > 0 && products < MAX_PRODUCTS; l++) {
    while (active > 0 && 2 * l * (width[active - 1] ?? 0) > RESOLVED) active -= 1;
    let sumRe = 0;
    let sumIm = 0;
    for (let i = 0; i < active; i++) {
      const p = value[i] ?? 0;
      const signed = l % 2 === 1 && behind[i] === 1 ? -p : p;
      sumRe += (re[i] ?? 0) * signed;
      sumIm += (im[i] ?? 0) * signed;
      const d = (l * (difference[i] ?? 0) - (2 * l + 1) * (gap[i] ?? 0) * p) / (l + 1);
      difference[i] = d;
      value[i] = p + d;
    }
    products += active;
    best.lMax = l;
    const size = Math.hypot(sumRe, sumIm);
    if (size > best.value) Object.assign(best, { value: size, l });
  }
  return best;
}
