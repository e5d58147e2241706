import type { PlotPicture } from '#src/components/plot-types.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { fullDigits, unitSymbol } from '#shared/units/format.ts';
import { sketchOf } from '#src/components/potential-shape.ts';

export type Potential = Extract<Estimate['potential'], { r: number[] }>;

/** V(r) as the sketch shows it, cut where it rises without end, as a plot for pictures. */
export function potentialPicture(potential: Potential): PlotPicture {
  const { curves, r } = sketchOf(potential);
  return {
    series: curves.map(({ name, points }) => ({
      key: name,
      name: `${name}(r)`,
      points: points.map(({ x, y }): [number, number] => [x, y]),
    })),
    x: { title: `r (${unitSymbol(potential.unit.r)})`, min: 0, max: r[1] },
    y: { title: `V(r) (${unitSymbol(potential.unit.v)})` },
    yScale: 'linear',
    hidden: new Set(),
    cursor: null,
    window: [0, 100],
  };
}

/** Every point of V(r) the engine answered: a row of names, one of units, all digits. */
export function potentialRows({ r, v, unit }: Potential): string[][] {
  const complex = v.some((value) => typeof value !== 'number');
  const names = complex ? ['r', 'Re V', 'Im V'] : ['r', 'V'];
  const units = [unit.r, ...names.slice(1).map(() => unit.v)];
  const rows = r.map((radius, i) => {
    const value = v[i] ?? NaN;
    const parts = typeof value === 'number' ? { re: value, im: 0 } : value;
    const shown = complex ? [parts.re, parts.im] : [parts.re];
    return [radius, ...shown].map(fullDigits);
  });
  return [names, units, ...rows];
}
