import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { parameterApplies, startingParameters } from '#shared/contracts/forms.ts';
import type { FormInfo, FormParameterInfo } from '#shared/contracts/forms.ts';
import type { Draft } from './editor.ts';
import { withoutEntered, withoutTermTexts } from './entered.ts';
import { same } from '#src/lib/same.ts';
import { without } from './without.ts';

/** A term with the defaults of the register; parameters that may be left out are left out. */
export function defaultTerm(form: FormInfo): InteractionTerm {
  return {
    form: form.key,
    ...Object.fromEntries(
      startingParameters(form.parameters).map((parameter) => [parameter.key, parameter.default]),
    ),
  };
}

/** Another form for a term: what both forms call by the same names is kept, where the person had set it. */
export function changedForm(
  term: InteractionTerm,
  from: FormInfo | undefined,
  to: FormInfo,
): InteractionTerm {
  const next = defaultTerm(to);
  for (const { key, label, dimension } of to.parameters) {
    const before = from?.parameters.find((parameter) => parameter.key === key);
    const value = term[key];
    if (value === undefined || before?.dimension !== dimension || before.label !== label) continue;
    if (!same(value, before.default)) next[key] = value;
  }
  return next;
}

function withTerms(
  document: CaseDocument,
  change: (terms: readonly InteractionTerm[]) => InteractionTerm[],
): CaseDocument {
  return { ...document, interaction: { terms: change(document.interaction.terms) } };
}

export function setForm(draft: Draft, index: number, term: InteractionTerm): Draft {
  const pointer = `/interaction/terms/${index}`;
  const open = Object.entries(draft.open).filter(([key]) => !key.startsWith(`${pointer}/`));
  const document = withTerms(withoutEntered(draft.document, pointer), (terms) =>
    terms.map((before, place) => (place === index ? term : before)),
  );
  return { ...draft, document, open: Object.fromEntries(open) };
}

/** One parameter of one term; without a value it is left out. */
export function setParameter(
  document: CaseDocument,
  index: number,
  key: string,
  value: InteractionTerm[string] | undefined,
): CaseDocument {
  return withTerms(document, (terms) =>
    terms.map((term, place) => {
      if (place !== index) return term;
      if (value !== undefined) return { ...term, [key]: value };
      return { ...without(term, key), form: term.form };
    }),
  );
}

/** A choice made: what hangs on another value of it goes, what hangs on this one begins with its default. */
export function setChoice(
  document: CaseDocument,
  index: number,
  form: FormInfo,
  { key, value }: { key: string; value: string },
): CaseDocument {
  const chosen = setParameter(document, index, key, value);
  const members = chosen.interaction.terms[index] ?? { form: form.key };
  return form.parameters
    .filter(({ when }) => when?.key === key)
    .reduce((next, parameter) => {
      if (!parameterApplies(parameter, members))
        return setParameter(next, index, parameter.key, undefined);
      const missing = members[parameter.key] === undefined && !parameter.optional;
      return missing ? setParameter(next, index, parameter.key, parameter.default) : next;
    }, chosen);
}

/** Of parameters of which exactly one is given, this one with its default. */
export function setAlternative(
  document: CaseDocument,
  index: number,
  alternatives: readonly FormParameterInfo[],
  key: string,
): CaseDocument {
  return alternatives.reduce(
    (next, one) => setParameter(next, index, one.key, one.key === key ? one.default : undefined),
    document,
  );
}

export function addTerm(document: CaseDocument, term: InteractionTerm): CaseDocument {
  return withTerms(document, (terms) => [...terms, term]);
}

/** Without one term; what stands in the fields of the later ones moves with them. */
export function removeTerm(draft: Draft, index: number): Draft {
  const { entered, ...rest } = draft.document;
  const document = withTerms(rest, (terms) => terms.filter((_, place) => place !== index));
  const kept = withoutTermTexts(entered ?? {}, index);
  return {
    ...draft,
    document: Object.keys(kept).length === 0 ? document : { ...document, entered: kept },
    open: withoutTermTexts(draft.open, index),
  };
}
