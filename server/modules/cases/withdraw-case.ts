import type { Status } from '#shared/contracts/cases.ts';
import { DomainError } from '#shared/errors.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import type { Saving } from './add-version.ts';
import { statusOf } from './case-rows.ts';
import { VersionStatus } from './case-version.entity.ts';
import { lockCase, requireCurrent } from './lock-case.ts';

const WITHDRAWABLE: readonly Status[] = ['draft', 'inReview'];
const WHY_NOT: Partial<Record<Status, string>> = {
  withdrawn: 'The newest version is withdrawn already.',
  approved: 'An approved version cannot be withdrawn; save a new version instead.',
  released: 'A released version can only be withdrawn by a lab manager.',
};

/** Takes the newest version, a draft or one in review, out of work. The case stays, with its history and the reason. */
export async function withdrawCase(
  { em, actor, now }: Saving,
  { caseId, ifMatch }: { caseId: string; ifMatch: string | undefined },
  reason: string,
): Promise<void> {
  await em.transactional(async (tx) => {
    const current = await lockCase(tx, caseId);
    if (ifMatch !== undefined) requireCurrent(current, ifMatch);
    const [version] = await tx.execute<{ id: string; hash: string; status: Status }[]>(
      `select v.id, v.hash, ${statusOf('v.id')} as status
       from case_versions v where v.case_id = ? and v.n = ?`,
      [caseId, current.newestVersion],
    );
    if (!version) throw new Error(`Case ${caseId} has no version ${current.newestVersion}.`);
    if (!WITHDRAWABLE.includes(version.status)) {
      throw new DomainError(
        'conflict',
        WHY_NOT[version.status] ?? 'Only a draft or a version in review can be withdrawn.',
      );
    }
    tx.create(
      VersionStatus,
      { versionId: version.id, status: 'withdrawn', actorId: actor.id, reason, createdAt: now },
      { persist: true },
    );
    current.updatedAt = now;
    recordTrail(tx, {
      actor,
      action: 'case.withdraw',
      subject: { type: 'case', id: caseId },
      before: { n: current.newestVersion, hash: version.hash, status: version.status },
      after: { n: current.newestVersion, hash: version.hash, status: 'withdrawn', reason },
      now,
    });
  });
}
