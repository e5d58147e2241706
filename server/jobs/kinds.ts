import { trialsKind } from '#server/modules/run-plans/trials-kind.ts';
import { scanKind } from '#server/modules/scans/scan-kind.ts';
import type { JobKind } from './job-kind.ts';

/** What workers can do. To add a kind: a file with `defineKind`, and a line here. */
export const JOB_KINDS = { scan: scanKind, runPlanTrials: trialsKind } as const satisfies Record<
  string,
  JobKind
>;
export type JobKindName = keyof typeof JOB_KINDS;
