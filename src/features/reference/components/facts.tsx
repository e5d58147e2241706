import type { ReactNode } from 'react';

export interface Fact {
  name: string;
  value: ReactNode;
  /** Where it comes from or what it holds for. */
  remark?: string;
}

/** Names and numbers in two columns. */
export function Facts({ facts }: { facts: readonly Fact[] }) {
  return (
    <dl className="grid grid-cols-[minmax(8rem,max-content)_1fr] gap-x-6 gap-y-1.5">
      {facts.map(({ name, value, remark }) => (
        <div key={name} className="contents">
          <dt className="text-muted">{name}</dt>
          <dd className="min-w-0">
            <span className="font-mono text-sm">{value}</span>
            {remark && <span className="block text-xs text-muted">{remark}</span>}
          </dd>
        </div>
      ))}
    </dl>
  );
}
