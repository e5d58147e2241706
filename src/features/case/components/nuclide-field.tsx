import { Field, TextInput } from '#src/components/field.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { takeText, takeValue } from '../model/typing.ts';
import type { Reading } from '../model/typing.ts';

/** `C-12`, also typed as `c12` or `12C`. */
export function readNuclide(text: string): Reading<string> {
  const match =
    /^\s*(?:([A-Za-z]{1,2})\s*-?\s*(\d{1,3})|(\d{1,3})\s*-?\s*([A-Za-z]{1,2}))\s*$/.exec(text);
  if (!match) return { problem: 'Write a nuclide as symbol and mass number, such as C-12.' };
  const symbol = match[1] ?? match[4] ?? '';
  const mass = match[2] ?? match[3] ?? '';
  return {
    value: `${symbol.charAt(0).toUpperCase()}${symbol.slice(1).toLowerCase()}-${Number(mass)}`,
  };
}

interface NuclideFieldProps {
  pointer: string;
  value: string;
  put: (document: CaseDocument, nuclide: string) => CaseDocument;
  hint?: string;
}

export function NuclideField({ pointer, value, put, hint }: NuclideFieldProps) {
  const { draft, edit, readOnly, problems } = useEditing();
  return (
    <Field label="Nuclide" hint={hint} error={problemAt(problems, pointer)}>
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
            edit(pointer, (before) => takeText(before, pointer, text, readNuclide(text), put));
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
