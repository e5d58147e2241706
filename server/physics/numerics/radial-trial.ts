import { UNIT_ROUNDOFF } from './rounding.ts';
import { FIELD_STRIDE, FIT_POINTS, shiftedChebyshev } from './shifted-chebyshev.ts';

/** Real functions of a radius that multiply a wave, all asked at once. */
export interface RadialField {
  components: number;
  /** Writes the values at x into `out`. */
  at: (x: number, out: Float64Array) => void;
}

/** Values carry roundings of their own, those of an exponent among them: below this a narrower panel gains nothing. */
const PLATEAU = 16 * UNIT_ROUNDOFF;
/** Coefficients below this are rounding. */
const LOST = 2 * UNIT_ROUNDOFF;
/** Coefficients at the end that tell what a fit misses. */
const LAST = 3;

/** A field on one trial panel: its Chebyshev coefficients, how many count, and what they miss. */
export interface Trial {
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
export interface Scratch {
  values: Float64Array[];
  out: Float64Array;
}

/**
 * Fits a field on one panel and looks at what a wave does there.
 *
 * @param wave wave number far out
 * @param from, width the panel
 * @param scratch arrays as long as there are points and components
 */
export function tryPanel(
  field: RadialField,
  wave: number,
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
