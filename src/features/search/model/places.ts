import type { Hit, SearchAnswer, SearchKind } from '#shared/contracts/search.ts';

export const KIND_WORDS: Record<SearchKind, string> = {
  cases: 'Cases',
  interactions: 'Library',
  nuclides: 'Nuclides',
  elements: 'Elements',
  forms: 'Interaction forms',
  materials: 'Materials',
  species: 'Particles',
};

/** What many are called, where the heading does not say it. */
const MANY: Partial<Record<SearchKind, string>> = { interactions: 'of the library' };

/** The page of a hit. */
const PAGES: Record<SearchKind, (hit: Hit) => string> = {
  cases: ({ key }) => `/cases/${encodeURIComponent(key)}`,
  interactions: ({ key }) => `/library/interactions/${encodeURIComponent(key)}`,
  nuclides: ({ key }) => `/reference/nuclides/${encodeURIComponent(key)}`,
  elements: ({ key }) => `/reference/elements?q=${encodeURIComponent(key)}`,
  forms: ({ key }) => `/reference/forms/${encodeURIComponent(key)}`,
  materials: ({ label }) => `/reference/materials?q=${encodeURIComponent(label)}`,
  species: ({ key }) => `/reference/species?q=${encodeURIComponent(key)}`,
};

/** The list that holds all hits of a group. */
const LISTS: Record<SearchKind, string> = {
  cases: '/cases',
  interactions: '/library',
  nuclides: '/reference/nuclides',
  elements: '/reference/elements',
  forms: '/reference/forms',
  materials: '/reference/materials',
  species: '/reference/species',
};

export interface Place {
  id: string;
  to: string;
  label: string;
  detail: string;
}
export interface PlaceGroup {
  kind: SearchKind;
  title: string;
  places: Place[];
}

/** What the list of hits shows; a group that was cut ends with the way to all of it. */
export function placesOf({ groups, q }: SearchAnswer): PlaceGroup[] {
  return groups.map(({ kind, hits, total }) => {
    const places = hits.map((hit, at) => ({
      id: `hit-${kind}-${at}`,
      to: PAGES[kind](hit),
      label: hit.label,
      detail: hit.detail,
    }));
    const rest = {
      id: `hit-${kind}-all`,
      to: `${LISTS[kind]}?q=${encodeURIComponent(q)}`,
      label: `All ${total} ${MANY[kind] ?? KIND_WORDS[kind].toLowerCase()}`,
      detail: '',
    };
    return {
      kind,
      title: KIND_WORDS[kind],
      places: total > hits.length ? [...places, rest] : places,
    };
  });
}
