import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Plus, Trash2 } from 'lucide-react';
import { Button, IconButton } from '#src/components/button.tsx';
import { Field } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Select } from '#src/components/select.tsx';
import { nuclidesTableSchema } from '#shared/contracts/reference.ts';
import type { RunPlan, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { inWords, request } from '#src/lib/api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { formLabel } from '../model/words.ts';
import { problemAt } from '../model/problems.ts';
import { Panel } from '../validity/panel.tsx';
import {
  contributionOf,
  isOutOfDate,
  lawsFor,
  uncounted,
  withBeamOf,
  withContributions,
} from './model/contributions.ts';
import type { Contribution, LawOfElement } from './model/contributions.ts';
import { withPlan } from './model/plan.ts';
import { withoutTexts } from './model/texts.ts';

const LAW_NAMES: Record<LawOfElement, string> = {
  atom: 'table of the neutral atom',
  contact: 'neutron scattering length of the table',
  coulomb: 'point charges (Coulomb)',
  case: 'the terms of this case',
};

/** The isotope of an element that there is most of; a name with a mass number is one already. */
async function commonest(name: string, signal: AbortSignal): Promise<string> {
  if (name.includes('-')) return name;
  const { items } = await request('/api/reference/nuclides', {
    answer: nuclidesTableSchema,
    query: { element: name, occurrence: 'natural', sort: '-abundance', pageSize: 1 },
    signal,
  });
  const [first] = items;
  if (!first) throw new Error(`No natural nuclide of ${name} is known.`);
  return first.nuclide;
}

function useChange() {
  const { edit } = useEditing();
  return (step: string, change: (list: readonly Contribution[]) => readonly Contribution[]) =>
    edit(`/runPlan/contributions ${step}`, (before) => {
      const clean = withoutTexts(before, /^\/runPlan\/contributions/);
      return {
        ...clean,
        document: withPlan(clean.document, (plan) =>
          withContributions(plan, change(plan.contributions ?? [])),
        ),
      };
    });
}

function Counted({ contribution, index }: { contribution: Contribution; index: number }) {
  const { draft, forms, problems, readOnly } = useEditing();
  const change = useChange();
  const { estimate, scatterer } = contribution;
  const { target } = estimate;
  const old = isOutOfDate(draft.document, contribution);
  const fault = problemAt(problems, `/runPlan/contributions/${index}`);
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-t border-line py-1.5 first:border-t-0">
      <div className="min-w-0 flex-1 basis-64">
        <p>
          <span className="font-semibold">{scatterer}</span>{' '}
          <span className="text-muted">
            as {target.kind === 'nuclide' ? target.nuclide : 'a target of its own'},{' '}
            {estimate.interaction.terms.map(({ form }) => formLabel(form, forms)).join(' + ')}
          </span>
        </p>
        {fault && <p className="text-sm text-fault">{fault}</p>}
        {old && !readOnly && (
          <p className="text-sm">
            The beam of the case has changed since.{' '}
            <button
              type="button"
              className="rounded underline underline-offset-3"
              onClick={() =>
                change(`beam ${index}`, (list) =>
                  list.map((one, i) => (i === index ? withBeamOf(draft.document, one) : one)),
                )
              }
            >
              Take the beam of the case
            </button>
          </p>
        )}
      </div>
      {!readOnly && (
        <span data-screen-only>
          <IconButton
            label={`Count ${scatterer} no longer`}
            onClick={() => change(`remove ${index}`, (list) => list.filter((_, i) => i !== index))}
          >
            <Trash2 aria-hidden="true" className="size-4" />
          </IconButton>
        </span>
      )}
    </li>
  );
}

/** Another element of the target, counted as background at every detector. */
function AddElement({ names }: { names: readonly string[] }) {
  const { draft } = useEditing();
  const change = useChange();
  const laws = lawsFor(draft.document);
  const [wanted, setWanted] = useState<string | null>(null);
  const [picked, setLaw] = useState<LawOfElement | null>(null);
  const name = names.find((one) => one === wanted) ?? names[0] ?? '';
  const law = laws.find((one) => one === picked) ?? laws[0] ?? 'case';
  const nuclide = useQuery({
    queryKey: ['commonest', name],
    queryFn: ({ signal }) => commonest(name, signal),
    staleTime: Infinity,
    enabled: name !== '',
  });
  function add(): void {
    const found = nuclide.data;
    if (found === undefined) return;
    change(`add ${name}`, (list) => [...list, contributionOf(draft.document, name, found, law)]);
  }
  return (
    <>
      <div className="flex flex-wrap items-end gap-3">
        <Field label="Element">
          {(control) => (
            <Select
              {...control}
              value={name}
              choices={names.map((value) => ({ value, label: value }))}
              onChange={setWanted}
            />
          )}
        </Field>
        <Field label="Scatters by">
          {(control) => (
            <Select
              {...control}
              value={law}
              choices={laws.map((value) => ({ value, label: LAW_NAMES[value] }))}
              onChange={setLaw}
            />
          )}
        </Field>
        <Button disabled={nuclide.data === undefined} onClick={add}>
          <Plus aria-hidden="true" className="size-4" /> Count {name} as background
        </Button>
      </div>
      {nuclide.isError && (
        <Notice tone="fault" title={`The nuclides of ${name} could not be looked up.`}>
          {inWords(nuclide.error)}
        </Notice>
      )}
    </>
  );
}

/** The other elements of the target: those counted as background, and those left out. */
export function ContributionsPanel({ plan, answer }: { plan: RunPlanBody; answer: RunPlan }) {
  const { readOnly } = useEditing();
  const list = plan.contributions ?? [];
  const left = uncounted(answer, plan);
  if (list.length === 0 && left.length === 0) return null;
  return (
    <Panel
      title="Other elements of the target"
      says="They meet the same beam and count as background at every detector. A detector that tells their energies apart needs none of them."
    >
      <div className="flex flex-col gap-3">
        {list.length > 0 && (
          <ul>
            {list.map((contribution, index) => (
              <Counted key={contribution.scatterer} contribution={contribution} index={index} />
            ))}
          </ul>
        )}
        {left.length > 0 && <p className="hidden print:block">Not counted: {left.join(', ')}.</p>}
        {left.length > 0 && !readOnly && (
          <div data-screen-only>
            <AddElement names={left} />
          </div>
        )}
      </div>
    </Panel>
  );
}
