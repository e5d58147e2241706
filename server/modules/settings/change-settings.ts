import type { ChangeSettings } from '#shared/contracts/settings.ts';
import { DomainError } from '#shared/errors.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import type { VerbContext } from '#server/http/context.ts';
import { etagOf, matchesLock } from '#server/modules/cases/etag.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { readSettings } from './current-settings.ts';

function refuseStale(version: number): never {
  throw new DomainError(
    'staleVersion',
    `Somebody changed the settings since you opened them; they are at version ${version} now. Nothing was changed: look at them again, then change them.`,
    { extra: { currentVersion: version, currentEtag: etagOf(version) } },
  );
}

/**
 * Sets the settings of the lab as a new version on top of the one named by If-Match. Of two changes at once the database
 * takes one by the number of its row. What holds already is no change and makes no version.
 */
export async function changeSettings(
  { em, actor, now }: VerbContext,
  ifMatch: string | undefined,
  { note = '', verdict }: ChangeSettings,
): Promise<void> {
  const after = { verdict };
  await em.transactional(async (tx) => {
    const { version, ...current } = await readSettings({ em: tx });
    if (!matchesLock(ifMatch, version, 'the settings')) refuseStale(version);
    const before = { verdict: current.verdict };
    if (canonicalJson(before) === canonicalJson(after)) return;
    const taken = await tx.execute<unknown[]>(
      `insert into settings_versions (n, content, author_id, note, created_at)
       values (?, ?::jsonb, ?, ?, ?) on conflict do nothing returning n`,
      [version + 1, JSON.stringify(after), actor.id, note, now.toISOString()],
    );
    if (taken.length === 0) refuseStale(version + 1);
    recordTrail(tx, {
      actor,
      action: 'settings.change',
      subject: { type: 'settings', id: 'lab' },
      before: { version, ...before },
      after: { version: version + 1, ...after, note },
      now,
    });
  });
}
