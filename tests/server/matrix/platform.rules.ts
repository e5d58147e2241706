import { randomUUID } from 'node:crypto';
import { TEST_PASSWORD, makeAccount, makeToken } from '#tests/support/factories.ts';
import { ADMINISTRATORS_ONLY, ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule } from '#tests/support/walk-routes.ts';

const OWN = { owner: 'allowed', member: 'hidden', outsider: 'hidden' } as const;

const newUser = () => ({
  name: 'A new person',
  email: `new-${randomUUID()}@example.org`,
  role: 'theorist',
  password: 'a password for the new one',
});

/** Health, sign-in, tokens and accounts. There is nobody else's session to reach: it is always one's own. */
export const RULES: Record<string, Rule> = {
  getHealth: { access: 'public', expect: ALLOWED_TO_ALL },
  getOpenApi: { access: 'public', expect: ALLOWED_TO_ALL },
  signIn: {
    access: 'public',
    expect: ALLOWED_TO_ALL,
    prepare: (_app, { email }) => ({ body: { email, password: TEST_PASSWORD } }),
  },
  signOut: { access: 'session.own', expect: ALLOWED_TO_ALL },
  getSession: { access: 'session.own', expect: ALLOWED_TO_ALL },
  changePassword: {
    access: 'session.own',
    expect: ALLOWED_TO_ALL,
    prepare: () => ({ body: { currentPassword: TEST_PASSWORD, newPassword: TEST_PASSWORD } }),
  },
  listTokens: { access: 'token.own', expect: ALLOWED_TO_ALL },
  createToken: {
    access: 'token.own',
    expect: ALLOWED_TO_ALL,
    prepare: () => ({ body: { name: 'A script', scope: 'read', expiresInDays: 1 } }),
  },
  revokeToken: {
    access: 'token.own',
    expect: { experimentalist: OWN, theorist: OWN, manager: OWN, administrator: OWN },
    async prepare(app, person, standing) {
      const account = standing === 'owner' ? person : await makeAccount(app.em());
      const { token } = await makeToken(app.em(), { account });
      return { params: { id: token.id } };
    },
  },
  listUsers: { access: 'user.list', expect: ADMINISTRATORS_ONLY },
  createUser: {
    access: 'user.write',
    expect: ADMINISTRATORS_ONLY,
    prepare: () => ({ body: newUser() }),
  },
  updateUser: {
    access: 'user.write',
    expect: ADMINISTRATORS_ONLY,
    async prepare(app) {
      const { id } = await makeAccount(app.em());
      return { params: { id }, body: { name: 'Another name' } };
    },
  },
};
