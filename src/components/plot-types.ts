export type Scale = 'linear' | 'log';

export interface PlotSeries {
  key: string;
  name: string;
  /** Abscissa and ordinate; null where there is no value, which leaves a gap. */
  points: ReadonlyArray<readonly [number, number | null]>;
  /** Place in the list of colours and dashes; by default its own place in the plot. */
  style?: number;
}

export interface PlotAxis {
  /** Quantity and unit: `dσ/dΩ (mb/sr)`. */
  title: string;
  /** How a tick reads; by default the bare number. */
  tick?: (value: number) => string;
  /** Fixed ends; by default those of the data. */
  min?: number;
  max?: number;
  /** Distance of ticks, where the trade has a habit. */
  interval?: number;
}

export interface PlotPicture {
  series: readonly PlotSeries[];
  x: PlotAxis;
  y: PlotAxis;
  yScale: Scale;
  /** Keys of the curves switched off. */
  hidden: ReadonlySet<string>;
  /** Abscissa of the crosshair. */
  cursor: number | null;
  /** Shown part of the abscissa, in percent. */
  window: readonly [number, number];
  /** Part of the abscissa that is marked. */
  band?: readonly [number, number] | null;
  /** Dragging marks a band in place of moving a zoomed window. */
  marking?: boolean;
}
