import type { ReactNode } from 'react';
import { Field, TextInput } from '#src/components/field.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { takeText, takeValue } from '../model/typing.ts';
import type { Reading } from '../model/typing.ts';

interface NameFieldProps {
  pointer: string;
  label: ReactNode;
  value: string;
  /** The name a text stands for, or why it is none. */
  read: (text: string) => Reading<string>;
  put: (document: CaseDocument, name: string) => CaseDocument;
  hint?: ReactNode;
}

/** A name of the document, typed as people write it: a nuclide, an element. */
export function NameField({ pointer, label, value, read, put, hint }: NameFieldProps) {
  const { draft, edit, readOnly, problems } = useEditing();
  return (
    <Field label={label} hint={hint} error={problemAt(problems, pointer)}>
      {(control) => (
        <TextInput
          {...control}
          className="font-mono"
          autoComplete="off"
          spellCheck={false}
          disabled={readOnly}
          value={draft.open[pointer]?.text ?? draft.document.entered?.[pointer] ?? value}
          onChange={(event) => {
            const text = event.target.value;
            edit(pointer, (before) => takeText(before, pointer, text, read(text), put));
          }}
          onBlur={() => {
            if (draft.open[pointer] ?? draft.document.entered?.[pointer] === undefined) return;
            edit(pointer, (before) => takeValue(before, pointer, (same) => same));
          }}
        />
      )}
    </Field>
  );
}
