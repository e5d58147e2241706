import { useCallback } from 'react';
import { useQuery } from '@tanstack/react-query';
import { X } from 'lucide-react';
import { Link } from 'react-router-dom';
import { CASE_SORTS, STATUSES } from '#shared/contracts/cases.ts';
import { statusLabel } from '#src/components/chip.tsx';
import { Segmented } from '#src/components/segmented.tsx';
import { Select } from '#src/components/select.tsx';
import { campaignsQuery } from '#src/lib/campaigns.ts';
import type { CaseAddress } from '../address.ts';
import { CaseSearch } from './case-search.tsx';

const SORT_LABELS: Record<(typeof CASE_SORTS)[number], string> = {
  '-updated': 'Newest change first',
  updated: 'Oldest change first',
  '-number': 'Highest number first',
  number: 'Lowest number first',
  title: 'Title, A to Z',
  '-title': 'Title, Z to A',
};

function CampaignFilter({ address }: { address: CaseAddress }) {
  const campaigns = useQuery(campaignsQuery).data ?? [];
  const chosen = address.query.campaign ?? '';
  if (campaigns.length === 0 && chosen === '') return null;
  const known = campaigns.some(({ id }) => id === chosen);
  return (
    <Select
      aria-label="Campaign"
      value={chosen}
      choices={[
        { value: '', label: 'Any campaign' },
        ...campaigns.map(({ id, name }) => ({ value: id, label: name })),
        ...(chosen && !known ? [{ value: chosen, label: 'A campaign you cannot see' }] : []),
      ]}
      onChange={(campaign) => address.change({ campaign })}
      className="max-w-60 min-w-40 max-sm:max-w-none max-sm:flex-1"
    />
  );
}

export function Filters({ address }: { address: CaseAddress }) {
  const { query, change, hrefWith } = address;
  const search = useCallback((q: string) => change({ q }, true), [change]);
  return (
    <div data-screen-only className="flex flex-wrap items-center gap-2">
      <CaseSearch value={query.q ?? ''} onSearch={search} />
      <Segmented
        label="Owner"
        size="normal"
        value={query.owner ?? 'all'}
        choices={[
          { value: 'all', label: 'All' },
          { value: 'me', label: 'Mine' },
        ]}
        onChange={(owner) => change({ owner: owner === 'all' ? undefined : owner })}
      />
      <Select
        aria-label="Status"
        value={query.status ?? ''}
        choices={[
          { value: '', label: 'Any status' },
          ...STATUSES.map((status) => ({ value: status, label: statusLabel(status) })),
        ]}
        onChange={(status) => change({ status })}
        className="min-w-36 max-sm:flex-1"
      />
      <CampaignFilter address={address} />
      <Select
        aria-label="Order"
        value={query.sort ?? '-updated'}
        choices={CASE_SORTS.map((sort) => ({ value: sort, label: SORT_LABELS[sort] }))}
        onChange={(sort) => change({ sort: sort === '-updated' ? undefined : sort })}
        className="max-sm:flex-1 md:hidden"
      />
      {query.tag && (
        <Link
          to={hrefWith({ tag: undefined })}
          state={{ keepFocus: true }}
          className="inline-flex min-h-9 items-center gap-1.5 rounded bg-slate-soft px-2.5 text-sm text-slate hover:underline"
        >
          tag: {query.tag}
          <X aria-hidden="true" className="size-4" />
          <span className="sr-only">Show cases with any tag</span>
        </Link>
      )}
    </div>
  );
}
