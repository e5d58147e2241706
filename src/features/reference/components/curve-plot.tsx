import { useMemo, useState } from 'react';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import { Plot } from '#src/components/plot.tsx';
import type { Scale } from '#src/components/plot-types.ts';
import { Segmented } from '#src/components/segmented.tsx';
import { csvOf } from '#src/lib/csv.ts';
import { cutOf, rowsOf, seriesOf, type Curve } from '../model/curve.ts';

/** The end of an axis in two digits, so that its last tick reads well. */
function roundEnd(values: readonly number[]): number {
  const last = values.at(-1) ?? 1;
  const unit = 10 ** (Math.floor(Math.log10(last)) - 1);
  return Number((Math.ceil(last / unit - 1e-9) * unit).toPrecision(2));
}

interface CurvePlotProps {
  /** Spoken name: what is drawn against what. */
  label: string;
  curve: Curve;
  /** Sign and unit of both axes. */
  x: { symbol: string; title: string; unit: string };
  y: { symbol: string; title: string; unit: string };
  fileName: string;
}

/** One curve of a form, signed or as its size on a logarithmic scale, with its numbers at the crosshair. */
export function CurvePlot({ label, curve, x, y, fileName }: CurvePlotProps) {
  const [scale, setScale] = useState<Scale>('linear');
  const [place, setPlace] = useState<number | null>(null);
  const series = useMemo(() => seriesOf(curve, y.symbol, scale), [curve, y.symbol, scale]);
  const cut = scale === 'linear' ? cutOf(curve) : null;
  const cursor = Math.min(place ?? Math.floor(curve.x.length / 4), curve.x.length - 1);
  const at = curve.x[cursor] ?? 0;
  const re = curve.re[cursor] ?? 0;
  const im = curve.im?.[cursor];
  const value = (part: number) => formatComposed(part, y.unit, 5);
  return (
    <Plot
      label={label}
      series={series}
      x={{ title: `${x.title} (${unitSymbol(x.unit)})`, min: 0, max: roundEnd(curve.x) }}
      y={{ title: `${scale === 'log' ? `|${y.symbol}|` : y.title} (${unitSymbol(y.unit)})` }}
      yScale={scale}
      cursor={cursor}
      onCursor={setPlace}
      cursorText={`${x.symbol} = ${formatComposed(at, x.unit, 4)}, ${y.symbol} = ${value(re)}`}
      fileName={fileName}
      csv={() => csvOf(rowsOf(curve, [x.symbol, y.symbol], [x.unit, y.unit]))}
      switches={
        <Segmented
          label={`Scale of ${y.symbol}`}
          value={scale}
          choices={[
            { value: 'linear', label: 'linear' },
            { value: 'log', label: 'log' },
          ]}
          onChange={setScale}
        />
      }
      readout={
        <div className="mt-2 flex flex-wrap gap-x-8 gap-y-1 border-t border-line pt-2.5 font-mono text-sm">
          <span>
            {x.symbol} = {formatComposed(at, x.unit, 4)}
          </span>
          <span>
            {y.symbol} = {value(re)}
            {im !== undefined && ` ${im < 0 ? '−' : '+'} i ${formatNumber(Math.abs(im), 5)}`}
          </span>
          <span className="font-sans text-muted">
            {cut !== null &&
              `cut off at ${formatComposed(Math.sign(curve.re[0] ?? 1) * cut, y.unit, 2)}; the log scale shows all`}
          </span>
        </div>
      }
    />
  );
}
