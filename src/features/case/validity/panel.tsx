import type { ReactNode } from 'react';

interface PanelProps {
  title: string;
  /** What it shows, in a sentence. */
  says?: ReactNode;
  /** At the right of the title. */
  actions?: ReactNode;
  children: ReactNode;
}

/** One part of the section: a sheet with its title. */
export function Panel({ title, says, actions, children }: PanelProps) {
  return (
    <section aria-label={title} className="rounded border border-line bg-sheet px-4.5 py-4">
      <div className="mb-2.5 flex flex-wrap items-start justify-between gap-x-4 gap-y-2">
        <div className="min-w-0 flex-1 basis-64">
          <h2 className="font-bold">{title}</h2>
          {says && <p className="max-w-prose text-sm text-muted">{says}</p>}
        </div>
        {actions}
      </div>
      {children}
    </section>
  );
}

/** A name and what stands for it, in a row of such. */
export function Item({ name, children }: { name: ReactNode; children: ReactNode }) {
  return (
    <div className="min-w-0">
      <dt className="text-xs text-muted">{name}</dt>
      <dd className="font-mono text-sm">{children}</dd>
    </div>
  );
}

export function Items({ children }: { children: ReactNode }) {
  return (
    <dl className="mt-2 flex flex-wrap gap-x-8 gap-y-1.5 border-t border-line pt-2.5">
      {children}
    </dl>
  );
}

export const headCell =
  'sticky top-0 bg-sheet px-3 py-1.5 text-right font-semibold whitespace-nowrap';
export const bodyCell = 'px-3 py-0.5 text-right whitespace-nowrap';

/** A wide table scrolls by itself, by keyboard too. */
export function TableBox({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div
      className="relative max-h-96 overflow-auto rounded border border-line print:max-h-none print:overflow-visible"
      tabIndex={0}
      role="region"
      aria-label={label}
    >
      {children}
    </div>
  );
}
