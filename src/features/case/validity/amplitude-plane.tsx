import { useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import { csvOf } from '#src/lib/csv.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { TakeRows } from '../aids/take-rows.tsx';
import { angleText } from '../model/abscissa-axis.ts';
import {
  amplitudeCurves,
  amplitudeRows,
  phaseOf,
  planeSeries,
  sizeOf,
} from './model/amplitudes.ts';
import type { AmplitudeCurve, AmplitudePoint } from './model/amplitudes.ts';
import { computedMethods, computedOf } from './model/methods.ts';
import type { Complex } from './model/waves.ts';
import { Item, Items, Panel, TableBox, bodyCell, headCell } from './panel.tsx';

const DEGREES = 180 / Math.PI;

function complexText({ re, im }: Complex, digits: number): string {
  return `${formatNumber(re, digits)} ${im < 0 ? '−' : '+'} ${formatNumber(Math.abs(im), digits)} i`;
}

function placeName({ theta, thetaCm }: AmplitudePoint, unit: string): string {
  const cm = thetaCm === undefined ? '' : ` (${angleText(thetaCm, unit)} cm)`;
  return `${angleText(theta, unit)}${cm}`;
}

interface Units {
  angle: string;
  length: string;
  frame: 'cm' | 'lab';
}

function AmplitudeReadout(props: {
  curves: readonly AmplitudeCurve[];
  place: number;
  units: Units;
}) {
  const { curves, place, units } = props;
  const first = curves[0]?.points[place];
  if (!first) return null;
  return (
    <Items>
      <Item name={`angle, ${units.frame}`}>θ = {placeName(first, units.angle)}</Item>
      {curves.map(({ key, name, points }) => {
        const f = points[place]?.f ?? null;
        return (
          <Item key={key} name={`f, ${name}`}>
            {f === null ? (
              <span className="font-sans">no value</span>
            ) : (
              <>
                {complexText(f, 4)} {unitSymbol(units.length)}
                <span className="text-muted">
                  {' · '}
                  |f| {formatNumber(sizeOf(f), 4)} {unitSymbol(units.length)}, phase{' '}
                  {formatNumber(phaseOf(f) * DEGREES, 4)}°
                </span>
              </>
            )}
          </Item>
        );
      })}
    </Items>
  );
}

function AmplitudeTable({ curves, units }: { curves: readonly AmplitudeCurve[]; units: Units }) {
  const unit = unitSymbol(units.length);
  return (
    <TableBox label="Table of amplitudes">
      <table className="w-full font-mono text-sm">
        <caption className="sr-only">
          Complex scattering amplitude of every method, in {unit}
        </caption>
        <thead>
          <tr className="font-sans">
            <th scope="col" className={headCell}>
              θ {units.frame} ({units.angle === 'deg' ? '°' : units.angle})
            </th>
            {curves.map(({ key, name }) => (
              <th key={key} scope="col" className={headCell}>
                f, {name} ({unit})
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {curves[0]?.points.map((point, place) => (
            <tr key={place} className="even:bg-soft/60">
              <th scope="row" className={`${bodyCell} font-normal`}>
                {placeName(point, units.angle)}
              </th>
              {curves.map(({ key, points }) => {
                const f = points[place]?.f ?? null;
                return (
                  <td key={key} className={bodyCell}>
                    {f === null ? '—' : complexText(f, 6)}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </TableBox>
  );
}

/** What is drawn, and what to look for in it. */
function saysOf(estimate: Estimate): string {
  const flips = computedMethods(estimate).some(({ result }) =>
    result.differential.some(({ analysingPower }) => typeof analysingPower === 'number'),
  );
  return [
    'f(θ) along the angle, centre of mass',
    ...(estimate.identical ? [', before the exchanged one is added'] : []),
    ...(flips ? [', without the part that flips the spin'] : []),
    '.',
    ...(computedOf(estimate, 'born1')
      ? [
          ' First Born of a real potential never leaves the real axis; what the others have beside it is second order and more.',
        ]
      : []),
  ].join('');
}

interface AmplitudePlaneProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** The complex amplitude of every method in its plane, drawn along the angle. */
export function AmplitudePlane({ estimate, dimmed, fileName }: AmplitudePlaneProps) {
  const curves = useMemo(() => amplitudeCurves(estimate), [estimate]);
  const series = useMemo(() => planeSeries(curves), [curves]);
  const [place, setPlace] = useState<number | null>(null);
  const [tableOpen, setTableOpen] = useState(false);
  const { angle, length } = estimate.units;
  const units = { angle, length, frame: estimate.frame };
  const points = curves[0]?.points ?? [];
  const firstValue = Math.max(
    0,
    points.findIndex(({ f }) => f !== null),
  );
  const cursor = Math.min(place ?? firstValue, Math.max(0, points.length - 1));
  const at = points[cursor];
  if (!at) return null;
  const rows = () => amplitudeRows(curves, units);
  const name = `${fileName}-amplitude`;
  return (
    <Panel title="The amplitude in its plane" says={saysOf(estimate)}>
      <Plot
        label="Complex scattering amplitude along the angle"
        series={series}
        x={{ title: `Re f (${unitSymbol(length)})` }}
        y={{ title: `Im f (${unitSymbol(length)})` }}
        yScale="linear"
        plane={{}}
        cursor={cursor}
        onCursor={setPlace}
        cursorText={`θ = ${placeName(at, angle)}: ${curves
          .map((curve) => {
            const f = curve.points[cursor]?.f ?? null;
            return `${curve.name} ${f === null ? 'no value' : `${complexText(f, 3)} ${unitSymbol(length)}`}`;
          })
          .join(', ')}`}
        dimmed={dimmed}
        fileName={name}
        csv={() => csvOf(rows())}
        readout={<AmplitudeReadout curves={curves} place={cursor} units={units} />}
      />
      <details
        className="mt-3 border-t border-line pt-2"
        onToggle={(event) => setTableOpen(event.currentTarget.open)}
      >
        <summary className="w-fit rounded text-sm text-muted hover:text-ink">
          The amplitudes as a table ({points.length} angles)
        </summary>
        {tableOpen && (
          <div className="mt-2 flex flex-col gap-2">
            <TakeRows fileName={name} rows={rows} />
            <AmplitudeTable curves={curves} units={units} />
          </div>
        )}
      </details>
    </Panel>
  );
}
