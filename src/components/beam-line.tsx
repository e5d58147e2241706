import { CircleAlert } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';
import { StationGlyph, type Station } from './station-glyph.tsx';

export interface BeamLineStation {
  key: Station;
  name: string;
  main: string;
  detail: string;
  /** What is wrong here, in words; shown on the line. */
  problem?: string | undefined;
}

interface BeamLineProps {
  stations: readonly BeamLineStation[];
  /** Without it the line is a picture to read, as in lists and on paper. */
  onOpen?: (key: Station) => void;
  selected?: Station | undefined;
}

function Picture({ station, lit }: { station: BeamLineStation; lit: boolean }) {
  return (
    <span
      className={classNames(
        'relative grid size-11 shrink-0 place-items-center rounded-full border-2 transition-colors',
        station.problem ? 'border-fault' : lit ? 'border-barn' : 'border-line',
        lit ? 'bg-barn-soft' : 'bg-paper',
        'group-hover:border-barn print:bg-sheet',
      )}
    >
      <StationGlyph
        station={station.key}
        className={classNames('size-5.5', station.problem ? 'text-fault' : 'text-barn')}
      />
    </span>
  );
}

function Words({ station, lit }: { station: BeamLineStation; lit: boolean }) {
  return (
    <span className="block min-w-0">
      <span
        className={classNames(
          'text-sm font-semibold',
          lit
            ? 'text-ink underline decoration-barn decoration-2 underline-offset-4 print:no-underline'
            : 'text-muted',
        )}
      >
        {station.name}
      </span>
      <span className="block font-semibold">
        {station.main} <span className="font-normal text-muted">{station.detail}</span>
      </span>
      {station.problem && (
        <span className="mt-0.5 flex gap-1 text-sm text-fault">
          <CircleAlert aria-hidden="true" className="mt-0.5 size-4 shrink-0" />
          <span className="line-clamp-2">{station.problem}</span>
        </span>
      )}
    </span>
  );
}

const cell = 'group flex w-full gap-3 rounded text-left md:flex-col md:gap-2';

/** The case as the apparatus it describes: four fixed stations along one line, upright on a narrow screen. */
export function BeamLine({ stations, onOpen, selected }: BeamLineProps) {
  return (
    <ol
      aria-label="Beam line"
      className="relative grid gap-y-3 md:grid-cols-[1.05fr_0.9fr_1.25fr_1.1fr] md:gap-x-4 before:absolute before:top-2 before:bottom-2 before:left-[21px] before:border-l-2 before:border-barn/45 md:before:inset-x-2 md:before:top-[21px] md:before:bottom-auto md:before:border-t-2 md:before:border-l-0"
    >
      {stations.map((station) => {
        const lit = station.key === selected;
        return (
          <li key={station.key} className="relative min-w-0">
            {onOpen ? (
              <button
                type="button"
                className={cell}
                aria-current={lit ? 'true' : undefined}
                onClick={() => onOpen(station.key)}
              >
                <Picture station={station} lit={lit} />
                <Words station={station} lit={lit} />
              </button>
            ) : (
              <span className={cell}>
                <Picture station={station} lit={lit} />
                <Words station={station} lit={lit} />
              </span>
            )}
          </li>
        );
      })}
    </ol>
  );
}
