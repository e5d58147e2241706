import { useEffect, useRef } from 'react';
import { useLocation } from 'react-router-dom';
import { SearchBox } from '#src/components/search-box.tsx';
import { useShortcutsOn } from '#src/lib/shortcuts.ts';

function wantsFocus(state: unknown): boolean {
  return typeof state === 'object' && state !== null && 'focusSearch' in state;
}

/** The search of the cases; the key / leads here from every page. */
export function CaseSearch({ value, onSearch }: { value: string; onSearch: (q: string) => void }) {
  const box = useRef<HTMLInputElement>(null);
  const { state } = useLocation() as { state: unknown };
  const shortcuts = useShortcutsOn();
  useEffect(() => {
    if (wantsFocus(state)) box.current?.focus();
  }, [state]);
  return (
    <SearchBox
      ref={box}
      id="case-search"
      label="Search the cases"
      placeholder="Number, title, particle, nuclide or form"
      value={value}
      onSearch={onSearch}
      hotkey={shortcuts ? '/' : undefined}
    />
  );
}
