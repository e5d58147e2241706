import type { EChartsCoreOption } from 'echarts/core';
import type { Palette } from '#src/styles/tokens.ts';
import { PLOT_FONT, abscissaAxis, ordinateAxis } from './plot-axes.ts';
import { crosshair, curve, guideLines, levelLine, markedBand } from './plot-curves.ts';
import type { PlotPanel, PlotPicture } from './plot-types.ts';

export interface Margins {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

/** A plane keeps its square: what is left of a square box must be one. */
const SCREEN: Margins = { left: 62, right: 18, top: 14, bottom: 48 };
const SQUARE: Margins = { left: 62, right: 18, top: 26, bottom: 54 };

/** The plots above each other, the lower one a third. */
function gridsOf({ panel, plane }: PlotPicture, margins: Margins | undefined) {
  const { left, right, top, bottom } = margins ?? (plane ? SQUARE : SCREEN);
  const sides = { left, right, containLabel: false };
  if (!panel) return [{ ...sides, top, bottom }];
  return [
    { ...sides, top, bottom: '39%' },
    { ...sides, top: '66%', bottom },
  ];
}

function lowerPlot(picture: PlotPicture, panel: PlotPanel, palette: Palette) {
  const where = { grid: 1, scale: panel.yScale };
  return [
    ...levelLine(panel.level, where, palette),
    ...panel.series.map((series, place) => curve(series, place, picture, where, palette)),
    ...crosshair(picture, where, palette),
  ];
}

function zoomed({ window, marking, panel }: PlotPicture) {
  return {
    type: 'inside',
    xAxisIndex: panel ? [0, 1] : 0,
    filterMode: 'none',
    start: window[0],
    end: window[1],
    // The wheel alone scrolls the page.
    zoomOnMouseWheel: 'ctrl',
    moveOnMouseWheel: false,
    moveOnMouseMove: marking !== true,
    preventDefaultMouseMove: false,
  };
}

/** The plot as ECharts takes it. Nothing of it needs styles in markup: the content policy forbids them, so the tooltip stays off. */
export function plotOption(
  picture: PlotPicture,
  palette: Palette,
  margins?: Margins,
): EChartsCoreOption {
  const { series, x, y, yScale, hidden, panel, plane } = picture;
  const where = { grid: 0, scale: yScale };
  const ordinate = { axis: y, scale: yScale, series, hidden, grid: 0 };
  return {
    animation: false,
    textStyle: { fontFamily: PLOT_FONT },
    grid: gridsOf(picture, margins),
    xAxis: [
      abscissaAxis(x, palette, 0, panel ? true : false),
      ...(panel ? [abscissaAxis(x, palette, 1, false)] : []),
    ],
    yAxis: [
      ordinateAxis(ordinate, palette),
      ...(panel
        ? [
            ordinateAxis(
              { axis: panel.y, scale: panel.yScale, series: panel.series, hidden, grid: 1 },
              palette,
            ),
          ]
        : []),
    ],
    // The ends of a plane are its zoom: both axes move together.
    dataZoom: plane ? [] : [zoomed(picture)],
    series: [
      ...markedBand(picture, palette),
      ...guideLines(picture, palette),
      ...series.map((one, place) => curve(one, place, picture, where, palette)),
      ...crosshair(picture, where, palette),
      ...(panel ? lowerPlot(picture, panel, palette) : []),
    ],
  };
}
