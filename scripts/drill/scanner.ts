import { setTimeout as sleep } from 'node:timers/promises';
import type { z } from 'zod';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import type { EstimateRequest, Method } from '#shared/contracts/estimates.ts';
import { jobSchema } from '#shared/contracts/jobs.ts';
import type { Job } from '#shared/contracts/jobs.ts';
import { scanResultSchema, startedScanSchema } from '#shared/contracts/scans.ts';
import type { ScanResult } from '#shared/contracts/scans.ts';
import { tokenOf } from './token.ts';

const PATIENCE = 120_000;

/** Electrons on a Yukawa well; the depth sets one scan apart from another, so that no point is taken from an earlier one. */
function estimateOf(depth: number, method: Method): EstimateRequest {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: 100, unit: 'eV' },
    interaction: {
      terms: [
        { form: 'yukawa', V0: { value: depth, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } },
      ],
    },
    methods: [method],
    angles: { unit: 'deg', values: [90] },
  };
}

/** A client that scans as a patient script does: it asks again while nothing answers. */
export class Scanner {
  private constructor(
    private readonly url: string,
    private readonly secret: string,
    readonly method: Method,
  ) {}

  static async signIn(url: string): Promise<Scanner> {
    const secret = await tokenOf(url, 'theorist');
    const exact = new Scanner(url, secret, 'partialWaves');
    const { methods } = await exact.estimate(estimateOf(-1, 'partialWaves'));
    const isThere = methods.partialWaves && !('unavailable' in methods.partialWaves);
    return isThere ? exact : new Scanner(url, secret, 'born1');
  }

  private async ask<S extends z.ZodType>(
    schema: S,
    path: string,
    body?: object,
  ): Promise<z.output<S>> {
    const begun = Date.now();
    for (;;) {
      const answer = await fetch(`${this.url}${path}`, {
        method: body ? 'POST' : 'GET',
        headers: { authorization: `Bearer ${this.secret}`, 'content-type': 'application/json' },
        ...(body && { body: JSON.stringify(body) }),
        signal: AbortSignal.timeout(20_000),
      }).catch(() => undefined);
      if (answer?.ok) return schema.parse(await answer.json());
      if (answer && answer.status < 500) {
        throw new Error(`${path}: ${answer.status} ${await answer.text()}`);
      }
      if (Date.now() - begun > PATIENCE) throw new Error(`No answer for ${PATIENCE / 1000} s.`);
      await sleep(100);
    }
  }

  private estimate(body: EstimateRequest) {
    return this.ask(estimateSchema, '/api/estimates', body);
  }

  async start(points: number, depth: number): Promise<string> {
    const [from, to] = [10, 1000].map((value) => ({ value, unit: 'eV' }));
    const { id } = await this.ask(startedScanSchema, '/api/scans', {
      estimate: estimateOf(depth, this.method),
      method: this.method,
      axes: [{ path: '/energy', from, to, count: points, scale: 'log' }],
      output: 'total',
    });
    return id;
  }

  readJob(id: string): Promise<Job> {
    return this.ask(jobSchema, `/api/jobs/${id}`);
  }

  async waitFor(id: string, wished: (job: Job) => boolean): Promise<Job> {
    const begun = Date.now();
    for (;;) {
      const job = await this.readJob(id);
      if (wished(job)) return job;
      if (job.state === 'failed' || job.state === 'cancelled') {
        throw new Error(`The scan ended as ${job.state}: ${job.error ?? ''}`);
      }
      if (Date.now() - begun > 20 * PATIENCE) throw new Error('The scan does not end.');
      await sleep(100);
    }
  }

  readResult(id: string): Promise<ScanResult> {
    return this.ask(scanResultSchema, `/api/scans/${id}/result`);
  }

  /** Points whose number is not that of a single estimate, among `samples` of them. */
  async wrongPoints({ axes, values }: ScanResult, depth: number, samples: number) {
    const energies = axes[0]?.values ?? [];
    const wrong: number[] = [];
    for (let i = 0; i < samples; i += 1) {
      const at = Math.floor((i * (energies.length - 1)) / Math.max(1, samples - 1));
      const energy = { value: energies[at] ?? NaN, unit: 'eV' };
      const { methods } = await this.estimate({ ...estimateOf(depth, this.method), energy });
      const result = methods[this.method];
      const total = result && 'total' in result ? result.total : undefined;
      if (!total || !('value' in total) || total.value !== values[at]) wrong.push(at);
    }
    return wrong;
  }
}
