import type { z } from 'zod';
import type { createVersionSchema } from '#shared/contracts/cases.ts';
import { summarise } from '#server/documents/summarise.ts';
import { addVersion } from './add-version.ts';
import type { Saving } from './add-version.ts';
import { CaseVersion } from './case-version.entity.ts';
import { computeContent } from './compute-content.ts';
import type { ComputeContext } from './compute-content.ts';
import { findCase, lockCase, requireCurrent } from './lock-case.ts';
import { requireSoundCitation } from './sound-citation.ts';
import { claimKey, findSaved } from './save-key.ts';
import type { SaveKey, Saved } from './save-key.ts';
import { searchText } from './search-text.ts';

export interface SaveRequest {
  caseId: string;
  ifMatch: string | undefined;
  key?: SaveKey | undefined;
}

/** Saves a version on top of the one the client started from; a case that has moved on meanwhile is refused as stale. */
export async function saveVersion(
  context: Saving & ComputeContext,
  { caseId, ifMatch, key }: SaveRequest,
  input: z.output<typeof createVersionSchema>,
): Promise<Saved> {
  const { em, actor, now } = context;
  // A retry carries the tag of before its own save, so it is recognised before the tag is judged.
  const before = await findSaved(em, key);
  if (before) return before;
  requireCurrent(await findCase(em, caseId), ifMatch);
  await requireSoundCitation(em, input.document);
  const content = await computeContent(input.document, context);
  const saved = await em.transactional(async (tx) => {
    const current = await lockCase(tx, caseId);
    const { newestVersion, lock } = current;
    const next: Saved = { caseId, n: newestVersion + 1, lock: lock + 1 };
    if (!(await claimKey(tx, key, next, now))) return undefined;
    requireCurrent(current, ifMatch);
    const { hash } = await tx.findOneOrFail(CaseVersion, { caseId, n: newestVersion });
    const title = input.title ?? current.title;
    const tags = input.tags ?? current.tags;
    tx.assign(current, {
      title,
      tags,
      newestVersion: next.n,
      summary: summarise(content.document),
      searchText: searchText(title, tags, content.document),
      updatedAt: now,
    });
    await tx.flush();
    await addVersion({ em: tx, actor, now }, current, content, {
      note: input.note ?? '',
      previous: { n: newestVersion, hash },
    });
    return next;
  });
  return saved ?? (await findSaved(em, key)) ?? Promise.reject(new Error('A save key vanished.'));
}
