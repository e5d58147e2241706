import { Copy } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { say } from '#src/lib/toasts.ts';

/** Copies a text, with a word that it was; a closed clipboard is told in words. */
export async function copyText(text: string, what: string): Promise<void> {
  try {
    await navigator.clipboard.writeText(text);
    say(`${what} is copied.`, { tone: 'sound' });
  } catch (refused) {
    console.info('The browser keeps the clipboard closed', refused);
    say('The browser does not let this page copy; mark the text and press Ctrl+C.', {
      tone: 'fault',
    });
  }
}

interface CodeBlockProps {
  /** Spoken name. */
  label: string;
  code: string;
  /** What the message after copying calls it. */
  what: string;
}

/** A text to take away: it scrolls by itself, by keyboard too, and is copied whole. */
export function CodeBlock({ label, code, what }: CodeBlockProps) {
  return (
    <div className="flex min-w-0 flex-col gap-2">
      <pre
        tabIndex={0}
        role="region"
        aria-label={label}
        className="max-h-72 overflow-auto rounded border border-line bg-paper px-3 py-2 font-mono text-sm"
      >
        {code}
      </pre>
      <div>
        <Button size="small" onClick={() => void copyText(code, what)}>
          <Copy aria-hidden="true" className="size-4" /> Copy
        </Button>
      </div>
    </div>
  );
}
