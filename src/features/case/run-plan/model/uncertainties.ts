import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { RunPlanBody, UncertainInput } from '#shared/contracts/run-plans.ts';
import { without } from '../../model/without.ts';
import { putIn, withPlan } from './plan.ts';

export type Kind = NonNullable<NonNullable<RunPlanBody['uncertaintyKinds']>[UncertainInput]>;

/** How one uncertainty is known; nothing said of it is no member at all. */
export function withKind(plan: RunPlanBody, input: UncertainInput, kind: Kind): RunPlanBody {
  const others = without(plan.uncertaintyKinds ?? {}, input);
  const said = Object.keys(kind).length > 0 ? { ...others, [input]: kind } : others;
  const rest = without(plan, 'uncertaintyKinds');
  return Object.keys(said).length === 0 ? rest : { ...rest, uncertaintyKinds: said };
}

/** An uncertainty put, or left out together with how it was known. */
export function putUncertainty(input: UncertainInput) {
  return (document: CaseDocument, value: number | undefined): CaseDocument => {
    const next = putIn('uncertainties', input)(document, value);
    return value === undefined ? withPlan(next, (plan) => withKind(plan, input, {})) : next;
  };
}

/** One word about an uncertainty put, or left out. */
export function putKind(input: UncertainInput, key: keyof Kind) {
  return (document: CaseDocument, value: Kind[keyof Kind] | undefined): CaseDocument =>
    withPlan(document, (plan) => {
      const before = without(plan.uncertaintyKinds?.[input] ?? {}, key);
      return withKind(plan, input, value === undefined ? before : { ...before, [key]: value });
    });
}
