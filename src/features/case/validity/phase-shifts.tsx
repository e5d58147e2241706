import { useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import { csvOf } from '#src/lib/csv.ts';
import { formatNumber, fullDigits } from '#shared/units/format.ts';
import type { PhaseShift } from '#shared/contracts/estimates.ts';
import { TakeRows } from '../aids/take-rows.tsx';
import { brief } from '../model/verdict.ts';
import {
  breaksUnitarity,
  groupsOf,
  jText,
  lastShown,
  phaseSeries,
  sizeSeries,
  transition,
  waveName,
  waveRows,
} from './model/waves.ts';
import { Item, Items, Panel, TableBox, bodyCell, headCell } from './panel.tsx';

const DEGREES = 180 / Math.PI;

function WaveTable({ waves }: { waves: readonly PhaseShift[] }) {
  const spin = waves.some(({ j }) => j !== undefined);
  return (
    <TableBox label="Table of phase shifts">
      <table className="w-full font-mono text-sm">
        <caption className="sr-only">
          Phase shifts of the partial waves, exact and in first order
        </caption>
        <thead>
          <tr className="font-sans">
            <th scope="col" className={headCell}>
              l
            </th>
            {spin && (
              <th scope="col" className={headCell}>
                j
              </th>
            )}
            <th scope="col" className={headCell}>
              δ (rad)
            </th>
            <th scope="col" className={headCell}>
              δ (°)
            </th>
            <th scope="col" className={headCell}>
              |S|
            </th>
            <th scope="col" className={headCell}>
              δ first Born (rad)
            </th>
            <th scope="col" className={headCell}>
              numerics of δ (rad)
            </th>
          </tr>
        </thead>
        <tbody>
          {waves.map((wave) => (
            <tr key={waveName(wave)} className="even:bg-soft/60">
              <th scope="row" className={`${bodyCell} font-normal`}>
                {wave.l}
              </th>
              {spin && <td className={bodyCell}>{wave.j === undefined ? '—' : jText(wave.j)}</td>}
              <td className={bodyCell} title={fullDigits(wave.delta)}>
                {formatNumber(wave.delta, 8)}
              </td>
              <td className={bodyCell}>{formatNumber(wave.delta * DEGREES, 7)}</td>
              <td className={bodyCell} title={fullDigits(wave.eta)}>
                {formatNumber(wave.eta, 8)}
              </td>
              <td className={bodyCell}>
                {wave.born === undefined ? '—' : formatNumber(wave.born, 6)}
                {breaksUnitarity(wave) && <span className="font-sans text-fault"> ○ above 1</span>}
              </td>
              <td className={`${bodyCell} text-muted`}>±{brief(wave.absoluteError)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableBox>
  );
}

/** Which waves first order makes scatter more than there is of them. */
function Unitarity({ waves }: { waves: readonly PhaseShift[] }) {
  const known = waves.filter(({ born }) => born !== undefined);
  if (known.length === 0) {
    return (
      <p className="max-w-prose text-sm">
        First order has no phases here, so unitarity cannot be asked of it wave by wave.
      </p>
    );
  }
  const broken = [...new Set(known.filter(breaksUnitarity).map(({ l }) => l))];
  const largest = known.reduce((a, b) => (Math.abs(b.born ?? 0) > Math.abs(a.born ?? 0) ? b : a));
  const number = `${formatNumber(Math.abs(largest.born ?? 0), 3)} at l = ${largest.l}`;
  return (
    <p className="max-w-prose text-sm">
      {broken.length === 0
        ? `Unitarity, wave by wave: |T| ≤ 1 holds for every wave of first order; the largest is ${number}.`
        : `Unitarity, wave by wave: first order breaks |T| ≤ 1 for l = ${listed(broken)}; the largest |T| is ${number}.`}
    </p>
  );
}

/** 0, 1, 2, 5 as `0 to 2, 5`. */
function listed(numbers: readonly number[]): string {
  const runs: [number, number][] = [];
  for (const n of numbers) {
    const last = runs.at(-1);
    if (last && n === last[1] + 1) last[1] = n;
    else runs.push([n, n]);
  }
  return runs
    .map(([a, b]) => (a === b ? String(a) : b === a + 1 ? `${a}, ${b}` : `${a} to ${b}`))
    .join(', ');
}

function WaveReadout({ wave }: { wave: PhaseShift }) {
  const { re, im } = transition(wave);
  return (
    <Items>
      <Item name="wave">{waveName(wave)}</Item>
      <Item name="phase shift δ">
        {formatNumber(wave.delta, 6)} rad = {formatNumber(wave.delta * DEGREES, 5)}°
        <span className="text-muted"> · numerics ±{brief(wave.absoluteError)} rad</span>
      </Item>
      <Item name="|S|">{formatNumber(wave.eta, 6)}</Item>
      <Item name="T = (S − 1)/2i">
        {formatNumber(re, 4)} {im < 0 ? '−' : '+'} {formatNumber(Math.abs(im), 4)} i
      </Item>
      {wave.born !== undefined && <Item name="first Born">{formatNumber(wave.born, 5)} rad</Item>}
    </Items>
  );
}

interface PhaseShiftsProps {
  waves: readonly PhaseShift[];
  lMax: number | undefined;
  /** Phases are relative to those of a point charge. */
  coulomb: boolean;
  dimmed: boolean;
  fileName: string;
}

/** The partial waves of the exact calculation: δ and |S| over l, and every number in a table. */
export function PhaseShifts({ waves, lMax, coulomb, dimmed, fileName }: PhaseShiftsProps) {
  const [place, setPlace] = useState(0);
  const [tableOpen, setTableOpen] = useState(false);
  const last = lastShown(waves);
  const drawn = useMemo(() => waves.filter(({ l }) => l <= last), [waves, last]);
  const series = useMemo(() => phaseSeries(drawn), [drawn]);
  const sizes = useMemo(() => sizeSeries(drawn), [drawn]);
  const lead = groupsOf(drawn)[0]?.waves ?? [];
  const wave = lead[Math.min(place, lead.length - 1)];
  if (!wave) return null;
  const beyond = waves.at(-1)?.l ?? last;
  return (
    <Panel
      title="Phase shifts"
      says={`${coulomb ? 'Relative to the Coulomb phase. ' : ''}δ between −π/2 and π/2${lMax === undefined ? '' : `; waves up to l = ${lMax} are integrated, those beyond closed with their first-order phases`}.${beyond > last ? ` Drawn up to l = ${last}; the table has all of them.` : ''}`}
    >
      <Plot
        label="Phase shift and size of S against l"
        series={series}
        x={{ title: 'orbital angular momentum l', whole: true, min: 0, max: Math.max(1, last) }}
        y={{ title: 'phase shift δ (rad)' }}
        yScale="linear"
        panel={{
          y: { title: '|S|', min: 0, max: 1.2, interval: 0.4 },
          yScale: 'linear',
          series: sizes,
          level: 1,
        }}
        cursor={Math.min(place, lead.length - 1)}
        onCursor={setPlace}
        cursorText={`${waveName(wave)}: δ = ${formatNumber(wave.delta, 4)} rad, |S| = ${formatNumber(wave.eta, 4)}`}
        dimmed={dimmed}
        fileName={`${fileName}-phase-shifts`}
        csv={() => csvOf(waveRows(waves))}
        readout={<WaveReadout wave={wave} />}
      />
      <div className="mt-3 border-t border-line pt-2.5">
        <Unitarity waves={waves} />
      </div>
      <details className="mt-2" onToggle={(event) => setTableOpen(event.currentTarget.open)}>
        <summary className="w-fit rounded text-sm text-muted hover:text-ink">
          The phase shifts as a table ({waves.length} waves)
        </summary>
        {tableOpen && (
          <div className="mt-2 flex flex-col gap-2">
            <TakeRows fileName={`${fileName}-phase-shifts`} rows={() => waveRows(waves)} />
            <WaveTable waves={waves} />
          </div>
        )}
      </details>
    </Panel>
  );
}
