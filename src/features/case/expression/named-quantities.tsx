import { X } from 'lucide-react';
import { IconButton } from '#src/components/button.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { isNamedQuantities } from '#shared/contracts/terms.ts';
import type { InteractionTerm, NamedQuantities } from '#shared/contracts/terms.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { setParameter } from '../model/terms.ts';
import { takeText, takeValue } from '../model/typing.ts';
import { without } from '../model/without.ts';
import { inOrder } from './model/names.ts';
import { kindOf, parameterText, readParameterText } from './model/read-parameter.ts';

function named(document: CaseDocument, index: number): NamedQuantities {
  const value = document.interaction.terms[index]?.['parameters'];
  return isNamedQuantities(value) ? value : {};
}

interface NamedQuantityProps {
  index: number;
  name: string;
  value: NamedQuantities[string];
  used: boolean;
}

function NamedQuantity({ index, name, value, used }: NamedQuantityProps) {
  const { draft, edit, readOnly, problems } = useEditing();
  const pointer = `/interaction/terms/${index}/parameters/${name}`;
  const entered = draft.document.entered?.[pointer];
  const text = draft.open[pointer]?.text ?? parameterText(value, entered);
  const put = (document: CaseDocument, next: NamedQuantities[string]) =>
    setParameter(document, index, 'parameters', { ...named(document, index), [name]: next });
  return (
    <div className="flex items-end gap-1">
      <Field
        className="min-w-0 flex-1"
        label={<span className="font-mono text-ink">{name}</span>}
        hint={used ? kindOf(value) : 'not in the formula'}
        error={problemAt(problems, pointer)}
      >
        {(control) => (
          <TextInput
            {...control}
            className="font-mono"
            autoComplete="off"
            spellCheck={false}
            disabled={readOnly}
            value={text}
            onChange={(event) => {
              const typed = event.target.value;
              edit(pointer, (before) =>
                takeText(before, pointer, typed, readParameterText(typed), put),
              );
            }}
          />
        )}
      </Field>
      {!used && !readOnly && (
        <IconButton
          label={`Remove the parameter ${name}`}
          onClick={() =>
            edit(`${pointer} remove`, (before) =>
              takeValue(before, pointer, (document) =>
                setParameter(document, index, 'parameters', {
                  ...without(named(document, index), name),
                }),
              ),
            )
          }
        >
          <X aria-hidden="true" className="size-4.5" />
        </IconButton>
      )}
    </div>
  );
}

interface NamedQuantitiesFieldProps {
  term: InteractionTerm;
  index: number;
  form: FormInfo;
}

/** The names a formula uses, each with its value and unit. */
export function NamedQuantitiesField({ term, index, form }: NamedQuantitiesFieldProps) {
  const { problems } = useEditing();
  const formula = typeof term['formula'] === 'string' ? term['formula'] : '';
  const words = form.parameters.find(({ key }) => key === 'formula')?.words ?? [];
  const parameters = isNamedQuantities(term['parameters']) ? term['parameters'] : {};
  const rows = inOrder(formula, words, parameters);
  const pointer = `/interaction/terms/${index}/parameters`;
  const own = problemAt(
    problems.filter(({ path }) => path === pointer),
    pointer,
  );
  return (
    <fieldset className="flex flex-col gap-2 border-0 p-0">
      <legend className="mb-1 text-sm text-muted">Parameters of the formula</legend>
      {own && <p className="text-sm text-fault">{own}</p>}
      {rows.length === 0 && <p className="text-sm text-muted">The formula names none.</p>}
      <div className="grid grid-cols-2 gap-x-3 gap-y-2">
        {rows.map((row) => (
          <NamedQuantity key={row.name} index={index} {...row} />
        ))}
      </div>
    </fieldset>
  );
}
