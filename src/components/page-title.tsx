import { useEffect, useRef, type ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import { classNames } from '#src/lib/class-names.ts';

interface PageTitleProps {
  /** What the browser's tab says; the heading too, unless other words are given. */
  title: string;
  children?: ReactNode;
  className?: string;
}

function wantsFocusKept(state: unknown): boolean {
  return typeof state === 'object' && state !== null && 'keepFocus' in state;
}

/**
 * The one h1 of a page. It names the tab and takes the focus when one walks to the page from another; a navigation with
 * `state: { keepFocus: true }` leaves the focus where it is.
 */
export function PageTitle({ title, children, className }: PageTitleProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  const location = useLocation();
  useEffect(() => {
    document.title = `${title} · Tallybarn`;
  }, [title]);
  const isFirstPage = location.key === 'default';
  const keepsFocus = wantsFocusKept(location.state);
  useEffect(() => {
    if (!isFirstPage && !keepsFocus) heading.current?.focus({ preventScroll: true });
    // The path alone: a filter in the address must not pull the focus away from the filter.
  }, [location.pathname, isFirstPage, keepsFocus]);
  return (
    <h1 ref={heading} tabIndex={-1} className={classNames('text-2xl max-sm:text-xl', className)}>
      {children ?? title}
    </h1>
  );
}
