import { useCallback, useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import type { Scale } from '#src/components/plot-types.ts';
import { Segmented } from '#src/components/segmented.tsx';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import { useAidsState } from '../aids/aids-context.ts';
import { bandOf, draggedRange, rangeOver } from '../aids/model/angle-range.ts';
import { PointMeaning } from '../aids/point-meaning.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { curvesCsv } from '../model/csv.ts';
import { abscissaOf, curvesOf } from '../model/curves.ts';
import type { Abscissa, Curve } from '../model/curves.ts';
import { anglesOf } from '../model/table.ts';
import { FRAME_NAMES } from '../model/words.ts';
import { NumbersTable } from './numbers-table.tsx';
import { Readout } from './readout.tsx';

function angleText(value: number, unit: string): string {
  const text = formatNumber(Number(value.toPrecision(6)), 6).replace(/(\.\d*?)0+$/, '$1');
  return unit === 'deg' ? `${text.replace(/\.$/, '')}°` : `${text.replace(/\.$/, '')} ${unit}`;
}

/** Ticks at 30° over a wide range, as the trade is used to. */
function angleInterval(curves: readonly Curve[], unit: string): { interval?: number } {
  const angles = curves[0]?.points.map(({ theta }) => theta) ?? [];
  const span = Math.max(...angles) - Math.min(...angles);
  return unit === 'deg' && span > 90 ? { interval: 30 } : {};
}

function plotted(curves: readonly Curve[], abscissa: Abscissa) {
  return curves.flatMap(({ key, name, points }, style) => {
    const pairs = points.flatMap((point): [number, number | null][] => {
      const x = abscissaOf(point, abscissa);
      return x === null ? [] : [[x, point.dcs]];
    });
    return pairs.length === 0 ? [] : [{ key, name, points: pairs, style }];
  });
}

function useSwitches() {
  const [yScale, setScale] = useState<Scale>('log');
  const [abscissa, setAbscissa] = useState<Abscissa>('theta');
  return { yScale, setScale, abscissa, setAbscissa };
}

function xAxis(abscissa: Abscissa, curves: readonly Curve[], estimate: Estimate) {
  const { angle, length } = estimate.units;
  const frame = FRAME_NAMES[estimate.frame];
  if (abscissa === 'theta') {
    return {
      title: `scattering angle θ, ${frame}${angle === 'deg' ? '' : ` (${angle})`}`,
      ...(angle === 'deg' ? { tick: (value: number) => angleText(value, 'deg') } : {}),
      ...angleInterval(curves, angle),
    };
  }
  if (abscissa === 'cos') return { title: `cos θ, ${frame}` };
  return { title: `momentum transfer q, centre of mass (${unitSymbol(`1/${length}`)})` };
}

/** The range of angles marked on the plot, while an aid asks for one. */
function useBand(curves: readonly Curve[], abscissa: Abscissa, unit: string) {
  const { draft } = useEditing();
  const { marking, range, setRange } = useAidsState();
  const [first] = curves;
  const onBand = useCallback(
    (from: number, to: number) => {
      const dragged = draggedRange(first, abscissa, [from, to], unit);
      if (dragged) setRange(dragged);
    },
    [first, abscissa, unit, setRange],
  );
  if (!marking) return {};
  const ends = bandOf(first, abscissa, rangeOver(anglesOf(draft.document), range));
  return { band: { ends, onBand } };
}

/** A branch is explained as what it is; their sum is not, since it has no amplitude of its own. */
function CurveMeaning(props: { curve: Curve; place: number; estimate: Estimate }) {
  const { curve, place, estimate } = props;
  const born = estimate.methods.born1;
  const point = born && !('unavailable' in born) ? born.differential[place] : undefined;
  const isSum = curve.key === 'born1' && (point?.branches?.length ?? 0) > 0;
  if (!point || isSum || !curve.key.startsWith('born1')) return null;
  return (
    <PointMeaning
      point={point}
      estimate={estimate}
      rank={curve.key === 'born1-high' ? 1 : 0}
      label={`What is dσ/dΩ here, ${curve.name}?`}
    />
  );
}

interface DistributionProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** dσ/dΩ against angle, momentum transfer or cosine: as a plot, as a row at the crosshair and as a table. */
export function Distribution({ estimate, dimmed, fileName }: DistributionProps) {
  const { draft, editDocument, readOnly, areaUnit } = useEditing();
  const { yScale, setScale, abscissa, setAbscissa } = useSwitches();
  const curves = useMemo(() => curvesOf(estimate, areaUnit), [estimate, areaUnit]);
  const series = useMemo(() => plotted(curves, abscissa), [curves, abscissa]);
  const [place, setPlace] = useState<number | null>(null);
  const [tableOpen, setTableOpen] = useState(false);
  const band = useBand(curves, abscissa, estimate.units.angle);

  const count = curves[0]?.points.length ?? 0;
  const cursor = Math.min(place ?? Math.floor((count - 1) / 3), Math.max(0, count - 1));
  const at = curves[0]?.points[cursor];
  const dcsUnit = `${areaUnit}/sr`;
  const units = {
    angle: estimate.units.angle,
    wavenumber: `1/${estimate.units.length}`,
    dcs: dcsUnit,
    frame: estimate.frame,
  };
  if (series.length === 0 || !at) {
    return <p className="text-muted">None of the methods asked for yields a curve here.</p>;
  }
  const fixed = draft.document.target.kind === 'fixed';

  return (
    <>
      <Plot
        label={`Differential cross section against ${abscissa === 'theta' ? 'angle' : abscissa === 'q' ? 'momentum transfer' : 'cosine of the angle'}`}
        series={series}
        x={xAxis(abscissa, curves, estimate)}
        y={{ title: `dσ/dΩ (${unitSymbol(dcsUnit)})` }}
        yScale={yScale}
        cursor={cursor}
        onCursor={setPlace}
        cursorText={`θ = ${angleText(at.theta, units.angle)}, dσ/dΩ = ${at.dcs === null ? (at.reason ?? 'none') : formatComposed(at.dcs, dcsUnit, 4)}`}
        dimmed={dimmed}
        fileName={fileName}
        csv={() => curvesCsv(curves, units)}
        {...band}
        readout={
          <Readout
            curves={curves}
            place={cursor}
            units={units}
            angle={angleText(at.theta, units.angle)}
            meaningOf={(curve) => <CurveMeaning curve={curve} place={cursor} estimate={estimate} />}
          />
        }
        switches={
          <>
            <Segmented
              label="Scale of dσ/dΩ"
              value={yScale}
              choices={[
                { value: 'log', label: 'log' },
                { value: 'linear', label: 'linear' },
              ]}
              onChange={setScale}
            />
            <Segmented
              label="Abscissa"
              value={abscissa}
              choices={[
                { value: 'theta', label: 'θ' },
                { value: 'q', label: 'q' },
                { value: 'cos', label: 'cos θ' },
              ]}
              onChange={setAbscissa}
            />
            {!fixed && !readOnly && (
              <Segmented
                label="Frame"
                value={draft.document.frame ?? 'cm'}
                choices={[
                  { value: 'cm', label: 'cm' },
                  { value: 'lab', label: 'lab' },
                ]}
                onChange={(frame) => editDocument('/frame', (before) => ({ ...before, frame }))}
              />
            )}
          </>
        }
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
    </>
  );
}
