import { Trash2 } from 'lucide-react';
import { IconButton } from '#src/components/button.tsx';
import { Formula } from '#src/components/formula.tsx';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import type { FormInfo, FormParameterInfo } from '#shared/contracts/forms.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { useEditing } from '../editing/editor-context.ts';
import { changedForm, removeTerm, setForm, setParameter } from '../model/terms.ts';
import { formLabel } from '../model/words.ts';
import { ChoiceField } from './choice-field.tsx';
import { NumberField, QuantityField } from './typed-fields.tsx';

function isDimension(name: string): name is Dimension {
  return Object.hasOwn(UNITS, name);
}

function ParameterLabel({ parameter }: { parameter: FormParameterInfo }) {
  return (
    <>
      {parameter.label} <Formula tex={parameter.symbol} className="text-ink" />
      {parameter.optional && ' (may be empty)'}
    </>
  );
}

interface ParameterFieldProps {
  term: InteractionTerm;
  index: number;
  parameter: FormParameterInfo;
}

/** One parameter, as the register describes it. */
function ParameterField({ term, index, parameter }: ParameterFieldProps) {
  const { key, dimension, minimum, maximum, exclusiveMinimum, integer, optional } = parameter;
  const value = term[key];
  const bounds = { minimum, maximum, exclusiveMinimum, integer, what: parameter.label };
  const shared = {
    pointer: `/interaction/terms/${index}/${key}`,
    label: <ParameterLabel parameter={parameter} />,
    optional: optional ?? false,
    hint: parameter.description,
  };
  const initial = parameter.default;
  if (isQuantity(initial) && isDimension(dimension)) {
    return (
      <QuantityField
        {...shared}
        name={`${parameter.label} of term ${index + 1}`}
        dimension={dimension}
        value={isQuantity(value) ? value : undefined}
        fallbackUnit={initial.unit}
        rules={{ ...bounds, unit: initial.unit }}
        put={(document, next) => setParameter(document, index, key, next)}
      />
    );
  }
  return (
    <NumberField
      {...shared}
      value={typeof value === 'number' ? value : undefined}
      rules={bounds}
      put={(document, next) => setParameter(document, index, key, next)}
    />
  );
}

/** Members the register does not describe are shown, never dropped. */
function UnknownMembers({ term, form }: { term: InteractionTerm; form: FormInfo | undefined }) {
  const known = new Set(['form', ...(form?.parameters.map(({ key }) => key) ?? [])]);
  const extra = Object.keys(term).filter((key) => !known.has(key));
  if (!form || extra.length === 0) return null;
  return (
    <p className="text-sm text-straw">
      Also given, and unknown to this form: <span className="font-mono">{extra.join(', ')}</span>.
    </p>
  );
}

interface TermInputsProps {
  term: InteractionTerm;
  index: number;
  /** More than one term: each then has a number and can be taken out. */
  several: boolean;
}

export function TermInputs({ term, index, several }: TermInputsProps) {
  const { forms, edit, readOnly } = useEditing();
  const form = forms.find(({ key }) => key === term.form);
  const choices = forms.map(({ key, label }) => ({ value: key, label }));
  return (
    <div
      role="group"
      aria-label={several ? `Term ${index + 1}` : 'Interaction term'}
      className="flex flex-col gap-3"
    >
      <div className="flex items-end gap-1">
        <div className="min-w-0 flex-1">
          <ChoiceField<string>
            exact
            pointer={`/interaction/terms/${index}`}
            label={several ? `Form of term ${index + 1}` : 'Form'}
            value={term.form}
            choices={
              form
                ? choices
                : [{ value: term.form, label: formLabel(term.form, forms) }, ...choices]
            }
            onChange={(key) => {
              const next = forms.find((candidate) => candidate.key === key);
              if (!next) return;
              edit(`/interaction/terms/${index}/form`, (draft) =>
                setForm(draft, index, changedForm(term, form, next)),
              );
            }}
          />
        </div>
        {several && !readOnly && (
          <IconButton
            label={`Remove term ${index + 1}`}
            onClick={() => edit('/interaction/terms', (draft) => removeTerm(draft, index))}
          >
            <Trash2 aria-hidden="true" className="size-4.5" />
          </IconButton>
        )}
      </div>
      {form && (
        <div className="rounded bg-soft px-3 py-1.5">
          <Formula display tex={form.formula} />
        </div>
      )}
      {form?.parameters.map((parameter) => (
        <ParameterField key={parameter.key} term={term} index={index} parameter={parameter} />
      ))}
      <UnknownMembers term={term} form={form} />
    </div>
  );
}
