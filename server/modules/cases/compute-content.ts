import { CURRENT_FORMAT } from '#shared/contracts/cases.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import type { Compute } from '#server/compute/compute.ts';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import { estimate } from '#server/modules/estimates/estimate.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';
import type { Place } from './document-faults.ts';
import { ofEstimate, ofRunPlan, withinDocument } from './document-faults.ts';

/** What a version keeps for ever, and the hash over it. */
export interface VersionContent {
  document: CaseDocument & { format: number };
  result: { estimate: Estimate; runPlan?: RunPlan };
  engine: Estimate['engine'];
  hash: string;
}

export interface ComputeContext {
  em: EntityManager;
  /** Whose computations are counted. */
  actor: { id: string };
  compute: Compute;
  signal?: AbortSignal;
}

/** One computation of the person, its faults told by their place in the document. */
async function counted<T>(
  { actor }: ComputeContext,
  place: Place,
  work: () => Promise<T>,
): Promise<T> {
  return withSlot(actor.id, work).catch((fault: unknown) => {
    throw withinDocument(fault, place);
  });
}

/** Computes a document by the one way an estimate and a run plan are computed, warnings included, and seals what came out. */
export async function computeContent(
  sent: CaseDocument,
  context: ComputeContext,
): Promise<VersionContent> {
  const document = { ...sent, format: CURRENT_FORMAT } as const;
  const { runPlan: planned, ...body } = document;
  const answer = await counted(context, ofEstimate, () => estimate(body, context));
  const result: VersionContent['result'] = { estimate: answer };
  if (planned) {
    const { compute, signal } = context;
    const request = { ...planned, estimate: body };
    result.runPlan = await counted(context, ofRunPlan, () =>
      compute('runPlan', request, signal ? { signal } : {}),
    );
  }
  const { engine } = answer;
  return { document, result, engine, hash: canonicalHash({ document, result, engine }) };
}
