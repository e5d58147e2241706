import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { isEnded } from '#shared/contracts/jobs.ts';
import type { Job } from '#shared/contracts/jobs.ts';
import type { PlannedDetector } from '#shared/contracts/run-plans.ts';
import type { RunPlanTrials } from '#shared/contracts/run-plan-trials.ts';
import { formatNumber } from '#shared/units/format.ts';
import { useEditing } from '../editing/editor-context.ts';
import { TableBox } from '../validity/panel.tsx';
import { percentText } from './model/numbers.ts';
import { Cell, HeadCells, NameCell } from './table-cells.tsx';
import { useTrials } from './use-trials.ts';

const WIDTH = 320;
const HEIGHT = 80;

/** How often each relative rate was drawn; the shortest interval stands out. */
function Histogram({ trials }: { trials: RunPlanTrials }) {
  const { histogram, shortest, coverage } = trials;
  const { from, to, counts } = histogram;
  const most = Math.max(1, ...counts);
  const step = WIDTH / counts.length;
  const at = (value: number) => ((value - from) / (to - from)) * WIDTH;
  const words = `Distribution of the rate, from ${formatNumber(from, 3)} to ${formatNumber(to, 3)} of the planned one; ${percentText(coverage, 2)} lie between ${formatNumber(shortest[0], 4)} and ${formatNumber(shortest[1], 4)}.`;
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      className="w-full max-w-90"
      role="img"
      aria-label={words}
    >
      <rect
        x={at(shortest[0])}
        y="0"
        width={Math.max(0, at(shortest[1]) - at(shortest[0]))}
        height={HEIGHT}
        className="fill-soft"
      />
      {counts.map((count, index) => (
        <rect
          key={index}
          x={index * step}
          y={HEIGHT * (1 - count / most)}
          width={step}
          height={(HEIGHT * count) / most}
          className="fill-slate"
        />
      ))}
      <path d={`M0,${HEIGHT}H${WIDTH}`} className="stroke-ink" />
    </svg>
  );
}

function Compared({ trials }: { trials: RunPlanTrials }) {
  const { standardDeviation, interval, shortest, budget, coverage } = trials;
  const rows: [string, number, readonly [number, number]][] = [
    ['Monte Carlo, symmetric', standardDeviation, interval],
    ['Monte Carlo, shortest', standardDeviation, shortest],
    ['budget', budget.combined, budget.interval],
  ];
  return (
    <div className="flex flex-col gap-2">
      <Histogram trials={trials} />
      <TableBox label="Monte Carlo beside the budget">
        <table className="w-full text-sm">
          <HeadCells
            heads={[
              ['of the signal rate'],
              ['standard', 'uncertainty'],
              ['from', `${percentText(coverage, 2)}, of the plan`],
              ['to', `${percentText(coverage, 2)}, of the plan`],
            ]}
          />
          <tbody>
            {rows.map(([name, spread, [low, high]]) => (
              <tr key={name} className="even:bg-soft/60">
                <NameCell>{name}</NameCell>
                <Cell>{percentText(spread)}</Cell>
                <Cell>{formatNumber(low, 5)}</Cell>
                <Cell>{formatNumber(high, 5)}</Cell>
              </tr>
            ))}
          </tbody>
        </table>
      </TableBox>
      <p className="text-xs text-muted">
        Mean <span className="font-mono">{formatNumber(trials.mean, 6)}</span> of the planned rate,
        from <span className="font-mono">{formatNumber(trials.trials, 7)}</span> trials with seed{' '}
        <span className="font-mono">{trials.seed}</span>: the same numbers on every machine.
      </p>
    </div>
  );
}

function Progress({ job, onCancel }: { job: Job; onCancel: () => void }) {
  const { done, total, workers, state } = job;
  if (state === 'cancelled') return <p className="text-sm">Cancelled.</p>;
  if (isEnded(state)) return null;
  return (
    <div className="flex flex-wrap items-center gap-3 text-sm">
      <progress value={done} max={Math.max(1, total)} aria-label="Monte Carlo under way" />
      <span>
        {done} of {total} parts
        {workers === 0 && '; no worker runs, so nothing moves until one is started'}
      </span>
      <Button size="small" onClick={onCancel}>
        Cancel
      </Button>
    </div>
  );
}

/** The budget held against drawn inputs: what a linear law of propagation cannot see. */
export function MonteCarlo({ detector }: { detector: PlannedDetector }) {
  const { draft, stale } = useEditing();
  const trials = useTrials(draft.document, detector.name);
  const { job, result } = trials;
  const running = trials.starting || (job !== undefined && !isEnded(job.state));
  if (detector.uncertaintyBudget.length === 0) return null;
  return (
    <section aria-label="Monte Carlo" className="flex flex-col gap-2">
      {!running && !result && (
        <div data-screen-only>
          <Button size="small" disabled={stale} onClick={trials.start}>
            Draw the inputs a million times
          </Button>
        </div>
      )}
      {trials.fault !== null && (
        <Notice live tone="fault" title="The Monte Carlo run gave no result.">
          {trials.fault}
        </Notice>
      )}
      {job && <Progress job={job} onCancel={trials.cancel} />}
      {result && <Compared trials={result} />}
    </section>
  );
}
