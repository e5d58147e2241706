import type { EntityManager } from '@mikro-orm/postgresql';
import { z } from 'zod';
import { DEFAULT_UNITS } from '#shared/contracts/estimates.ts';
import type { ScanResult } from '#shared/contracts/scans.ts';
import { DomainError } from '#shared/errors.ts';
import { Job } from '#server/jobs/job.entity.ts';
import { scanPartSchema } from './compute-scan-point.ts';
import type { ScanPart } from './compute-scan-point.ts';
import { Grid } from './grid.ts';
import { storedScanSchema } from './scan-kind.ts';

type Value = ScanPart['value'];

async function loadParts(em: EntityManager, id: string) {
  const rows = await em.execute<{ engine: string; value: unknown }[]>(
    'select engine, value from job_parts where job_id = ? order by n',
    [id],
  );
  const parts = z.array(scanPartSchema).parse(rows.map(({ value }) => value));
  return { parts, engines: [...new Set(rows.map(({ engine }) => engine))].sort() };
}

function emptyOf(points: readonly ScanPart[]): ScanResult['empty'] {
  const found = new Map<string, { points: number; first: number }>();
  points.forEach(({ reason }, at) => {
    if (reason === undefined) return;
    const before = found.get(reason);
    found.set(reason, { points: (before?.points ?? 0) + 1, first: before?.first ?? at });
  });
  return [...found].map(([reason, counted]) => ({ reason, ...counted }));
}

/** Cut into rows of the second axis, where there is one. */
function nest(values: readonly Value[], width: number | undefined): ScanResult['values'] {
  if (width === undefined) return [...values] as ScanResult['values'];
  return Array.from({ length: values.length / width }, (_, i) =>
    values.slice(i * width, (i + 1) * width),
  ) as ScanResult['values'];
}

/** The numbers of a scan that is done; refused (409) before that. */
export async function scanResult(em: EntityManager, id: string): Promise<ScanResult> {
  const job = await em.findOneOrFail(Job, { id });
  if (job.state !== 'done') {
    throw new DomainError(
      'conflict',
      `The scan is ${job.state} (${job.done} of ${job.total} points); its result is there when it is done.`,
      { extra: { state: job.state, done: job.done, total: job.total } },
    );
  }
  const request = storedScanSchema.parse(job.input);
  const { estimate, method, output } = request;
  const grid = new Grid(request);
  const { parts, engines } = await loadParts(em, id);
  const { unit: angleUnit, values: angles } = grid.angles;
  const nowhere: Value = output === 'dcs' ? angles.map(() => null) : null;
  const points = grid.parts().map((part) => {
    const found = parts[part];
    if (!found) throw new Error(`Point ${part} of scan ${id} is missing.`);
    return found;
  });
  const area = estimate.units?.area ?? DEFAULT_UNITS.area;
  const unit = { total: area, dcs: `${area}/sr`, verdict: null }[output];
  return {
    id,
    method,
    output,
    unit,
    axes: grid.axes,
    ...(output === 'dcs' && {
      angles: { unit: angleUnit, frame: estimate.frame ?? 'cm', values: angles },
    }),
    values: nest(
      points.map(({ value }) => value ?? nowhere),
      grid.axes[1]?.values.length,
    ),
    empty: emptyOf(points),
    engines,
  };
}
