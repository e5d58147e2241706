import type { Account } from '#server/modules/users/account.entity.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { ADMINISTRATORS_ONLY, ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule, Standing } from '#tests/support/walk-routes.ts';
import { publication, publish, yukawaTerms } from '../library/library-requests.ts';

const THEORISTS_ONLY: Rule['expect'] = {
  experimentalist: 'forbidden',
  theorist: 'allowed',
  manager: 'forbidden',
  administrator: 'forbidden',
};
const KEEPERS: Rule['expect'] = {
  ...THEORISTS_ONLY,
  theorist: { owner: 'allowed', member: 'forbidden', outsider: 'forbidden' },
  manager: 'allowed',
};

const publishers = new WeakMap<TestApp, ReturnType<TestApp['person']>>();

/** An interaction somebody published, given to the person where they are to own it. */
async function interactionOf(app: TestApp, person: Account, standing: Standing) {
  const publisher = publishers.get(app) ?? app.person('theorist');
  publishers.set(app, publisher);
  const { published, etag } = await publish((await publisher).agent);
  if (standing === 'owner') {
    const values = [person.id, published.id];
    await query(
      app.database.ownerUrl,
      'update interactions set owner_id = $1 where id = $2',
      values,
    );
  }
  return { params: { id: published.id, n: '1' }, headers: { 'If-Match': etag } };
}

const READ: Rule = { access: 'interaction.read', expect: ALLOWED_TO_ALL, prepare: interactionOf };

/** The library, which everyone reads and theorists fill, and the settings of the lab. */
export const RULES: Record<string, Rule> = {
  listInteractions: { access: 'interaction.read', expect: ALLOWED_TO_ALL },
  publishInteraction: {
    access: 'interaction.publish',
    expect: THEORISTS_ONLY,
    prepare: () => ({ body: publication() }),
  },
  readInteraction: READ,
  readInteractionVersion: READ,
  listCitingCases: READ,
  addInteractionVersion: {
    access: 'interaction.publish',
    expect: THEORISTS_ONLY,
    prepare: async (app, person, standing) => ({
      ...(await interactionOf(app, person, standing)),
      body: publication({ terms: yukawaTerms(-11) }),
    }),
  },
  retireInteraction: {
    access: 'interaction.retire',
    expect: KEEPERS,
    prepare: async (app, person, standing) => ({
      ...(await interactionOf(app, person, standing)),
      body: { reason: 'To see who may.' },
    }),
  },
  reinstateInteraction: {
    access: 'interaction.retire',
    expect: KEEPERS,
    prepare: async (app, person, standing) => ({
      ...(await interactionOf(app, person, standing)),
      body: { reason: 'To see who may.' },
    }),
  },
  readSettings: { access: 'settings.read', expect: ALLOWED_TO_ALL },
  listSettingsVersions: { access: 'settings.read', expect: ALLOWED_TO_ALL },
  changeSettings: {
    access: 'settings.write',
    expect: ADMINISTRATORS_ONLY,
    prepare: () => ({
      headers: { 'If-Match': '*' },
      body: {
        verdict: { exact: { sound: 0.01, usable: 0.1 }, criteria: { sound: 0.1, usable: 1 } },
      },
    }),
  },
};
