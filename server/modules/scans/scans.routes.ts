import { z } from 'zod';
import {
  scanRequestSchema,
  scanResultSchema,
  scanSchema,
  startedScanSchema,
} from '#shared/contracts/scans.ts';
import type { Scan } from '#shared/contracts/scans.ts';
import { prefers, textAnswer } from '#server/http/other-answer.ts';
import { defineRoute } from '#server/http/route.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';
import { jobRow, loadJob } from '#server/modules/jobs/job-rows.ts';
import type { JobRow } from '#server/modules/jobs/job-rows.ts';
import { presentProgress } from '#server/modules/jobs/present-job.ts';
import { cancelJob, resumeJob } from '#server/modules/jobs/stop-and-resume.ts';
import { checkScan } from './check-scan.ts';
import { createScan } from './create-scan.ts';
import { resultCsv } from './result-csv.ts';
import { scanResult } from './scan-result.ts';

const params = z.object({ id: z.uuid() });
const tag = 'Scans';
const CSV = 'text/csv';

function presentScan(row: JobRow): Scan {
  const { state, ...progress } = presentProgress(row);
  return { ...progress, status: state, title: row.title };
}

export const scanRoutes = [
  defineRoute({
    method: 'post',
    path: '/api/scans',
    operationId: 'createScan',
    summary: 'File a scan of a case over one or two of its inputs for the workers',
    tag,
    access: 'scan.create',
    body: scanRequestSchema,
    response: startedScanSchema,
    status: 202,
    refusals: ['tooManyRequests', 'tooMuchWork'],
    async handler({ em, actor, now, body, compute, signal }) {
      await withSlot(actor.id, () => checkScan(body, { compute, signal }));
      return { id: await createScan({ em, actor, now }, body) };
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/scans/:id',
    operationId: 'readScan',
    summary: 'How far a scan is',
    tag,
    access: 'job.read',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id, 'scan'),
    params,
    response: scanSchema,
    handler: async ({ em, resource }) => presentScan(await jobRow(em, resource.id)),
  }),
  defineRoute({
    method: 'get',
    path: '/api/scans/:id/result',
    operationId: 'readScanResult',
    summary: 'The numbers of a scan that is done: JSON, or CSV by Accept',
    tag,
    access: 'job.read',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id, 'scan'),
    params,
    response: scanResultSchema,
    otherTypes: [CSV],
    refusals: ['conflict'],
    async handler({ em, resource, headers }) {
      const result = await scanResult(em, resource.id);
      if (!prefers(headers['accept'], CSV)) return result;
      return textAnswer(CSV, resultCsv(result), `scan-${resource.id.slice(0, 8)}.csv`);
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/scans/:id/cancel',
    operationId: 'cancelScan',
    summary: 'Cancel a scan; what it has computed is kept',
    tag,
    access: 'job.cancel',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id, 'scan'),
    params,
    response: scanSchema,
    refusals: ['conflict'],
    async handler({ em, actor, now, resource }) {
      await cancelJob({ em, actor, now }, resource.id);
      return presentScan(await jobRow(em, resource.id));
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/scans/:id/resume',
    operationId: 'resumeScan',
    summary: 'Let a cancelled or failed scan go on from the points it has',
    tag,
    access: 'job.cancel',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id, 'scan'),
    params,
    response: scanSchema,
    refusals: ['conflict'],
    async handler({ em, actor, now, resource }) {
      await resumeJob({ em, actor, now }, resource.id);
      return presentScan(await jobRow(em, resource.id));
    },
  }),
];
