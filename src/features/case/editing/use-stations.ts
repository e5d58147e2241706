import { useCallback, useState } from 'react';
import type { Station } from '#src/components/station-glyph.tsx';

/** Which groups of inputs are folded, and at which station the person is. */
export function useStations(groupId: (station: Station) => string) {
  const [selected, setSelected] = useState<Station>('beam');
  const [closed, setClosed] = useState<ReadonlySet<Station>>(new Set());
  const toggle = useCallback((station: Station) => {
    setClosed((before) => {
      const next = new Set(before);
      if (!next.delete(station)) next.add(station);
      return next;
    });
  }, []);
  const openStation = useCallback(
    (station: Station) => {
      setSelected(station);
      setClosed((before) => {
        const next = new Set(before);
        next.delete(station);
        return next;
      });
      const heading = document.getElementById(groupId(station));
      heading?.focus({ preventScroll: true });
      const calm = window.matchMedia('(prefers-reduced-motion: reduce)').matches;
      heading?.scrollIntoView({ block: 'start', behavior: calm ? 'auto' : 'smooth' });
    },
    [groupId],
  );
  return { selected, setSelected, closed, toggle, openStation };
}
