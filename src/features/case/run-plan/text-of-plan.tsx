import { Field, TextInput } from '#src/components/field.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';

interface TextOfPlanProps {
  pointer: string;
  label: string;
  value: string | undefined;
  put: (document: CaseDocument, value: string | undefined) => CaseDocument;
  hint?: string;
}

/** A word of the plan, such as a formula or a name; an empty field leaves it out. */
export function TextOfPlan({ pointer, label, value, put, hint }: TextOfPlanProps) {
  const { editDocument, readOnly, problems } = useEditing();
  return (
    <Field label={label} hint={hint} error={problemAt(problems, pointer)}>
      {(control) => (
        <TextInput
          {...control}
          disabled={readOnly}
          autoComplete="off"
          value={value ?? ''}
          onChange={(event) => {
            const text = event.target.value;
            editDocument(pointer, (document) => put(document, text === '' ? undefined : text));
          }}
        />
      )}
    </Field>
  );
}
