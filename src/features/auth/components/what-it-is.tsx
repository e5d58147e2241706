import { STATIONS, StationGlyph, type Station } from '#src/components/station-glyph.tsx';

const ASKS: Record<Station, { label: string; asks: string }> = {
  beam: { label: 'Beam', asks: 'Which particle, at what energy?' },
  target: { label: 'Target', asks: 'What does it meet?' },
  interaction: { label: 'Interaction', asks: 'How much scatters, and where, with what error?' },
  detectors: { label: 'Detectors', asks: 'At which angles is it seen?' },
};

/** The beam line as the newcomer's introduction: what a case consists of. */
export function WhatItIs() {
  return (
    <div className="flex flex-col gap-5">
      <p className="max-w-prose text-lg">
        Cross sections in the Born approximation, each with its error and with how far it may be
        believed. Every case is kept, and comes out the same when it is opened again.
      </p>
      <ol className="relative flex flex-col gap-4 max-lg:hidden">
        <span aria-hidden="true" className="absolute inset-y-5 left-5 border-l-2 border-barn/45" />
        {STATIONS.map((station) => (
          <li key={station} className="relative flex items-center gap-4">
            <span className="grid size-10 shrink-0 place-items-center rounded-full border-2 border-line bg-paper text-barn">
              <StationGlyph station={station} className="size-5" />
            </span>
            <span>
              <span className="block text-sm font-semibold">{ASKS[station].label}</span>
              <span className="text-muted">{ASKS[station].asks}</span>
            </span>
          </li>
        ))}
      </ol>
    </div>
  );
}
