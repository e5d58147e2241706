import { describe, expect, test } from 'vitest';
import type { RadialField } from '#server/physics/numerics/radial-trial.ts';
import { PanelError, radialPanels } from '#server/physics/numerics/radial-panels.ts';
import { stepAdded } from '#server/physics/numerics/radial-added.ts';
import type { PanelPowers } from '#server/physics/numerics/radial-powers.ts';
import { addBarrier, fieldPowers, panelPowers } from '#server/physics/numerics/radial-powers.ts';
import type { RadialWave } from '#server/physics/numerics/radial-series.ts';
import {
  squareOfLast,
  stepComplex,
  stepFromOrigin,
  stepReal,
} from '#server/physics/numerics/radial-steps.ts';
import { FIELD_STRIDE } from '#server/physics/numerics/shifted-chebyshev.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const field = (f: (x: number) => number): RadialField => ({
  components: 1,
  at: (x, out) => {
    out[0] = f(x);
  },
});
const request = (f: (x: number) => number, start: number, end: number, wave: number) =>
  radialPanels({ field: field(f), start, end, breaks: [], wave, tolerance: 1e-18 });

/** The regular solution of y'' = (l(l+1)/x² + f - wave²) y at the end, with its slope. */
function follow(f: (x: number) => number, l: number, end: number, wave: number) {
  const panels = request(f, 0, end, wave);
  const y: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
  const powers = panelPowers();
  fieldPowers(panels, 0, 0, 1, 0, 0, powers);
  const width = panels.edges[1] ?? NaN;
  const P = new Float64Array(FIELD_STRIDE + 2);
  for (let m = 0; m < powers.length; m++) P[m + 1] = powers.powers[m] ?? 0;
  P[2] = (P[2] ?? 0) - (wave * width) ** 2;
  stepFromOrigin(l, P, null, y);
  let last = width;
  for (let p = 1; p < panels.count; p++) {
    const next = (panels.edges[p + 1] ?? NaN) - (panels.edges[p] ?? NaN);
    y.slopeRe *= next / last;
    last = next;
    fieldPowers(panels, p, 0, 1, 0, 0, powers);
    addBarrier(panels, p, l * (l + 1), wave, powers);
    stepReal(powers.powers, powers.length, y);
  }
  return { value: y.re, slope: y.slopeRe / last, first: width, count: panels.count };
}

describe('power series over panels', () => {
  test.each([0, 1, 4])('a harmonic oscillator, l = %s: x^{l+1} exp(-x²/2)', (l) => {
    // y'' = (l(l+1)/x² + x² - (2l+3)) y
    const end = 3;
    const { value, slope } = follow((x) => x * x, l, end, Math.sqrt(2 * l + 3));
    expectRelative(slope / value, (l + 1) / end - end, 1e-10);
  });

  test.each([0, 2])(
    'a charge that attracts, l = %s: x^{l+1} exp(-x/(l+1)), singular at the origin',
    (l) => {
      const kappa = 1 / (l + 1);
      const end = 6;
      const { value, slope } = follow((x) => -2 / x + kappa * kappa, l, end, 0);
      expectRelative(slope / value, (l + 1) / end - kappa, 1e-10);
    },
  );

  test('sin and its Wronskian over a hundred periods', () => {
    const end = 200 * Math.PI + 1;
    const { value, slope, count } = follow(() => 0, 0, end, 1);
    expectRelative(value / slope, Math.tan(1), 1e-12);
    expect(count).toBeLessThan(400);
  });

  test('a real and a complex step agree; a phase of i turns the wave', () => {
    const W = Float64Array.of(-4, 0.5, -0.25);
    const real: RadialWave = { re: 0.3, im: 0, slopeRe: -0.7, slopeIm: 0 };
    const complex: RadialWave = { re: 0, im: 0.3, slopeRe: 0, slopeIm: -0.7 };
    stepReal(W, 3, real);
    stepComplex(W, 3, new Float64Array(3), 3, complex);
    expectRelative(complex.im, real.re, 1e-15);
    expectRelative(complex.slopeIm, real.slopeRe, 1e-15);
    expect(complex.re).toBe(0);
  });

  test('a complex field: y = exp((1 + i)t) for W = 2i', () => {
    const wave: RadialWave = { re: 1, im: 0, slopeRe: 1, slopeIm: 1 };
    stepComplex(Float64Array.of(0), 1, Float64Array.of(2), 1, wave);
    expectRelative(wave.re, Math.E * Math.cos(1), 1e-15);
    expectRelative(wave.im, Math.E * Math.sin(1), 1e-15);
  });

  test('free wave and addition: their sum is the whole wave, however weak the field', () => {
    const powers = (...values: number[]): PanelPowers => ({
      powers: Float64Array.from([...values, ...Array<number>(64 - values.length).fill(0)]),
      length: values.length,
    });
    for (const size of [1, 1e-9]) {
      const free: RadialWave = { re: 0.2, im: 0, slopeRe: 1, slopeIm: 0 };
      const added: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
      const whole: RadialWave = { ...free };
      stepReal(Float64Array.of(-3 + size, -0.5 * size), 2, whole);
      stepAdded(powers(-3), powers(size, -0.5 * size), powers(), free, added);
      expect(Math.abs(free.re + added.re - whole.re)).toBeLessThan(1e-15);
      // First order by Green's function: ∫ sin(w(1-t))/w · size (1 - t/2) F dt, checked by halving the size.
      const half: RadialWave = { re: 0, im: 0, slopeRe: 0, slopeIm: 0 };
      const again: RadialWave = { re: 0.2, im: 0, slopeRe: 1, slopeIm: 0 };
      stepAdded(powers(-3), powers(size / 2, -0.25 * size), powers(), again, half);
      if (size < 1) expectRelative(added.re / half.re, 2, 1e-9);
    }
  });

  test('the square of a series', () => {
    const wave: RadialWave = { re: 0, im: 0, slopeRe: 2, slopeIm: 0 };
    const terms = stepReal(Float64Array.of(-4), 1, wave);
    // ∫ sin²(2t) dt
    expectRelative(squareOfLast(terms, 0), 0.5 - Math.sin(4) / 8, 1e-14);
  });
});

describe('panels', () => {
  test('cut where the field jumps, and no wider than the wave allows', () => {
    const panels = radialPanels({
      field: field((x) => (x < 1 ? -5 : 0)),
      start: 0,
      end: 3,
      breaks: [1, 7],
      wave: 4,
      tolerance: 1e-18,
    });
    expect([...panels.edges]).toContain(1);
    expect(panels.edges[panels.count]).toBe(3);
    for (let p = 0; p < panels.count; p++) {
      const width = (panels.edges[p + 1] ?? NaN) - (panels.edges[p] ?? NaN);
      expect(4 * width).toBeLessThanOrEqual(3.1);
    }
  });

  test('the powers give the field back', () => {
    const f = (x: number) => -20 / (1 + Math.exp((x - 2) / 0.3));
    const panels = request(f, 0, 6, 1);
    const row = panels.field[0] ?? new Float64Array();
    for (let p = 1; p < panels.count; p++) {
      const [from, to] = [panels.edges[p] ?? NaN, panels.edges[p + 1] ?? NaN];
      for (const t of [0.1, 0.5, 0.93]) {
        let sum = 0;
        for (let m = FIELD_STRIDE - 1; m >= 0; m--)
          sum = sum * t + (row[p * FIELD_STRIDE + m] ?? 0);
        const found = sum / (to - from) ** 2;
        expect(Math.abs(found - f(from + t * (to - from)))).toBeLessThan(1e-13);
      }
    }
  });

  test('a field that is not finite or never ends is refused with its radius', () => {
    const attempt = (f: (x: number) => number, wave = 1) => {
      try {
        request(f, 0, 2, wave);
      } catch (error) {
        if (error instanceof PanelError) return error;
        throw error;
      }
      throw new Error('was followed');
    };
    expect(attempt((x) => (x > 1 ? NaN : 0))).toMatchObject({ reason: 'notFinite' });
    expect(attempt((x) => (x > 1 ? NaN : 0)).at).toBeGreaterThan(0.9);
    expect(attempt(() => 0, 1e6)).toMatchObject({ reason: 'tooMany' });
    expect(attempt((x) => -1 / x ** 2)).toMatchObject({ reason: 'tooMany' });
  });
});
