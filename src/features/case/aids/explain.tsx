import { useState, type ReactNode } from 'react';
import { CircleHelp, Copy } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Formula } from '#src/components/formula.tsx';
import { copyText } from './code-block.tsx';
import { latexOf } from './model/latex.ts';
import type { Meaning } from './model/meaning-amplitude.ts';

interface MeaningDialogProps {
  meaning: Meaning;
  /** The number itself, in the unit it is shown in. */
  value: string;
  onClose: () => void;
}

/** What a number is: laws with the values of this case, then unit, frame, approximation, error and source. */
export function MeaningDialog({ meaning, value, onClose }: MeaningDialogProps) {
  return (
    <Dialog
      open
      width="wide"
      onOpenChange={(open) => !open && onClose()}
      title={meaning.title}
      description={<span className="font-mono text-ink">{value}</span>}
    >
      <ol className="rounded border border-line">
        {meaning.steps.map(({ name, law, substituted }) => (
          <li key={name} className="min-w-0 border-t border-line px-4 py-2.5 first:border-t-0">
            <h3 className="text-sm text-muted">{name}</h3>
            <Formula display tex={law} />
            {substituted && <Formula display tex={substituted} className="text-muted" />}
          </li>
        ))}
      </ol>
      <dl className="grid gap-x-5 gap-y-2 text-sm sm:grid-cols-[9rem_minmax(0,1fr)]">
        {meaning.facts.map(({ name, text }) => (
          <div key={name} className="contents">
            <dt className="text-muted">{name}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
      <div>
        <Button size="small" onClick={() => void copyText(latexOf(meaning), 'The LaTeX')}>
          <Copy aria-hidden="true" className="size-4" /> Copy as LaTeX
        </Button>
      </div>
    </Dialog>
  );
}

interface ExplainProps {
  /** What the button is spoken as: "What is Elastic σ?" */
  label: string;
  /** The dialog, made when it is asked for. */
  dialog: (close: () => void) => ReactNode;
}

/** A small question mark beside a number that opens what the number is. */
export function Explain({ label, dialog }: ExplainProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <button
        type="button"
        aria-label={label}
        title={label}
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
        className="inline-grid size-6 place-items-center rounded align-middle text-muted hover:bg-soft hover:text-ink"
        data-screen-only
      >
        <CircleHelp aria-hidden="true" className="size-4" />
      </button>
      {open && dialog(() => setOpen(false))}
    </>
  );
}
