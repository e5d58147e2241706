import { useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import type { PlotSeries } from '#src/components/plot-types.ts';
import { csvOf } from '#src/lib/csv.ts';
import { formatNumber, fullDigits } from '#shared/units/format.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { abscissaAxis, angleText } from '../model/abscissa-axis.ts';
import { METHOD_STYLES, curvesOf } from '../model/curves.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { computedMethods } from './model/methods.ts';
import { Item, Items, Panel } from './panel.tsx';

function powerSeries(estimate: Estimate): PlotSeries[] {
  return computedMethods(estimate).flatMap(({ method, result }) => {
    const points = result.differential.map(({ theta, analysingPower }): [number, number | null] => [
      theta,
      analysingPower ?? null,
    ]);
    if (!points.some(([, value]) => value !== null)) return [];
    return [{ key: method, name: METHOD_NAMES[method], style: METHOD_STYLES[method], points }];
  });
}

interface AnalysingPowerProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** Left-right asymmetry of a polarised beam, where a spin-orbit term makes one. */
export function AnalysingPower({ estimate, dimmed, fileName }: AnalysingPowerProps) {
  const series = useMemo(() => powerSeries(estimate), [estimate]);
  const curves = useMemo(() => curvesOf(estimate, estimate.units.area, { sums: true }), [estimate]);
  const [place, setPlace] = useState<number | null>(null);
  const [first] = series;
  if (!first) return null;
  const count = first.points.length;
  const cursor = Math.min(place ?? Math.floor((count - 1) / 3), count - 1);
  const theta = first.points[cursor]?.[0] ?? 0;
  const { angle } = estimate.units;
  const text = (value: number | null | undefined) =>
    typeof value === 'number' ? formatNumber(value, 4) : 'no value';
  return (
    <Panel
      title="Analysing power"
      says="Left-right asymmetry A of a fully polarised beam, Madison convention: positive where more goes to the left, seen along the beam with the polarisation up."
    >
      <Plot
        label="Analysing power against angle"
        series={series}
        x={abscissaAxis('theta', curves, estimate)}
        y={{ title: 'analysing power A', min: -1, max: 1, interval: 0.5 }}
        yScale="linear"
        cursor={cursor}
        onCursor={setPlace}
        cursorText={`θ = ${angleText(theta, angle)}: ${series
          .map(({ name, points }) => `${name} A = ${text(points[cursor]?.[1])}`)
          .join(', ')}`}
        dimmed={dimmed}
        fileName={`${fileName}-analysing-power`}
        csv={() =>
          csvOf([
            ['theta', ...series.map(({ name }) => `analysing power ${name}`)],
            [`${angle} (${estimate.frame})`, ...series.map(() => '1')],
            ...first.points.map(([at], row) => [
              fullDigits(at),
              ...series.map(({ points }) => {
                const value = points[row]?.[1];
                return typeof value === 'number' ? fullDigits(value) : '';
              }),
            ]),
          ])
        }
        readout={
          <Items>
            <Item name={`angle, ${estimate.frame}`}>θ = {angleText(theta, angle)}</Item>
            {series.map(({ key, name, points }) => (
              <Item key={key} name={`A, ${name}`}>
                {text(points[cursor]?.[1])}
              </Item>
            ))}
          </Items>
        }
      />
    </Panel>
  );
}
