import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { NuclideDetail } from '#shared/contracts/reference.ts';
import { Failure } from '#src/components/failure.tsx';
import { NotFound } from '#src/components/not-found.tsx';
import { PageTitle } from '#src/components/page-title.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { ApiError } from '#src/lib/api.ts';
import { nuclideQuery } from '../api.ts';
import { Cautions } from '../components/cautions.tsx';
import { Facts, type Fact } from '../components/facts.tsx';
import { IsotopeTable } from '../components/isotope-table.tsx';
import { NuclideSign } from '../components/nuclide-sign.tsx';
import { Provenance } from '../components/provenance.tsx';
import { UseInCase } from '../components/use-in-case.tsx';
import { chargeFacts, massFacts, neutronFacts } from '../model/nuclide-facts.ts';

function Block({
  title,
  facts,
  empty,
  children,
}: {
  title: string;
  facts: readonly Fact[];
  empty: string;
  children?: React.ReactNode;
}) {
  return (
    <section className="flex min-w-0 flex-col gap-2.5 rounded border border-line bg-sheet px-4 py-3">
      <h2 className="text-lg font-semibold">{title}</h2>
      {facts.length > 0 ? <Facts facts={facts} /> : <p className="text-muted">{empty}</p>}
      {children}
    </section>
  );
}

function Neutrons({ detail }: { detail: NuclideDetail }) {
  const { neutron } = detail;
  return (
    <Block
      title="Slow neutrons"
      facts={neutronFacts(detail)}
      empty="No scattering length of this nuclide is tabulated."
    >
      {neutron && !neutron.isotope && (
        <p className="text-sm text-muted">
          Printed for the element, of which this is the only isotope in nature.
        </p>
      )}
      {neutron && neutron.cautions.length > 0 && <Cautions lines={neutron.cautions} />}
      {neutron?.b && (
        <div>
          <UseInCase start={{ kind: 'neutron', name: neutron.name }} label="Use with neutrons" />
        </div>
      )}
    </Block>
  );
}

function Sheet({ detail }: { detail: NuclideDetail }) {
  const { nuclide, element, symbol, isotopes, tables } = detail;
  return (
    <>
      <div className="flex min-h-9 flex-wrap items-center justify-between gap-3">
        <PageTitle title={nuclide}>
          <NuclideSign nuclide={nuclide} />{' '}
          <span className="text-xl font-normal text-muted max-sm:text-lg">{element}</span>
        </PageTitle>
        <div data-screen-only>
          <UseInCase start={{ kind: 'nuclide', name: nuclide }} look="primary" />
        </div>
      </div>
      <div className="grid gap-4 md:grid-cols-2 xl:grid-cols-3">
        <Block title="Mass and spin" facts={massFacts(detail)} empty="" />
        <Block
          title="Charge"
          facts={chargeFacts(detail)}
          empty="No charge radius of this nuclide is tabulated."
        />
        <Neutrons detail={detail} />
      </div>
      <section className="flex flex-col gap-2">
        <h2 className="text-lg font-semibold">{element} in nature</h2>
        {isotopes.length > 0 ? (
          <IsotopeTable isotopes={isotopes} current={nuclide} />
        ) : (
          <p className="text-muted">No isotope of this element occurs in nature.</p>
        )}
        <p>
          <Link
            to={`/reference/nuclides?element=${symbol}`}
            className="rounded text-slate underline underline-offset-2"
          >
            Every isotope of {element.toLowerCase()}
          </Link>
        </p>
      </section>
      <div className="flex flex-col gap-2">
        {tables.map((table) => (
          <Provenance key={table.key} table={table} />
        ))}
      </div>
    </>
  );
}

/** Everything the tables know of one nuclide. */
export default function NuclidePage() {
  const { nuclide = '' } = useParams();
  const { data, error, refetch } = useQuery(nuclideQuery(nuclide));
  if (error instanceof ApiError && error.code === 'notFound') return <NotFound />;
  return (
    <div className="flex flex-col gap-5">
      {error && <Failure what="The nuclide" error={error} onRetry={() => void refetch()} />}
      {!data && !error && (
        <Waiting what="the nuclide">
          <Skeleton className="mb-4 h-8 w-48" />
          <Skeleton className="h-56" />
        </Waiting>
      )}
      {data && <Sheet detail={data} />}
    </div>
  );
}
