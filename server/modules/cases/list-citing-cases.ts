import type { EntityManager } from '@mikro-orm/postgresql';
import type { CitingCase } from '#shared/contracts/library.ts';
import type { Status } from '#shared/contracts/cases.ts';
import type { Actor } from '#server/http/actor.ts';
import { NEWEST, statusOf } from './case-rows.ts';
import { reachedBy } from './case-resource.ts';

interface Row {
  id: string;
  number: number;
  title: string;
  status: Status;
  ownerId: string;
  ownerName: string;
  version: number;
  citedVersion: number;
}

/** Cases the actor may read whose newest version cites this interaction of the library, the newest change first. */
export async function listCitingCases(
  em: EntityManager,
  actor: Pick<Actor, 'id' | 'role'>,
  interactionId: string,
  { page, pageSize }: { page: number; pageSize: number },
): Promise<{ items: CitingCase[]; total: number }> {
  const may = reachedBy(actor, 'case.read');
  const tables = `cases c join accounts o on o.id = c.owner_id join case_versions v on v.case_id = c.id`;
  // The first condition is that of the index.
  const where = `v.document #> '{interaction,citation}' is not null
    and v.document #>> '{interaction,citation,id}' = ? and ${NEWEST} and (${may.sql})`;
  const params = [interactionId, ...may.params];
  const [counted] = await em.execute<{ total: number }[]>(
    `select count(*)::integer as total from ${tables} where ${where}`,
    params,
  );
  const rows = await em.execute<Row[]>(
    `select c.id, c.number, c.title, ${statusOf('v.id')} as status,
       o.id as "ownerId", o.name as "ownerName", v.n as version,
       (v.document #>> '{interaction,citation,version}')::integer as "citedVersion"
     from ${tables} where ${where} order by c.updated_at desc, c.number desc limit ? offset ?`,
    [...params, pageSize, (page - 1) * pageSize],
  );
  const items = rows.map(({ ownerId, ownerName, ...row }) => ({
    ...row,
    owner: { id: ownerId, name: ownerName },
  }));
  return { items, total: counted?.total ?? 0 };
}
