import { ArrowDown, ArrowUp, ChevronsUpDown } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { CaseListItem } from '#shared/contracts/cases.ts';
import { BeamLineRow } from '#src/components/beam-line-row.tsx';
import { StatusChip } from '#src/components/chip.tsx';
import { When } from '#src/components/when.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { CaseAddress } from '../address.ts';

const CELL = 'px-3 py-2.5 align-top';
const SORTABLE = { number: 'No.', title: 'Case', updated: 'Changed' } as const;
type SortKey = keyof typeof SORTABLE;

function SortHeader({
  sortKey,
  address,
  className,
}: {
  sortKey: SortKey;
  address: CaseAddress;
  className?: string;
}) {
  const sort = address.query.sort ?? '-updated';
  const rising = sort === sortKey;
  const falling = sort === `-${sortKey}`;
  // A first click on the moment of change shows the newest, on anything else the lowest.
  const firstFalls = sortKey === 'updated';
  const next = rising || (firstFalls && !falling) ? `-${sortKey}` : sortKey;
  const Arrow = rising ? ArrowUp : falling ? ArrowDown : ChevronsUpDown;
  return (
    <th
      scope="col"
      aria-sort={rising ? 'ascending' : falling ? 'descending' : 'none'}
      className={classNames('px-3 py-2 font-semibold', className)}
    >
      <Link
        to={address.hrefWith({ sort: next === '-updated' ? undefined : next })}
        state={{ keepFocus: true }}
        className={classNames(
          'inline-flex items-center gap-1 rounded hover:text-ink',
          (rising || falling) && 'text-ink',
        )}
      >
        {SORTABLE[sortKey]}
        <Arrow aria-hidden="true" className="size-3.5" />
      </Link>
    </th>
  );
}

function Tags({ tags, address }: { tags: readonly string[]; address: CaseAddress }) {
  if (tags.length === 0) return null;
  return (
    <ul aria-label="Tags" className="flex flex-wrap gap-1.5">
      {tags.map((tag) => (
        <li key={tag}>
          <Link
            to={address.hrefWith({ tag })}
            state={{ keepFocus: true }}
            className="inline-block rounded bg-soft px-1.5 py-0.5 text-xs text-muted hover:text-ink hover:underline"
          >
            {tag}
          </Link>
        </li>
      ))}
    </ul>
  );
}

function Row({ item, address }: { item: CaseListItem; address: CaseAddress }) {
  return (
    <tr className="border-t border-line hover:bg-soft/60">
      <td className={classNames(CELL, 'text-right font-mono text-sm text-muted max-md:hidden')}>
        {item.number}
      </td>
      <td className={CELL}>
        <div className="flex flex-col gap-1">
          <Link to={`/cases/${item.id}`} className="w-fit rounded font-semibold hover:underline">
            <span className="mr-2 font-mono text-sm font-normal text-muted md:hidden">
              {item.number}
            </span>
            {item.title}
          </Link>
          <BeamLineRow summary={item.summary} />
          <Tags tags={item.tags} address={address} />
          <div className="flex flex-wrap items-center gap-x-3 gap-y-1 pt-0.5 text-sm text-muted md:hidden">
            <StatusChip status={item.status} />
            <span>{item.owner.name}</span>
            <When iso={item.version.createdAt} />
          </div>
        </div>
      </td>
      <td className={classNames(CELL, 'max-md:hidden')}>
        <StatusChip status={item.status} />
      </td>
      <td className={classNames(CELL, 'max-lg:hidden')}>{item.owner.name}</td>
      <td className={classNames(CELL, 'max-lg:hidden')}>
        {item.campaign?.name ?? <span className="text-muted">none</span>}
      </td>
      <td className={classNames(CELL, 'whitespace-nowrap max-md:hidden')}>
        <When iso={item.version.createdAt} />
        <span className="block text-sm text-muted">version {item.version.n}</span>
      </td>
    </tr>
  );
}

export function CaseTable({
  items,
  address,
  dimmed,
}: {
  items: readonly CaseListItem[];
  address: CaseAddress;
  /** The rows are of the last question while the next answer is on its way. */
  dimmed: boolean;
}) {
  return (
    <div
      aria-busy={dimmed}
      className={classNames('rounded border border-line bg-sheet', dimmed && 'stale')}
    >
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">Cases, one a row, with their beam line</caption>
        <thead className="text-sm text-muted max-md:sr-only">
          <tr>
            <SortHeader sortKey="number" address={address} className="w-16 text-right" />
            <SortHeader sortKey="title" address={address} />
            <th scope="col" className="px-3 py-2 font-semibold">
              Status
            </th>
            <th scope="col" className="px-3 py-2 font-semibold max-lg:hidden">
              Owner
            </th>
            <th scope="col" className="px-3 py-2 font-semibold max-lg:hidden">
              Campaign
            </th>
            <SortHeader sortKey="updated" address={address} />
          </tr>
        </thead>
        <tbody>
          {items.map((item) => (
            <Row key={item.id} item={item} address={address} />
          ))}
        </tbody>
      </table>
    </div>
  );
}
