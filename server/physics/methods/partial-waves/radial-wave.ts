import type { RadialPanels } from '#server/physics/numerics/radial-panels.ts';
import {
  addedFromOrigin,
  stepAdded,
  stepAddedReal,
} from '#server/physics/numerics/radial-added.ts';
import type { PanelPowers } from '#server/physics/numerics/radial-powers.ts';
import { addBarrier, fieldPowers, panelPowers } from '#server/physics/numerics/radial-powers.ts';
import type { RadialWave } from '#server/physics/numerics/radial-series.ts';
import { stepComplex, stepFromOrigin, stepReal } from '#server/physics/numerics/radial-steps.ts';
import { FIELD_STRIDE } from '#server/physics/numerics/shifted-chebyshev.ts';
import { riccatiRatio } from '#server/physics/numerics/riccati-bessel.ts';
import type { RadialInteraction } from './interaction.ts';
import { CENTRAL_IM, CENTRAL_RE, SHORT, SPIN_IM, SPIN_RE } from './interaction.ts';
import type { Matched, Outer } from './matched.ts';
import { WaveStart } from './wave-start.ts';

const HUGE = 1e150;

/** Carries waves of one interaction over its panels. */
export class RadialSolver {
  private readonly total = panelPowers();
  private readonly second = panelPowers();
  private readonly shiftedRe = new Float64Array(FIELD_STRIDE + 2);
  private readonly shiftedFree = new Float64Array(FIELD_STRIDE + 2);
  private readonly shiftedIm = new Float64Array(FIELD_STRIDE + 2);
  private readonly wave: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
  private readonly free: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
  private readonly jumps: Float64Array;
  readonly starts: WaveStart;

  constructor(
    private readonly interaction: RadialInteraction,
    private readonly panels: RadialPanels,
    private readonly k: number,
  ) {
    this.starts = new WaveStart(panels, k, interaction.charge);
    this.jumps = new Float64Array(panels.count + 1);
    for (const { radius, jump } of interaction.shells) {
      const edge = panels.edges.indexOf(radius);
      if (edge >= 0) this.jumps[edge] = (this.jumps[edge] ?? 0) + jump;
    }
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
    const from = this.starts.at(l, factor);
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
    const from = this.starts.at(l, factor);
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
