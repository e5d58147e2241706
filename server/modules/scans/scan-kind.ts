import { createHash } from 'node:crypto';
import { z } from 'zod';
import type { ComputedMethod, Estimate } from '#shared/contracts/estimates.ts';
import { scanRequestSchema } from '#shared/contracts/scans.ts';
import type { ScanRequest } from '#shared/contracts/scans.ts';
import { DomainError } from '#shared/errors.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import { defineKind } from '#server/jobs/job-kind.ts';
import type { PartTools } from '#server/jobs/job-kind.ts';
import { ENGINE } from '#server/physics/version.ts';
import { Grid } from './grid.ts';

/** For one point; an estimate of a request has ten. */
const DEADLINE_MILLISECONDS = 120_000;

const number = z.number().nullable();
/** What is kept of a point: its total or its curve, and why a number is missing. */
export const scanPartSchema = z.object({
  value: z.union([number, z.array(number)]),
  reason: z.string().optional(),
});
export type ScanPart = z.infer<typeof scanPartSchema>;

function numbersOf(computed: ComputedMethod, output: ScanRequest['output']): ScanPart {
  if (output === 'total') {
    const { total } = computed;
    return 'divergent' in total ? { value: null, reason: total.reason } : { value: total.value };
  }
  const missing = computed.differential.find(({ dcs }) => dcs === null);
  const value = computed.differential.map(({ dcs }) => dcs);
  return missing
    ? { value, reason: missing.reason ?? 'There is no value at this angle.' }
    : { value };
}

function partOf(estimate: Estimate, { method, output }: ScanRequest): ScanPart {
  const result = estimate.methods[method];
  if (!result || 'unavailable' in result) {
    return { value: null, reason: result?.reason ?? 'The method gave no answer.' };
  }
  return numbersOf(result, output);
}

/** A point that cannot be computed is empty, with the reason; the scan goes on. */
async function computePart(grid: Grid, request: ScanRequest, n: number, tools: PartTools) {
  const { compute, signal } = tools;
  try {
    const options = { signal, deadline: DEADLINE_MILLISECONDS };
    return partOf(await compute('estimate', grid.bodyOf(n), options), request);
  } catch (fault) {
    const isAnswer =
      fault instanceof DomainError && ['invalidInput', 'tooMuchWork'].includes(fault.code);
    if (!isAnswer || signal.aborted) throw fault;
    return { value: null, reason: fault.message };
  }
}

export const scanKind = defineKind({
  input: scanRequestSchema,
  total: (request) => new Grid(request).total,
  open(request) {
    const grid = new Grid(request);
    const { method, output } = request;
    return {
      contentHash: (n) =>
        createHash('sha256')
          .update(canonicalJson({ engine: ENGINE, method, output, body: grid.bodyOf(n) }))
          .digest('hex'),
      part: (n, tools) => computePart(grid, request, n, tools),
    };
  },
});
