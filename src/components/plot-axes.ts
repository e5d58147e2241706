import { formatNumber } from '#shared/units/format.ts';
import { fonts, type Palette } from '#src/styles/tokens.ts';
import type { PlotAxis, PlotPicture, PlotSeries, Scale } from './plot-types.ts';

/** A drawing carries it inside an attribute, which double quotes would end. */
export const PLOT_FONT = fonts.sans.replaceAll('"', "'");

/** Powers below the largest value that a logarithmic axis still shows: deep minima must not flatten the curve. */
const DECADES = 14;

function powerOfTen(value: number): string {
  const exponent = Math.round(Math.log10(value));
  if (exponent >= -2 && exponent <= 3) return String(10 ** exponent);
  const raised = [...String(Math.abs(exponent))].map((d) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(d)] ?? '').join('');
  return `10${exponent < 0 ? '⁻' : ''}${raised}`;
}

function plainTick(value: number): string {
  const size = Math.abs(value);
  if (size !== 0 && (size < 1e-3 || size >= 1e5))
    return formatNumber(Number(value.toPrecision(3)), 3);
  return String(Number(value.toPrecision(6))).replace('-', '−');
}

function axisLook(axis: PlotAxis, palette: Palette) {
  return {
    name: axis.title,
    nameLocation: 'middle' as const,
    nameTextStyle: { color: palette.ink, fontFamily: PLOT_FONT, fontSize: 13.5 },
    axisLine: { show: true, onZero: false, lineStyle: { color: palette.edge } },
    axisTick: { lineStyle: { color: palette.edge } },
    splitLine: { show: true, lineStyle: { color: palette.line, width: 1 } },
    axisLabel: { color: palette.muted, fontFamily: PLOT_FONT, fontSize: 12.5, hideOverlap: true },
  };
}

type Drawn = Pick<PlotPicture, 'hidden' | 'yScale'> & { series: readonly PlotSeries[] };

function extentOf({ series, hidden, yScale }: Drawn): [number, number] | null {
  let low = Infinity;
  let high = -Infinity;
  for (const { key, points } of series) {
    if (hidden.has(key)) continue;
    for (const [, value] of points) {
      if (value === null || (yScale === 'log' && !(value > 0))) continue;
      low = Math.min(low, value);
      high = Math.max(high, value);
    }
  }
  return high >= low ? [low, high] : null;
}

function logEnds(extent: [number, number] | null): { min?: number; max?: number } {
  if (!extent) return {};
  const [low, high] = extent;
  const top = Math.ceil(Math.log10(high) - 1e-9);
  const bottom = Math.max(Math.floor(Math.log10(low) + 1e-9), top - DECADES);
  return { min: 10 ** Math.min(bottom, top - 1), max: 10 ** top };
}

/** `bare`: the upper of two plots leaves labels and title of the abscissa to the lower. */
export function abscissaAxis(axis: PlotAxis, palette: Palette, grid: number, bare: boolean) {
  const look = axisLook(axis, palette);
  return {
    type: 'value' as const,
    gridIndex: grid,
    ...look,
    ...(bare ? { name: '' } : {}),
    nameGap: 28,
    min: axis.min ?? 'dataMin',
    max: axis.max ?? 'dataMax',
    ...(axis.interval === undefined ? {} : { interval: axis.interval }),
    ...(axis.whole ? { minInterval: 1 } : {}),
    axisLabel: {
      ...look.axisLabel,
      show: !bare,
      formatter: axis.tick ?? plainTick,
      showMinLabel: true,
      showMaxLabel: true,
    },
  };
}

function linearEnds({ min, max, interval }: PlotAxis) {
  if (min !== undefined && max !== undefined) {
    return { min, max, ...(interval === undefined ? {} : { interval }) };
  }
  return { scale: false, boundaryGap: [0, '4%'] };
}

interface Ordinate {
  axis: PlotAxis;
  scale: Scale;
  series: readonly PlotSeries[];
  hidden: ReadonlySet<string>;
  grid: number;
}

export function ordinateAxis({ axis, scale, series, hidden, grid }: Ordinate, palette: Palette) {
  const log = scale === 'log';
  const look = axisLook(axis, palette);
  const free = axis.min === undefined || axis.max === undefined;
  return {
    type: log ? ('log' as const) : ('value' as const),
    gridIndex: grid,
    ...look,
    nameGap: 44,
    ...(log && free ? logEnds(extentOf({ series, hidden, yScale: scale })) : linearEnds(axis)),
    ...(grid > 0 ? { splitNumber: 3 } : {}),
    axisLabel: { ...look.axisLabel, formatter: log ? powerOfTen : (axis.tick ?? plainTick) },
  };
}
