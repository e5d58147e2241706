import { ArrowRight } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';

/** One thing that differs between two states of something, in words and units. */
export interface Difference {
  key: string;
  label: string;
  before: string;
  after: string;
}

/** Sentences read better plain, and each on lines of its own. */
const isLong = (text: string): boolean => text.length > 80;

/** Field by field, in words and units: what it was, what it is. */
export function DifferenceTable({ differences }: { differences: readonly Difference[] }) {
  return (
    <dl className="divide-y divide-line">
      {differences.map(({ key, label, before, after }) => (
        <div key={key} className="grid gap-x-4 py-1.5 sm:grid-cols-[13rem_1fr]">
          <dt className="text-sm text-muted">{label}</dt>
          <dd className="min-w-0">
            <span
              className={classNames(
                'text-muted line-through decoration-1',
                isLong(before) && 'mb-1 block max-w-prose',
              )}
            >
              {before}
            </span>{' '}
            <ArrowRight
              aria-label="becomes"
              className={classNames('inline size-4 text-muted', isLong(before) ? 'mr-1' : 'mx-1')}
            />{' '}
            <span className={isLong(after) ? 'max-w-prose' : 'font-semibold'}>{after}</span>
          </dd>
        </div>
      ))}
    </dl>
  );
}
