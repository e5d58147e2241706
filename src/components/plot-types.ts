export type Scale = 'linear' | 'log';

export interface PlotSeries {
  key: string;
  name: string;
  /** Abscissa and ordinate; null where there is no value, which leaves a gap. */
  points: ReadonlyArray<readonly [number, number | null]>;
  /** Place in the list of colours and dashes; by default its own place in the plot. */
  style?: number;
  /** Each point is a thing of its own, such as a partial wave, and is marked. */
  marks?: boolean;
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
  /** Counts something: ticks at whole numbers only. */
  whole?: boolean;
}

/** A second, lower plot over the same abscissa; its curves go with those of the same key. */
export interface PlotPanel {
  y: PlotAxis;
  yScale: Scale;
  series: readonly PlotSeries[];
  /** A value worth a line across, such as a ratio of one. */
  level?: number;
}

export interface PlotPicture {
  series: readonly PlotSeries[];
  x: PlotAxis;
  y: PlotAxis;
  yScale: Scale;
  panel?: PlotPanel | null;
  /** Both axes are of one scale and the points stand in the order of a parameter: complex numbers in their plane. */
  plane?: boolean;
  /** Lines of the plane itself, behind the curves. */
  guides?: ReadonlyArray<PlotSeries['points']>;
  /** Keys of the curves switched off. */
  hidden: ReadonlySet<string>;
  /** Abscissa of the crosshair. */
  cursor: number | null;
  /** Place of the crosshair among the points, which is what a plane goes by. */
  place?: number;
  /** Shown part of the abscissa, in percent. */
  window: readonly [number, number];
  /** Part of the abscissa that is marked. */
  band?: readonly [number, number] | null;
  /** The curves belong to inputs that have changed since: drawn pale, axes as ever. */
  faded?: boolean;
  /** Dragging marks a band in place of moving a zoomed window. */
  marking?: boolean;
}
