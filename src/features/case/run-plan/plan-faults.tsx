import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { FieldError } from '#shared/errors.ts';
import type { RunPlanBody } from '#shared/contracts/run-plans.ts';

const PARTS: readonly [RegExp, string][] = [
  [/^\/runPlan\/beam/, 'Beam of the run'],
  [/^\/runPlan\/(foil|gas)/, 'Target of the run'],
  [/^\/runPlan\/aim/, 'Aim of the run'],
  [/^\/runPlan\/uncertaint/, 'Uncertainties of the inputs'],
  [/^\/runPlan\/contributions/, 'Other elements'],
];
const DETECTOR = /^\/runPlan\/detectors\/(\d+)/;

function placeOf(path: string, plan: RunPlanBody): string {
  const index = DETECTOR.exec(path)?.[1];
  if (index !== undefined) return plan.detectors[Number(index)]?.name ?? 'Detectors';
  return PARTS.find(([place]) => place.test(path))?.[1] ?? 'Inputs of the case';
}

interface PlanFaultsProps {
  plan: RunPlanBody;
  faults: readonly FieldError[];
  /** A failure that no field is to blame for. */
  failure: string | null;
  /** Figures of the last sound inputs stand below. */
  kept: boolean;
  onRetry: () => void;
  onDetector: (index: number) => void;
}

/** Why the figures below are not those of the inputs, and where to mend. */
export function PlanFaults(props: PlanFaultsProps) {
  const { plan, faults, failure, kept, onRetry, onDetector } = props;
  const below = kept ? '; the figures below are those of the last sound inputs' : '';
  if (failure !== null) {
    return (
      <Notice
        live
        tone="fault"
        title={`The run could not be sized${below}.`}
        actions={
          <Button size="small" onClick={onRetry}>
            Try again
          </Button>
        }
      >
        {failure}
      </Notice>
    );
  }
  if (faults.length === 0) return null;
  const many = faults.length === 1 ? 'One input needs' : `${faults.length} inputs need`;
  return (
    <Notice live tone="fault" title={`The run: ${many} mending${below}.`}>
      <ul>
        {faults.map(({ path, message }) => {
          const index = DETECTOR.exec(path)?.[1];
          const place = placeOf(path, plan);
          return (
            <li key={`${path} ${message}`}>
              {index === undefined ? (
                place
              ) : (
                <button
                  type="button"
                  className="rounded underline underline-offset-3"
                  onClick={() => onDetector(Number(index))}
                >
                  {place}
                </button>
              )}
              : {message}
            </li>
          );
        })}
      </ul>
    </Notice>
  );
}
