import type { PlotPanel, PlotSeries } from '#src/components/plot-types.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { Curve } from '../../model/curves.ts';
import { quotient, ratioAxis } from './overlay.ts';

/** The exact curve of a case and of its opposite, with their ratio below. */
export interface BothSigns {
  /** Whether there is an exact curve of both. */
  exact: boolean;
  series: PlotSeries[];
  panel: PlotPanel | null;
}

const EXACT = 'partialWaves';

function pairs({ points }: Curve): [number, number | null][] {
  return points.map(({ theta, dcs }) => [theta, dcs]);
}

export function signSeries(given: readonly Curve[], turned: readonly Curve[]): BothSigns {
  const a = given.find(({ key }) => key === EXACT);
  const b = turned.find(({ key }) => key === EXACT);
  if (!a || !b) return { exact: false, series: [], panel: null };
  const ratios = a.points.map(({ theta, dcs }, place): [number, number | null] => [
    theta,
    quotient(b.points[place]?.dcs, dcs),
  ]);
  const values = ratios.flatMap(([, value]) => (value === null ? [] : [value]));
  return {
    exact: true,
    series: [
      { key: 'given', name: 'exact, as given', style: 1, points: pairs(a) },
      { key: 'turned', name: 'exact, opposite sign', style: 4, points: pairs(b) },
    ],
    panel: {
      ...ratioAxis(values, 'opposite / given'),
      series: [{ key: 'turned', name: 'opposite over given', style: 4, points: ratios }],
      level: 1,
    },
  };
}

export function signRatio({ panel }: BothSigns, place: number): number | null {
  return panel?.series[0]?.points[place]?.[1] ?? null;
}

export function signRows(
  { series, panel }: BothSigns,
  dcsUnit: string,
  angle: string,
  frame: string,
): string[][] {
  const [given, turned] = series;
  const number = (value: number | null | undefined) =>
    typeof value === 'number' ? fullDigits(value) : '';
  return [
    ['theta', 'dcs exact as given', 'dcs exact opposite sign', 'opposite over given'],
    [`${angle} (${frame})`, `${dcsUnit} (${frame})`, `${dcsUnit} (${frame})`, '1'],
    ...(given?.points ?? []).map(([theta, dcs], place) => [
      fullDigits(theta),
      number(dcs),
      number(turned?.points[place]?.[1]),
      number(panel?.series[0]?.points[place]?.[1]),
    ]),
  ];
}
