import type { Estimate } from '#shared/contracts/estimates.ts';

type Potential = Extract<Estimate['potential'], { r: number[] }>;

export interface SketchCurve {
  name: string;
  points: { x: number; y: number }[];
}

export interface Sketch {
  curves: SketchCurve[];
  /** Range of r shown, and of V. */
  r: [number, number];
  v: [number, number];
  /** The curve goes on beyond the lower or upper end. */
  cut: boolean;
  /** Radius within which V is infinite and has no points. */
  wall: number | null;
}

const COMPLEX = (v: Potential['v'][number]): { re: number; im: number } =>
  typeof v === 'number' ? { re: v, im: 0 } : v;

/** Height that shows the shape: the whole where it is finite, the part beyond the innermost eighth where it rises without end. */
function height(r: readonly number[], sizes: readonly number[], end: number): number {
  const whole = Math.max(...sizes, 0);
  const outer = Math.max(...sizes.filter((_, i) => (r[i] ?? 0) >= end / 8), 0);
  return outer > 0 && whole > 4 * outer ? 2.2 * outer : whole;
}

/** Where the curve has died away to nothing the picture need not go on. */
function usefulEnd(r: readonly number[], sizes: readonly number[]): number {
  const last = r.at(-1) ?? 1;
  const largest = Math.max(...sizes.filter((_, i) => (r[i] ?? 0) >= last / 20), 0);
  let end = last;
  for (let i = r.length - 1; i >= 0; i -= 1) {
    if ((sizes[i] ?? 0) > 0.004 * largest) break;
    end = r[i] ?? end;
  }
  return Math.max(end * 1.1 < last ? end * 1.1 : last, last / 20);
}

/** Finite potentials are sampled from next to the origin; where the first points are missing, nothing enters. */
function wallOf([first = 0, second = 0]: readonly number[]): number | null {
  return first > 5 * (second - first) ? first : null;
}

/** V(r) cut to a window that shows its shape, real and imaginary part. */
export function sketchOf(potential: Potential): Sketch {
  const values = potential.v.map(COMPLEX);
  const sizes = values.map(({ re, im }) => Math.max(Math.abs(re), Math.abs(im)));
  const end = usefulEnd(potential.r, sizes);
  const top = height(potential.r, sizes, end) || 1;
  const within = potential.r.map((_, i) => i).filter((i) => (potential.r[i] ?? 0) <= end);
  const complex = values.some(({ im }) => im !== 0);
  const part = (name: string, read: (v: { re: number; im: number }) => number): SketchCurve => ({
    name,
    points: within
      .map((i) => ({ x: potential.r[i] ?? 0, y: read(values[i] ?? { re: 0, im: 0 }) }))
      .filter(({ y }) => Math.abs(y) <= top),
  });
  const curves = complex
    ? [part('Re V', ({ re }) => re), part('Im V', ({ im }) => im)]
    : [part('V', ({ re }) => re)];
  const ys = curves.flatMap(({ points }) => points.map(({ y }) => y));
  return {
    curves,
    r: [0, end],
    v: [Math.min(0, ...ys), Math.max(0, ...ys)],
    cut: Math.max(...sizes, 0) > top,
    wall: wallOf(potential.r),
  };
}
