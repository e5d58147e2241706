import { Suspense, lazy, useCallback, useEffect, useId, useState, type ReactNode } from 'react';
import { ZoomIn, ZoomOut } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';
import { usePalette } from '#src/lib/theme.ts';
import { IconButton } from './button.tsx';
import { PlotExportMenu } from './plot-export-menu.tsx';
import { PlotHandle } from './plot-handle.tsx';
import { styleOf } from './plot-curves.ts';
import { planeAxes } from './plot-plane.ts';
import type { PlotAxis, PlotPanel, PlotPicture, PlotSeries, Scale } from './plot-types.ts';

const PlotCanvas = lazy(() => import('./plot-canvas.tsx'));
const WHOLE = [0, 100] as const;

interface PlotProps {
  /** Spoken name: what is drawn against what. */
  label: string;
  series: readonly PlotSeries[];
  x: PlotAxis;
  y: PlotAxis;
  yScale: Scale;
  /** Place of the crosshair among the points of the first curve. */
  cursor: number;
  onCursor: (place: number) => void;
  /** What all curves say at the crosshair. */
  readout: ReactNode;
  /** How the crosshair's place is spoken. */
  cursorText: string;
  /** Switches of the caller, right of the legend. */
  switches?: ReactNode;
  /** The next curve is on its way: the old one stays, dimmed. */
  dimmed?: boolean;
  fileName: string;
  csv: () => string;
  /** A second plot below, over the same abscissa. */
  panel?: PlotPanel | null;
  /** Complex numbers in their plane, in the order of a parameter that the slider goes through. */
  plane?: { guides?: ReadonlyArray<PlotSeries['points']> };
  /** A part of the abscissa marked by dragging; without it dragging moves a zoomed plot. */
  band?: { ends: readonly [number, number] | null; onBand: (from: number, to: number) => void };
}

function Legend(props: {
  series: readonly PlotSeries[];
  hidden: ReadonlySet<string>;
  onToggle: (key: string) => void;
}) {
  const { palette } = usePalette();
  return (
    <ul className="flex flex-wrap gap-x-1 gap-y-1" aria-label="Curves">
      {props.series.map((series, place) => {
        const { role, dash } = styleOf(series, place);
        const off = props.hidden.has(series.key);
        return (
          <li key={series.key}>
            <button
              type="button"
              aria-pressed={!off}
              onClick={() => props.onToggle(series.key)}
              title={off ? `Show ${series.name}` : `Hide ${series.name}`}
              className={classNames(
                'flex min-h-7 items-center gap-2 rounded px-1.5 text-sm hover:bg-soft',
                off && 'text-muted line-through',
              )}
            >
              <svg viewBox="0 0 30 8" className="h-2 w-7.5" aria-hidden="true">
                <line
                  x1="0"
                  x2="30"
                  y1="4"
                  y2="4"
                  stroke={palette[role]}
                  strokeWidth="2.4"
                  strokeDasharray={dash.join(' ')}
                  opacity={off ? 0.35 : 1}
                />
              </svg>
              {series.name}
            </button>
          </li>
        );
      })}
    </ul>
  );
}

/** The point next to the pointer: along the abscissa, or in a plane in both directions. */
function nearestPlace(points: PlotSeries['points'], x: number, y: number | null): number {
  let best = 0;
  let least = Infinity;
  points.forEach(([atX, atY], place) => {
    const away = y === null ? Math.abs(atX - x) : Math.hypot(atX - x, (atY ?? Infinity) - y);
    if (away < least) [best, least] = [place, away];
  });
  return best;
}

/** True once something has lasted for a moment, false at once: what passes quickly does not flicker. */
function useLasting(now: boolean): boolean {
  const [lasting, setLasting] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setLasting(now), now ? 120 : 0);
    return () => clearTimeout(timer);
  }, [now]);
  return now && lasting;
}

function zoomed([from, to]: readonly [number, number], about: number): [number, number] {
  const half = (to - from) / 4;
  const middle = Math.min(Math.max(about, from + half), to - half);
  return [middle - half, middle + half];
}

/** A plane is square; two plots above each other need more room than one. */
function heightOf(isPlane: boolean, hasPanel: boolean): string {
  if (isPlane) return 'mx-auto aspect-square w-full max-w-[26rem]';
  return hasPanel ? 'h-[400px] sm:h-[480px]' : 'h-[300px] sm:h-[350px]';
}

/** The one plot of the application: legend that toggles, crosshair for mouse, touch and keyboard, zoom, and export. */
export function Plot(props: PlotProps) {
  const { label, series, yScale, cursor, onCursor, band, panel = null, plane } = props;
  const [hidden, setHidden] = useState<ReadonlySet<string>>(new Set());
  const [window, setWindow] = useState<readonly [number, number]>(WHOLE);
  const sliderId = useId();
  const first = series[0]?.points;
  const place = Math.min(cursor, (first?.length ?? 1) - 1);
  const [at = null, level = null] = first?.[place] ?? [];
  const isPlane = plane !== undefined;
  const guides = plane?.guides ?? [];
  const shown = series.filter(({ key }) => !hidden.has(key)).map(({ points }) => points);
  const { x, y } = isPlane
    ? planeAxes(
        props,
        [...shown, ...guides],
        100 / (window[1] - window[0]),
        at === null || level === null ? null : [at, level],
      )
    : props;
  const picture: PlotPicture = {
    ...{ series, x, y, yScale, hidden, cursor: at, place, window, panel, guides },
    plane: isPlane,
    band: band?.ends ?? null,
    marking: band !== undefined,
    faded: useLasting(props.dimmed ?? false),
  };

  const onPoint = useCallback(
    (pointX: number, pointY: number) => {
      if (first) onCursor(nearestPlace(first, pointX, isPlane ? pointY : null));
    },
    [first, onCursor, isPlane],
  );
  const toggle = (key: string) =>
    setHidden((keys) => {
      const next = new Set(keys);
      if (!next.delete(key)) next.add(key);
      return next;
    });
  const descending =
    first !== undefined && !isPlane && (first[0]?.[0] ?? 0) > (first.at(-1)?.[0] ?? 0);
  const last = Math.max(0, (first?.length ?? 1) - 1);
  const ends = first ? [first[0]?.[0] ?? 0, first[last]?.[0] ?? 1] : [0, 1];
  const [low = 0, high = 1] = [Math.min(...ends), Math.max(...ends)];
  const share = at === null ? 50 : (100 * (at - low)) / (high - low || 1);

  return (
    <figure aria-label={label} className="min-w-0">
      <div className="mb-2 flex flex-wrap items-center justify-between gap-x-4 gap-y-2">
        <Legend series={series} hidden={hidden} onToggle={toggle} />
        <div className="flex flex-wrap items-center gap-1.5" data-screen-only>
          {props.switches}
          <IconButton
            label="Zoom in at the crosshair"
            className="size-7!"
            onClick={() => setWindow(zoomed(window, share))}
          >
            <ZoomIn aria-hidden="true" className="size-4" />
          </IconButton>
          <IconButton
            label="Show the whole range"
            className="size-7!"
            disabled={window[0] <= 0 && window[1] >= 100}
            onClick={() => setWindow(WHOLE)}
          >
            <ZoomOut aria-hidden="true" className="size-4" />
          </IconButton>
          <PlotExportMenu fileName={props.fileName} picture={picture} csv={props.csv} />
        </div>
      </div>
      <div
        role="img"
        aria-label={`${label}. The numbers stand in the table below.`}
        aria-busy={props.dimmed || undefined}
        className={classNames(
          'relative',
          heightOf(isPlane, panel !== null),
          band && 'cursor-crosshair',
        )}
      >
        <Suspense fallback={<p className="grid h-full place-items-center text-muted">Drawing…</p>}>
          <PlotCanvas
            picture={picture}
            onPoint={onPoint}
            onWindow={setWindow}
            onBand={band?.onBand}
          />
        </Suspense>
      </div>
      <div>
        {/* Inset as the axis is, so that the handle stands below the crosshair. */}
        <div className={classNames('flex', !isPlane && 'pr-[11px] pl-[55px]')} data-screen-only>
          <label htmlFor={sliderId} className="sr-only">
            Crosshair
          </label>
          <PlotHandle
            id={sliderId}
            min={0}
            max={last}
            value={Math.min(cursor, last)}
            aria-valuetext={props.cursorText}
            dir={descending ? 'rtl' : 'ltr'}
            onChange={(event) => onCursor(Number(event.target.value))}
          />
        </div>
        {props.readout}
      </div>
    </figure>
  );
}
