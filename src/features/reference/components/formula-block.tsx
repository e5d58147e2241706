import { Copy } from 'lucide-react';
import { IconButton } from '#src/components/button.tsx';
import { Formula } from '#src/components/formula.tsx';
import { say } from '#src/lib/toasts.ts';

async function copy(tex: string): Promise<void> {
  try {
    await navigator.clipboard.writeText(tex);
    say('TeX copied.', { tone: 'sound' });
  } catch (refused) {
    console.info('The browser keeps the clipboard closed', refused);
    say('The browser keeps the clipboard closed to this page.', { tone: 'attention' });
  }
}

/** A named formula, typeset, with its TeX to take away. */
export function FormulaBlock({ name, tex }: { name: string; tex: string }) {
  return (
    <div className="min-w-0">
      <div className="flex items-center justify-between gap-2">
        <h2 className="text-sm text-muted">{name}</h2>
        <IconButton
          label={`Copy the TeX of ${name}`}
          className="size-7"
          data-screen-only
          onClick={() => void copy(tex)}
        >
          <Copy aria-hidden="true" className="size-4 text-muted" />
        </IconButton>
      </div>
      <Formula tex={tex} display className="text-lg" />
    </div>
  );
}
