import type { RunPlan, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import { runPlan } from '#server/physics/run-plan.ts';
import { presentRunPlan } from './present-run-plan.ts';
import { toPlan } from './to-plan.ts';

/** The whole way of a run plan, as a thread walks it: units end, physics, units begin again. */
export function computeRunPlan(request: RunPlanRequest): RunPlan {
  return presentRunPlan(runPlan(toPlan(request)), request);
}
