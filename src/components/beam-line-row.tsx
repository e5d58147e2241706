import { StationGlyph, type Station } from './station-glyph.tsx';

interface BeamLineRowProps {
  summary: { beam: string; target: string; interaction: string; detectors?: string };
}

const LABELS: Record<Station, string> = {
  beam: 'Beam',
  target: 'Target',
  interaction: 'Interaction',
  detectors: 'Detectors',
};

/** The beam line shrunk to one row, for lists: the stations in their order, joined by the line. */
export function BeamLineRow({ summary }: BeamLineRowProps) {
  const stations = (['beam', 'target', 'interaction'] as const).filter((key) => summary[key]);
  return (
    <ul className="flex flex-wrap items-center gap-y-1 text-sm text-muted">
      {stations.map((station, index) => (
        <li key={station} className="flex min-w-0 items-start">
          <StationGlyph station={station} className="mt-0.5 mr-1.5 size-4 shrink-0 text-barn" />
          <span className="sr-only">{LABELS[station]}: </span>
          <span className="min-w-0">{summary[station]}</span>
          {index < stations.length - 1 && (
            <span aria-hidden="true" className="mx-2 mt-2.5 h-px w-4 shrink-0 bg-barn/50 sm:w-6" />
          )}
        </li>
      ))}
    </ul>
  );
}
