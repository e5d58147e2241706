import { z } from 'zod';
import type { RunPlanRequest } from '#shared/contracts/run-plans.ts';
import { DomainError } from '#shared/errors.ts';
import { runTrials, seedOfPart } from '#server/physics/counting/statistics/trials.ts';
import { trialModel } from '#server/physics/plan-trials.ts';
import { runPlan } from '#server/physics/run-plan.ts';
import { toPlan } from './to-plan.ts';

/** One part of a Monte Carlo run. */
export interface RunPlanTrialsTask {
  plan: RunPlanRequest;
  detector: string;
  seed: number;
  part: number;
  trials: number;
}

export const trialsPartSchema = z.object({
  count: z.int(),
  mean: z.number(),
  square: z.number(),
  from: z.number(),
  to: z.number(),
  counts: z.array(z.int()),
  /** 1/s: what 1 stands for, and what the law of propagation makes of it. */
  rate: z.number(),
  combined: z.number(),
});
export type TrialsPart = z.infer<typeof trialsPartSchema>;

function placed(fault: unknown): unknown {
  if (!(fault instanceof DomainError) || fault.code !== 'invalidInput') return fault;
  const errors = (fault.details.errors ?? [{ path: '', message: fault.message }]).map(
    ({ path, message }) => ({ path: `/plan${path}`, message }),
  );
  return new DomainError('invalidInput', fault.message, { errors });
}

/** Draws of one detector's rate, relative to the planned one. */
export function computeRunPlanTrials(task: RunPlanTrialsTask): TrialsPart {
  const { detector, seed, part, trials } = task;
  try {
    const result = runPlan(toPlan(task.plan));
    const index = result.detectors.findIndex((one) => one.detector.name === detector);
    const planned = result.detectors[index];
    if (!planned) {
      const message = `The plan has no detector named ${detector}.`;
      throw new DomainError('invalidInput', message, {
        errors: [{ path: '/detectors', message }],
      });
    }
    const { draw, range, rate } = trialModel(result, index);
    const { combined } = planned;
    return { ...runTrials(draw, trials, seedOfPart(seed, part), range), rate, combined };
  } catch (fault) {
    throw placed(fault);
  }
}
