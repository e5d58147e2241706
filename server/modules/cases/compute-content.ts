import { CURRENT_FORMAT } from '#shared/contracts/cases.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { DomainError } from '#shared/errors.ts';
import type { Compute } from '#server/compute/compute.ts';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import { estimate } from '#server/modules/estimates/estimate.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';

/** What a version keeps for ever, and the hash over it. */
export interface VersionContent {
  document: CaseDocument & { format: number };
  result: { estimate: Estimate };
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

/** A fault of the document, told by its place in what was sent: the document is a member there. */
export function withinDocument(fault: unknown): unknown {
  if (!(fault instanceof DomainError) || fault.code !== 'invalidInput') return fault;
  const given = fault.details.errors ?? [{ path: '', message: fault.message }];
  const errors = given.map(({ path, message }) => ({ path: `/document${path}`, message }));
  const [first, ...rest] = errors;
  const more = rest.length > 0 ? ` (and ${rest.length} more)` : '';
  const message = first ? `${first.path}: ${first.message}${more}` : fault.message;
  return new DomainError(fault.code, message, { ...fault.details, errors });
}

/** Computes a document by the one way an estimate is computed, warnings included, and seals what came out. */
export async function computeContent(
  sent: CaseDocument,
  context: ComputeContext,
): Promise<VersionContent> {
  const document = { ...sent, format: CURRENT_FORMAT } as const;
  const work = () => estimate(document, context);
  const answer = await withSlot(context.actor.id, work).catch((fault: unknown) => {
    throw withinDocument(fault);
  });
  const result = { estimate: answer };
  const { engine } = answer;
  return { document, result, engine, hash: canonicalHash({ document, result, engine }) };
}
