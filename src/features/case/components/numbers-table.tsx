import { Fragment } from 'react';
import { Copy } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { formatNumber, fullDigits, unitSymbol } from '#shared/units/format.ts';
import { say } from '#src/lib/toasts.ts';
import { curvesTabbed } from '../model/csv.ts';
import type { TableUnits } from '../model/csv.ts';
import type { Curve, CurvePoint } from '../model/curves.ts';
import { brief } from '../model/verdict.ts';

interface NumbersTableProps {
  curves: readonly Curve[];
  units: TableUnits;
}

function errorOf({ relativeError, absoluteError }: CurvePoint): string {
  if (relativeError !== undefined) return brief(relativeError);
  return absoluteError === undefined ? '' : `±${brief(absoluteError)}`;
}

const head = 'sticky top-0 bg-sheet px-3 py-1.5 text-right font-semibold whitespace-nowrap';
const cell = 'px-3 py-0.5 text-right whitespace-nowrap';

function Row({ curves, index }: { curves: readonly Curve[]; index: number }) {
  const first = curves[0]?.points[index];
  if (!first) return null;
  return (
    <tr className="even:bg-soft/60">
      <th scope="row" className={`${cell} font-normal`}>
        {formatNumber(first.theta, 6)}
      </th>
      <td className={cell}>{first.q === null ? '—' : formatNumber(first.q, 6)}</td>
      {curves.map(({ key, points }) => {
        const point = points[index];
        const { dcs = null, reason = '—' } = point ?? {};
        return dcs === null || !point ? (
          <td key={key} colSpan={2} className="px-3 py-0.5 text-right font-sans text-muted">
            {reason}
          </td>
        ) : (
          <Fragment key={key}>
            <td className={cell} title={fullDigits(dcs)}>
              {dcs.toExponential(6).replace(/e\+?/, ' e')}
            </td>
            <td className={`${cell} text-muted`}>{errorOf(point)}</td>
          </Fragment>
        );
      })}
    </tr>
  );
}

/** The numbers of the plot, for reading and for those who do not see it. */
export function NumbersTable({ curves, units }: NumbersTableProps) {
  const count = curves[0]?.points.length ?? 0;
  async function copy(): Promise<void> {
    await navigator.clipboard.writeText(curvesTabbed(curves, units));
    say('The table is copied, with all digits and the units in the second row.', { tone: 'sound' });
  }
  return (
    <div className="mt-2">
      <Button size="small" className="mb-2" onClick={() => void copy()}>
        <Copy aria-hidden="true" className="size-4" /> Copy the table
      </Button>
      <div
        className="max-h-96 overflow-auto rounded border border-line"
        tabIndex={0}
        role="region"
        aria-label="Table of the differential cross section"
      >
        <table className="w-full font-mono text-sm">
          <caption className="sr-only">
            dσ/dΩ in {unitSymbol(units.dcs)}, frame {units.frame}
          </caption>
          <thead>
            <tr className="font-sans">
              <th scope="col" className={head}>
                θ {units.frame} ({units.angle === 'deg' ? '°' : units.angle})
              </th>
              <th scope="col" className={head}>
                q ({unitSymbol(units.wavenumber)})
              </th>
              {curves.map(({ key, name }) => (
                <Fragment key={key}>
                  <th scope="col" className={head}>
                    {name} ({unitSymbol(units.dcs)})
                  </th>
                  <th scope="col" className={head}>
                    numerics
                  </th>
                </Fragment>
              ))}
            </tr>
          </thead>
          <tbody>
            {Array.from({ length: count }, (_, index) => (
              <Row key={index} curves={curves} index={index} />
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}
