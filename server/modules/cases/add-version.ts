import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { Actor } from '#server/http/actor.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { CaseVersion, VersionStatus } from './case-version.entity.ts';
import type { Case } from './case.entity.ts';
import type { VersionContent } from './compute-content.ts';

/** What every save is told by its caller. A command acts for an account without any credential. */
export interface Saving {
  em: EntityManager;
  actor: Pick<Actor, 'id' | 'name' | 'role'> & Partial<Pick<Actor, 'credential'>>;
  now: Date;
}

export interface Previous {
  n: number;
  hash: string;
}

/** Appends the version that the case now points to, as a draft, and writes the trail; within the caller's transaction. */
export async function addVersion(
  { em, actor, now }: Saving,
  of: Case,
  content: VersionContent,
  { note, previous }: { note: string; previous?: Previous },
): Promise<void> {
  const { title, tags, newestVersion: n } = of;
  const { document, result, engine, hash } = content;
  const version = em.create(
    CaseVersion,
    {
      id: randomUUID(),
      caseId: of.id,
      n,
      title,
      tags,
      format: document.format,
      document,
      result,
      engine,
      hash,
      authorId: actor.id,
      note,
      createdAt: now,
    },
    { persist: true },
  );
  // The rows refer to each other by plain identifiers, so their order is ours to keep.
  await em.flush();
  em.create(
    VersionStatus,
    { versionId: version.id, status: 'draft', actorId: actor.id, reason: '', createdAt: now },
    { persist: true },
  );
  recordTrail(em, {
    actor,
    action: previous ? 'case.saveVersion' : 'case.create',
    subject: { type: 'case', id: of.id },
    ...(previous && { before: { ...previous } }),
    after: { number: of.number, n, hash, title, tags, campaignId: of.campaignId },
    now,
  });
  await em.flush();
}
