/** An axis in the units of its numbers, with the places of its ticks. */
export interface Scale {
  from: number;
  to: number;
  ticks: number[];
}

/** More decades than this hide what matters: what lies deeper is not drawn. */
export const MOST_DECADES = 12;

/** Round steps of 1, 2, 3 (of right angles) or 5 between two numbers, about `count` of them. */
export function linearScale(from: number, to: number, count = 6): Scale {
  if (!(to > from)) {
    const half = Math.abs(from) > 0 ? Math.abs(from) * 0.1 : 1;
    return linearScale(from - half, from + half, count);
  }
  const rough = (to - from) / count;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 3, 5, 10].map((s) => s * power).find((s) => s >= rough) ?? 10 * power;
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  const ticks = Array.from({ length: last - first + 1 }, (_, i) => (first + i) * step);
  return { from, to, ticks };
}

/**
 * A logarithmic axis, in powers of ten, around values above zero; null where there are none.
 * It ends at whole decades, and ticks are thinned out to eight at most.
 */
export function decadeScale(values: readonly number[]): Scale | null {
  const logs = values.filter((value) => value > 0).map((value) => Math.log10(value));
  if (logs.length === 0) return null;
  const highest = logs.reduce((a, b) => Math.max(a, b));
  const lowest = logs.reduce((a, b) => Math.min(a, b));
  const to = Math.floor(highest) + 1;
  const from = Math.max(Math.floor(lowest), to - MOST_DECADES);
  const step = Math.max(1, Math.ceil((to - from) / 8));
  const ticks = [];
  for (let tick = from; tick <= to; tick += step) ticks.push(tick);
  return { from, to, ticks };
}
