import { classNames } from '#src/lib/class-names.ts';

/** Holds the place of what is on its way; silent itself, a `Waiting` around it speaks. */
export function Skeleton({ className }: { className?: string }) {
  return (
    <span
      aria-hidden="true"
      className={classNames('block h-4 animate-pulse rounded bg-soft', className)}
    />
  );
}

/** Says once that something is being fetched. */
export function Waiting({ what, children }: { what: string; children?: React.ReactNode }) {
  return (
    <div role="status">
      <span className="sr-only">Loading {what} …</span>
      {children}
    </div>
  );
}
