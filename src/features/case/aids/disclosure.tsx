import { useState, type ReactNode } from 'react';
import { ChevronRight } from 'lucide-react';

interface DisclosureProps {
  title: string;
  /** What it answers, in a few words. */
  says: string;
  /** Told when it opens and closes. */
  onOpen?: (open: boolean) => void;
  children: ReactNode;
}

/** One aid: a line that opens. What is inside is asked for only then. */
export function Disclosure({ title, says, onOpen, children }: DisclosureProps) {
  const [open, setOpen] = useState(false);
  return (
    <details
      className="group/aid border-t border-line first-of-type:border-t-0"
      onToggle={(event) => {
        const now = event.currentTarget.open;
        setOpen(now);
        onOpen?.(now);
      }}
    >
      <summary className="flex cursor-pointer list-none items-baseline gap-x-2.5 rounded py-2 [&::-webkit-details-marker]:hidden">
        <ChevronRight
          aria-hidden="true"
          className="size-4 shrink-0 self-center text-muted transition-transform group-open/aid:rotate-90"
        />
        <span className="flex min-w-0 flex-wrap items-baseline gap-x-2.5">
          <span className="font-semibold">{title}</span>
          <span className="text-sm text-muted">{says}</span>
        </span>
      </summary>
      {open && <div className="pb-4 pl-6.5 max-sm:pl-0">{children}</div>}
    </details>
  );
}
