import { Field, TextArea } from '#src/components/field.tsx';
import { Formula } from '#src/components/formula.tsx';
import type { FormParameterInfo } from '#shared/contracts/forms.ts';
import { MAX_FORMULA, isNamedQuantities } from '#shared/contracts/terms.ts';
import type { InteractionTerm, NamedQuantities } from '#shared/contracts/terms.ts';
import { PotentialPreview } from '#src/components/potential-preview.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { usePotential } from '../editing/use-potential.ts';
import type { Draft } from '../model/editor.ts';
import { problemAt } from '../model/problems.ts';
import { setParameter } from '../model/terms.ts';
import { takeText, takeValue } from '../model/typing.ts';
import type { Reading } from '../model/typing.ts';
import { parametersFor } from './model/names.ts';
import { placeOf } from './model/place.ts';

function namedOf(term: InteractionTerm | undefined): NamedQuantities {
  const value = term?.['parameters'];
  return isNamedQuantities(value) ? value : {};
}

function readFormula(text: string): Reading<string> {
  return text.length <= MAX_FORMULA
    ? { value: text }
    : { problem: `A formula may have at most ${MAX_FORMULA} characters; this has ${text.length}.` };
}

/** The formula and the parameters it asks for, in one step. */
function takeFormula(draft: Draft, index: number, text: string, words: readonly string[]): Draft {
  const pointer = `/interaction/terms/${index}/formula`;
  const next = takeText(draft, pointer, text, readFormula(text), (document, formula) => {
    const before = namedOf(document.interaction.terms[index]);
    const named = parametersFor(formula, words, before, document.units);
    return setParameter(
      setParameter(document, index, 'formula', formula),
      index,
      'parameters',
      named,
    );
  });
  // The formula says all that was typed.
  return next.open[pointer] ? next : takeValue(next, pointer, (same) => same);
}

/** A fault of the formula, and the character it speaks of where it stands. */
function FormulaFault({ message, formula }: { message: string; formula: string }) {
  const place = placeOf(message, formula);
  return (
    <>
      {message}
      {place && (
        <code className="mt-1 block font-mono whitespace-pre-wrap text-ink" aria-hidden="true">
          {place.before}
          <mark className="bg-fault px-px text-paper">{place.at}</mark>
          {place.after}
        </code>
      )}
    </>
  );
}

interface FormulaFieldProps {
  term: InteractionTerm;
  index: number;
  parameter: FormParameterInfo;
}

/** V(r) as a formula, its faults at their place. */
export function FormulaField({ term, index, parameter }: FormulaFieldProps) {
  const { draft, edit, readOnly, problems } = useEditing();
  const pointer = `/interaction/terms/${index}/formula`;
  const value = term['formula'];
  const text = draft.open[pointer]?.text ?? (typeof value === 'string' ? value : '');
  const fault = problemAt(problems, pointer);
  return (
    <Field
      label={
        <>
          {parameter.label} <Formula tex="=" className="text-ink" />
        </>
      }
      hint={parameter.description}
      error={fault === undefined ? undefined : <FormulaFault message={fault} formula={text} />}
    >
      {(control) => (
        <TextArea
          {...control}
          aria-label="V(r), formula"
          className="font-mono"
          rows={text.length > 60 ? 4 : 2}
          spellCheck={false}
          autoComplete="off"
          autoCapitalize="off"
          disabled={readOnly}
          value={text}
          onChange={(event) => {
            const typed = event.target.value;
            edit(pointer, (before) => takeFormula(before, index, typed, parameter.words ?? []));
          }}
        />
      )}
    </Field>
  );
}

/** V(r) of this term alone, as it is typed. */
export function TermPotential({ term, name }: { term: InteractionTerm; name: string }) {
  const { draft } = useEditing();
  const { potential, stale } = usePotential(term, draft.document.units);
  return <PotentialPreview potential={potential} dimmed={stale} name={name} />;
}
