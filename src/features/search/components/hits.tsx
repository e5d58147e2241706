import { Link } from 'react-router-dom';
import { inWords } from '#src/lib/api.ts';
import { classNames } from '#src/lib/class-names.ts';
import type { Place } from '../model/places.ts';
import type { Search } from '../use-search.ts';

function Option({ place, active, onOpen }: { place: Place; active: boolean; onOpen: () => void }) {
  return (
    <Link
      id={place.id}
      role="option"
      aria-selected={active}
      // The field keeps the focus; it names the option it stands on.
      tabIndex={-1}
      to={place.to}
      onClick={onOpen}
      onMouseDown={(event) => event.preventDefault()}
      className={classNames(
        'flex scroll-my-2 items-baseline justify-between gap-4 rounded px-2.5 py-1.5 hover:bg-soft',
        active && 'bg-barn-soft outline-2 -outline-offset-2 outline-ink',
      )}
    >
      <span className="min-w-0 shrink-0 basis-auto truncate font-medium max-sm:max-w-[55%]">
        {place.label}
      </span>
      <span className="min-w-0 truncate text-sm text-muted">{place.detail}</span>
    </Link>
  );
}

/** The hits in their groups, as the list a combobox opens. */
export function Hits({ id, search, onOpen }: { id: string; search: Search; onOpen: () => void }) {
  const { groups, active, state, error, text } = search;
  return (
    <>
      <div
        id={id}
        role="listbox"
        aria-label="Found"
        aria-busy={state === 'searching'}
        // It scrolls by itself, as the arrow keys walk.
        className={classNames(
          'flex max-h-[min(34rem,60svh)] flex-col gap-2 overflow-y-auto',
          state === 'searching' && 'stale',
        )}
      >
        {groups.map(({ kind, title, places }) => (
          <div key={kind} role="group" aria-labelledby={`${id}-${kind}`}>
            <div id={`${id}-${kind}`} className="px-2.5 py-1 text-xs font-semibold text-muted">
              {title}
            </div>
            {places.map((place) => (
              <Option
                key={place.id}
                place={place}
                active={active?.id === place.id}
                onOpen={onOpen}
              />
            ))}
          </div>
        ))}
      </div>
      {state === 'searching' && groups.length === 0 && (
        <p className="px-2.5 py-1.5 text-muted">Searching …</p>
      )}
      {state === 'nothing' && (
        <p className="px-2.5 py-1.5 text-muted">
          Nothing is called “{text.trim()}”. Try a nuclide as Ca-40, a form, a material, or words of
          a case.
        </p>
      )}
      {state === 'failed' && <p className="px-2.5 py-1.5 text-fault">{inWords(error)}</p>}
    </>
  );
}
