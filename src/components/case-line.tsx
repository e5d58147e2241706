import { Link } from 'react-router-dom';
import type { CaseListItem } from '#shared/contracts/cases.ts';
import { BeamLineRow } from './beam-line-row.tsx';
import { StatusChip } from './chip.tsx';
import { When } from './when.tsx';

/** One case in a short list: number, title and state, and below them its beam line. */
export function CaseLine({ item }: { item: CaseListItem }) {
  return (
    <div className="flex flex-col gap-1 py-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <Link to={`/cases/${item.id}`} className="min-w-0 rounded font-semibold hover:underline">
          <span className="mr-2 font-mono text-sm font-normal text-muted">{item.number}</span>
          {item.title}
        </Link>
        <span className="flex items-center gap-3 text-sm text-muted">
          <StatusChip status={item.status} />
          <When iso={item.version.createdAt} />
        </span>
      </div>
      <BeamLineRow summary={item.summary} />
    </div>
  );
}
