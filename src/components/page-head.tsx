import type { ReactNode } from 'react';
import { PageTitle } from './page-title.tsx';

/** The head of a page: its title, and what can be begun here. */
export function PageHead({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <div className="flex min-h-9 flex-wrap items-center justify-between gap-3">
      <PageTitle title={title} />
      {children && (
        <div data-screen-only className="flex flex-wrap gap-2">
          {children}
        </div>
      )}
    </div>
  );
}
