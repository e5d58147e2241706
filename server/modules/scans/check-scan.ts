import type { ScanRequest } from '#shared/contracts/scans.ts';
import { DomainError } from '#shared/errors.ts';
import type { Compute } from '#server/compute/compute.ts';
import { Grid } from './grid.ts';

/** A point that takes longer is the workers' to try, who have more time. */
const DEADLINE_MILLISECONDS = 2_000;

/**
 * Computes the first and the last point, so that an input which can never be right is refused at once and not found in an empty
 * result. Where the method does not allow but one of the two, the rest may be worth having.
 */
export async function checkScan(
  request: ScanRequest,
  { compute, signal }: { compute: Compute; signal: AbortSignal },
): Promise<void> {
  const grid = new Grid(request);
  const { method, output } = request;
  const faults: DomainError[] = [];
  const ends = [...new Set([0, grid.total - 1])];
  for (const part of ends) {
    try {
      const task = { body: grid.bodyOf(part), method, output };
      await compute('scanPoint', task, { signal, deadline: DEADLINE_MILLISECONDS });
    } catch (fault) {
      if (signal.aborted || !(fault instanceof DomainError) || fault.code === 'unavailable') {
        throw fault;
      }
      if (fault.code !== 'invalidInput') continue;
      const placed = withinScan(fault, part, grid);
      if (placed.details.errors?.some(({ path }) => path !== '/method')) throw placed;
      faults.push(placed);
    }
  }
  const [first] = faults;
  if (first && faults.length === ends.length) throw first;
}

/** Told by its place in what was sent: at an axis where the fault lies on its path, at the method, or in the estimate. */
function withinScan(fault: DomainError, part: number, grid: Grid): DomainError {
  const given = fault.details.errors ?? [{ path: '', message: fault.message }];
  const which = part === 0 ? 'first' : 'last';
  const errors = given.map(({ path, message }) => {
    const axis = grid.axes.findIndex((one) => path === one.path || path.startsWith(`${one.path}/`));
    if (path === '/method') return { path, message };
    return axis < 0
      ? { path: `/estimate${path}`, message }
      : { path: `/axes/${axis}`, message: `At the ${which} point: ${message}` };
  });
  const [first] = errors;
  const message = first ? `${first.path}: ${first.message}` : fault.message;
  return new DomainError('invalidInput', message, { errors });
}
