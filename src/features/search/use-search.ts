import { useEffect, useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { searchQuery } from './api.ts';
import { placesOf, type Place, type PlaceGroup } from './model/places.ts';

const PAUSE_MS = 150;

function useSettled(text: string): string {
  const [settled, setSettled] = useState(text);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(text), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text]);
  return settled;
}

export interface Search {
  text: string;
  type: (text: string) => void;
  groups: readonly PlaceGroup[];
  /** The hit the arrow keys stand on; null while they stand in the field. */
  active: Place | null;
  /** Walks through the hits and, past either end, through the field. */
  step: (by: 1 | -1) => void;
  first: () => void;
  last: () => void;
  state: 'idle' | 'searching' | 'found' | 'nothing' | 'failed';
  error: unknown;
}

/** A search as one types it, and the place of the arrow keys among its hits. */
export function useSearch(): Search {
  const [text, setText] = useState('');
  const [at, setAt] = useState(-1);
  const typed = text.trim();
  const settled = useSettled(typed);
  const { data, error, isError, isPlaceholderData } = useQuery(searchQuery(settled));
  const shown = typed === '' || settled === '' ? undefined : data;
  const groups = useMemo(() => (shown ? placesOf(shown) : []), [shown]);
  const places = useMemo(() => groups.flatMap((group) => group.places), [groups]);
  const count = places.length;

  function state(): Search['state'] {
    if (typed === '') return 'idle';
    if (isError) return 'failed';
    if (settled !== typed || !shown || isPlaceholderData) return 'searching';
    return count === 0 ? 'nothing' : 'found';
  }

  return {
    text,
    type(next) {
      setText(next);
      setAt(-1);
    },
    groups,
    active: places[at] ?? null,
    step: (by) =>
      setAt((now) => ((Math.min(now, count - 1) + 1 + by + count + 1) % (count + 1)) - 1),
    first: () => setAt(0),
    last: () => setAt(count - 1),
    state: state(),
    error,
  };
}
