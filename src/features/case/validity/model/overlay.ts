import type { PlotAxis, PlotPanel, PlotSeries, Scale } from '#src/components/plot-types.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { Estimate, Method } from '#shared/contracts/estimates.ts';
import { abscissaOf } from '../../model/curves.ts';
import type { Abscissa, Curve, CurvePoint } from '../../model/curves.ts';
import { curvesRows } from '../../model/csv.ts';
import type { TableUnits } from '../../model/csv.ts';
import { referenceName, referenceOf } from './methods.ts';

/** Each method divided by the one they are held against, at the same angles. */
export interface Ratios {
  reference: Method;
  curves: { key: string; name: string; style: number; values: (number | null)[] }[];
}

/** A method over another; nothing where either has no value or the quotient has no meaning. */
export function quotient(value: number | null | undefined, by: number | null | undefined) {
  if (typeof value !== 'number' || typeof by !== 'number' || by === 0) return null;
  const ratio = value / by;
  return Number.isFinite(ratio) ? ratio : null;
}

export function ratiosOf(estimate: Estimate, curves: readonly Curve[]): Ratios | null {
  const reference = referenceOf(estimate)?.method;
  const base = curves.find(({ key }) => key === reference);
  if (reference === undefined || !base) return null;
  const others = curves.filter(({ key }) => key !== reference);
  if (others.length === 0) return null;
  return {
    reference,
    curves: others.map(({ key, name, style, points }) => ({
      key,
      name,
      style,
      values: points.map(({ dcs }, place) => quotient(dcs, base.points[place]?.dcs)),
    })),
  };
}

/** Ratios beyond these are drawn at the edge of the picture: a minimum of one curve must not flatten all else. */
const MOST = 1e3;

/** Whether some ratio is drawn at the edge instead of where it is. */
export function leavesPicture({ curves }: Ratios): boolean {
  return curves.some(({ values }) =>
    values.some((value) => value !== null && (value > MOST || value < 1 / MOST)),
  );
}

function ticked(low: number, high: number): PlotAxis {
  const rough = (high - low) / 3;
  const power = 10 ** Math.floor(Math.log10(rough));
  const interval = power * (rough / power > 5 ? 10 : rough / power > 2 ? 5 : 2);
  return {
    title: '',
    min: Math.floor(low / interval) * interval,
    max: Math.ceil(high / interval) * interval,
    interval,
  };
}

/** Linear about one where the methods lie together, logarithmic where they part by more than a factor of ten. */
export function ratioAxis(
  values: readonly number[],
  title: string,
): { y: PlotAxis; yScale: Scale } {
  const low = values.reduce((a, b) => Math.min(a, b), 1);
  const high = values.reduce((a, b) => Math.max(a, b), 1);
  if (high > 10 || (low > 0 && high / low > 10)) {
    const decade = (value: number) => 10 ** value;
    return {
      yScale: 'log',
      y: {
        title,
        min: decade(Math.floor(Math.log10(Math.max(low, 1 / MOST)))),
        max: decade(Math.ceil(Math.log10(Math.min(high, MOST)))),
      },
    };
  }
  if (!(high - low > 1e-9)) return { yScale: 'linear', y: { title, min: 0, max: 2, interval: 1 } };
  return { yScale: 'linear', y: { ...ticked(low, high), title } };
}

/** The plot below the curves: ratios over the same abscissa. */
export function ratioPanel(
  ratios: Ratios | null,
  curves: readonly Curve[],
  abscissa: Abscissa,
): PlotPanel | null {
  const [first] = curves;
  if (!ratios || !first) return null;
  const { y, yScale } = ratioAxis(
    ratios.curves.flatMap(({ values }) => values.filter((value) => value !== null)),
    `ratio to ${referenceName(ratios.reference)}`,
  );
  const [floor, roof] = yScale === 'log' ? [y.min ?? 0, y.max ?? Infinity] : [-Infinity, Infinity];
  const series = ratios.curves.map(({ key, name, style, values }): PlotSeries => ({
    key,
    name,
    style,
    points: values.flatMap((value, place): [number, number | null][] => {
      const point = first.points[place];
      const x = point ? abscissaOf(point, abscissa) : null;
      if (x === null) return [];
      return [[x, value === null ? null : Math.min(Math.max(value, floor), roof)]];
    }),
  }));
  return { y, yScale, series, level: 1 };
}

/** What a point may be off by, in its unit. */
function errorOf({ dcs, relativeError, absoluteError }: CurvePoint): string {
  if (absoluteError !== undefined) return fullDigits(absoluteError);
  if (relativeError === undefined || dcs === null) return '';
  return fullDigits(relativeError * Math.abs(dcs));
}

/** The table of the curves, behind it what each number may be off by, and the ratios. */
export function overlayRows(
  curves: readonly Curve[],
  ratios: Ratios | null,
  units: TableUnits,
): string[][] {
  const [names = [], unitRow = [], ...rows] = curvesRows(curves, units);
  const over = ratios === null ? '' : referenceName(ratios.reference);
  const divided = ratios?.curves ?? [];
  return [
    [
      ...names,
      ...curves.map(({ name }) => `numerical error ${name}`),
      ...divided.map(({ name }) => `ratio ${name} to ${over}`),
    ],
    [...unitRow, ...curves.map(() => units.dcs), ...divided.map(() => '1')],
    ...rows.map((row, place) => [
      ...row,
      ...curves.map(({ points }) => {
        const point = points[place];
        return point ? errorOf(point) : '';
      }),
      ...divided.map(({ values }) => {
        const value = values[place];
        return typeof value === 'number' ? fullDigits(value) : '';
      }),
    ]),
  ];
}
