import type { Case, CaseListItem } from '#shared/contracts/cases.ts';
import type { CaseRow } from './case-rows.ts';

/** The only way a case leaves the server. */
export function presentCase(row: CaseRow): Case {
  return {
    id: row.id,
    number: row.number,
    title: row.title,
    status: row.status,
    releasedVersion: row.releasedVersion,
    tags: row.tags,
    owner: { id: row.ownerId, name: row.ownerName },
    campaign: row.campaignId === null ? null : { id: row.campaignId, name: row.campaignName ?? '' },
    createdAt: row.createdAt,
    version: {
      n: row.n,
      hash: row.hash,
      createdAt: row.savedAt,
      author: { id: row.authorId, name: row.authorName },
      note: row.note,
      status: row.status,
    },
  };
}

export function presentListItem(row: CaseRow): CaseListItem {
  return { ...presentCase(row), summary: row.summary };
}
