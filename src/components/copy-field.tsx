import { useId, useRef, useState } from 'react';
import { Check, Copy } from 'lucide-react';
import { Button } from './button.tsx';
import { controlClasses } from './field.tsx';

/** A text to take away whole: selected on focus, copied by a button, with a word that it was. */
export function CopyField({ label, value }: { label: string; value: string }) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [said, setSaid] = useState('');

  async function copy() {
    try {
      await navigator.clipboard.writeText(value);
      setSaid('Copied.');
    } catch (refused) {
      console.info('The browser keeps the clipboard closed', refused);
      input.current?.select();
      setSaid('Selected: copy it with Ctrl+C.');
    }
  }

  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="text-sm text-muted">
        {label}
      </label>
      <div className="flex gap-2">
        <input
          ref={input}
          id={id}
          readOnly
          value={value}
          onFocus={(event) => event.target.select()}
          className={`${controlClasses} font-mono`}
        />
        <Button onClick={() => void copy()}>
          {said === 'Copied.' ? (
            <Check aria-hidden="true" className="size-4 text-field" />
          ) : (
            <Copy aria-hidden="true" className="size-4" />
          )}
          Copy
        </Button>
      </div>
      <p role="status" className="min-h-4 text-xs text-muted">
        {said}
      </p>
    </div>
  );
}
