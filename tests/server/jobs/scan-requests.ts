import { setTimeout as sleep } from 'node:timers/promises';
import { scanSchema, startedScanSchema } from '#shared/contracts/scans.ts';
import type { Scan } from '#shared/contracts/scans.ts';
import type { Compute } from '#server/compute/compute.ts';
import { runWorker } from '#server/jobs/worker.ts';
import { createLogger } from '#server/http/logging.ts';
import { query } from '#tests/support/test-database.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';

export const eV = (value: number) => ({ value, unit: 'eV' });

/** Totals of the Yukawa well over energy, in logarithmic steps. */
export const energyScan = {
  estimate: yukawaDocument,
  method: 'born1',
  axes: [{ path: '/energy', from: eV(10), to: eV(1000), count: 20, scale: 'log' }],
  output: 'total',
} as const;

/** A scan no other test asks for, so that none of its points is known. */
let depth = -1;
export function newScan(points: number): object {
  depth -= 1;
  const { estimate, axes } = energyScan;
  const terms = [{ ...estimate.interaction.terms[0], V0: eV(depth) }];
  return {
    ...energyScan,
    estimate: { ...estimate, interaction: { terms } },
    axes: [{ ...axes[0], count: points }],
  };
}

export async function startScan(agent: Agent, body: object = energyScan): Promise<string> {
  const answer = await agent.post('/api/scans').send(body).expect(202);
  return startedScanSchema.parse(answer.body).id;
}

export async function readScan(agent: Agent, id: string): Promise<Scan> {
  return scanSchema.parse((await agent.get(`/api/scans/${id}`).expect(200)).body);
}

/** Waits until the scan is as wished; a scan that ended otherwise is a failure. */
export async function waitFor(
  agent: Agent,
  id: string,
  wished: (scan: Scan) => boolean,
): Promise<Scan> {
  for (;;) {
    const scan = await readScan(agent, id);
    if (wished(scan)) return scan;
    if (!['queued', 'running'].includes(scan.status)) {
      throw new Error(`The scan ended as ${scan.status}: ${scan.error ?? 'no reason'}.`);
    }
    await sleep(50);
  }
}

export const isDone = ({ status }: Scan) => status === 'done';

/** The engine in this thread, with a way to look at what it is asked or to slow it down. */
export function watchedCompute(before: (input: unknown) => Promise<void> | void): Compute {
  return async (kind, input, options) => {
    const { ENGINE } = await import('#server/compute/engine-kinds.ts');
    await before(input);
    options?.signal?.throwIfAborted();
    return ENGINE[kind](input);
  };
}

export interface RunningWorker {
  stop: () => Promise<void>;
}

/** A worker within the test, with the engine in the same thread. */
export function startWorker(
  { orm }: Pick<TestApp, 'orm'>,
  compute: Compute = watchedCompute(() => undefined),
): RunningWorker {
  const stopping = new AbortController();
  const logger = createLogger('silent');
  const ended = runWorker({ orm, compute, logger }, stopping.signal);
  return {
    async stop() {
      stopping.abort();
      await ended;
    },
  };
}

/** Numbers of the points that are kept of a scan, in their order. */
export const partsOf = ({ database }: TestApp, id: string) =>
  query(database.ownerUrl, 'select n from job_parts where job_id = $1 order by n', [id]);
export const numbers = (count: number) => Array.from({ length: count }, (_, n) => ({ n }));
