import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';

/** What the engine can be asked, with what goes in and what comes out: plain JSON both ways. */
export interface EngineKinds {
  estimate: { input: EstimateRequest; output: Estimate };
}
export type EngineKind = keyof EngineKinds;

export const ENGINE: {
  readonly [K in EngineKind]: (input: EngineKinds[K]['input']) => EngineKinds[K]['output'];
} = {
  estimate: computeEstimate,
};
