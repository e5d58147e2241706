import { z } from 'zod';
import { VERDICTS } from '#shared/contracts/estimates.ts';
import type { Method } from '#shared/contracts/estimates.ts';
import type { ScanOutput } from '#shared/contracts/scans.ts';
import { AnswerUnits } from '#server/modules/estimates/answer-units.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { presentDifferential } from '#server/modules/estimates/present-differential.ts';
import { askedAngles } from '#server/modules/estimates/to-angles.ts';
import { toProblem } from '#server/modules/estimates/to-problem.ts';
import type { EstimateTask } from '#server/modules/estimates/to-problem.ts';
import { collisionCurve } from '#server/physics/collision-curve.ts';
import { curveOf } from '#server/physics/observables/differential.ts';

const number = z.number().nullable();
/** What is kept of a point: its total, its curve or its verdict, and why a number is missing. */
export const scanPartSchema = z.object({
  value: z.union([number, z.array(number), z.enum(VERDICTS)]),
  reason: z.string().optional(),
});
export type ScanPart = z.infer<typeof scanPartSchema>;

export interface ScanPointTask {
  body: EstimateTask;
  method: Method;
  output: ScanOutput;
}

function totalOf({ body, method }: ScanPointTask): ScanPart {
  const { total } = collisionCurve(toProblem(body), method).integrals();
  if ('divergent' in total) return { value: null, reason: total.divergent };
  return { value: new AnswerUnits(body).areaOf(total.value) };
}

function curvePart({ body, method }: ScanPointTask): ScanPart {
  const problem = toProblem(body);
  const { input } = collisionCurve(problem, method);
  const curve = curveOf(input, problem.angles, problem.frame, problem.collision.frame);
  const points = presentDifferential(curve, askedAngles(body).values, new AnswerUnits(body));
  const value = points.map(({ dcs }) => dcs);
  const missing = points.find(({ dcs }) => dcs === null);
  if (!missing) return { value };
  return { value, reason: missing.reason ?? 'There is no value at this angle.' };
}

function verdictPart({ body }: ScanPointTask): ScanPart {
  const { verdict, reason } = computeEstimate(body).validity;
  return { value: verdict, ...(verdict === 'unassessed' && reason !== undefined && { reason }) };
}

const WAYS: Record<ScanOutput, (task: ScanPointTask) => ScanPart> = {
  total: totalOf,
  dcs: curvePart,
  verdict: verdictPart,
};

/** One point of a scan: the numbers an estimate would give there, without what a scan does not show. */
export function computeScanPoint(task: ScanPointTask): ScanPart {
  return WAYS[task.output](task);
}
