import { UNIT_ROUNDOFF } from './rounding.ts';
import { addPowers, FIELD_STRIDE, FIT_POINTS, shiftedChebyshev } from './shifted-chebyshev.ts';

/** Real functions of a radius that multiply a wave, all asked at once. */
export interface RadialField {
  components: number;
  /** Writes the values at x into `out`. */
  at: (x: number, out: Float64Array) => void;
}

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
/** Values carry roundings of their own, those of an exponent among them: below this a narrower panel gains nothing. */
const PLATEAU = 16 * UNIT_ROUNDOFF;
/** Coefficients below this are rounding. */
const LOST = 2 * UNIT_ROUNDOFF;
/** Coefficients at the end that tell what a fit misses. */
const LAST = 3;

/** A field on one trial panel: its Chebyshev coefficients, how many count, and what they miss. */
interface Trial {
  chebyshev: Float64Array[];
  length: number;
  residual: number;
  /** Whether the residual is no more than rounding of the values. */
  known: boolean;
  finite: boolean;
  /** ∫ sqrt|field - wave²| over the panel. */
  phase: number;
  allowed: number;
  size: Float64Array;
}

/** Reused between trials. */
interface Scratch {
  values: Float64Array[];
  out: Float64Array;
}

function tryPanel(
  { field, wave }: RadialPanelRequest,
  from: number,
  width: number,
  { values, out }: Scratch,
): Trial {
  let phase = 0;
  let allowed = -Infinity;
  const sizes = new Float64Array(field.components);
  let finite = true;
  for (let i = 0; i < FIELD_STRIDE; i++) {
    const x = from + width * (FIT_POINTS[i] ?? 0);
    field.at(x, out);
    let size = 0;
    for (let c = 0; c < field.components; c++) {
      const value = out[c] ?? NaN;
      if (!Number.isFinite(value)) finite = false;
      if (c < 2) size += Math.abs(c === 0 ? value - wave * wave : value);
      sizes[c] = Math.max(sizes[c] ?? 0, x * x * Math.abs(value));
      (values[c] ?? out)[i] = from === 0 ? value * x : value;
    }
    phase += Math.sqrt(size) / FIELD_STRIDE;
    allowed = Math.max(allowed, x * x * (wave * wave - (out[0] ?? 0)));
  }
  let length = 1;
  let residual = 0;
  let known = true;
  // One component may be the small difference of others: the largest value sets the rounding of all.
  let largest = 0;
  for (const f of values) for (const one of f) largest = Math.max(largest, Math.abs(one));
  const chebyshev = finite ? values.map(shiftedChebyshev) : [];
  for (const row of chebyshev) {
    let n = FIELD_STRIDE;
    while (n > 1 && Math.abs(row[n - 1] ?? 0) <= LOST * largest) n -= 1;
    length = Math.max(length, n);
    let tail = 0;
    for (let i = 1; i <= LAST; i++) tail += Math.abs(row[FIELD_STRIDE - i] ?? 0);
    residual = Math.max(residual, from === 0 ? tail / width : tail);
    if (tail > PLATEAU * largest) known = false;
  }
  return { chebyshev, length, residual, known, finite, phase: phase * width, allowed, size: sizes };
}

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
  const edges = [start];
  const powers: number[][] = Array.from({ length: field.components }, () => []);
  const lengths: number[] = [];
  const inverse: number[] = [];
  const inverseLengths: number[] = [];
  const allowed: number[] = [];
  const sizes: number[][] = powers.map(() => []);
  let missed = 0;
  let at = start;
  let stop = 0;
  let width = Math.min(wave > 0 ? PHASE / wave : Infinity, (stops[0] ?? end) - start);
  while (at < end) {
    while ((stops[stop] ?? end) <= at) stop += 1;
    const limit = stops[stop] ?? end;
    if (at > 0) width = Math.min(width, STEEPNESS * at);
    if (width > 0.7 * (limit - at)) width = Math.min(width, limit - at);
    if (width < limit - at && width > 0.55 * (limit - at)) width = (limit - at) / 2;
    // The width is what the rounded edges leave: no step may move the wave by a rounding of its radius.
    const next = at + width >= limit * (1 - 4 * UNIT_ROUNDOFF) ? limit : at + width;
    width = next - at;
    const trial = tryPanel(request, at, width, scratch);
    const weight = width * (wave > 0 ? Math.min(width, 1 / wave) : width);
    const fits = trial.finite && (trial.known || trial.residual * weight <= tolerance);
    if (!(trial.phase <= PHASE * 1.001 && fits)) {
      width *=
        trial.phase > PHASE ? Math.max(0.2, Math.min(0.9, (0.95 * PHASE) / trial.phase)) : 0.6;
      if (!(width > 8 * UNIT_ROUNDOFF * at && width > 1e-290)) {
        throw new PanelError(trial.finite || at === 0 ? 'tooMany' : 'notFinite', at);
      }
      continue;
    }
    const factor = at === 0 ? width : width * width;
    trial.chebyshev.forEach((row, c) => addPowers(row, trial.length, factor, powers[c] ?? []));
    lengths.push(trial.length);
    inverseLengths.push(inversePowers(at > 0 ? at / width : Infinity, inverse));
    allowed.push(trial.allowed);
    sizes.forEach((row, c) => row.push(trial.size[c] ?? 0));
    missed += trial.residual * weight;
    at = next;
    edges.push(at);
    width *= Math.min(GROWTH, Math.max(1, PHASE / trial.phase));
    if (lengths.length > MOST_PANELS) throw new PanelError('tooMany', at);
  }
  return {
    count: lengths.length,
    edges: Float64Array.from(edges),
    field: powers.map((row) => Float64Array.from(row)),
    fieldLength: Int32Array.from(lengths),
    inverseSquare: Float64Array.from(inverse),
    inverseLength: Int32Array.from(inverseLengths),
    allowed: Float64Array.from(allowed),
    size: sizes.map((row) => Float64Array.from(row)),
    missed,
  };
}
