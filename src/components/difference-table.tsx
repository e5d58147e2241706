import { ArrowRight } from 'lucide-react';

/** One thing that differs between two states of something, in words and units. */
export interface Difference {
  key: string;
  label: string;
  before: string;
  after: string;
}

/** Field by field, in words and units: what it was, what it is. */
export function DifferenceTable({ differences }: { differences: readonly Difference[] }) {
  return (
    <dl className="divide-y divide-line">
      {differences.map(({ key, label, before, after }) => (
        <div key={key} className="grid gap-x-4 py-1.5 sm:grid-cols-[13rem_1fr]">
          <dt className="text-sm text-muted">{label}</dt>
          <dd className="min-w-0">
            <span className="text-muted line-through decoration-1">{before}</span>{' '}
            <ArrowRight aria-label="becomes" className="mx-1 inline size-4 text-muted" />{' '}
            <span className="font-semibold">{after}</span>
          </dd>
        </div>
      ))}
    </dl>
  );
}
