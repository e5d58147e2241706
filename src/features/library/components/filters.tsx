import { useCallback } from 'react';
import { X } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { INTERACTION_SORTS } from '#shared/contracts/library.ts';
import { SearchBox } from '#src/components/search-box.tsx';
import { Select } from '#src/components/select.tsx';
import type { LibraryAddress } from '../address.ts';

const SORTS: ReadonlyArray<{ value: (typeof INTERACTION_SORTS)[number]; label: string }> = [
  { value: 'name', label: 'Name, A to Z' },
  { value: '-name', label: 'Name, Z to A' },
  { value: '-updated', label: 'Newest change first' },
  { value: 'updated', label: 'Oldest change first' },
];

export function Filters({ address: { query, change, hrefWith } }: { address: LibraryAddress }) {
  const search = useCallback((q: string) => change({ q }, true), [change]);
  return (
    <div data-screen-only className="flex flex-wrap items-center gap-2">
      <SearchBox
        id="library-search"
        label="Search the library"
        placeholder="Name, form, particle or source"
        value={query.q ?? ''}
        onSearch={search}
      />
      <Select
        aria-label="Status"
        value={query.status ?? 'published'}
        choices={[
          { value: 'published', label: 'In use' },
          { value: 'retired', label: 'Retired' },
          { value: 'all', label: 'All' },
        ]}
        onChange={(status) => change({ status: status === 'published' ? undefined : status })}
        className="min-w-32 max-sm:flex-1"
      />
      <Select
        aria-label="Order"
        value={query.sort ?? 'name'}
        choices={SORTS}
        onChange={(sort) => change({ sort: sort === 'name' ? undefined : sort })}
        className="min-w-44 max-sm:flex-1"
      />
      {query.tag && (
        <Link
          to={hrefWith({ tag: undefined })}
          state={{ keepFocus: true }}
          className="inline-flex min-h-9 items-center gap-1.5 rounded bg-slate-soft px-2.5 text-sm text-slate hover:underline"
        >
          tag: {query.tag}
          <X aria-hidden="true" className="size-4" />
          <span className="sr-only">Show interactions with any tag</span>
        </Link>
      )}
    </div>
  );
}
