import { useEffect, useRef, useState } from 'react';
import { Search } from 'lucide-react';
import { useLocation } from 'react-router-dom';
import { controlClasses } from '#src/components/field.tsx';
import { Kbd } from '#src/components/kbd.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { useShortcutsOn } from '#src/lib/shortcuts.ts';

const PAUSE_MS = 250;

function wantsFocus(state: unknown): boolean {
  return typeof state === 'object' && state !== null && 'focusSearch' in state;
}

/** Searches while one types, after a short pause; the address follows without filling the history. */
export function SearchBox({ value, onSearch }: { value: string; onSearch: (q: string) => void }) {
  const [text, setText] = useState(value);
  const [shown, setShown] = useState(value);
  const box = useRef<HTMLInputElement>(null);
  const location = useLocation();
  const shortcuts = useShortcutsOn();

  // Back and forward change the address under the box.
  if (value !== shown) {
    setShown(value);
    if (value !== text.trim()) setText(value);
  }
  useEffect(() => {
    if (wantsFocus(location.state)) box.current?.focus();
  }, [location.state]);
  useEffect(() => {
    const q = text.trim();
    if (q === value) return;
    const timer = setTimeout(() => onSearch(q), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text, value, onSearch]);

  return (
    <div role="search" className="relative min-w-0 flex-1 basis-64">
      <label htmlFor="case-search" className="sr-only">
        Search the cases
      </label>
      <Search
        aria-hidden="true"
        className="pointer-events-none absolute top-1/2 left-2.5 size-4 -translate-y-1/2 text-muted"
      />
      <input
        ref={box}
        id="case-search"
        type="search"
        maxLength={200}
        value={text}
        onChange={(event) => setText(event.target.value)}
        placeholder="Number, title, particle, nuclide or form"
        className={classNames(controlClasses, 'bg-sheet! pr-10 pl-8')}
      />
      {shortcuts && text === '' && (
        <span
          aria-hidden="true"
          className="pointer-events-none absolute top-1/2 right-2 -translate-y-1/2 max-lg:hidden"
        >
          <Kbd>/</Kbd>
        </span>
      )}
    </div>
  );
}
