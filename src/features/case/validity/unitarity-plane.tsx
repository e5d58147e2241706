import { useMemo, useState } from 'react';
import { Plot } from '#src/components/plot.tsx';
import { csvOf } from '#src/lib/csv.ts';
import { formatNumber } from '#shared/units/format.ts';
import type { PhaseShift } from '#shared/contracts/estimates.ts';
import {
  UNITARITY_CIRCLE,
  groupsOf,
  transition,
  transitionSeries,
  waveName,
  waveRows,
} from './model/waves.ts';
import { Item, Items, Panel } from './panel.tsx';

const PLANE = { guides: [UNITARITY_CIRCLE] };

interface UnitarityPlaneProps {
  waves: readonly PhaseShift[];
  dimmed: boolean;
  fileName: string;
}

/** T of every wave against the circle that none can leave. */
export function UnitarityPlane({ waves, dimmed, fileName }: UnitarityPlaneProps) {
  const series = useMemo(() => transitionSeries(waves), [waves]);
  const [place, setPlace] = useState(0);
  const lead = groupsOf(waves)[0]?.waves ?? [];
  const wave = lead[Math.min(place, lead.length - 1)];
  if (!wave) return null;
  const { re, im } = transition(wave);
  const value = `${formatNumber(re, 4)} ${im < 0 ? '−' : '+'} ${formatNumber(Math.abs(im), 4)} i`;
  return (
    <Panel
      title="Every wave within the circle"
      says="T = (S − 1)/2i, wave by wave. On the circle a wave is scattered, inside it partly absorbed; outside more would come out than went in. First order lies on the real axis, so it leaves the circle by second order. The numbers stand in the table of phase shifts."
    >
      <Plot
        label="T of every partial wave in its plane"
        series={series}
        x={{ title: 'Re T' }}
        y={{ title: 'Im T' }}
        yScale="linear"
        plane={PLANE}
        cursor={Math.min(place, lead.length - 1)}
        onCursor={setPlace}
        cursorText={`${waveName(wave)}: T = ${value}`}
        dimmed={dimmed}
        fileName={`${fileName}-unitarity`}
        csv={() => csvOf(waveRows(waves))}
        readout={
          <Items>
            <Item name="wave">{waveName(wave)}</Item>
            <Item name="T, exact">{value}</Item>
            {wave.born !== undefined && (
              <Item name="T, first Born">{formatNumber(wave.born, 4)}</Item>
            )}
            <Item name="|S|">{formatNumber(wave.eta, 6)}</Item>
          </Items>
        }
      />
    </Panel>
  );
}
