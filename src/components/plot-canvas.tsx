import { useEffect, useRef } from 'react';
import { LineChart, ScatterChart } from 'echarts/charts';
import {
  DataZoomInsideComponent,
  GridComponent,
  LegendComponent,
  MarkLineComponent,
} from 'echarts/components';
import * as echarts from 'echarts/core';
import { CanvasRenderer, SVGRenderer } from 'echarts/renderers';
import EChartsReact from 'echarts-for-react/esm/core';
import { usePalette } from '#src/lib/theme.ts';
import { plotOption } from './plot-option.ts';
import type { PlotPicture } from './plot-types.ts';

echarts.use([
  LineChart,
  ScatterChart,
  GridComponent,
  DataZoomInsideComponent,
  LegendComponent,
  MarkLineComponent,
  CanvasRenderer,
  SVGRenderer,
]);

interface PlotCanvasProps {
  picture: PlotPicture;
  onPoint: (x: number) => void;
  onWindow: (window: [number, number]) => void;
}

interface ZoomEvent {
  start?: number;
  end?: number;
  batch?: { start?: number; end?: number }[];
}

/** The drawn part, loaded when the first plot is shown. */
export default function PlotCanvas({ picture, onPoint, onWindow }: PlotCanvasProps) {
  const { palette } = usePalette();
  const chart = useRef<EChartsReact>(null);
  const box = useRef<HTMLDivElement>(null);

  // The wrapper ignores the first resize after a remount, so the plot watches its box itself.
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const observer = new ResizeObserver(() => chart.current?.getEchartsInstance().resize());
    observer.observe(element);
    return () => observer.disconnect();
  }, []);

  useEffect(() => {
    const instance = chart.current?.getEchartsInstance();
    const surface = instance?.getZr();
    if (!instance || !surface) return;
    const follow = (event: { offsetX: number; offsetY: number }) => {
      const at = [event.offsetX, event.offsetY];
      if (!instance.containPixel('grid', at)) return;
      const [x] = instance.convertFromPixel('grid', at);
      if (typeof x === 'number' && Number.isFinite(x)) onPoint(x);
    };
    surface.on('mousemove', follow);
    surface.on('click', follow);
    return () => {
      surface.off('mousemove', follow);
      surface.off('click', follow);
    };
  }, [onPoint]);

  const onZoom = (event: ZoomEvent) => {
    const { start, end } = event.batch?.[0] ?? event;
    if (start !== undefined && end !== undefined) onWindow([start, end]);
  };

  return (
    <div ref={box} className="h-full w-full">
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
