import { useCallback, useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import type { Scale } from '#src/components/plot-types.ts';
import { Segmented } from '#src/components/segmented.tsx';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatComposed, unitSymbol } from '#shared/units/format.ts';
import { useAidsState } from '../aids/aids-context.ts';
import { RatioNote, ratioAt } from '../aids/ratio-note.tsx';
import { useRatio } from '../aids/use-ratio.ts';
import type { Ratio } from '../aids/use-ratio.ts';
import { REFERENCE_NAMES, ratioRows, ratioSeries } from '../aids/model/ratio.ts';
import { bandOf, draggedRange, rangeOver } from '../aids/model/angle-range.ts';
import { PointMeaning } from '../aids/point-meaning.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { csvOf } from '#src/lib/csv.ts';
import { curvesCsv } from '../model/csv.ts';
import type { TableUnits } from '../model/csv.ts';
import { ABSCISSA_WORDS, abscissaAxis, angleText } from '../model/abscissa-axis.ts';
import { abscissaOf, curvesOf } from '../model/curves.ts';
import type { Abscissa, Curve } from '../model/curves.ts';
import { anglesOf } from '../model/table.ts';
import { NumbersTable } from './numbers-table.tsx';
import { Readout } from './readout.tsx';

function plotted(curves: readonly Curve[], abscissa: Abscissa) {
  return curves.flatMap(({ key, name, style, points }) => {
    const pairs = points.flatMap((point): [number, number | null][] => {
      const x = abscissaOf(point, abscissa);
      return x === null ? [] : [[x, point.dcs]];
    });
    return pairs.length === 0 ? [] : [{ key, name, points: pairs, style }];
  });
}

/** Each of the two things the plot can show keeps a scale of its own: a ratio is read against one. */
function useSwitches(shown: 'dcs' | 'ratio') {
  const [scales, setScales] = useState<Record<typeof shown, Scale>>({
    dcs: 'log',
    ratio: 'linear',
  });
  const [abscissa, setAbscissa] = useState<Abscissa>('theta');
  const setScale = (scale: Scale) => setScales({ ...scales, [shown]: scale });
  return { yScale: scales[shown], setScale, abscissa, setAbscissa };
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

interface Drawing {
  ratio: Ratio;
  series: ReturnType<typeof plotted>;
  curves: readonly Curve[];
  abscissa: Abscissa;
  units: TableUnits;
}

/** What the plot shows: the curves, or once it is here their ratio to two point charges. */
function drawnAs({ ratio, series, curves, abscissa, units }: Drawing) {
  const { reference } = ratio;
  const [first] = curves;
  if (!reference || !first) {
    return {
      isRatio: false,
      name: 'Differential cross section',
      title: `dσ/dΩ (${unitSymbol(units.dcs)})`,
      series,
      csv: () => curvesCsv(curves, units),
    };
  }
  const name = REFERENCE_NAMES[reference.kind];
  return {
    isRatio: true,
    name: `Ratio to ${name}`,
    title: `dσ/dΩ over ${name}`,
    series: [
      {
        key: 'ratio',
        name: `${first.name} over ${name}`,
        points: ratioSeries(first, reference, abscissa),
        style: 1,
      },
    ],
    csv: () => csvOf(ratioRows(first, reference, units)),
  };
}

interface DistributionProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** dσ/dΩ against angle, momentum transfer or cosine: as a plot, as a row at the crosshair and as a table. */
export function Distribution({ estimate, dimmed, fileName }: DistributionProps) {
  const { draft, editDocument, readOnly, areaUnit } = useEditing();
  const ratio = useRatio();
  const { yScale, setScale, abscissa, setAbscissa } = useSwitches(ratio.on ? 'ratio' : 'dcs');
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
  const drawn = drawnAs({ ratio, series, curves, abscissa, units });

  return (
    <>
      <Plot
        label={`${drawn.name} against ${ABSCISSA_WORDS[abscissa]}`}
        series={drawn.series}
        x={abscissaAxis(abscissa, curves, estimate)}
        y={{ title: drawn.title }}
        yScale={yScale}
        cursor={cursor}
        onCursor={setPlace}
        cursorText={`θ = ${angleText(at.theta, units.angle)}, dσ/dΩ = ${at.dcs === null ? (at.reason ?? 'none') : formatComposed(at.dcs, dcsUnit, 4)}`}
        dimmed={dimmed || ratio.stale}
        fileName={drawn.isRatio ? `${fileName}-ratio` : fileName}
        csv={drawn.csv}
        {...band}
        readout={
          <Readout
            curves={curves}
            place={cursor}
            units={units}
            angle={angleText(at.theta, units.angle)}
            {...(ratio.on && { ratio: ratioAt(ratio, cursor) })}
            meaningOf={(curve) => <CurveMeaning curve={curve} place={cursor} estimate={estimate} />}
          />
        }
        switches={
          <>
            {ratio.offered && (
              <Segmented
                label="What is drawn"
                value={ratio.on ? 'ratio' : 'dcs'}
                choices={[
                  { value: 'dcs', label: 'dσ/dΩ' },
                  { value: 'ratio', label: 'ratio' },
                ]}
                onChange={(shown) => ratio.setOn(shown === 'ratio')}
              />
            )}
            <Segmented
              label={ratio.on ? 'Scale of the ratio' : 'Scale of dσ/dΩ'}
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
      {ratio.on && <RatioNote ratio={ratio} />}
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
