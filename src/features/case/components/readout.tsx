import type { ReactNode } from 'react';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { TableUnits } from '../model/csv.ts';
import type { Curve } from '../model/curves.ts';
import { numericsText } from '../model/verdict.ts';

interface ReadoutProps {
  curves: readonly Curve[];
  place: number;
  units: TableUnits;
  /** The angle of the crosshair, in words. */
  angle: string;
  /** What the value of a curve is, behind a question mark. */
  meaningOf: (curve: Curve) => ReactNode;
  /** The ratio that is drawn, in words. */
  ratio?: { name: string; text: string };
}

function Item({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="min-w-0">
      <dt className="text-xs text-muted">{name}</dt>
      <dd className="font-mono text-sm">{children}</dd>
    </div>
  );
}

/** Everything at the crosshair in one row that never changes its height. */
export function Readout({ curves, place, units, angle, meaningOf, ratio }: ReadoutProps) {
  const first = curves[0]?.points[place];
  if (!first) return null;
  const single = curves.length === 1;
  return (
    <dl className="mt-2 flex flex-wrap gap-x-8 gap-y-1.5 border-t border-line pt-2.5">
      <Item name={`angle, ${units.frame}`}>θ = {angle}</Item>
      {first.q !== null && (
        <Item name="momentum transfer">q = {formatComposed(first.q, units.wavenumber, 5)}</Item>
      )}
      {ratio && <Item name={ratio.name}>{ratio.text}</Item>}
      {curves.map((curve) => {
        const point = curve.points[place];
        return (
          <Item key={curve.key} name={curve.name}>
            {!point || point.dcs === null ? (
              <span className="font-sans">{point?.reason ?? 'no value'}</span>
            ) : (
              <>
                {formatNumber(point.dcs, 5)} {unitSymbol(units.dcs)} {meaningOf(curve)}
                <span className="text-muted">
                  {single ? ` · ${numericsText(point)}` : ''}
                  {point.thetaCm === undefined
                    ? ''
                    : ` · θcm ${formatNumber(point.thetaCm, 4)}${units.angle === 'deg' ? '°' : ` ${units.angle}`}`}
                </span>
              </>
            )}
          </Item>
        );
      })}
    </dl>
  );
}
