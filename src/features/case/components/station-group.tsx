import type { ReactNode } from 'react';
import { ChevronDown } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';
import { useEditing } from '../editing/editor-context.ts';
import { StationGlyph, type Station } from '#src/components/station-glyph.tsx';

export const groupId = (station: Station): string => `inputs-${station}`;

interface StationGroupProps {
  station: Station;
  name: string;
  open: boolean;
  onToggle: () => void;
  /** Focus came into the group: it is the one at work. */
  onEnter: () => void;
  summary: string;
  faulty: boolean;
  children: ReactNode;
}

/** The inputs of one station. */
export function StationGroup(props: StationGroupProps) {
  const { readOnly } = useEditing();
  const { station, name, open, onToggle, onEnter, summary, faulty, children } = props;
  const id = groupId(station);
  return (
    <section
      aria-labelledby={`${id}-title`}
      className="border-t border-line first:border-t-0"
      onFocusCapture={onEnter}
    >
      <h2>
        <button
          id={id}
          type="button"
          aria-expanded={open}
          aria-controls={`${id}-fields`}
          onClick={onToggle}
          className="flex w-full items-center gap-2.5 rounded px-4.5 py-3 text-left hover:bg-soft"
        >
          <StationGlyph
            station={station}
            className={classNames('size-5 shrink-0', faulty ? 'text-fault' : 'text-barn')}
          />
          <span id={`${id}-title`} className="font-bold">
            {name}
          </span>
          {!open && <span className="min-w-0 flex-1 truncate text-sm text-muted">{summary}</span>}
          <ChevronDown
            aria-hidden="true"
            className={classNames(
              'ml-auto size-4 shrink-0 text-muted transition-transform',
              open && 'rotate-180',
            )}
          />
        </button>
      </h2>
      <div id={`${id}-fields`} hidden={!open} className="px-4.5 pb-4.5">
        <fieldset
          disabled={readOnly}
          className="flex min-w-0 flex-col gap-3.5 [&_:disabled:not([type=radio])]:opacity-100!"
        >
          {children}
        </fieldset>
      </div>
    </section>
  );
}
