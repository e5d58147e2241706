import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { RadialPanels } from '#server/physics/numerics/radial-panels.ts';
import { FIELD_STRIDE } from '#server/physics/numerics/radial-panels.ts';
import type { PanelPowers, RadialWave } from '#server/physics/numerics/radial-steps.ts';
import {
  addBarrier,
  addedFromOrigin,
  fieldPowers,
  panelPowers,
  stepAdded,
  stepAddedReal,
  stepComplex,
  stepFromOrigin,
  stepReal,
} from '#server/physics/numerics/radial-steps.ts';
import { riccatiRatio } from '#server/physics/numerics/riccati-bessel.ts';
import type { RadialInteraction } from './interaction.ts';
import type { Panels } from './panels.ts';
import { CENTRAL_IM, CENTRAL_RE, SHORT, SPIN_IM, SPIN_RE } from './interaction.ts';

/** Reference functions at the end of the panels: dimensionless, slopes by k r. */
export interface Outer {
  F: number;
  dF: number;
  G: number;
  dG: number;
}

/** u = alpha F + beta G at the end of the panels, up to a common factor. */
export interface Matched {
  alphaRe: number;
  alphaIm: number;
  betaRe: number;
  betaIm: number;
  /** k ∫ |u|² dr over |alpha - i beta|²: what a relative error of the energy does to the phase. */
  delay: number;
  /** What a relative error of u or u' at the end does to T. */
  spread: number;
  /** Panels the wave was carried over. */
  panels: number;
  /** Whether it was begun behind its barrier. */
  begun: boolean;
}

/** Half the exponent by which what is forgotten must die out: exp(-40) is below 1e-17. */
const FORGOTTEN = 20;
const HUGE = 1e150;

/** Exponent of what a free wave of order l gains from x to its turning point. */
export function barrierExponent(l: number, x: number): number {
  const nu = l + 0.5;
  if (nu <= x) return 0;
  const root = Math.sqrt((nu - x) * (nu + x));
  return nu * Math.log((nu + root) / x) - root;
}

/** Carries waves of one interaction over its panels. */
export class RadialSolver {
  private first = 0;
  private readonly total = panelPowers();
  private readonly second = panelPowers();
  private readonly shiftedRe = new Float64Array(FIELD_STRIDE + 2);
  private readonly shiftedFree = new Float64Array(FIELD_STRIDE + 2);
  private readonly shiftedIm = new Float64Array(FIELD_STRIDE + 2);
  private readonly wave: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
  private readonly free: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
  private readonly jumps: Float64Array;

  constructor(
    private readonly interaction: RadialInteraction,
    private readonly panels: RadialPanels,
    private readonly k: number,
  ) {
    this.jumps = new Float64Array(panels.count + 1);
    for (const { radius, jump } of interaction.shells) {
      const edge = panels.edges.indexOf(radius);
      if (edge >= 0) this.jumps[edge] = (this.jumps[edge] ?? 0) + jump;
    }
  }

  /** Largest of r² (k² - U) on a panel, which l(l+1) must exceed to keep the wave out. */
  private allowedOn(panel: number, factor: number): number {
    const { allowed, size } = this.panels;
    return (allowed[panel] ?? 0) + Math.abs(factor) * (size[SPIN_RE]?.[panel] ?? 0);
  }

  /** Whether what lies inside the edge cannot be felt by this wave outside. */
  private isForgotten(edge: number, l: number, factor: number): boolean {
    const { edges, count } = this.panels;
    const barrier = l * (l + 1);
    let exponent = 0;
    for (let p = edge; p < count; p++) {
      const room = barrier - this.allowedOn(p, factor);
      if (room <= 0) return exponent >= FORGOTTEN;
      exponent += Math.sqrt(room) * Math.log((edges[p + 1] ?? 1) / (edges[p] ?? 1));
      if (exponent >= FORGOTTEN) return true;
    }
    const x = this.k * (edges[count] ?? 0);
    return exponent + (this.interaction.charge === 0 ? barrierExponent(l, x) : 0) >= FORGOTTEN;
  }

  /** First panel of a wave; the count of panels where nothing is felt at all. Higher waves begin further out. */
  start(l: number, factor: number): number {
    const { count } = this.panels;
    const barrier = l * (l + 1);
    while (
      this.first < count &&
      l > 0 &&
      barrier > this.allowedOn(this.first, factor) &&
      this.isForgotten(this.first + 1, l, factor)
    ) {
      this.first += 1;
    }
    return this.first;
  }

  /** Highest l for which attraction opens a region inside its centrifugal barrier: resonances may lie up to it. */
  pocketOrder(): number {
    const { count, size, allowed } = this.panels;
    let most = 0;
    for (let p = 0; p < count; p++) {
      const open = allowed[p] ?? 0;
      if ((size[0]?.[p] ?? 0) > 0.1 * open) most = Math.max(most, open);
    }
    return Math.sqrt(most);
  }

  private shift(powers: PanelPowers, into: Float64Array): void {
    into.fill(0);
    for (let m = 0; m < powers.length; m++) into[m + 1] = powers.powers[m] ?? 0;
  }

  private begin(p: number, l: number, factor: number, wave: RadialWave): number {
    const { edges } = this.panels;
    const { core, absorbs } = this.interaction;
    const width = (edges[p + 1] ?? 0) - (edges[p] ?? 0);
    wave.im = 0;
    wave.slopeIm = 0;
    if (p > 0) {
      const r = edges[p] ?? 0;
      const x = this.k * r;
      wave.re = 1;
      wave.slopeRe = width * ((l + 1) / r - this.k * riccatiRatio(l, x));
      return p;
    }
    if (core > 0) {
      wave.re = 0;
      wave.slopeRe = 1;
      return 0;
    }
    fieldPowers(this.panels, 0, CENTRAL_RE, 1, SPIN_RE, factor, this.total);
    this.shift(this.total, this.shiftedRe);
    this.shiftedRe[2] = (this.shiftedRe[2] ?? 0) - (this.k * width) ** 2;
    if (absorbs) {
      fieldPowers(this.panels, 0, CENTRAL_IM, 1, SPIN_IM, factor, this.second);
      this.shift(this.second, this.shiftedIm);
    }
    stepFromOrigin(l, this.shiftedRe, absorbs ? this.shiftedIm : null, wave);
    return 1;
  }

  /**
   * Regular wave at the end of the panels in terms of the free or Coulomb functions there.
   *
   * Formula: u'' = [l(l+1)/r² + U - k²] u; alpha = u' G - u G', beta = u F' - u' F.
   *
   * @param l order; must not fall from call to call
   * @param factor of the l·sigma part: l or -(l+1)
   * @returns null where the wave never feels the interaction
   */
  match(l: number, factor: number, { F, dF, G, dG }: Outer): Matched | null {
    const { edges, count } = this.panels;
    const from = this.start(l, factor);
    if (from >= count) return null;
    const { wave, total, second, k } = this;
    const { absorbs } = this.interaction;
    const barrier = l * (l + 1);
    let norm = 0;
    let previous = 0;
    for (let p = this.begin(from, l, factor, wave); p <= count; p++) {
      const width = (edges[p + 1] ?? 0) - (edges[p] ?? 0);
      const last = p > from ? (edges[p] ?? 0) - (edges[p - 1] ?? 0) : width;
      const size = wave.re * wave.re + wave.im * wave.im;
      if (p > from) norm += (last * (previous + size)) / 2;
      previous = size;
      const jump = this.jumps[p] ?? 0;
      if (p > from || this.interaction.core > 0) {
        wave.slopeRe += last * jump * wave.re;
        wave.slopeIm += last * jump * wave.im;
      }
      if (p === count) {
        wave.slopeRe /= k * last;
        wave.slopeIm /= k * last;
        break;
      }
      wave.slopeRe *= width / last;
      wave.slopeIm *= width / last;
      if (size > HUGE) {
        const shrink = 1 / Math.sqrt(size);
        norm /= size;
        previous /= size;
        wave.re *= shrink;
        wave.im *= shrink;
        wave.slopeRe *= shrink;
        wave.slopeIm *= shrink;
      }
      fieldPowers(this.panels, p, CENTRAL_RE, 1, SPIN_RE, factor, total);
      addBarrier(this.panels, p, barrier, k, total);
      if (absorbs) {
        fieldPowers(this.panels, p, CENTRAL_IM, 1, SPIN_IM, factor, second);
        stepComplex(total.powers, total.length, second.powers, second.length, wave);
      } else stepReal(total.powers, total.length, wave);
    }
    const alphaRe = wave.slopeRe * G - wave.re * dG;
    const alphaIm = wave.slopeIm * G - wave.im * dG;
    const betaRe = wave.re * dF - wave.slopeRe * F;
    const betaIm = wave.im * dF - wave.slopeIm * F;
    const outer = Math.hypot(alphaRe + betaIm, alphaIm - betaRe);
    const [u, slope] = [Math.hypot(wave.re, wave.im), Math.hypot(wave.slopeRe, wave.slopeIm)];
    const [f, df] = [Math.abs(F), Math.abs(dF)];
    const mixed = Math.min(1, k * (edges[count] ?? 0)) * (u * f + slope * df);
    return {
      alphaRe,
      alphaIm,
      betaRe,
      betaIm,
      delay: (k * norm) / outer / outer,
      spread: (u * df + slope * f + mixed) / outer,
      panels: count - from,
      begun: from > 0,
    };
  }

  /**
   * The same for a weak interaction: the free or Coulomb wave and what is added to it are carried side by side, so that beta keeps
   * its digits.
   *
   * Formula: u = F~ + y, y'' = [l(l+1)/r² + 2 eta k/r - k²] y + U (F~ + y), F~ the regular wave without U.
   */
  matchWeak(l: number, factor: number, outer: Outer): Matched | null {
    const { edges, count } = this.panels;
    const from = this.start(l, factor);
    if (from >= count) return null;
    const { k, wave: added, free, total, second } = this;
    const { absorbs } = this.interaction;
    const third = this.third;
    const charged = this.interaction.charge !== 0;
    const felt = charged ? SHORT : CENTRAL_RE;
    third.length = 0;
    const barrier = l * (l + 1);
    added.re = added.im = added.slopeRe = added.slopeIm = 0;
    let p = from;
    if (p > 0) this.begin(p, l, factor, free);
    else {
      const width = edges[1] ?? 0;
      fieldPowers(this.panels, 0, felt, 1, SPIN_RE, factor, total);
      this.shift(total, this.shiftedRe);
      if (absorbs) {
        fieldPowers(this.panels, 0, CENTRAL_IM, 1, SPIN_IM, factor, second);
        this.shift(second, this.shiftedIm);
      }
      if (charged) fieldPowers(this.panels, 0, CENTRAL_RE, 1, SHORT, -1, third);
      this.shift(third, this.shiftedFree);
      this.shiftedFree[2] = (this.shiftedFree[2] ?? 0) - (k * width) ** 2;
      const imaginary = absorbs ? this.shiftedIm : null;
      addedFromOrigin(l, this.shiftedFree, this.shiftedRe, imaginary, free, added);
      p = 1;
    }
    for (; p <= count; p++) {
      const width = (edges[p + 1] ?? 0) - (edges[p] ?? 0);
      const last = p > from ? (edges[p] ?? 0) - (edges[p - 1] ?? 0) : width;
      if (p > from) {
        const jump = this.jumps[p] ?? 0;
        added.slopeRe += last * jump * (added.re + free.re);
        added.slopeIm += last * jump * added.im;
      }
      const scale = p === count ? 1 / (k * last) : width / last;
      free.slopeRe *= scale;
      added.slopeRe *= scale;
      added.slopeIm *= scale;
      if (p === count) break;
      this.rescale(free, added);
      third.length = 0;
      if (charged) fieldPowers(this.panels, p, CENTRAL_RE, 1, SHORT, -1, third);
      addBarrier(this.panels, p, barrier, k, third);
      fieldPowers(this.panels, p, felt, 1, SPIN_RE, factor, total);
      if (absorbs) {
        fieldPowers(this.panels, p, CENTRAL_IM, 1, SPIN_IM, factor, second);
        stepAdded(third, total, second, free, added);
      } else stepAddedReal(third, total, free, added);
    }
    const { F, dF, G, dG } = outer;
    const betaRe = added.re * dF - added.slopeRe * F;
    const betaIm = added.im * dF - added.slopeIm * F;
    const alphaRe = (added.slopeRe + free.slopeRe) * G - (added.re + free.re) * dG;
    const alphaIm = added.slopeIm * G - added.im * dG;
    return {
      alphaRe,
      alphaIm,
      betaRe,
      betaIm,
      delay: 0,
      spread: 1,
      panels: count - from,
      begun: from > 0,
    };
  }

  private readonly third = panelPowers();

  private rescale(free: RadialWave, added: RadialWave): void {
    const size = Math.abs(free.re);
    if (size <= HUGE) return;
    free.re /= size;
    free.slopeRe /= size;
    added.re /= size;
    added.im /= size;
    added.slopeRe /= size;
    added.slopeIm /= size;
  }
}

/** T = beta/(alpha - i beta) of a matched wave, T = (S - 1)/2i, and 1 - |S|². */
export function transitionOf({ alphaRe, alphaIm, betaRe, betaIm }: Matched) {
  const [c, s] = [alphaRe + betaIm, alphaIm - betaRe];
  const size = c * c + s * s;
  return {
    re: (betaRe * c + betaIm * s) / size,
    im: (betaIm * c - betaRe * s) / size,
    absorbed: (4 * (alphaRe * betaIm - alphaIm * betaRe)) / size,
    eta: Math.hypot(alphaRe - betaIm, alphaIm + betaRe) / Math.sqrt(size),
  };
}

/** What is lost of a wave that begins behind its barrier. */
const LOST = 1e-17;

/**
 * Bound of the error of T.
 *
 * @param x k times the radius of the match
 * @param weak whether the wave was carried beside a free one: its rounding is then relative to T
 * @param size |T|
 * @param panels with what their fit of U misses, and the strength of the interaction
 */
export function errorOf(
  { delay, spread, panels, begun }: Matched,
  x: number,
  weak: boolean,
  size: number,
  { all, strength }: Pick<Panels, 'all' | 'strength'>,
): number {
  const rounding = weak
    ? (64 + 8 * panels + 2 * x) * size
    : (16 + 2 * panels + x) * spread + 8 * delay;
  const forgotten = begun ? LOST * Math.min(1, strength[0] ?? 0) : 0;
  return UNIT_ROUNDOFF * rounding + forgotten + all.missed * Math.min(1, x);
}
