import { useEffect, useId, useState, type KeyboardEvent, type ReactNode, type Ref } from 'react';
import { Search as Lens } from 'lucide-react';
import { useNavigate } from 'react-router-dom';
import { controlClasses } from '#src/components/field.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { useSearch } from '../use-search.ts';
import { Hits } from './hits.tsx';

interface SearchFieldProps {
  id: string;
  /** Whether the hits float below the field, or stand in the flow of a dialog. */
  floating: boolean;
  /** What stands at the right end of the empty field. */
  hint?: ReactNode;
  /** A hit was opened, or the field was left by Escape. */
  onDone: () => void;
  ref?: Ref<HTMLInputElement>;
}

/** One field over cases and tables: a combobox whose list is walked with the arrow keys while the focus stays in the field. */
export function SearchField({ id, floating, hint, onDone, ref }: SearchFieldProps) {
  const search = useSearch();
  const navigate = useNavigate();
  const listId = useId();
  const [open, setOpen] = useState(false);
  const { text, active, state } = search;
  const shown = open && state !== 'idle';

  useEffect(() => {
    if (active) document.getElementById(active.id)?.scrollIntoView({ block: 'nearest' });
  }, [active]);

  function done() {
    search.type('');
    setOpen(false);
    onDone();
  }
  function openActive() {
    const place = active ?? (state === 'found' ? search.groups[0]?.places[0] : undefined);
    if (!place) return;
    void navigate(place.to);
    done();
  }
  function press(event: KeyboardEvent<HTMLInputElement>) {
    if (event.nativeEvent.isComposing) return;
    const keys: Record<string, () => void> = {
      ArrowDown: () => (shown ? search.step(1) : setOpen(true)),
      ArrowUp: () => (shown ? search.step(-1) : setOpen(true)),
      Enter: openActive,
    };
    if (shown && active) Object.assign(keys, { Home: search.first, End: search.last });
    // A dialog closes by itself.
    if (floating) keys['Escape'] = shown ? () => setOpen(false) : done;
    const run = keys[event.key];
    if (!run) return;
    event.preventDefault();
    event.stopPropagation();
    run();
  }

  return (
    <div
      role="search"
      aria-label="Everything"
      className="relative min-w-0 flex-1"
      onBlur={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget)) setOpen(false);
      }}
    >
      <label htmlFor={id} className="sr-only">
        Search cases, nuclides, forms and materials
      </label>
      <Lens
        aria-hidden="true"
        className="pointer-events-none absolute top-2.5 left-2.5 size-4 text-muted"
      />
      <input
        ref={ref}
        id={id}
        {...(!floating && { 'data-autofocus': true })}
        type="text"
        role="combobox"
        aria-expanded={shown}
        aria-controls={listId}
        aria-autocomplete="list"
        {...(active && { 'aria-activedescendant': active.id })}
        autoComplete="off"
        autoCapitalize="none"
        spellCheck={false}
        enterKeyHint="go"
        maxLength={200}
        placeholder="Case, nuclide, form, material"
        value={text}
        onChange={(event) => {
          search.type(event.target.value);
          setOpen(true);
        }}
        onFocus={() => setOpen(true)}
        onClick={() => setOpen(true)}
        onKeyDown={press}
        className={classNames(controlClasses, 'bg-sheet! pr-10 pl-8!')}
      />
      {hint && text === '' && (
        <span
          aria-hidden="true"
          className="pointer-events-none absolute top-1/2 right-2 -translate-y-1/2"
        >
          {hint}
        </span>
      )}
      <div
        hidden={!shown}
        className={
          floating
            ? 'absolute top-full right-0 left-0 z-30 mt-1 rounded border border-line bg-sheet p-1.5 text-base text-ink shadow lg:min-w-[30rem]'
            : 'mt-3'
        }
      >
        <Hits id={listId} search={search} onOpen={done} />
      </div>
      <p role="status" className="sr-only">
        {shown && state === 'found' && `${search.groups.flatMap((g) => g.places).length} hits`}
        {shown && state === 'nothing' && 'Nothing found'}
      </p>
    </div>
  );
}
