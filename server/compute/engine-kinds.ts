import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import type { EstimateTask } from '#server/modules/estimates/to-problem.ts';
import type { MaterialAids, MaterialAidsRequest } from '#shared/contracts/material-aids.ts';
import { computeMaterialAids } from '#server/modules/material-aids/compute-material-aids.ts';
import { drawForm } from '#server/modules/reference/draw-form.ts';
import type { FormSheet } from '#server/modules/reference/draw-form.ts';
import { computeScanPoint } from '#server/modules/scans/compute-scan-point.ts';
import type { ScanPart, ScanPointTask } from '#server/modules/scans/compute-scan-point.ts';
import type { RunPlan, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import { computeRunPlan } from '#server/modules/run-plans/compute-run-plan.ts';
import { drawReport } from '#server/reports/draw-report.ts';
import type { ReportInput } from '#server/reports/report-input.ts';
import { computeRunPlanTrials } from '#server/modules/run-plans/compute-run-plan-trials.ts';
import type {
  RunPlanTrialsTask,
  TrialsPart,
} from '#server/modules/run-plans/compute-run-plan-trials.ts';

/** What the engine can be asked, with what goes in and what comes out: plain JSON both ways, but for the bytes of a report. */
export interface EngineKinds {
  estimate: { input: EstimateTask; output: Estimate };
  /** The same collision in a material. */
  materialAids: { input: MaterialAidsRequest; output: MaterialAids };
  /** The same collision counted by detectors. */
  runPlan: { input: RunPlanRequest; output: RunPlan };
  /** A part of a Monte Carlo run of it. */
  runPlanTrials: { input: RunPlanTrialsTask; output: TrialsPart };
  /** One point of a scan of the same collision. */
  scanPoint: { input: ScanPointTask; output: ScanPart };
  /** What the Reference shows of a form: V(r), its transform, remarks. */
  formSheet: { input: EstimateRequest; output: FormSheet };
  /** A saved version on paper. */
  report: { input: ReportInput; output: Uint8Array };
}
export type EngineKind = keyof EngineKinds;

export const ENGINE: {
  readonly [K in EngineKind]: (input: EngineKinds[K]['input']) => EngineKinds[K]['output'];
} = {
  estimate: computeEstimate,
  materialAids: computeMaterialAids,
  runPlan: computeRunPlan,
  runPlanTrials: computeRunPlanTrials,
  scanPoint: computeScanPoint,
  formSheet: drawForm,
  report: drawReport,
};
