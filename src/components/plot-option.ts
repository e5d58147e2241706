import type { EChartsCoreOption } from 'echarts/core';
import { formatNumber } from '#shared/units/format.ts';
import { fonts, series as styles, type Palette } from '#src/styles/tokens.ts';
import type { PlotAxis, PlotPicture, PlotSeries } from './plot-types.ts';

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
    nameTextStyle: { color: palette.ink, fontFamily: fonts.sans, fontSize: 13.5 },
    axisLine: { show: true, onZero: false, lineStyle: { color: palette.edge } },
    axisTick: { lineStyle: { color: palette.edge } },
    splitLine: { show: true, lineStyle: { color: palette.line, width: 1 } },
    axisLabel: { color: palette.muted, fontFamily: fonts.sans, fontSize: 12.5, hideOverlap: true },
  };
}

export function styleOf(series: PlotSeries, place: number) {
  const index = (series.style ?? place) % styles.length;
  return styles[index] ?? { role: 'ink' as const, dash: [] };
}

function extentOf({ series, hidden, yScale }: PlotPicture): [number, number] | null {
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

function curve(series: PlotSeries, place: number, picture: PlotPicture, palette: Palette) {
  const { role, dash } = styleOf(series, place);
  const positive = picture.yScale === 'log';
  return {
    type: 'line' as const,
    id: series.key,
    name: series.name,
    data: picture.hidden.has(series.key)
      ? []
      : series.points.map(([x, y]) => [x, y !== null && (!positive || y > 0) ? y : null]),
    symbol: 'none',
    lineStyle: { color: palette[role], width: 2.2, type: dash.length > 0 ? [...dash] : 'solid' },
    itemStyle: { color: palette[role] },
    silent: true,
    animation: false,
  };
}

/** The value a curve has at the point next to an abscissa. */
export function nearestPoint(
  points: PlotSeries['points'],
  x: number,
): readonly [number, number | null] | undefined {
  let best: readonly [number, number | null] | undefined;
  for (const point of points) {
    if (!best || Math.abs(point[0] - x) < Math.abs(best[0] - x)) best = point;
  }
  return best;
}

function crosshair(picture: PlotPicture, palette: Palette) {
  const { cursor } = picture;
  if (cursor === null) return [];
  const marks = picture.series.flatMap((series, place) => {
    if (picture.hidden.has(series.key)) return [];
    const point = nearestPoint(series.points, cursor);
    const value = point?.[1];
    if (!point || value === null || value === undefined) return [];
    if (picture.yScale === 'log' && !(value > 0)) return [];
    const { role } = styleOf(series, place);
    return [{ value: [point[0], value], itemStyle: { color: palette[role] } }];
  });
  return [
    {
      type: 'scatter' as const,
      id: 'crosshair',
      data: marks,
      symbolSize: 9,
      itemStyle: { borderColor: palette.sheet, borderWidth: 1.5 },
      silent: true,
      animation: false,
      z: 5,
      markLine: {
        silent: true,
        symbol: 'none',
        animation: false,
        label: { show: false },
        lineStyle: { color: palette.muted, type: [3, 3], width: 1 },
        data: [{ xAxis: cursor }],
      },
    },
  ];
}

/** The marked part of the abscissa: a ground behind the curves and an edge on either side, so that no hue carries it alone. */
function markedBand({ band }: PlotPicture, palette: Palette) {
  if (!band) return [];
  return [
    {
      type: 'line' as const,
      id: 'band',
      data: [],
      silent: true,
      animation: false,
      z: 1,
      markArea: {
        silent: true,
        animation: false,
        itemStyle: { color: palette.slate, opacity: 0.14 },
        data: [[{ xAxis: band[0] }, { xAxis: band[1] }]],
      },
      markLine: {
        silent: true,
        symbol: 'none',
        animation: false,
        label: { show: false },
        lineStyle: { color: palette.slate, type: 'solid', width: 1.2 },
        data: [{ xAxis: band[0] }, { xAxis: band[1] }],
      },
    },
  ];
}

/** The plot as ECharts takes it. Nothing of it needs styles in markup: the content policy forbids them, so the tooltip stays off. */
export function plotOption(picture: PlotPicture, palette: Palette): EChartsCoreOption {
  const { x, y, yScale, window } = picture;
  const log = yScale === 'log';
  return {
    animation: false,
    textStyle: { fontFamily: fonts.sans },
    grid: { left: 62, right: 18, top: 14, bottom: 48, containLabel: false },
    xAxis: {
      type: 'value',
      ...axisLook(x, palette),
      nameGap: 28,
      min: x.min ?? 'dataMin',
      max: x.max ?? 'dataMax',
      ...(x.interval === undefined ? {} : { interval: x.interval }),
      axisLabel: {
        ...axisLook(x, palette).axisLabel,
        formatter: x.tick ?? plainTick,
        showMinLabel: true,
        showMaxLabel: true,
      },
    },
    yAxis: {
      type: log ? 'log' : 'value',
      ...axisLook(y, palette),
      nameGap: 44,
      ...(log ? logEnds(extentOf(picture)) : { scale: false, boundaryGap: [0, '4%'] }),
      axisLabel: {
        ...axisLook(y, palette).axisLabel,
        formatter: log ? powerOfTen : (y.tick ?? plainTick),
      },
    },
    dataZoom: [
      {
        type: 'inside',
        xAxisIndex: 0,
        filterMode: 'none',
        start: window[0],
        end: window[1],
        // The wheel alone scrolls the page.
        zoomOnMouseWheel: 'ctrl',
        moveOnMouseWheel: false,
        moveOnMouseMove: picture.marking !== true,
        preventDefaultMouseMove: false,
      },
    ],
    series: [
      ...markedBand(picture, palette),
      ...picture.series.map((series, place) => curve(series, place, picture, palette)),
      ...crosshair(picture, palette),
    ],
  };
}
