import { Field, TextInput } from '#src/components/field.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { takeText, takeValue } from '../model/typing.ts';

interface TextOfPlanProps {
  pointer: string;
  label: string;
  value: string | undefined;
  put: (document: CaseDocument, value: string | undefined) => CaseDocument;
  /** An empty field leaves it out; otherwise it is a fault that waits for its mend. */
  optional?: boolean;
  longest?: number;
  hint?: string;
}

/** A word of the plan, such as a formula or a name. */
export function TextOfPlan(props: TextOfPlanProps) {
  const { pointer, label, value, put, optional = false, longest, hint } = props;
  const { draft, edit, readOnly, problems } = useEditing();
  const text = draft.open[pointer]?.text ?? value ?? '';
  function onText(typed: string): void {
    const empty = typed.trim() === '';
    edit(pointer, (before) =>
      empty && !optional
        ? takeText(before, pointer, typed, { problem: `${label}: type one.` }, put)
        : takeValue(before, pointer, (document) => put(document, empty ? undefined : typed)),
    );
  }
  return (
    <Field label={label} hint={hint} error={problemAt(problems, pointer)}>
      {(control) => (
        <TextInput
          {...control}
          disabled={readOnly}
          autoComplete="off"
          spellCheck={false}
          maxLength={longest}
          value={text}
          onChange={(event) => onText(event.target.value)}
        />
      )}
    </Field>
  );
}
