import { useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import { csvOf } from '#src/lib/csv.ts';
import { formatNumber } from '#shared/units/format.ts';
import type { PhaseShift } from '#shared/contracts/estimates.ts';
import { TakeRows } from '../aids/take-rows.tsx';
import { brief } from '../model/verdict.ts';
import {
  DEGREES,
  groupsOf,
  lastShown,
  phaseSeries,
  sizeSeries,
  transition,
  waveName,
  waveRows,
} from './model/waves.ts';
import { Item, Items, Panel } from './panel.tsx';
import { UnitarityNote } from './unitarity-note.tsx';
import { WaveTable } from './wave-table.tsx';

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
        <UnitarityNote waves={waves} />
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
