import { RotateCcw } from 'lucide-react';
import { inWords } from '#src/lib/api.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

/** Something could not be fetched: in words, with the way to try again. */
export function Failure({
  what,
  error,
  onRetry,
}: {
  what: string;
  error: unknown;
  onRetry?: () => void;
}) {
  return (
    <Notice
      live
      tone="fault"
      title={`${what} could not be loaded.`}
      actions={
        onRetry && (
          <Button size="small" onClick={onRetry}>
            <RotateCcw aria-hidden="true" className="size-4" /> Try again
          </Button>
        )
      }
    >
      {inWords(error)}
    </Notice>
  );
}
