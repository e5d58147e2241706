import { Trash2 } from 'lucide-react';
import { IconButton } from '#src/components/button.tsx';
import { Formula } from '#src/components/formula.tsx';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { useEditing } from '../editing/editor-context.ts';
import { changedForm, removeTerm, setForm } from '../model/terms.ts';
import { formLabel } from '../model/words.ts';
import { ChoiceField } from './choice-field.tsx';
import { ParameterFields } from './parameter-fields.tsx';

/** Members the register does not describe are shown, never dropped. */
function UnknownMembers({ term, form }: { term: InteractionTerm; form: FormInfo | undefined }) {
  const known = new Set(['form', 'original', ...(form?.parameters.map(({ key }) => key) ?? [])]);
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
          {/* Beside the inputs there is little width: what stands after the potential takes lines of its own. */}
          {form.formula.split(/[,;]\s*\\quad\s*/).map((tex) => (
            <Formula
              key={tex}
              display
              tex={tex}
              className={tex.length > 60 ? 'text-sm' : undefined}
            />
          ))}
        </div>
      )}
      {form && <ParameterFields term={term} index={index} form={form} />}
      <UnknownMembers term={term} form={form} />
    </div>
  );
}
