import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { Overview } from '#shared/contracts/reference.ts';
import { Failure } from '#src/components/failure.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { overviewQuery } from '../api.ts';
import { FormStrip } from '../components/form-strip.tsx';

interface Place {
  to: string;
  answers: string;
}

const PLACES: Readonly<Record<string, Place>> = {
  species: {
    to: '/reference/species',
    answers: 'What do the particles of a beam weigh, and what charge and spin have they?',
  },
  nuclides: {
    to: '/reference/nuclides',
    answers:
      'Mass, abundance and spin of an isotope; charge radius and neutron length on its page.',
  },
  elements: {
    to: '/reference/elements',
    answers: 'What does an element weigh as it is found, and how dense is it?',
  },
  neutronLengths: {
    to: '/reference/neutron-lengths',
    answers: 'How do slow neutrons scatter from it, and can the entry be trusted?',
  },
  materials: {
    to: '/reference/materials',
    answers: 'Formula and density of what targets are made of.',
  },
};

function Shelf({ tables }: Overview) {
  return (
    <ul className="divide-y divide-line rounded border border-line bg-sheet">
      {tables.map(({ key, title, edition, source, entries }) => {
        const place = PLACES[key];
        if (!place) return null;
        return (
          <li
            key={key}
            className="relative grid gap-x-6 gap-y-0.5 px-4 py-3 hover:bg-soft md:grid-cols-[minmax(0,3fr)_minmax(0,2fr)_6rem]"
          >
            <div className="min-w-0">
              <h3 className="text-base font-semibold">
                <Link to={place.to} className="rounded after:absolute after:inset-0 after:rounded">
                  {title}
                </Link>
              </h3>
              <p className="text-muted">{place.answers}</p>
            </div>
            <div className="min-w-0 md:pt-0.5">
              <p className="font-mono text-sm">{edition}</p>
              <p className="line-clamp-2 text-sm text-muted" title={source}>
                {source}
              </p>
            </div>
            <p className="text-sm text-muted md:pt-0.5 md:text-right">
              <span className="font-mono text-base text-ink">{entries.toLocaleString('en')}</span>{' '}
              {entries === 1 ? 'entry' : 'entries'}
            </p>
          </li>
        );
      })}
    </ul>
  );
}

function Placeholders() {
  return (
    <Waiting what="the tables">
      <div className="flex flex-col gap-4 rounded border border-line bg-sheet px-4 py-4">
        {[0, 1, 2, 3, 4].map((row) => (
          <Skeleton key={row} className="h-10" />
        ))}
      </div>
    </Waiting>
  );
}

/** The room of published numbers: what is here, in which edition. */
export default function ReferenceOverviewPage() {
  const { data, error, refetch } = useQuery(overviewQuery);
  return (
    <div className="flex flex-col gap-4">
      <div className="flex flex-col gap-1.5">
        <PageHead title="Reference" />
        <p className="max-w-[75ch] text-muted">
          The forms and numbers that cases are computed from, each with the edition and the
          publication it was read from. Editions are added, never replaced.
        </p>
      </div>
      <section aria-labelledby="reference-forms" className="flex flex-col gap-2">
        <h2 id="reference-forms" className="text-lg font-semibold">
          <Link to="/reference/forms" className="rounded hover:underline">
            Interaction forms
          </Link>
        </h2>
        <FormStrip />
      </section>
      <section aria-labelledby="reference-tables" className="flex flex-col gap-2">
        <h2 id="reference-tables" className="text-lg font-semibold">
          Tables
        </h2>
        {error && <Failure what="The tables" error={error} onRetry={() => void refetch()} />}
        {!data && !error && <Placeholders />}
        {data && <Shelf tables={data.tables} />}
      </section>
    </div>
  );
}
