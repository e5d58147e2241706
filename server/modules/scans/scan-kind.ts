import { createHash } from 'node:crypto';
import { scanRequestSchema } from '#shared/contracts/scans.ts';
import { verdictThresholdsSchema } from '#shared/contracts/settings.ts';
import { DomainError } from '#shared/errors.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import { defineKind } from '#server/jobs/job-kind.ts';
import type { PartTools } from '#server/jobs/job-kind.ts';
import { ENGINE } from '#server/physics/version.ts';
import type { ScanPart, ScanPointTask } from './compute-scan-point.ts';
import { Grid } from './grid.ts';

/** For one point; an estimate of a request has ten seconds. */
const DEADLINE_MILLISECONDS = 120_000;

/** As it was asked, with the thresholds that held then where they decide. */
export const storedScanSchema = scanRequestSchema.extend({
  thresholds: verdictThresholdsSchema.optional(),
});

/** A point that cannot be computed is empty, with the reason; the scan goes on. */
async function computePart(task: ScanPointTask, { compute, signal }: PartTools): Promise<ScanPart> {
  try {
    return await compute('scanPoint', task, { signal, deadline: DEADLINE_MILLISECONDS });
  } catch (fault) {
    const isAnswer =
      fault instanceof DomainError && ['invalidInput', 'tooMuchWork'].includes(fault.code);
    if (!isAnswer || signal.aborted) throw fault;
    return { value: null, reason: fault.message };
  }
}

export const scanKind = defineKind({
  input: storedScanSchema,
  total: (scan) => new Grid(scan).total,
  open({ thresholds, ...request }) {
    const grid = new Grid(request);
    const { method, output } = request;
    const taskOf = (n: number): ScanPointTask => ({
      body: { ...grid.bodyOf(n), ...(thresholds && { thresholds }) },
      method,
      output,
    });
    return {
      contentHash: (n) =>
        createHash('sha256')
          .update(canonicalJson({ engine: ENGINE, ...taskOf(n) }))
          .digest('hex'),
      part: (n, tools) => computePart(taskOf(n), tools),
    };
  },
});
