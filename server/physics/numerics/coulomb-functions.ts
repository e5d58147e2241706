import { carryInwards } from './coulomb-inward.ts';
import { UNIT_ROUNDOFF } from './rounding.ts';

/** Coulomb functions of all orders at one argument; powers of two are taken out where they would leave the range of doubles. */
export interface CoulombWaves {
  /** F_l = f[l] · 2^-scale[l] and dF_l/drho = df[l] · 2^-scale[l]. */
  f: Float64Array;
  df: Float64Array;
  /** G_l = g[l] · 2^scale[l] and dG_l/drho = dg[l] · 2^scale[l]. */
  g: Float64Array;
  dg: Float64Array;
  /** Zero unless G_l exceeds 2^256. */
  scale: Int32Array;
  /**
   * Relative error: of each value itself where l(l+1) + 2 eta rho > rho², of sqrt(F² + G²) and sqrt(F'² + G'²) elsewhere.
   */
  error: Float64Array;
}

/** F_l and F_l' without their common factor. */
interface Regular {
  f: Float64Array;
  df: Float64Array;
  /** Powers of two to multiply with, at most 0 after the first. */
  power: Int32Array;
  steps: number;
}

const STEP_POWER = 256;
const BIG = 2 ** STEP_POWER;
const MAX_TERMS = 1_000_000;
const TINY = 1e-300;
/** Below this the continued fraction of the outgoing wave is slow. */
const NEAREST_START = 8;

/** Order from which on the wave is behind its centrifugal barrier at rho. */
function turningOrder(eta: number, rho: number): number {
  return Math.sqrt(Math.max(0, rho * (rho - 2 * eta)));
}

/** F_{l+1}/F_l behind the barrier, from the continued fraction of the minimal solution of the three-term recurrence. */
function ratioAbove(l: number, eta: number, rho: number): { ratio: number; terms: number } {
  const root = (n: number) => Math.hypot(1, eta / n);
  const diagonal = (n: number) => (2 * n + 1) / rho + (eta / n) * ((2 * n + 1) / (n + 1));
  let fraction = diagonal(l + 1);
  let c = fraction;
  let d = 0;
  for (let n = l + 2; n < l + MAX_TERMS; n++) {
    const a = root(n) ** 2;
    const b = diagonal(n);
    d = b - a * d;
    d = 1 / (Math.abs(d) < TINY ? TINY : d);
    c = b - a / c;
    if (Math.abs(c) < TINY) c = TINY;
    fraction *= c * d;
    if (Math.abs(c * d - 1) < UNIT_ROUNDOFF) return { ratio: root(l + 1) / fraction, terms: n - l };
  }
  throw new RangeError(`Coulomb functions at eta = ${eta}, rho = ${rho} need too many terms`);
}

/**
 * Downwards from behind the barrier, where F is the solution that grows. With x = |eta|/l and e = sqrt(1 + x²) - x the recurrence
 * is written for F_{l-1} - sign(eta) F_l, so that a large eta/l does not cancel.
 */
function regularDownwards(lMax: number, eta: number, rho: number): Regular {
  const sign = eta < 0 ? -1 : 1;
  const top = Math.ceil(Math.max(lMax, turningOrder(eta, rho) + 8, Math.abs(eta)));
  const start = ratioAbove(top, eta, rho);
  const result = {
    f: new Float64Array(lMax + 1),
    df: new Float64Array(lMax + 1),
    power: new Int32Array(lMax + 1),
    steps: top + start.terms,
  };
  let f = 1;
  let df = (top + 1) / rho + eta / (top + 1) - Math.hypot(1, eta / (top + 1)) * start.ratio;
  let power = 0;
  for (let l = top; ; l--) {
    if (l <= lMax) {
      result.f[l] = f;
      result.df[l] = df;
      result.power[l] = power;
    }
    if (l === 0) break;
    const x = Math.abs(eta) / l;
    const root = Math.hypot(1, x);
    const e = 1 / (root + x);
    const change = ((l / rho - sign * e) * f + df) / root;
    const lower = sign * f + change;
    df = sign * x * change + (l / rho) * lower - e * f;
    f = lower;
    while (Math.hypot(f, df) > BIG) {
      f /= BIG;
      df /= BIG;
      power += STEP_POWER;
    }
  }
  return result;
}

/** p + iq = d ln(G_0 + i F_0)/drho, from the continued fraction for the outgoing wave, by Lentz. */
function outgoing(eta: number, rho: number): { p: number; q: number; terms: number } {
  if (eta === 0) return { p: 0, q: 1, terms: 0 };
  const bRe = 2 * (rho - eta);
  let bIm = 2;
  // The fraction K of a_1/(b_1 + a_2/(b_2 + …)): first its denominator, then a_1 divided by it.
  let [kRe, kIm] = [bRe, bIm];
  let [cRe, cIm] = [bRe, bIm];
  let [dRe, dIm] = [0, 0];
  let n = 1;
  for (; n < MAX_TERMS; n++) {
    const aRe = n * (n + 1) - eta * eta;
    const aIm = eta * (2 * n + 1);
    bIm += 2;
    const eRe = bRe + aRe * dRe - aIm * dIm;
    const eIm = bIm + aRe * dIm + aIm * dRe;
    const eSize = eRe * eRe + eIm * eIm;
    [dRe, dIm] = [eRe / eSize, -eIm / eSize];
    const cSize = cRe * cRe + cIm * cIm;
    const [qRe, qIm] = [(aRe * cRe + aIm * cIm) / cSize, (aIm * cRe - aRe * cIm) / cSize];
    [cRe, cIm] = [bRe + qRe, bIm + qIm];
    const [tRe, tIm] = [cRe * dRe - cIm * dIm, cRe * dIm + cIm * dRe];
    [kRe, kIm] = [kRe * tRe - kIm * tIm, kRe * tIm + kIm * tRe];
    if (Math.abs(tRe - 1) + Math.abs(tIm) < 2 * UNIT_ROUNDOFF) break;
  }
  // a_1 = i eta (1 + i eta)
  const size = kRe * kRe + kIm * kIm;
  const hRe = (-eta * eta * kRe + eta * kIm) / size;
  const hIm = (eta * kRe + eta * eta * kIm) / size;
  return { p: -hIm / rho, q: 1 - eta / rho + hRe / rho, terms: n };
}

/** What l = 0 needs to be scaled: G_0 and its derivative, and the factor of the regular chain. */
interface Start {
  g: number;
  dg: number;
  /** G_0 = g · 2^power. */
  power: number;
  /** F_0 = factor · f[0] of the chain, times 2^-power. */
  factor: number;
  steps: number;
}

/** G_0 where the continued fraction of the outgoing wave serves, from F'/F and 1/(F² + G²) = q. */
function startOutside(eta: number, rho: number, f: number, df: number): Start {
  const { p, q, terms } = outgoing(eta, rho);
  const rest = df - p * f;
  const factor = Math.sqrt(q) / Math.hypot(q * f, rest);
  const g = (factor * rest) / q;
  return { g, dg: p * g - q * factor * f, power: 0, factor, steps: terms };
}

/** Where the outgoing wave is computed: not below the turning point, where q is lost, nor so far in that its fraction is slow. */
function startingPoint(eta: number, rho: number): number {
  return Math.max(rho, 2 * eta, NEAREST_START);
}

function startAt(eta: number, rho: number, chain: Regular): Start {
  const [f, df] = [chain.f[0] ?? 0, chain.df[0] ?? 0];
  const from = startingPoint(eta, rho);
  if (from === rho) return startOutside(eta, rho, f, df);
  const outer = regularDownwards(0, eta, from);
  const known = startOutside(eta, from, outer.f[0] ?? 0, outer.df[0] ?? 0);
  const { g, dg, power, steps } = carryInwards(eta, from, known.g, known.dg, rho);
  // F'G - FG' = 1
  return {
    g,
    dg,
    power,
    factor: 1 / (df * g - f * dg),
    steps: known.steps + outer.steps + 4 * steps,
  };
}

/**
 * Regular and irregular Coulomb functions and their derivatives for l = 0 … lMax.
 *
 * Formula: w'' + (1 - 2 eta/rho - l(l+1)/rho²) w = 0, F'G - FG' = 1. F'/F behind the barrier by its continued fraction and F_l
 * downwards by recurrence; at l = 0 the continued fraction of the outgoing wave gives 1/(F² + G²), inside the turning point carried
 * inwards by Taylor series; G_l upwards by recurrence.
 *
 * @param lMax highest order, integer >= 0
 * @param eta Sommerfeld parameter, > 0 repels, to 1e4 either way; no unit
 * @param rho k r, 1e-60 to 1e6
 * @returns scaled functions with their errors; see CoulombWaves
 * @throws RangeError outside the domain, or where more than a million terms would be needed
 *
 * Source: DLMF 33.2, 33.4, 33.8; A. R. Barnett, D. H. Feng, J. W. Steed and L. J. B. Goldfarb, Comput. Phys. Commun. 8 (1974) 377.
 */
export function coulombWaves(lMax: number, eta: number, rho: number): CoulombWaves {
  if (!(Number.isInteger(lMax) && lMax >= 0)) throw new RangeError(`order ${lMax} is no count`);
  if (!(rho >= 1e-60 && rho <= 1e6))
    throw new RangeError(`Coulomb functions are asked at rho = ${rho}`);
  if (!(Math.abs(eta) <= 1e4)) throw new RangeError(`Coulomb functions are asked at eta = ${eta}`);
  const chain = regularDownwards(lMax, eta, rho);
  const start = startAt(eta, rho, chain);
  const { f, df, power } = chain;
  const g = new Float64Array(lMax + 1);
  const dg = new Float64Array(lMax + 1);
  const scale = new Int32Array(lMax + 1);
  const error = new Float64Array(lMax + 1);
  const sign = eta < 0 ? -1 : 1;
  let [y, dy, exponent] = [start.g, start.dg, start.power];
  const bottom = power[0] ?? 0;
  for (let l = 0; l <= lMax; l++) {
    if (l > 0) {
      const x = Math.abs(eta) / l;
      const root = Math.hypot(1, x);
      const e = 1 / (root + x);
      const change = ((l / rho - sign * e) * y - dy) / root;
      const slope = (e - (sign * l) / rho) * y - (sign * x + l / rho) * change;
      y = sign * y + change;
      dy = slope;
      while (Math.hypot(y, dy) > BIG) {
        y /= BIG;
        dy /= BIG;
        exponent += STEP_POWER;
      }
    }
    g[l] = y;
    dg[l] = dy;
    scale[l] = exponent;
    const rescale = start.factor * 2 ** (exponent - start.power + (power[l] ?? 0) - bottom);
    f[l] = (f[l] ?? 0) * rescale;
    df[l] = (df[l] ?? 0) * rescale;
    error[l] = UNIT_ROUNDOFF * (32 + chain.steps + start.steps + 2 * l);
  }
  return { f, df, g, dg, scale, error };
}
