import type { ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { InteractionVersion } from '#shared/contracts/library.ts';
import { InteractionTerms } from '#src/components/library/interaction-terms.tsx';
import { PotentialPreview } from '#src/components/potential-preview.tsx';
import { Skeleton } from '#src/components/skeleton.tsx';
import { inWords } from '#src/lib/api.ts';
import { energyRangeText, exampleText, speciesText } from '#src/lib/interaction-words.ts';
import { interactionCurveQuery } from '#src/lib/library.ts';

export function Section({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="flex min-w-0 flex-col gap-2">
      <h2 className="text-lg font-semibold">{title}</h2>
      {children}
    </section>
  );
}

function Curve({ interaction }: { interaction: InteractionVersion }) {
  const { data, error } = useQuery(interactionCurveQuery(interaction));
  if (error) return <p className="text-muted">No sketch of V(r): {inWords(error)}</p>;
  if (!data) return <Skeleton className="h-36 max-w-md" />;
  return (
    <>
      <PotentialPreview potential={data} dimmed={false} name={interaction.name} />
      <p className="text-sm text-muted">Shown with {exampleText(interaction.example)}.</p>
    </>
  );
}

function Facts({ interaction: { validity, source, tags } }: { interaction: InteractionVersion }) {
  const rows = [
    ['Energies, lab', energyRangeText(validity)],
    ['Particles', speciesText(validity)],
    ['Source', source],
    ['Tags', tags.join(', ') || 'none'],
  ] as const;
  return (
    <dl className="grid gap-x-5 gap-y-1.5 sm:grid-cols-[8rem_1fr]">
      {rows.map(([name, text]) => (
        <div key={name} className="contents">
          <dt className="text-muted">{name}</dt>
          <dd className="min-w-0 whitespace-pre-line">{text}</dd>
        </div>
      ))}
    </dl>
  );
}

/** Description, validity and source of a version beside its V(r) and terms. */
export function WhatItIs({ interaction }: { interaction: InteractionVersion }) {
  return (
    <div className="grid gap-x-10 gap-y-6 lg:grid-cols-2">
      <div className="flex min-w-0 flex-col gap-6">
        <Section title="Description">
          <p className="max-w-prose whitespace-pre-line">{interaction.description}</p>
        </Section>
        <Section title="Where it holds">
          <p className="max-w-prose whitespace-pre-line">{interaction.validity.words}</p>
          <Facts interaction={interaction} />
        </Section>
      </div>
      <div className="flex min-w-0 flex-col gap-6">
        <Section title="Potential">
          <Curve interaction={interaction} />
        </Section>
        <Section title="Terms">
          <InteractionTerms terms={interaction.terms} />
        </Section>
      </div>
    </div>
  );
}
