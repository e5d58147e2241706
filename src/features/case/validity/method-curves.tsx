import { useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import type { PlotSeries } from '#src/components/plot-types.ts';
import { csvOf } from '#src/lib/csv.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import { NumbersTable } from '../components/numbers-table.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { ABSCISSA_WORDS, abscissaAxis, angleText } from '../model/abscissa-axis.ts';
import { abscissaOf, curvesOf } from '../model/curves.ts';
import type { Abscissa, Curve } from '../model/curves.ts';
import type { TableUnits } from '../model/csv.ts';
import { numericsText } from '../model/verdict.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { referenceName } from './model/methods.ts';
import { leavesPicture, overlayRows, ratioPanel, ratiosOf } from './model/overlay.ts';
import type { Ratios } from './model/overlay.ts';
import { Item, Items, Panel } from './panel.tsx';
import { ScaleSwitches, useScales } from './scales.tsx';

export function seriesOf(curves: readonly Curve[], abscissa: Abscissa): PlotSeries[] {
  return curves.map(({ key, name, style, points }) => ({
    key,
    name,
    style,
    points: points.flatMap((point): [number, number | null][] => {
      const x = abscissaOf(point, abscissa);
      return x === null ? [] : [[x, point.dcs]];
    }),
  }));
}

/** Units of a table of curves in the frame of the answer. */
export function tableUnits(estimate: Estimate, areaUnit: string): TableUnits {
  const { angle, length } = estimate.units;
  return {
    angle,
    wavenumber: `1/${length}`,
    dcs: `${areaUnit}/sr`,
    frame: estimate.frame,
  };
}

interface ReadoutProps {
  curves: readonly Curve[];
  ratios: Ratios | null;
  place: number;
  units: TableUnits;
}

/** All methods at the crosshair: value, numerical error and ratio. */
function MethodReadout({ curves, ratios, place, units }: ReadoutProps) {
  const first = curves[0]?.points[place];
  if (!first) return null;
  return (
    <Items>
      <Item name={`angle, ${units.frame}`}>θ = {angleText(first.theta, units.angle)}</Item>
      {curves.map(({ key, name, points }) => {
        const point = points[place];
        const ratio = ratios?.curves.find((curve) => curve.key === key)?.values[place] ?? null;
        return (
          <Item key={key} name={name}>
            {!point || point.dcs === null ? (
              <span className="font-sans">{point?.reason ?? 'no value'}</span>
            ) : (
              <>
                {formatNumber(point.dcs, 5)} {unitSymbol(units.dcs)}
                <span className="text-muted">
                  {' · '}
                  {numericsText(point)}
                  {ratio !== null &&
                    ratios &&
                    ` · ${formatNumber(ratio, 4)} of ${referenceName(ratios.reference)}`}
                </span>
              </>
            )}
          </Item>
        );
      })}
    </Items>
  );
}

function saysOf(ratios: Ratios): string {
  const by =
    ratios.reference === 'partialWaves'
      ? 'the exact one'
      : `${METHOD_NAMES[ratios.reference]}, for there is no exact curve here`;
  const edge = leavesPicture(ratios)
    ? ' A ratio above 1000 or below 0.001 is drawn at the edge; the row below the plot has its value.'
    : '';
  return `Below on the same abscissa: each method divided by ${by}.${edge}`;
}

interface MethodCurvesProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** dσ/dΩ of every method, and below on the same abscissa each against the exact one. */
export function MethodCurves({ estimate, dimmed, fileName }: MethodCurvesProps) {
  const { areaUnit } = useEditing();
  const scales = useScales();
  const { yScale, abscissa } = scales;
  const curves = useMemo(() => curvesOf(estimate, areaUnit, { sums: true }), [estimate, areaUnit]);
  const ratios = useMemo(() => ratiosOf(estimate, curves), [estimate, curves]);
  const series = useMemo(() => seriesOf(curves, abscissa), [curves, abscissa]);
  const panel = useMemo(() => ratioPanel(ratios, curves, abscissa), [ratios, curves, abscissa]);
  const [place, setPlace] = useState<number | null>(null);
  const [tableOpen, setTableOpen] = useState(false);
  const count = curves[0]?.points.length ?? 0;
  const cursor = Math.min(place ?? Math.floor((count - 1) / 3), Math.max(0, count - 1));
  const at = curves[0]?.points[cursor];
  if (!at) {
    return (
      <Panel title="All methods">
        <p className="text-muted">No method yields a curve here.</p>
      </Panel>
    );
  }
  const units = tableUnits(estimate, areaUnit);
  const spoken = curves
    .map(({ name, points }) => {
      const dcs = points[cursor]?.dcs ?? null;
      return `${name} ${dcs === null ? 'no value' : formatComposed(dcs, units.dcs, 4)}`;
    })
    .join(', ');
  return (
    <Panel title="All methods" says={ratios ? saysOf(ratios) : undefined}>
      <Plot
        label={`Differential cross section of every method against ${ABSCISSA_WORDS[abscissa]}`}
        series={series}
        x={abscissaAxis(abscissa, curves, estimate)}
        y={{ title: `dσ/dΩ (${unitSymbol(units.dcs)})` }}
        yScale={yScale}
        panel={panel}
        cursor={cursor}
        onCursor={setPlace}
        cursorText={`θ = ${angleText(at.theta, units.angle)}: ${spoken}`}
        dimmed={dimmed}
        fileName={`${fileName}-methods`}
        csv={() => csvOf(overlayRows(curves, ratios, units))}
        switches={<ScaleSwitches {...scales} />}
        readout={<MethodReadout curves={curves} ratios={ratios} place={cursor} units={units} />}
      />
      <details
        className="mt-3 border-t border-line pt-2"
        onToggle={(event) => setTableOpen(event.currentTarget.open)}
      >
        <summary className="w-fit rounded text-sm text-muted hover:text-ink">
          The numbers as a table ({count} angles)
        </summary>
        {tableOpen && <NumbersTable curves={curves} units={units} />}
      </details>
    </Panel>
  );
}
