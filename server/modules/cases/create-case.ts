import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { z } from 'zod';
import type { createCaseSchema } from '#shared/contracts/cases.ts';
import { summarise } from '#server/documents/summarise.ts';
import { requireCampaign } from '#server/modules/campaigns/require-campaign.ts';
import { addVersion } from './add-version.ts';
import type { Saving } from './add-version.ts';
import { Case } from './case.entity.ts';
import { computeContent } from './compute-content.ts';
import type { ComputeContext } from './compute-content.ts';
import { requireSoundCitation } from './sound-citation.ts';
import { claimKey, findSaved } from './save-key.ts';
import type { SaveKey, Saved } from './save-key.ts';
import { searchText } from './search-text.ts';

/** The next number, counted from 1 without gaps: the counter is locked until this save is kept or given up. */
async function nextNumber(em: EntityManager): Promise<number> {
  const [row] = await em.execute<{ last: number }[]>(
    'update case_numbers set last = last + 1 returning last',
  );
  if (!row) throw new Error('The counter of cases is missing.');
  return row.last;
}

/** Files a new case with its first version. The result is computed here, so that it is never what a client says it is. */
export async function createCase(
  context: Saving & ComputeContext,
  input: z.output<typeof createCaseSchema>,
  key?: SaveKey,
): Promise<Saved> {
  const { em, actor, now } = context;
  const before = await findSaved(em, key);
  if (before) return before;
  const campaignId = input.campaignId ?? null;
  if (campaignId !== null) await requireCampaign(em, actor, campaignId);
  await requireSoundCitation(em, input.document);
  const content = await computeContent(input.document, context);
  const saved: Saved = { caseId: randomUUID(), n: 1, lock: 1 };
  const kept = await em.transactional(async (tx) => {
    if (!(await claimKey(tx, key, saved, now))) return false;
    const tags = input.tags ?? [];
    const created = tx.create(
      Case,
      {
        id: saved.caseId,
        number: await nextNumber(tx),
        title: input.title,
        tags,
        ownerId: actor.id,
        campaignId,
        newestVersion: saved.n,
        summary: summarise(content.document),
        searchText: searchText(input.title, tags, content.document),
        createdAt: now,
        updatedAt: now,
      },
      { persist: true },
    );
    await tx.flush();
    await addVersion({ em: tx, actor, now }, created, content, { note: input.note ?? '' });
    return true;
  });
  return kept ? saved : ((await findSaved(em, key)) ?? saved);
}
