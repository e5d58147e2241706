import { Copy, Waypoints } from 'lucide-react';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { startHref, type ReferenceStart } from '#src/lib/reference-start.ts';
import { say } from '#src/lib/toasts.ts';
import { useFilesCases } from './use-in-case.tsx';

async function copy(name: string, line: string): Promise<void> {
  try {
    await navigator.clipboard.writeText(line);
    say(`${name} copied with its units.`, { tone: 'sound' });
  } catch (refused) {
    console.info('The browser keeps the clipboard closed', refused);
    say('The browser keeps the clipboard closed to this page. Export the table as CSV.', {
      tone: 'attention',
    });
  }
}

/** What can be done with one row: take it into a case, take it away. */
export function RowActions({
  name,
  line,
  start,
}: {
  name: string;
  line: string;
  start: ReferenceStart | null;
}) {
  const files = useFilesCases();
  return (
    <div className="flex items-center justify-end gap-0.5" data-screen-only>
      {start && files && (
        <ButtonLink
          to={startHref(start)}
          look="quiet"
          size="small"
          aria-label={`Use ${name} in a case`}
          title={`Use ${name} in a case`}
        >
          <Waypoints aria-hidden="true" className="size-4 text-barn" />
          <span className="text-muted max-xl:hidden">Use in a case</span>
        </ButtonLink>
      )}
      <Button
        look="quiet"
        size="small"
        aria-label={`Copy ${name}`}
        title={`Copy ${name}`}
        className="px-1.5!"
        onClick={() => void copy(name, line)}
      >
        <Copy aria-hidden="true" className="size-4 text-muted" />
      </Button>
    </div>
  );
}
