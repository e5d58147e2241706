import { DomainError } from '#shared/errors.ts';
import { isUniqueViolation } from '#server/db/faults.ts';

/** Runs what writes an interaction; a name that another one bears is refused in words. The database decides, not a look beforehand. */
export async function refusingTakenName<T>(name: string, work: () => Promise<T>): Promise<T> {
  return work().catch((fault: unknown) => {
    if (!isUniqueViolation(fault) || !String(fault).includes('interactions_name_key')) throw fault;
    const message = `There is an interaction called “${name}” already; publish a further version of it, or choose another name.`;
    throw new DomainError('conflict', message, { errors: [{ path: '/name', message }] });
  });
}
