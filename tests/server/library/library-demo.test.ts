import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import type { Compute } from '#server/compute/compute.ts';
import {
  DEMO_INTERACTIONS,
  LIBRARY_CASES,
  seedLibrary,
} from '#server/db/seeders/demo/library-demo.ts';
import { publishInteractionSchema } from '#shared/contracts/library.ts';
import type { InteractionDetail, InteractionItem } from '#shared/contracts/library.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { makeAccount } from '#tests/support/factories.ts';
import { query } from '#tests/support/test-database.ts';
import { fileCase, read } from '../cases/case-requests.ts';

const compute: Compute = (kind, input) => Promise.resolve(ENGINE[kind](input));

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
  const actor = await makeAccount(app.em(), { role: 'theorist', demo: true });
  await seedLibrary({ em: app.em(), compute, actor, now: new Date() });
});
afterAll(() => app.close());

describe('the library of the demo', () => {
  it.each(DEMO_INTERACTIONS.flatMap(({ versions }) => versions.map((one) => [one.name, one])))(
    'keeps to what a person may publish: %s',
    (_, version) => {
      expect(publishInteractionSchema.parse(version)).toEqual(version);
    },
  );

  it('is published whole, one with a second version', async () => {
    const agent = await app.signedIn('experimentalist');
    const { items } = await read<{ items: InteractionItem[] }>(agent, '/api/interactions');
    expect(items.map(({ id }) => id).sort()).toEqual(DEMO_INTERACTIONS.map(({ id }) => id));
    expect(items.filter(({ version }) => version.n > 1)).toHaveLength(1);
    for (const { id, versions } of DEMO_INTERACTIONS) {
      const detail = await read<InteractionDetail>(agent, `/api/interactions/${id}`);
      expect(detail.terms).toEqual(versions.at(-1)?.terms);
      expect(detail.versions).toHaveLength(versions.length);
    }
  });

  it('is cited by a worked case that is not at the newest version', async () => {
    const agent = await app.signedIn('experimentalist');
    const [demo] = LIBRARY_CASES;
    const document = demo?.versions[0].document;
    const { filed } = await fileCase(agent, { document });
    const { id, version } = document?.interaction.citation ?? { id: '', version: 0 };
    const { newestVersion } = await read<InteractionDetail>(agent, `/api/interactions/${id}`);
    expect(newestVersion).toBeGreaterThan(version);
    expect(await read(agent, `/api/interactions/${id}/cases`)).toMatchObject({
      items: [{ id: filed.id, citedVersion: version }],
    });
  });

  it('goes with the demo, but for what the case of somebody else cites; the guards are back then', async () => {
    const [removed] = await query(
      app.database.ownerUrl,
      'select remove_demo_interactions() as removed',
    );
    expect(removed).toEqual({ removed: DEMO_INTERACTIONS.length - 1 });
    const left = await query(app.database.ownerUrl, 'select id from interactions');
    expect(left).toEqual([{ id: LIBRARY_CASES[0]?.versions[0].document.interaction.citation?.id }]);
    for (const table of ['interaction_versions', 'interaction_statuses']) {
      await expect(query(app.database.ownerUrl, `delete from ${table}`)).rejects.toThrow(
        /only grows/,
      );
    }
  });
});
