import { ChevronLeft, ChevronRight } from 'lucide-react';
import { Link } from 'react-router-dom';
import { buttonClasses } from './button.tsx';

interface PaginationProps {
  page: number;
  pageSize: number;
  total: number;
  /** What is counted, in the plural. */
  noun: string;
  hrefOf: (page: number) => string;
}

function Step({
  to,
  label,
  children,
}: {
  to: string | null;
  label: string;
  children: React.ReactNode;
}) {
  if (to === null) {
    return (
      <span aria-disabled="true" className={buttonClasses('plain', 'small')}>
        {children}
      </span>
    );
  }
  return (
    <Link to={to} aria-label={label} className={buttonClasses('plain', 'small')}>
      {children}
    </Link>
  );
}

export function Pagination({ page, pageSize, total, noun, hrefOf }: PaginationProps) {
  const pages = Math.max(1, Math.ceil(total / pageSize));
  const first = total === 0 ? 0 : (page - 1) * pageSize + 1;
  const last = Math.min(total, page * pageSize);
  return (
    <nav
      aria-label={`Pages of ${noun}`}
      data-screen-only
      className="flex flex-wrap items-center justify-between gap-3 text-sm text-muted"
    >
      <span>
        {first}–{last} of {total} {noun}
      </span>
      {pages > 1 && (
        <span className="flex items-center gap-2">
          <Step to={page > 1 ? hrefOf(page - 1) : null} label="Previous page">
            <ChevronLeft aria-hidden="true" className="size-4" /> Previous
          </Step>
          <span>
            Page {page} of {pages}
          </span>
          <Step to={page < pages ? hrefOf(page + 1) : null} label="Next page">
            Next <ChevronRight aria-hidden="true" className="size-4" />
          </Step>
        </span>
      )}
    </nav>
  );
}
