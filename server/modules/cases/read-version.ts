import type { EntityManager } from '@mikro-orm/postgresql';
import type { Status, VersionDetail, VersionHead } from '#shared/contracts/cases.ts';
import { DomainError } from '#shared/errors.ts';
import { readDocument } from '#server/documents/read-document.ts';
import type { StoredDocument } from '#server/documents/upcast.ts';
import { statusOf, utc } from './case-rows.ts';

interface HeadRow {
  n: number;
  hash: string;
  note: string;
  createdAt: string;
  authorId: string;
  authorName: string;
  status: Status;
}
interface VersionRow extends HeadRow, Pick<VersionDetail, 'title' | 'result' | 'engine'> {
  document: StoredDocument;
}

const HEAD = `v.n, v.hash, v.note, ${utc('v.created_at')} as "createdAt",
  a.id as "authorId", a.name as "authorName", ${statusOf('v.id')} as status`;
const TABLES = 'case_versions v join accounts a on a.id = v.author_id';

function presentHead(row: HeadRow): VersionHead & { note: string; status: Status } {
  const { n, hash, note, createdAt, authorId, authorName, status } = row;
  return { n, hash, note, createdAt, status, author: { id: authorId, name: authorName } };
}

/** Heads of the versions of a case, newest first. */
export async function listVersions(
  em: EntityManager,
  caseId: string,
  { page, pageSize }: { page: number; pageSize: number },
): Promise<{ items: VersionHead[]; total: number }> {
  const rows = await em.execute<HeadRow[]>(
    `select ${HEAD} from ${TABLES} where v.case_id = ? order by v.n desc limit ? offset ?`,
    [caseId, pageSize, (page - 1) * pageSize],
  );
  const [counted] = await em.execute<{ total: number }[]>(
    'select newest_version as total from cases where id = ?',
    [caseId],
  );
  return { items: rows.map(presentHead), total: counted?.total ?? 0 };
}

/** One version with its document and the result as it was shown. */
export async function readVersion(
  em: EntityManager,
  caseId: string,
  n: number,
): Promise<VersionDetail> {
  const [row] = await em.execute<VersionRow[]>(
    `select ${HEAD}, v.title, v.document, v.result, v.engine
     from ${TABLES} where v.case_id = ? and v.n = ?`,
    [caseId, n],
  );
  if (!row) throw new DomainError('notFound', `This case has no version ${n}.`);
  const { title, document, result, engine } = row;
  return { ...presentHead(row), title, document: readDocument(document), result, engine };
}

/** The document of one version alone, in today's format. */
export async function readDocumentOf(
  em: EntityManager,
  caseId: string,
  n: number,
): Promise<VersionDetail['document']> {
  const [row] = await em.execute<{ document: StoredDocument }[]>(
    'select document from case_versions where case_id = ? and n = ?',
    [caseId, n],
  );
  if (!row) throw new Error(`Case ${caseId} had a version ${n} a moment ago.`);
  return readDocument(row.document);
}
