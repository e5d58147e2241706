import { Archive } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { InteractionItem } from '#shared/contracts/library.ts';
import { Chip } from '#src/components/chip.tsx';
import { When } from '#src/components/when.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { energyRangeText, speciesText } from '#src/lib/interaction-words.ts';
import { interactionHref } from '#src/lib/library.ts';
import type { LibraryAddress } from '../address.ts';

export function RetiredChip() {
  return (
    <Chip tone="plain" icon={<Archive aria-hidden="true" className="size-3.5" />}>
      Retired
    </Chip>
  );
}

function Tags({ tags, address }: { tags: readonly string[]; address: LibraryAddress }) {
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

function Entry({ item, address }: { item: InteractionItem; address: LibraryAddress }) {
  const { validity, version } = item;
  return (
    <li className="flex flex-col gap-1 px-4 py-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2 className="min-w-0 text-base">
          <Link to={interactionHref(item.id)} className="rounded font-semibold hover:underline">
            {item.name}
          </Link>
        </h2>
        <span className="flex flex-wrap items-center gap-x-3 text-sm text-muted">
          {item.status === 'retired' && <RetiredChip />}
          <span>
            version {version.n}, {version.author.name}, <When iso={version.createdAt} />
          </span>
        </span>
      </div>
      <p className="text-sm">{item.summary}</p>
      <p className="line-clamp-2 max-w-[85ch] text-muted">{item.description}</p>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1 text-sm">
        <span className="text-muted">
          {energyRangeText(validity)}, {speciesText(validity)}
        </span>
        <Tags tags={item.tags} address={address} />
      </div>
    </li>
  );
}

export function InteractionList({
  items,
  address,
  dimmed,
}: {
  items: readonly InteractionItem[];
  address: LibraryAddress;
  /** The rows are of the last question while the next answer is on its way. */
  dimmed: boolean;
}) {
  return (
    <ul
      aria-label="Interactions"
      aria-busy={dimmed}
      className={classNames(
        'divide-y divide-line rounded border border-line bg-sheet',
        dimmed && 'stale',
      )}
    >
      {items.map((item) => (
        <Entry key={item.id} item={item} address={address} />
      ))}
    </ul>
  );
}
