import { createHash } from 'node:crypto';
import { z } from 'zod';
import { runPlanTrialsRequestSchema } from '#shared/contracts/run-plan-trials.ts';
import type { RunPlanTrials, RunPlanTrialsRequest } from '#shared/contracts/run-plan-trials.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import { defineKind } from '#server/jobs/job-kind.ts';
import { mergeTrials, summaryOf } from '#server/physics/counting/statistics/trials.ts';
import { normalQuantile } from '#server/physics/numerics/distributions.ts';
import { ENGINE } from '#server/physics/version.ts';
import { trialsPartSchema } from './compute-run-plan-trials.ts';
import type { RunPlanTrialsTask } from './compute-run-plan-trials.ts';

/** Trials of one part: a tenth of a second, so that progress and cancel are felt. */
const PART = 50_000;
const DEADLINE_MILLISECONDS = 120_000;
const DRAWN_BINS = 100;

const partsOf = ({ trials }: RunPlanTrialsRequest) => Math.ceil(trials / PART);

function taskOf(
  { plan, detector, seed, trials }: RunPlanTrialsRequest,
  part: number,
): RunPlanTrialsTask {
  return { plan, detector, seed, part, trials: Math.min(PART, trials - part * PART) };
}

/** Bins wide enough to be drawn. */
function coarser(counts: readonly number[]): number[] {
  const width = counts.length / DRAWN_BINS;
  return Array.from({ length: DRAWN_BINS }, (_, i) =>
    counts.slice(i * width, (i + 1) * width).reduce((sum, n) => sum + n, 0),
  );
}

function resultOf(request: RunPlanTrialsRequest, values: readonly unknown[]): RunPlanTrials {
  const { detector, seed, coverage } = request;
  const parts = z.array(trialsPartSchema).parse(values);
  const all = mergeTrials(parts);
  const { trials, mean, deviation, meanError, interval, shortest, resolution } = summaryOf(
    all,
    coverage,
  );
  const { rate = 0, combined = 0 } = parts[0] ?? {};
  const half = normalQuantile((1 + coverage) / 2) * combined;
  return {
    detector,
    trials,
    seed,
    generator:
      'xoshiro128**, each part of 50,000 trials with a seed of its own from that of the run',
    coverage,
    rate: { value: rate, unit: '1/s' },
    mean,
    standardDeviation: deviation,
    meanError,
    interval,
    shortest,
    resolution,
    budget: { combined, interval: [1 - half, 1 + half] },
    histogram: { from: all.from, to: all.to, counts: coarser(all.counts) },
  };
}

export const trialsKind = defineKind({
  input: runPlanTrialsRequestSchema,
  total: partsOf,
  open: (request) => ({
    contentHash: (n) =>
      createHash('sha256')
        .update(canonicalJson({ engine: ENGINE, kind: 'runPlanTrials', ...taskOf(request, n) }))
        .digest('hex'),
    part: (n, { compute, signal }) =>
      compute('runPlanTrials', taskOf(request, n), { signal, deadline: DEADLINE_MILLISECONDS }),
  }),
  finish: (request, parts) => Promise.resolve(resultOf(request, parts)),
});
