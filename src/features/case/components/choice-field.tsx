import type { ReactNode } from 'react';
import { Field } from '#src/components/field.tsx';
import { Select, type Choice } from '#src/components/select.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';

interface ChoiceFieldProps<T extends string> {
  pointer: string;
  label: ReactNode;
  value: T;
  choices: ReadonlyArray<Choice<T> | { group: string; choices: ReadonlyArray<Choice<T>> }>;
  onChange: (value: T) => void;
  hint?: ReactNode;
  /** Only faults at the pointer itself, where fields of their own stand below it. */
  exact?: boolean;
}

export function ChoiceField<T extends string>(props: ChoiceFieldProps<T>) {
  const { pointer, label, value, choices, onChange, hint, exact } = props;
  const { problems, readOnly } = useEditing();
  const error = problemAt(
    exact ? problems.filter(({ path }) => path === pointer) : problems,
    pointer,
  );
  return (
    <Field label={label} hint={hint} error={error}>
      {(control) => (
        <Select
          {...control}
          value={value}
          choices={choices}
          onChange={onChange}
          disabled={readOnly}
        />
      )}
    </Field>
  );
}
