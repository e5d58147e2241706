import { useState } from 'react';
import { Pencil } from 'lucide-react';
import { IconButton } from '#src/components/button.tsx';
import { PageTitle } from '#src/components/page-title.tsx';

interface TitleFieldProps {
  title: string;
  readOnly: boolean;
  onChange: (title: string) => void;
}

/** The title, editable where it stands. */
export function TitleField({ title, readOnly, onChange }: TitleFieldProps) {
  const [before, setBefore] = useState<string | null>(null);
  if (before !== null) {
    const close = () => {
      if (title.trim() === '') onChange(before);
      setBefore(null);
    };
    return (
      <>
        <PageTitle title={title} className="sr-only" />
        <input
          type="text"
          aria-label="Title of the case"
          autoFocus
          maxLength={200}
          value={title}
          onChange={(event) => onChange(event.target.value)}
          onBlur={close}
          onKeyDown={(event) => {
            if (event.key === 'Enter') close();
            if (event.key === 'Escape') {
              onChange(before);
              setBefore(null);
            }
          }}
          className="-mx-2 w-full max-w-3xl rounded border border-edge bg-paper px-2 font-display text-2xl font-semibold tracking-[-0.01em] max-sm:text-xl"
        />
      </>
    );
  }
  return (
    <div>
      <PageTitle title={title} className="inline" />
      {!readOnly && (
        <IconButton
          label="Change the title"
          className="ml-1.5 size-7! align-[0.1em] text-muted"
          onClick={() => setBefore(title)}
          data-screen-only
        >
          <Pencil aria-hidden="true" className="size-4" />
        </IconButton>
      )}
    </div>
  );
}
