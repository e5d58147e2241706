import { useState } from 'react';
import { useQueries } from '@tanstack/react-query';
import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { inWords, request } from '#src/lib/api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { limitsOf } from './model/limits-of-case.ts';
import type { Limit } from './model/limit-sides.ts';
import { LimitsTable } from './limits-table.tsx';
import type { LimitLine } from './limits-table.tsx';

interface Asked {
  document: CaseDocument;
  limits: Limit[];
}

/** The signal ends what is still running when the page or the aid is left. */
function limitQuery(body: EstimateRequest) {
  return {
    queryKey: ['limit', body],
    queryFn: ({ signal }: { signal: AbortSignal }) =>
      request('/api/estimates', { method: 'POST', body, answer: estimateSchema, signal }),
    staleTime: Infinity,
    gcTime: 60_000,
    retry: false,
  };
}

function useLines(limits: readonly Limit[]): { lines: LimitLine[]; done: number } {
  const results = useQueries({
    queries: limits.flatMap(({ expected, obtained }) => [
      limitQuery(expected.body),
      limitQuery(obtained.body),
    ]),
  });
  const lines = limits.map((limit, i): LimitLine => {
    const pair = [results[2 * i], results[2 * i + 1]] as const;
    const failed = pair.find((side) => side?.error);
    return {
      limit,
      answers: pair[0]?.data && pair[1]?.data ? [pair[0].data, pair[1].data] : null,
      failure: failed?.error ? inWords(failed.error) : null,
    };
  });
  const done = lines.filter(({ answers, failure }) => answers !== null || failure !== null).length;
  return { lines, done };
}

function Answers({ limits }: { limits: readonly Limit[] }) {
  const { lines, done } = useLines(limits);
  if (done < limits.length) {
    return (
      <p className="flex items-center gap-3 text-sm">
        <progress
          value={done}
          max={limits.length}
          aria-label="Limits computed"
          className="accent-barn"
        />
        {done} of {limits.length} computed
      </p>
    );
  }
  return <LimitsTable lines={lines} />;
}

/** The case against the forms it must take in its limits: every number computed by the engine, for changed inputs. */
export function Limits({ estimate }: { estimate: Estimate }) {
  const { draft, stale } = useEditing();
  const [asked, setAsked] = useState<Asked | null>(null);
  const current = asked?.document === draft.document ? asked : null;
  return (
    <div className="flex flex-col items-start gap-3">
      <p className="max-w-prose text-sm text-muted">
        Takes the inputs to limits in which the answer is known by other means. It tests the model
        and its programming together; whether Born’s approximation suits the case it does not say.
      </p>
      {!current && (
        <Button
          disabled={stale}
          onClick={() =>
            setAsked({ document: draft.document, limits: limitsOf(draft.document, estimate) })
          }
        >
          {asked ? 'Show the limits of the changed case' : 'Show the limits'}
        </Button>
      )}
      <div aria-live="polite" className="w-full min-w-0">
        {current &&
          (current.limits.length > 0 ? (
            <Answers limits={current.limits} />
          ) : (
            <Notice tone="info" title="No limiting form is known for this case.">
              Its terms have no strength, range or mass that can be taken to a limit on its own.
            </Notice>
          ))}
      </div>
    </div>
  );
}
