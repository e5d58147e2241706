import type { ScanRequest } from '#shared/contracts/scans.ts';
import { DomainError } from '#shared/errors.ts';
import type { Compute } from '#server/compute/compute.ts';
import { Grid } from './grid.ts';

/**
 * Computes the first and the last point, so that an input which can never be right is refused at once and not found in an empty
 * result. A point that is only too much work for a request is left to the workers, who have more time.
 */
export async function checkScan(
  request: ScanRequest,
  { compute, signal }: { compute: Compute; signal: AbortSignal },
): Promise<void> {
  const grid = new Grid(request);
  for (const part of new Set([0, grid.total - 1])) {
    try {
      await compute('estimate', grid.bodyOf(part), { signal, deadline: 3_000 });
    } catch (fault) {
      if (signal.aborted || !(fault instanceof DomainError) || fault.code === 'unavailable') {
        throw fault;
      }
      if (fault.code === 'invalidInput') throw withinScan(fault, part, grid);
    }
  }
}

/** Told by its place in what was sent: at an axis where the fault lies on its path, else in the estimate. */
function withinScan(fault: DomainError, part: number, grid: Grid): DomainError {
  const given = fault.details.errors ?? [{ path: '', message: fault.message }];
  const which = part === 0 ? 'first' : 'last';
  const errors = given.map(({ path, message }) => {
    const axis = grid.axes.findIndex((one) => path === one.path || path.startsWith(`${one.path}/`));
    return axis < 0
      ? { path: `/estimate${path}`, message }
      : { path: `/axes/${axis}`, message: `At the ${which} point: ${message}` };
  });
  const [first] = errors;
  const message = first ? `${first.path}: ${first.message}` : fault.message;
  return new DomainError('invalidInput', message, { errors });
}
