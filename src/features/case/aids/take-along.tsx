import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Link2 } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { Segmented } from '#src/components/segmented.tsx';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { contentOf } from '../editing/use-work.ts';
import { linkOf } from '../model/permalink.ts';
import { CodeBlock, copyText } from './code-block.tsx';
import { mayHaveCharges } from './model/charges.ts';
import { latexOf } from './model/latex.ts';
import { meaningOfFigure } from './model/meaning-figure.ts';
import type { FigureKind } from './model/meaning-figure.ts';
import { apiSnippet, closedSnippet } from './model/python.ts';
import { useLiveAids } from './use-aids.ts';

const TOO_LARGE =
  'This case is too large to stand in an address. Save it, and share the address of the case with those who may read it.';

function CaseLink() {
  const { draft } = useEditing();
  const content = contentOf(draft);
  const link = useQuery({
    queryKey: ['link of', content],
    queryFn: () => linkOf(content),
    staleTime: Infinity,
    gcTime: 30_000,
  });
  const fragment = link.data;
  const address = fragment ? `${window.location.origin}/cases/new${fragment}` : null;
  return (
    <section className="flex flex-col gap-1.5">
      <h3 className="font-semibold">An address that opens this case</h3>
      <p className="max-w-prose text-sm text-muted">
        It holds the inputs as they stand here, saved or not, and opens them as a new case for
        anyone who can sign in. Nothing is stored on the server.
      </p>
      {fragment === null ? (
        <p className="text-sm">{TOO_LARGE}</p>
      ) : (
        <div>
          <Button
            size="small"
            disabled={address === null}
            onClick={() => void copyText(address ?? '', 'The address')}
          >
            <Link2 aria-hidden="true" className="size-4" /> Copy the address
          </Button>
        </div>
      )}
    </section>
  );
}

type Way = 'closed' | 'api';

function Python({ estimate }: { estimate: Estimate }) {
  const { draft } = useEditing();
  const { document } = draft;
  const [wanted, setWanted] = useState<Way>('closed');
  const unit = estimate.units.angle;
  const { aids } = useLiveAids(
    { reference: true },
    {
      enabled: mayHaveCharges(document),
      change: (now) => ({ ...now, angles: { unit, values: [1e-3] } }),
    },
  );
  const reference = aids?.reference;
  const charges = reference && !('unavailable' in reference) ? reference.chargeProduct : null;
  const closed = closedSnippet(document, estimate, charges);
  const way = 'refused' in closed ? 'api' : wanted;
  const code =
    way === 'closed' && 'code' in closed
      ? closed.code
      : apiSnippet(document, window.location.origin, unit);
  return (
    <section className="flex min-w-0 flex-col gap-1.5">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h3 className="font-semibold">Python</h3>
        {'code' in closed && (
          <Segmented
            label="What the program does"
            value={way}
            choices={[
              { value: 'closed', label: 'closed formula' },
              { value: 'api', label: 'call of the API' },
            ]}
            onChange={setWanted}
          />
        )}
      </div>
      <p className="max-w-prose text-sm text-muted">
        {'refused' in closed
          ? closed.refused
          : way === 'closed'
            ? 'Runs by itself and compares what it finds with the values of this page.'
            : 'Needs a personal token, made under Account.'}
      </p>
      <CodeBlock label="Python program" code={code} what="The program" />
    </section>
  );
}

const NUMBERS: readonly { value: FigureKind; label: string }[] = [
  { value: 'elastic', label: 'elastic' },
  { value: 'momentumTransfer', label: 'momentum transfer' },
  { value: 'viscosity', label: 'viscosity' },
];

function Latex({ estimate }: { estimate: Estimate }) {
  const { draft, forms } = useEditing();
  const [kind, setKind] = useState<FigureKind>('elastic');
  const meaning = meaningOfFigure(kind, { estimate, document: draft.document, forms });
  if (!meaning) return null;
  return (
    <section className="flex min-w-0 flex-col gap-1.5">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h3 className="font-semibold">LaTeX</h3>
        <Segmented label="Which number" value={kind} choices={NUMBERS} onChange={setKind} />
      </div>
      <p className="max-w-prose text-sm text-muted">
        The number with its laws, for amsmath. For the cross section at one angle open the question
        mark beside it.
      </p>
      <CodeBlock label="LaTeX" code={latexOf(meaning)} what="The LaTeX" />
    </section>
  );
}

/** The case as a text for elsewhere: an address, a program, a formula with its numbers. */
export function TakeAlong({ estimate }: { estimate: Estimate }) {
  return (
    <div className="flex flex-col gap-5">
      <CaseLink />
      <Python estimate={estimate} />
      <Latex estimate={estimate} />
    </div>
  );
}
