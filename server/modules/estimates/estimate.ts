import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import type { Compute } from '#server/compute/compute.ts';

/** Computes an estimate away from the event loop; stores nothing. */
export async function estimate(
  request: EstimateRequest,
  { compute, signal }: { compute: Compute; signal?: AbortSignal },
): Promise<Estimate> {
  return compute('estimate', request, signal ? { signal } : {});
}
