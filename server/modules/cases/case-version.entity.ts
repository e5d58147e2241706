import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { Status, VersionDetail } from '#shared/contracts/cases.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { StoredDocument } from '#server/documents/upcast.ts';

type VersionResult = VersionDetail['result'];

/** One saved state of a case: document, result as shown, engine, and the hash over these three. Append-only. */
export const CaseVersion = defineEntity({
  name: 'CaseVersion',
  tableName: 'case_versions',
  properties: (p) => ({
    id: p.uuid().primary(),
    caseId: p.uuid(),
    n: p.integer(),
    title: p.text(),
    tags: p.array().columnType('text[]').$type<string[]>(),
    format: p.integer(),
    document: p.json<StoredDocument>().columnType('jsonb'),
    result: p.json<VersionResult>().columnType('jsonb'),
    engine: p.json<Estimate['engine']>().columnType('jsonb'),
    hash: p.text(),
    authorId: p.uuid(),
    note: p.text(),
    createdAt: p.datetime(),
  }),
});
export type CaseVersion = InferEntity<typeof CaseVersion>;

/** A status given to a version; the newest row is the one that counts. Append-only. */
export const VersionStatus = defineEntity({
  name: 'VersionStatus',
  tableName: 'version_statuses',
  properties: (p) => ({
    id: p.bigint('string').primary(),
    versionId: p.uuid(),
    status: p.text().$type<Status>(),
    actorId: p.uuid(),
    reason: p.text(),
    createdAt: p.datetime(),
  }),
});
export type VersionStatus = InferEntity<typeof VersionStatus>;
