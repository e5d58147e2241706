import type { PlotPanel, PlotSeries } from '#src/components/plot-types.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { Curve } from '../../model/curves.ts';
import { quotient, ratioAxis } from './overlay.ts';

/** The curves of a case and of its opposite by one method, with their ratio below. */
export interface BothSigns {
  /** As the method is called in the tables. */
  name: string;
  series: PlotSeries[];
  panel: PlotPanel;
}

/** Methods that know the sign, the best first. */
const KNOWING = ['partialWaves', 'eikonal', 'born2'];

function pairs({ points }: Curve): [number, number | null][] {
  return points.map(({ theta, dcs }) => [theta, dcs]);
}

/** By the best method there is for both; null where none of them knows the sign. */
export function signSeries(given: readonly Curve[], turned: readonly Curve[]): BothSigns | null {
  const key = KNOWING.find((one) =>
    [given, turned].every((curves) => curves.some((curve) => curve.key === one)),
  );
  const a = given.find((curve) => curve.key === key);
  const b = turned.find((curve) => curve.key === key);
  if (!a || !b) return null;
  const ratios = a.points.map(({ theta, dcs }, place): [number, number | null] => [
    theta,
    quotient(b.points[place]?.dcs, dcs),
  ]);
  const values = ratios.flatMap(([, value]) => (value === null ? [] : [value]));
  return {
    name: a.name,
    series: [
      { key: 'given', name: 'as given', style: a.style, points: pairs(a) },
      { key: 'turned', name: 'opposite sign', style: 4, points: pairs(b) },
    ],
    panel: {
      ...ratioAxis(values, 'opposite / given'),
      series: [{ key: 'turned', name: 'opposite over given', style: 4, points: ratios }],
      level: 1,
    },
  };
}

export function signRatio({ panel }: BothSigns, place: number): number | null {
  return panel.series[0]?.points[place]?.[1] ?? null;
}

export function signRows(
  { name, series, panel }: BothSigns,
  dcsUnit: string,
  angle: string,
  frame: string,
): string[][] {
  const [given, turned] = series;
  const number = (value: number | null | undefined) =>
    typeof value === 'number' ? fullDigits(value) : '';
  return [
    ['theta', `dcs ${name}, as given`, `dcs ${name}, opposite sign`, 'opposite over given'],
    [`${angle} (${frame})`, `${dcsUnit} (${frame})`, `${dcsUnit} (${frame})`, '1'],
    ...(given?.points ?? []).map(([theta, dcs], place) => [
      fullDigits(theta),
      number(dcs),
      number(turned?.points[place]?.[1]),
      number(panel.series[0]?.points[place]?.[1]),
    ]),
  ];
}
