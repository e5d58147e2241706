import type { Amplitude } from '#server/physics/methods/amplitude.ts';
import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { DomainError } from '#shared/errors.ts';

/** Lengths of the interaction that decide how finely an amplitude must be sampled, angstrom. */
export interface Scales {
  /** Largest range; 0 for an interaction without one. */
  range: number;
  /** Largest radius where the potential jumps: the transform then oscillates without end. 0 if none. */
  edge: number;
  /** Number of terms, for the bound of the work. */
  terms: number;
  /** q where the slope of the amplitude jumps, 1/angstrom. */
  kinks?: readonly number[];
}

/** Values of an amplitude at the nodes of a composite rule over all angles; t = q/(2k) = sin(theta/2). */
export interface ConeSamples {
  k: number;
  t: number[];
  /** Weights of dt. */
  weight: number[];
  /** Width of the half panel a node belongs to: nothing finer is resolved there. */
  width: number[];
  re: number[];
  im: number[];
  /** Bound of the error of the amplitude, angstrom. */
  error: number[];
  /** For each moment the sum of the differences of two orders, panel by panel. */
  orderError: Moments;
  /** Bound of what the errors of the amplitude do to each moment. */
  noise: Moments;
  moments: Moments;
}

/** ∫|f|² w(t) dt with the weights of elastic, momentum-transfer and viscosity cross section, angstrom². */
export type Moments = [number, number, number];

interface Panel {
  a: number;
  b: number;
  fine: Moments;
  error: Moments;
  /** What the errors of the amplitude do to the moments: below it a panel cannot gain by being cut. */
  noise: Moments;
  nodes: Sample[];
}
interface Sample {
  t: number;
  weight: number;
  width: number;
  f: Amplitude;
}

const RULE = gaussRule(16);
const AIM = 4 * UNIT_ROUNDOFF;
const MAX_ROUNDS = 40;
const MAX_TRANSFORMS = 1_000_000;
const CALLS_PER_PANEL = 48;

/**
 * dΩ = 8 pi t dt; 1 - cos(theta) = 2t²; sin²(theta) = 4t²(1 - t²).
 * The 8 pi is left to the caller.
 */
export function coneWeights(t: number): Moments {
  const square = t * t;
  return [t, 2 * square * t, 4 * square * t * (1 - t) * (1 + t)];
}

function nodesOn(f: (q: number) => Amplitude, k: number, a: number, b: number): Sample[] {
  const half = (b - a) / 2;
  const middle = a + half;
  return Array.from(RULE.nodes, (node, i) => {
    const t = middle + half * node;
    return { t, weight: half * (RULE.weights[i] ?? 0), width: b - a, f: f(2 * k * t) };
  });
}

const squared = ({ re, im }: Amplitude): number => re * re + im * im;
const squareError = (f: Amplitude): number => (2 * Math.hypot(f.re, f.im) + f.error) * f.error;

function momentsOf(nodes: readonly Sample[], of: (f: Amplitude) => number): Moments {
  const sum: Moments = [0, 0, 0];
  for (const { t, weight, f } of nodes) {
    const size = weight * of(f);
    const [w0, w1, w2] = coneWeights(t);
    sum[0] += size * w0;
    sum[1] += size * w1;
    sum[2] += size * w2;
  }
  return sum;
}

/** Sixteen points on the whole against sixteen on either half. */
function panelOn(f: (q: number) => Amplitude, k: number, a: number, b: number): Panel {
  const middle = a + (b - a) / 2;
  const nodes = [...nodesOn(f, k, a, middle), ...nodesOn(f, k, middle, b)];
  const fine = momentsOf(nodes, squared);
  const coarse = momentsOf(nodesOn(f, k, a, b), squared);
  const error = fine.map((value, i) => Math.abs(value - (coarse[i] ?? 0))) as Moments;
  return { a, b, fine, error, noise: momentsOf(nodes, squareError), nodes };
}

/** Panels that double in width from half the inverse range on, none wider than three periods of |f|² of a sharp edge; kinks are edges too. */
export function coneEdges(k: number, { range, edge, terms, kinks = [] }: Scales): number[] {
  const widest = edge > 0 ? (3 * Math.PI) / (2 * k * edge) : 1;
  if ((1 / widest) * CALLS_PER_PANEL * terms > MAX_TRANSFORMS) throw tooFine();
  const edges = [0];
  let at = 0;
  let width = Math.min(range > 0 ? 0.5 / (2 * k * range) : 1, widest);
  while (at < 1) {
    at = at + width >= 1 - 1e-9 ? 1 : at + width;
    edges.push(at);
    width = Math.min(at, widest);
  }
  const cuts = kinks.map((q) => q / (2 * k)).filter((t) => t < 1 && !edges.includes(t));
  return [...edges, ...cuts].sort((a, b) => a - b);
}

function tooFine(): DomainError {
  return new DomainError(
    'tooMuchWork',
    'The amplitude oscillates too often over the angles for the cross section to be integrated: the product of wave number and radius is too large. Lower the energy or the radius, or check their units.',
  );
}

function add(panels: readonly Panel[], pick: (panel: Panel) => Moments): Moments {
  const sum: Moments = [0, 0, 0];
  for (const panel of panels) pick(panel).forEach((value, i) => (sum[i] = (sum[i] ?? 0) + value));
  return sum;
}

/**
 * Samples an amplitude over all scattering angles so that its squares integrate to rounding.
 *
 * Formula: Gauss-Legendre sums of 16 points on either half of panels in t = sin(theta/2), panels bisected until they agree
 * with 16 points on the whole.
 *
 * @param f amplitude, angstrom, finite for 0 < q <= 2k (1/angstrom)
 * @param k wave number, 1/angstrom, > 0
 * @param scales lengths of the interaction
 * @returns nodes, weights, values and the three moments with the difference of the two orders
 * @throws DomainError('tooMuchWork') where more than a million transforms would be needed
 *
 * Source: textbook; P. J. Davis and P. Rabinowitz, Methods of Numerical Integration, 2nd ed. (1984), ch. 6.
 */
export function sampleCone(f: (q: number) => Amplitude, k: number, scales: Scales): ConeSamples {
  const edges = coneEdges(k, scales);
  let panels = edges.slice(1).map((edge, i) => panelOn(f, k, edges[i] ?? 0, edge));
  let calls = panels.length * CALLS_PER_PANEL;
  let moments = add(panels, ({ fine }) => fine);
  for (let round = 0; round < MAX_ROUNDS; round++) {
    const allowed = moments.map((value) => (AIM * value) / Math.sqrt(panels.length));
    const isBad = ({ error, fine, noise }: Panel) =>
      error.some(
        (e, i) =>
          e > (allowed[i] ?? 0) && e > 16 * UNIT_ROUNDOFF * (fine[i] ?? 0) + (noise[i] ?? 0),
      );
    const bad = panels.filter(isBad);
    if (bad.length === 0) break;
    calls += 2 * bad.length * CALLS_PER_PANEL;
    if (calls * scales.terms > MAX_TRANSFORMS) throw tooFine();
    const halves = bad.flatMap(({ a, b }) => {
      const middle = a + (b - a) / 2;
      return [panelOn(f, k, a, middle), panelOn(f, k, middle, b)];
    });
    panels = [...panels.filter((panel) => !isBad(panel)), ...halves];
    moments = add(panels, ({ fine }) => fine);
  }
  panels.sort((x, y) => x.a - y.a);
  const nodes = panels.flatMap((panel) => panel.nodes);
  return {
    k,
    t: nodes.map((node) => node.t),
    weight: nodes.map((node) => node.weight),
    width: nodes.map((node) => node.width),
    re: nodes.map((node) => node.f.re),
    im: nodes.map((node) => node.f.im),
    error: nodes.map((node) => node.f.error),
    orderError: add(panels, ({ error }) => error),
    noise: add(panels, ({ noise }) => noise),
    moments,
  };
}
