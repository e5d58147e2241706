import { series as styles, type Palette } from '#src/styles/tokens.ts';
import type { PlotPicture, PlotSeries, Scale } from './plot-types.ts';

export function styleOf(series: PlotSeries, place: number) {
  const index = (series.style ?? place) % styles.length;
  return styles[index] ?? { role: 'ink' as const, dash: [] };
}

const FADED = 0.4;

/** Which of two plots above each other something is drawn in. */
interface Where {
  grid: number;
  scale: Scale;
}

const shown = (value: number | null, scale: Scale) =>
  value !== null && (scale !== 'log' || value > 0) ? value : null;

export function curve(
  series: PlotSeries,
  place: number,
  { hidden, faded }: PlotPicture,
  { grid, scale }: Where,
  palette: Palette,
) {
  const { role, dash } = styleOf(series, place);
  return {
    type: 'line' as const,
    id: grid === 0 ? series.key : `panel ${series.key}`,
    name: series.name,
    xAxisIndex: grid,
    yAxisIndex: grid,
    data: hidden.has(series.key) ? [] : series.points.map(([x, y]) => [x, shown(y, scale)]),
    ...(series.marks
      ? { symbol: 'circle', symbolSize: 5.5, showAllSymbol: true }
      : { symbol: 'none' }),
    lineStyle: {
      color: palette[role],
      width: series.marks ? 1.2 : 2.2,
      type: dash.length > 0 ? [...dash] : 'solid',
      opacity: faded ? FADED : 1,
    },
    itemStyle: { color: palette[role], opacity: faded ? FADED : 1 },
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

const ROUND = {
  type: 'scatter' as const,
  symbolSize: 9,
  silent: true,
  animation: false,
  z: 5,
};

/** A mark on every curve at the crosshair, and over an abscissa a line through both plots. */
export function crosshair(picture: PlotPicture, where: Where, palette: Palette) {
  const { cursor, plane, place, panel, hidden } = picture;
  if (cursor === null) return [];
  const { grid, scale } = where;
  const drawn = grid === 0 ? picture.series : (panel?.series ?? []);
  const marks = drawn.flatMap((series, index) => {
    if (hidden.has(series.key)) return [];
    const point = plane ? series.points[place ?? 0] : nearestPoint(series.points, cursor);
    const value = shown(point?.[1] ?? null, scale);
    if (!point || value === null) return [];
    const { role } = styleOf(series, index);
    return [{ value: [point[0], value], itemStyle: { color: palette[role] } }];
  });
  const line = {
    silent: true,
    symbol: 'none',
    animation: false,
    label: { show: false },
    lineStyle: { color: palette.muted, type: [3, 3], width: 1 },
    data: [{ xAxis: cursor }],
  };
  return [
    {
      ...ROUND,
      id: grid === 0 ? 'crosshair' : 'panel crosshair',
      xAxisIndex: grid,
      yAxisIndex: grid,
      data: marks,
      itemStyle: { borderColor: palette.sheet, borderWidth: 1.5 },
      ...(plane ? {} : { markLine: line }),
    },
  ];
}

/** The marked part of the abscissa: a ground behind the curves and an edge on either side, so that no hue carries it alone. */
export function markedBand({ band }: PlotPicture, palette: Palette) {
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

/** A line across at a value worth one. */
export function levelLine(level: number | undefined, { grid }: Where, palette: Palette) {
  if (level === undefined) return [];
  return [
    {
      type: 'line' as const,
      id: 'level',
      xAxisIndex: grid,
      yAxisIndex: grid,
      data: [],
      silent: true,
      animation: false,
      z: 1,
      markLine: {
        silent: true,
        symbol: 'none',
        animation: false,
        label: { show: false },
        lineStyle: { color: palette.muted, type: 'solid', width: 1.2 },
        data: [{ yAxis: level }],
      },
    },
  ];
}

/** Lines of a plane itself, such as a circle no point may leave. */
export function guideLines({ guides = [] }: PlotPicture, palette: Palette) {
  return guides.map((points, index) => ({
    type: 'line' as const,
    id: `guide ${index}`,
    data: points.map(([x, y]) => [x, y]),
    symbol: 'none',
    lineStyle: { color: palette.edge, width: 1.2, type: 'solid' as const },
    silent: true,
    animation: false,
    z: 1,
  }));
}
