import type { ScatteringAmplitude } from '#server/physics/methods/amplitude.ts';
import { exchangeDcs } from '#server/physics/methods/exchange.ts';
import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import type { Scales } from './cone-samples.ts';
import { coneEdges } from './cone-samples.ts';
import type { Integral } from './integrals.ts';

/** How far first order is off, relative. */
export interface Deviations {
  /** The largest over all angles, and where, rad, centre of mass. */
  largest: number;
  largestAt: number;
  /** Mean over the solid angle. */
  weighted: number;
  /** Of the elastic total; null where it diverges. */
  elastic: number | null;
}

export interface DeviationInput {
  born: ScatteringAmplitude;
  exact: ScatteringAmplitude;
  k: number;
  scales: Scales;
  /** Spin of identical particles; null for distinct ones. */
  exchangeSpin: number | null;
  /** Elastic cross sections of the two. */
  elastic: { born: Integral; exact: Integral };
}

/** A cross section below this part of the forward one is measured by it: a zero of one curve is no infinite deviation. */
const FORWARD_SHARE = 1e-3;
const RULE = gaussRule(16);
const PEAKS = 6;
const CLIMB = 40;

/** |f|² at t = sin(theta/2), with the exchanged amplitude of identical particles; null where it diverges. */
function curve(f: ScatteringAmplitude, { k, exchangeSpin }: DeviationInput) {
  return (t: number): number | null => {
    const direct = f.amplitude(2 * k * t);
    if (direct === null) return null;
    if (exchangeSpin === null) return direct.re * direct.re + direct.im * direct.im;
    const exchanged = f.amplitude(2 * k * Math.sqrt((1 - t) * (1 + t)));
    return exchanged && exchangeDcs(direct, exchanged, exchangeSpin).value;
  };
}

function relative(value: number, to: number): number {
  if (value === to) return 0;
  return Math.abs(value - to) / (to > 0 ? to : Math.abs(value));
}

/** The highest point between samples: the tallest of them are climbed by thirds, for peaks over a zero are narrow. */
function highest(f: (t: number) => number, samples: readonly [number, number][]): [number, number] {
  const value = (i: number) => samples[i]?.[1] ?? -1;
  const place = (i: number) => samples[Math.min(samples.length - 1, Math.max(0, i))]?.[0] ?? 0;
  const peaks = [...samples.keys()]
    .filter((i) => value(i) >= value(i - 1) && value(i) >= value(i + 1))
    .sort((a, b) => value(b) - value(a))
    .slice(0, PEAKS);
  let best: [number, number] = [0, 0];
  for (const peak of peaks) {
    let [a, b] = [place(peak - 1), place(peak + 1)];
    const points: [number, number][] = [[place(peak), value(peak)]];
    for (let step = 0; step < CLIMB; step++) {
      const [left, right] = [a + (b - a) / 3, b - (b - a) / 3];
      const [low, high] = [f(left), f(right)];
      points.push([left, low], [right, high]);
      if (low < high) a = left;
      else b = right;
    }
    for (const point of points) if (point[1] > best[1]) best = point;
  }
  return best;
}

function ofTotals({ born, exact }: DeviationInput['elastic']): number | null {
  if ('divergent' in born || 'divergent' in exact) return null;
  return relative(born.value, exact.value);
}

/**
 * How far the first-order curve is from the exact one.
 *
 * Formula: |dσ1 - dσ|/max(dσ, 1e-3 of the forward dσ) with dσ the exact dσ/dΩ; its largest value, its mean over the sphere
 * (1/4π)∫ … dΩ = 2∫_0^1 … t dt with t = sin(theta/2), and |σ1 - σ|/σ of the elastic totals.
 *
 * @param input two amplitudes of one interaction, angstrom, at one k, 1/angstrom
 * @returns relative deviations; the mean by 16 Gauss points a panel, good to a few parts in a thousand of itself, for its integrand has kinks
 *
 * Validity: amplitudes alone are compared, without the factors of a lepton's spin and without incoherent scattering, which
 * first order has and the radial equation has not.
 */
export function deviations(input: DeviationInput): Deviations {
  const first = curve(input.born, input);
  const exact = curve(input.exact, input);
  const least = FORWARD_SHARE * (exact(0) ?? 0);
  const at = (t: number): number => {
    const [a, b] = [first(t), exact(t)];
    return a === null || b === null ? 0 : Math.abs(a - b) / Math.max(b, least, Number.MIN_VALUE);
  };
  const looked: [number, number][] = [[0, at(0)]];
  let weighted = 0;
  const edges = coneEdges(input.k, input.scales);
  edges.slice(1).forEach((end, i) => {
    const half = (end - (edges[i] ?? 0)) / 2;
    RULE.nodes.forEach((node, j) => {
      const t = end - half + half * node;
      const found = at(t);
      weighted += 2 * half * (RULE.weights[j] ?? 0) * t * found;
      looked.push([t, found]);
    });
  });
  looked.push([1, at(1)]);
  const [largestAt, largest] = highest(at, looked);
  return {
    largest,
    largestAt: 2 * Math.asin(largestAt),
    weighted,
    elastic: ofTotals(input.elastic),
  };
}
