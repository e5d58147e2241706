import type { ReactNode } from 'react';

export function Kbd({ children }: { children: ReactNode }) {
  return (
    <kbd className="inline-grid min-w-6 place-items-center rounded border border-edge px-1.5 font-mono text-xs text-muted">
      {children}
    </kbd>
  );
}
