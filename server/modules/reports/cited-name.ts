import type { EntityManager } from '@mikro-orm/postgresql';
import type { Citation } from '#shared/contracts/estimates.ts';

/** A cited interaction of the library as paper names it: name, version, and where it was taken from. */
export async function citedName(
  em: EntityManager,
  citation: Citation | undefined,
): Promise<string | undefined> {
  if (!citation) return undefined;
  const [row] = await em.execute<{ name: string; source: string }[]>(
    `select content->>'name' as name, content->>'source' as source
     from interaction_versions where interaction_id = ? and n = ?`,
    [citation.id, citation.version],
  );
  if (!row) return undefined;
  const said = `library: ${row.name}, version ${citation.version}`;
  return row.source ? `${said}; source: ${row.source}` : said;
}
