import { UNIT_ROUNDOFF } from './rounding.ts';
import type { RadialField, Scratch, Trial } from './radial-trial.ts';
import { tryPanel } from './radial-trial.ts';
import { addPowers, FIELD_STRIDE } from './shifted-chebyshev.ts';

export interface RadialPanelRequest {
  field: RadialField;
  /** First and last radius; from 0 the field may rise as 1/x. */
  start: number;
  end: number;
  /** Radii where the field or a derivative jumps, in any order. */
  breaks: readonly number[];
  /** Wave number far out, >= 0. */
  wave: number;
  /** What the fit may miss of the field times the square of a panel's width (its width over the wave number where that is less). */
  tolerance: number;
}

/** Panels on which a field is a polynomial in t, x = edge + width·t, t = 0 to 1. */
export interface RadialPanels {
  count: number;
  /** count + 1 radii. */
  edges: Float64Array;
  /** width² times each component in powers of t, FIELD_STRIDE numbers a panel; width times (x field) on a panel from the origin. */
  field: Float64Array[];
  /** Powers used on each panel. */
  fieldLength: Int32Array;
  /** width²/x² in powers of t, POWER_STRIDE numbers a panel; nothing on a panel from the origin. */
  inverseSquare: Float64Array;
  inverseLength: Int32Array;
  /** Largest of wave² x² - x² (first component) on each panel: what a centrifugal barrier must exceed. */
  allowed: Float64Array;
  /** Largest of x² |component| on each panel. */
  size: Float64Array[];
  /** Σ |what the fit misses| · width · min(width, 1/wave). */
  missed: number;
}

export const POWER_STRIDE = 64;
const MOST_PANELS = 12_000;
/** Phase of the local wave on one panel. */
const PHASE = 3;
/** Width over distance from the origin. */
const STEEPNESS = 0.45;
const GROWTH = 1.6;
const NARROWEST = 1e-290;
/** 1/(c + t)² = Σ (-1)^m (m + 1) t^m/c^{m+2}, to its last digit. */
function inversePowers(c: number, out: number[]): number {
  let power = 1 / (c * c);
  let length = 0;
  for (let m = 0; m < POWER_STRIDE; m++) {
    const term = (m + 1) * power;
    out.push(term);
    if (Math.abs(term) * c * c > UNIT_ROUNDOFF / 8) length = m + 1;
    power /= -c;
  }
  return length;
}

/** Why a field cannot be followed: it takes too many panels, or is not finite somewhere. */
export class PanelError extends Error {
  constructor(
    readonly reason: 'tooMany' | 'notFinite',
    readonly at: number,
  ) {
    super(`radial panels fail at ${at}: ${reason}`);
  }
}

/** Panels as they are found. */
class Found {
  private readonly edges: number[];
  private readonly powers: number[][];
  private readonly lengths: number[] = [];
  private readonly inverse: number[] = [];
  private readonly inverseLengths: number[] = [];
  private readonly allowed: number[] = [];
  private readonly sizes: number[][];
  private missed = 0;

  constructor(start: number, components: number) {
    this.edges = [start];
    this.powers = Array.from({ length: components }, () => []);
    this.sizes = this.powers.map(() => []);
  }

  get count(): number {
    return this.lengths.length;
  }

  add(at: number, next: number, { chebyshev, length, allowed, size }: Trial, missed: number): void {
    const width = next - at;
    const factor = at === 0 ? width : width * width;
    chebyshev.forEach((row, c) => addPowers(row, length, factor, this.powers[c] ?? []));
    this.lengths.push(length);
    this.inverseLengths.push(inversePowers(at > 0 ? at / width : Infinity, this.inverse));
    this.allowed.push(allowed);
    this.sizes.forEach((row, c) => row.push(size[c] ?? 0));
    this.edges.push(next);
    this.missed += missed;
  }

  panels(): RadialPanels {
    return {
      count: this.count,
      edges: Float64Array.from(this.edges),
      field: this.powers.map((row) => Float64Array.from(row)),
      fieldLength: Int32Array.from(this.lengths),
      inverseSquare: Float64Array.from(this.inverse),
      inverseLength: Int32Array.from(this.inverseLengths),
      allowed: Float64Array.from(this.allowed),
      size: this.sizes.map((row) => Float64Array.from(row)),
      missed: this.missed,
    };
  }
}

/** Width of the next panel: no wider than the origin allows, and without a sliver before the next jump. */
function widthAt(at: number, limit: number, wanted: number): number {
  const width = at > 0 ? Math.min(wanted, STEEPNESS * at) : wanted;
  const left = limit - at;
  if (width > 0.7 * left) return Math.min(width, left);
  return width > 0.55 * left ? left / 2 : width;
}

/** A narrower width after a trial that was too wide. */
function narrower(width: number, { phase }: Trial): number {
  return width * (phase > PHASE ? Math.max(0.2, Math.min(0.9, (0.95 * PHASE) / phase)) : 0.6);
}

/**
 * Cuts a radius into panels on which a field is a polynomial to rounding and a wave turns through three radians.
 *
 * Formula: 18 Chebyshev points a panel, coefficients of T_n turned into powers of t; a panel is halved while its last coefficients count,
 * while ∫ sqrt|W - k²| dx exceeds 3, and is never wider than 0.45 of its distance from the origin.
 *
 * @param request the field W, where it jumps, and how well it must be met
 * @returns panels from start to end
 * @throws PanelError where the field is not finite or takes too many panels
 *
 * Source: textbook; L. N. Trefethen, Approximation Theory and Approximation Practice (2013), ch. 4.
 */
export function radialPanels(request: RadialPanelRequest): RadialPanels {
  const { field, start, end, breaks, wave, tolerance } = request;
  const stops = [...new Set(breaks.filter((x) => x > start && x < end))].sort((a, b) => a - b);
  stops.push(end);
  const scratch: Scratch = {
    values: Array.from({ length: field.components }, () => new Float64Array(FIELD_STRIDE)),
    out: new Float64Array(field.components),
  };
  const found = new Found(start, field.components);
  let at = start;
  let stop = 0;
  let width = Math.min(wave > 0 ? PHASE / wave : Infinity, (stops[0] ?? end) - start);
  while (at < end) {
    while ((stops[stop] ?? end) <= at) stop += 1;
    const limit = stops[stop] ?? end;
    width = widthAt(at, limit, width);
    // The width is what the rounded edges leave: no step may move the wave by a rounding of its radius.
    const next = at + width >= limit * (1 - 4 * UNIT_ROUNDOFF) ? limit : at + width;
    width = next - at;
    const trial = tryPanel(field, wave, at, width, scratch);
    const missed = trial.residual * width * (wave > 0 ? Math.min(width, 1 / wave) : width);
    const fits = trial.finite && (trial.known || missed <= tolerance);
    if (trial.phase <= PHASE * 1.001 && fits) {
      found.add(at, next, trial, missed);
      at = next;
      width *= Math.min(GROWTH, Math.max(1, PHASE / trial.phase));
      if (found.count > MOST_PANELS) throw new PanelError('tooMany', at);
    } else {
      width = narrower(width, trial);
      if (!(width > 8 * UNIT_ROUNDOFF * at && width > NARROWEST)) {
        throw new PanelError(trial.finite || at === 0 ? 'tooMany' : 'notFinite', at);
      }
    }
  }
  return found.panels();
}
