import { z } from 'zod';
import { caseDocumentSchema } from '#shared/contracts/cases.ts';
import { listDrafts, loadDraft, saveDraft } from '#src/lib/drafts.ts';
import type { Draft as KeptDraft } from '#src/lib/drafts.ts';

/** Unsaved work as it is kept: with the version it began from, so that a stale save is found out even after days. */
export const keptWorkSchema = z.object({
  draft: z.object({
    title: z.string(),
    tags: z.array(z.string()),
    document: caseDocumentSchema,
    open: z.record(z.string(), z.object({ text: z.string(), problem: z.string().nullable() })),
  }),
  base: z.object({ version: z.int(), etag: z.string() }).nullable(),
});
export type KeptWork = z.infer<typeof keptWorkSchema>;

/** One name a browser tab, so that two tabs on the same case do not overwrite each other's work. */
function tabName(): string {
  const key = 'tallybarn.tab';
  try {
    const known = sessionStorage.getItem(key);
    if (known !== null) return known;
    const fresh = crypto.randomUUID().slice(0, 8);
    sessionStorage.setItem(key, fresh);
    return fresh;
  } catch (refused) {
    console.info('This tab has no storage of its own', refused);
    return 'shared';
  }
}

export const ownKey = (subject: string): string => `${subject}#${tabName()}`;

export function keep(account: string, subject: string, href: string, work: KeptWork): boolean {
  return saveDraft(account, { key: ownKey(subject), title: work.draft.title, href, value: work });
}

export function ownWork(account: string, subject: string): KeptDraft<KeptWork> | undefined {
  return loadDraft(account, ownKey(subject), keptWorkSchema);
}

/** Work on the same case that another tab left, or this one before the browser was closed. Newest first. */
export function otherWork(account: string, subject: string): KeptDraft<KeptWork> | undefined {
  const own = ownKey(subject);
  const other = listDrafts(account).find(
    ({ key }) => key !== own && (key === subject || key.startsWith(`${subject}#`)),
  );
  return other ? loadDraft(account, other.key, keptWorkSchema) : undefined;
}
