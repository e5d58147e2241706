import { useEffect, useRef } from 'react';
import { LineChart, ScatterChart } from 'echarts/charts';
import {
  DataZoomInsideComponent,
  GridComponent,
  LegendComponent,
  MarkAreaComponent,
  MarkLineComponent,
} from 'echarts/components';
import * as echarts from 'echarts/core';
import { CanvasRenderer, SVGRenderer } from 'echarts/renderers';
import EChartsReact from 'echarts-for-react/esm/core';
import { usePalette } from '#src/lib/theme.ts';
import { fonts } from '#src/styles/tokens.ts';
import { plotOption } from './plot-option.ts';
import type { PlotPicture } from './plot-types.ts';

echarts.use([
  LineChart,
  ScatterChart,
  GridComponent,
  DataZoomInsideComponent,
  LegendComponent,
  MarkAreaComponent,
  MarkLineComponent,
  CanvasRenderer,
  SVGRenderer,
]);

interface PlotCanvasProps {
  picture: PlotPicture;
  onPoint: (x: number, y: number) => void;
  onWindow: (window: [number, number]) => void;
  /** Where dragging marks a band: its two ends, in the order they were drawn. */
  onBand?: ((from: number, to: number) => void) | undefined;
}

interface Pointer {
  offsetX: number;
  offsetY: number;
}

/** A press that moves less than this is a click. */
const DRAG_PIXELS = 4;

interface ZoomEvent {
  start?: number;
  end?: number;
  batch?: { start?: number; end?: number }[];
}

/** The drawn part, loaded when the first plot is shown. */
export default function PlotCanvas({ picture, onPoint, onWindow, onBand }: PlotCanvasProps) {
  const { palette } = usePalette();
  const chart = useRef<EChartsReact>(null);
  const box = useRef<HTMLDivElement>(null);
  /** Where a drag began: it outlives the redrawing that it causes. */
  const pressed = useRef<Pointer>(null);
  const grids = picture.panel ? 2 : 1;

  // The wrapper ignores the first resize after a remount, so the plot watches its box itself.
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const observer = new ResizeObserver(() => chart.current?.getEchartsInstance().resize());
    observer.observe(element);
    return () => observer.disconnect();
  }, []);

  // A canvas asks for a face it has not got yet, but is not drawn anew when it comes.
  useEffect(() => {
    let gone = false;
    void document.fonts.load(`12px ${fonts.sans}`, '0⁻⁴₀').then(() => {
      if (!gone) chart.current?.getEchartsInstance().resize();
    });
    return () => {
      gone = true;
    };
  }, []);

  useEffect(() => {
    const instance = chart.current?.getEchartsInstance();
    const surface = instance?.getZr();
    if (!instance || !surface) return;
    const placeAt = ({ offsetX, offsetY }: Pointer) => {
      const [x, y] = instance.convertFromPixel('grid', [offsetX, offsetY]);
      return typeof x === 'number' && Number.isFinite(x) ? [x, y ?? 0] : null;
    };
    const abscissaAt = (pointer: Pointer) => placeAt(pointer)?.[0] ?? null;
    const inside = ({ offsetX, offsetY }: Pointer) =>
      Array.from({ length: grids }, (_, gridIndex) => gridIndex).some((gridIndex) =>
        instance.containPixel({ gridIndex }, [offsetX, offsetY]),
      );
    const follow = (event: Pointer) => {
      const start = pressed.current;
      if (start && onBand && Math.abs(event.offsetX - start.offsetX) >= DRAG_PIXELS) {
        const [from, to] = [abscissaAt(start), abscissaAt(event)];
        if (from !== null && to !== null) onBand(from, to);
      }
      const [x, y] = (inside(event) ? placeAt(event) : null) ?? [];
      if (x !== undefined && y !== undefined) onPoint(x, y);
    };
    const press = (event: Pointer) => {
      const { offsetX, offsetY } = event;
      pressed.current = inside(event) ? { offsetX, offsetY } : null;
    };
    const release = () => {
      pressed.current = null;
    };
    surface.on('mousemove', follow);
    surface.on('click', follow);
    surface.on('mousedown', press);
    surface.on('mouseup', release);
    return () => {
      surface.off('mousemove', follow);
      surface.off('click', follow);
      surface.off('mousedown', press);
      surface.off('mouseup', release);
    };
  }, [onPoint, onBand, grids]);

  const onZoom = (event: ZoomEvent) => {
    const { start, end } = event.batch?.[0] ?? event;
    if (start !== undefined && end !== undefined) onWindow([start, end]);
  };

  return (
    <div ref={box} className="absolute inset-0 overflow-hidden">
      <EChartsReact
        ref={chart}
        echarts={echarts}
        option={plotOption(picture, palette)}
        notMerge
        autoResize={false}
        onEvents={{ datazoom: onZoom }}
        style={{ height: '100%', width: '100%' }}
      />
    </div>
  );
}
