import type { ReactNode } from 'react';

/** An empty place: what belongs there, and the first step. */
export function EmptyState({
  title,
  children,
  actions,
}: {
  title: string;
  children?: ReactNode;
  actions?: ReactNode;
}) {
  return (
    <div className="flex flex-col items-start gap-3 rounded border border-dashed border-edge px-5 py-6">
      <div>
        <p className="font-semibold">{title}</p>
        {children && <div className="max-w-prose text-muted">{children}</div>}
      </div>
      {actions && <div className="flex flex-wrap gap-2">{actions}</div>}
    </div>
  );
}
