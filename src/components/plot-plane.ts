import type { PlotAxis, PlotSeries } from './plot-types.ts';

type Points = PlotSeries['points'];

function reach(all: readonly Points[]): { x: [number, number]; y: [number, number] } {
  const xs: number[] = [];
  const ys: number[] = [];
  for (const points of all) {
    for (const [x, y] of points) {
      if (y === null) continue;
      xs.push(x);
      ys.push(y);
    }
  }
  if (xs.length === 0) return { x: [-1, 1], y: [-1, 1] };
  // The origin belongs to every plane of complex numbers.
  const ends = (values: number[]): [number, number] => [
    values.reduce((a, b) => Math.min(a, b), 0),
    values.reduce((a, b) => Math.max(a, b), 0),
  ];
  return { x: ends(xs), y: ends(ys) };
}

/** The step of ticks a person would choose: 1, 2 or 5 times a power of ten. */
function step(span: number): number {
  const rough = span / 5;
  const power = 10 ** Math.floor(Math.log10(rough));
  const share = rough / power;
  return power * (share < 1.5 ? 1 : share < 3.5 ? 2 : share < 7.5 ? 5 : 10);
}

function about(middle: number, span: number, tick: number) {
  const low = Math.floor((middle - span / 2) / tick) * tick;
  return { min: low, max: low + (Math.ceil(span / tick) + 1) * tick, interval: tick };
}

/** Both axes of a plane with ends on ticks and of one length, so that a circle is one; `zoom` above 1 looks closer at a point. */
export function planeAxes(
  axes: { x: PlotAxis; y: PlotAxis },
  drawn: readonly Points[],
  zoom: number,
  at: readonly [number, number] | null,
): { x: PlotAxis; y: PlotAxis } {
  const { x, y } = reach(drawn);
  const widest = Math.max(x[1] - x[0], y[1] - y[0]) || 1;
  const span = (1.04 * widest) / zoom;
  const tick = step(span);
  const close = zoom > 1 && at;
  const middle = close ? at : [(x[0] + x[1]) / 2, (y[0] + y[1]) / 2];
  return {
    x: { ...axes.x, ...about(middle[0] ?? 0, span, tick) },
    y: { ...axes.y, ...about(middle[1] ?? 0, span, tick) },
  };
}
