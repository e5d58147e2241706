import { useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import { csvOf } from '#src/lib/csv.ts';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { abscissaAxis, angleText } from '../model/abscissa-axis.ts';
import type { Curve } from '../model/curves.ts';
import { signRatio, signRows } from './model/signs.ts';
import type { BothSigns } from './model/signs.ts';
import { Item, Items } from './panel.tsx';

interface SignPlotProps {
  drawn: BothSigns;
  curves: readonly Curve[];
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** Both curves by the best method that knows the sign, and their ratio. */
export function SignPlot({ drawn, curves, estimate, dimmed, fileName }: SignPlotProps) {
  const { areaUnit } = useEditing();
  const [place, setPlace] = useState<number | null>(null);
  const { angle } = estimate.units;
  const dcsUnit = `${areaUnit}/sr`;
  const points = drawn.series[0]?.points ?? [];
  const cursor = Math.min(place ?? Math.floor((points.length - 1) / 3), points.length - 1);
  const at = angleText(points[cursor]?.[0] ?? 0, angle);
  const ratio = signRatio(drawn, cursor);
  return (
    <Plot
      label={`Differential cross section of both signs against angle, ${drawn.name}`}
      series={drawn.series}
      x={abscissaAxis('theta', curves, estimate)}
      y={{ title: `dσ/dΩ (${unitSymbol(dcsUnit)})` }}
      yScale="log"
      panel={drawn.panel}
      cursor={cursor}
      onCursor={setPlace}
      cursorText={`θ = ${at}: opposite over given ${ratio === null ? 'no value' : formatNumber(ratio, 4)}`}
      dimmed={dimmed}
      fileName={`${fileName}-signs`}
      csv={() => csvOf(signRows(drawn, dcsUnit, angle, estimate.frame))}
      readout={
        <Items>
          <Item name={`angle, ${estimate.frame}`}>θ = {at}</Item>
          {drawn.series.map(({ key, name, points: own }) => {
            const value = own[cursor]?.[1] ?? null;
            return (
              <Item key={key} name={`${name}, ${drawn.name}`}>
                {value === null ? 'no value' : formatComposed(value, dcsUnit, 5)}
              </Item>
            );
          })}
          <Item name="opposite / given">
            {ratio === null ? 'no value' : formatNumber(ratio, 5)}
          </Item>
        </Items>
      }
    />
  );
}
