import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import type { FormDetail } from '#shared/contracts/reference.ts';
import { BeamLineRow } from '#src/components/beam-line-row.tsx';
import { Failure } from '#src/components/failure.tsx';
import { NotFound } from '#src/components/not-found.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { ApiError } from '#src/lib/api.ts';
import { formQuery } from '../api.ts';
import { CurvePlot } from '../components/curve-plot.tsx';
import { FormulaBlock } from '../components/formula-block.tsx';
import { ParameterTable } from '../components/parameter-table.tsx';
import { Provenance } from '../components/provenance.tsx';
import { UseInCase } from '../components/use-in-case.tsx';

function Section({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <section className="flex min-w-0 flex-col gap-2">
      <h2 className="text-lg font-semibold">{title}</h2>
      {children}
    </section>
  );
}

function Curves({ detail: { form, picture, start } }: { detail: FormDetail }) {
  const { potential, transform } = picture;
  return (
    <div className="grid gap-x-10 gap-y-6 xl:grid-cols-2">
      <Section title="Potential">
        {'unavailable' in potential ? (
          <p className="text-muted">No curve: {potential.reason}</p>
        ) : (
          <CurvePlot
            label={`V(r) of the form ${form.label} against the distance r`}
            curve={{ x: potential.r, re: potential.re, im: potential.im }}
            x={{ symbol: 'r', title: 'distance r', unit: potential.unit.r }}
            y={{ symbol: 'V', title: 'V(r)', unit: potential.unit.v }}
            fileName={`${form.key}-potential`}
          />
        )}
      </Section>
      <Section title="Born transform">
        {'unavailable' in transform ? (
          <p className="text-muted">No transform: {transform.reason}</p>
        ) : (
          <>
            <CurvePlot
              label={`Born transform of the form ${form.label} against the momentum transfer q`}
              curve={{ x: transform.q, re: transform.re, im: transform.im }}
              x={{ symbol: 'q', title: 'momentum transfer q', unit: transform.unit.q }}
              y={{ symbol: 'S', title: 'S(q) = ∫ r² V j₀(qr) dr', unit: transform.unit.s }}
              fileName={`${form.key}-transform`}
            />
            <p className="text-sm text-muted">
              numerics {transform.error.toExponential(0).replace('-', '−')} of the largest value
            </p>
          </>
        )}
      </Section>
      <p className="flex flex-wrap items-baseline gap-x-3 text-sm text-muted xl:col-span-2">
        Drawn for the defaults, with <BeamLineRow summary={start.summary} />
      </p>
    </div>
  );
}

/** Formulas too long to stand side by side. */
function isLong({ formula, transformFormula }: FormDetail['form']): boolean {
  return Math.max(formula.length, transformFormula.length) > 130;
}

function Sheet({ detail }: { detail: FormDetail }) {
  const { form, remarks, table } = detail;
  return (
    <>
      <PageHead title={form.label}>
        <UseInCase start={{ kind: 'form', name: form.key }} look="primary" />
      </PageHead>
      <div
        className={classNames(
          'grid min-w-0 gap-x-10 gap-y-4 rounded border border-line bg-sheet px-4 py-3',
          !isLong(form) && 'lg:grid-cols-2',
        )}
      >
        <FormulaBlock name="Potential" tex={form.formula} />
        <FormulaBlock name="Transform" tex={form.transformFormula} />
        <p className="col-span-full text-sm text-muted">Source: {form.source}</p>
      </div>
      <Curves detail={detail} />
      <Section title="Behaviour and limits">
        <ul className="flex max-w-[85ch] list-disc flex-col gap-1.5 pl-5 marker:text-barn">
          {remarks.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      </Section>
      <Section title="Parameters">
        <ParameterTable parameters={form.parameters} />
      </Section>
      <Provenance table={table} />
    </>
  );
}

/** One interaction form: formula, transform, curves, parameters, limits. */
export default function FormPage() {
  const { key = '' } = useParams();
  const { data, error, refetch } = useQuery(formQuery(key));
  if (error instanceof ApiError && error.code === 'notFound') return <NotFound />;
  return (
    <div className="flex flex-col gap-6">
      {error && <Failure what="The form" error={error} onRetry={() => void refetch()} />}
      {!data && !error && (
        <Waiting what="the form">
          <Skeleton className="mb-4 h-8 w-64" />
          <Skeleton className="mb-4 h-24" />
          <Skeleton className="h-72" />
        </Waiting>
      )}
      {data && <Sheet detail={data} />}
    </div>
  );
}
