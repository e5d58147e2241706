import { useMemo, useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Plot } from '#src/components/plot.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { csvOf } from '#src/lib/csv.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate, Method } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useLiveEstimate } from '../editing/use-estimate.ts';
import { abscissaAxis, angleText } from '../model/abscissa-axis.ts';
import { curvesOf } from '../model/curves.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { computedMethods, computedOf } from './model/methods.ts';
import { oppositeOf } from './model/opposite.ts';
import { signRows, signSeries, signRatio } from './model/signs.ts';
import { Item, Items, Panel, headCell, bodyCell } from './panel.tsx';

const ASKED: Method[] = ['born1', 'partialWaves'];

function elasticOf(estimate: Estimate, method: Method) {
  const elastic = computedOf(estimate, method)?.elastic;
  return elastic && !('divergent' in elastic) ? elastic : null;
}

/** σ elastic of both signs and their ratio, a line each method. */
function Totals({ given, turned }: { given: Estimate; turned: Estimate }) {
  const { areaUnit } = useEditing();
  const rows = computedMethods(given)
    .filter(({ method }) => computedOf(turned, method) !== null)
    .map(({ method }) => ({
      method,
      a: elasticOf(given, method),
      b: elasticOf(turned, method),
    }));
  return (
    <div
      className="relative overflow-x-auto"
      tabIndex={0}
      role="region"
      aria-label="Elastic totals of both signs"
    >
      <table className="text-sm">
        <caption className="sr-only">Elastic cross section with either sign</caption>
        <thead>
          <tr>
            <th scope="col" className="py-1.5 pr-3 text-left font-semibold">
              elastic σ
            </th>
            <th scope="col" className={headCell}>
              as given
            </th>
            <th scope="col" className={headCell}>
              opposite sign
            </th>
            <th scope="col" className={headCell}>
              opposite / given
            </th>
          </tr>
        </thead>
        <tbody className="font-mono">
          {rows.map(({ method, a, b }) => (
            <tr key={method} className="border-t border-line">
              <th scope="row" className="py-1 pr-3 text-left font-sans font-normal">
                {METHOD_NAMES[method]}
              </th>
              {[a, b].map((elastic, place) => (
                <td key={place} className={`${bodyCell} py-1`}>
                  {elastic === null
                    ? 'divergent'
                    : formatComposed(
                        elastic.value * composedFactor(elastic.unit, areaUnit),
                        areaUnit,
                        5,
                      )}
                </td>
              ))}
              <td className={`${bodyCell} py-1`}>
                {a === null || b === null || a.value === 0
                  ? '—'
                  : formatNumber(b.value / a.value, 6)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

interface ComparisonProps {
  estimate: Estimate;
  opposite: CaseDocument;
  what: string;
  dimmed: boolean;
  fileName: string;
}

function Comparison({ estimate, opposite, what, dimmed, fileName }: ComparisonProps) {
  const { areaUnit } = useEditing();
  const asked = useMemo(() => ({ ...opposite, methods: ASKED }), [opposite]);
  const { estimate: turned, stale, errors, failure } = useLiveEstimate(asked);
  const [place, setPlace] = useState<number | null>(null);
  const given = useMemo(() => curvesOf(estimate, areaUnit, { sums: true }), [estimate, areaUnit]);
  const other = useMemo(
    () => (turned ? curvesOf(turned, areaUnit, { sums: true }) : []),
    [turned, areaUnit],
  );
  const trouble = failure ?? errors[0]?.message ?? null;
  if (trouble !== null) {
    return (
      <Notice live tone="fault" title="The opposite sign could not be computed.">
        {trouble}
      </Notice>
    );
  }
  if (!turned) return <p className="text-muted">Computing …</p>;
  const drawn = signSeries(given, other);
  const [first] = drawn.series;
  const count = first?.points.length ?? 0;
  const cursor = Math.min(place ?? Math.floor((count - 1) / 3), Math.max(0, count - 1));
  const theta = first?.points[cursor]?.[0] ?? 0;
  const { angle } = estimate.units;
  const pale = dimmed || stale;
  return (
    <div
      aria-busy={pale || undefined}
      className={classNames('flex flex-col gap-3', pale && 'stale')}
    >
      <p className="max-w-prose text-sm">Compared: {what}.</p>
      <Totals given={estimate} turned={turned} />
      {drawn.exact && first && (
        <Plot
          label="Exact differential cross section of both signs against angle"
          series={drawn.series}
          x={abscissaAxis('theta', given, estimate)}
          y={{ title: `dσ/dΩ (${unitSymbol(`${areaUnit}/sr`)})` }}
          yScale="log"
          panel={drawn.panel}
          cursor={cursor}
          onCursor={setPlace}
          cursorText={`θ = ${angleText(theta, angle)}: opposite over given ${formatNumber(signRatio(drawn, cursor) ?? NaN, 4)}`}
          dimmed={pale}
          fileName={`${fileName}-signs`}
          csv={() => csvOf(signRows(drawn, `${areaUnit}/sr`, angle, estimate.frame))}
          readout={
            <Items>
              <Item name={`angle, ${estimate.frame}`}>θ = {angleText(theta, angle)}</Item>
              {drawn.series.map(({ key, name, points }) => {
                const value = points[cursor]?.[1] ?? null;
                return (
                  <Item key={key} name={name}>
                    {value === null ? 'no value' : formatComposed(value, `${areaUnit}/sr`, 5)}
                  </Item>
                );
              })}
              <Item name="opposite / given">
                {formatNumber(signRatio(drawn, cursor) ?? NaN, 5)}
              </Item>
            </Items>
          }
        />
      )}
    </div>
  );
}

function saysOf(charged: boolean, corrected: boolean): string {
  if (!charged) {
    return '|f₁|² does not know the sign: attraction and repulsion of one strength give the same curve in first order. Beyond it they part.';
  }
  return `In first order the charge of the projectile only sets the sign of its amplitude on a charge, and |f₁|² does not know it. Beyond first order particle and antiparticle part${corrected ? '; the correction that is applied here is the beginning of it' : ''}.`;
}

interface OppositeSignProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** What first order cannot see: whether the potential attracts or repels. */
export function OppositeSign({ estimate, dimmed, fileName }: OppositeSignProps) {
  const { draft } = useEditing();
  const [open, setOpen] = useState(false);
  const opposite = useMemo(() => oppositeOf(draft.document), [draft.document]);
  if (!computedOf(estimate, 'born1')) return null;
  const partner = 'none' in opposite ? null : opposite.antiparticle;
  return (
    <Panel
      title={partner === null ? 'The sign of the potential' : `Against the ${partner}`}
      says={saysOf(partner !== null, draft.document.corrections !== undefined)}
      actions={
        !('none' in opposite) && (
          <Button size="small" aria-expanded={open} onClick={() => setOpen(!open)}>
            {open
              ? 'Close the comparison'
              : partner === null
                ? 'Same case, opposite sign'
                : `Same case with the ${partner}`}
          </Button>
        )
      }
    >
      {'none' in opposite ? (
        <p className="text-sm">{opposite.none}</p>
      ) : (
        open && (
          <Comparison
            estimate={estimate}
            opposite={opposite.document}
            what={opposite.what}
            dimmed={dimmed}
            fileName={fileName}
          />
        )
      )}
    </Panel>
  );
}
