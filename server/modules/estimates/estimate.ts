import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { currentSettings } from '#server/modules/settings/current-settings.ts';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { Compute } from '#server/compute/compute.ts';

/** Computes an estimate away from the event loop, judged by the thresholds the lab has now; stores nothing. */
export async function estimate(
  request: EstimateRequest,
  { em, compute, signal }: { em: EntityManager; compute: Compute; signal?: AbortSignal },
): Promise<Estimate> {
  const { verdict: thresholds } = await currentSettings({ em });
  return compute('estimate', { ...request, thresholds }, signal ? { signal } : {});
}
