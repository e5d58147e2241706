import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { can } from '#server/http/can.ts';
import { defineRoute, ownAccount } from '#server/http/route.ts';
import { ACTIONS, PERMISSIONS, ROLES } from '#shared/roles.ts';
import type { Action } from '#shared/roles.ts';

const OTHER = { ownerId: 'another', memberIds: ['somebody', 'else'] };

/** What a reach means, said again in another way than the code says it. */
const ALLOWED = {
  any: { none: true, owner: true, member: true, outsider: true },
  involved: { none: false, owner: true, member: true, outsider: false },
  own: { none: false, owner: true, member: false, outsider: false },
  none: { none: false, owner: false, member: false, outsider: false },
};

describe.each(ROLES)('%s', (role) => {
  test.each(ACTIONS)('%s', (action) => {
    const actor = { id: 'me', role };
    const expected = ALLOWED[PERMISSIONS[role][action]];
    expect({
      none: can(actor, action),
      owner: can(actor, action, { ownerId: 'me', memberIds: [] }),
      member: can(actor, action, { ...OTHER, memberIds: ['me'] }),
      outsider: can(actor, action, OTHER),
    }).toEqual(expected);
  });
});

test('an administrator reads no case, and a lab manager writes their own alone', () => {
  const administrator = { id: 'me', role: 'administrator' as const };
  const manager = { id: 'me', role: 'manager' as const };
  const mine = { ownerId: 'me' };
  for (const action of ['case.read', 'case.write', 'case.create', 'case.list'] as const) {
    expect(can(administrator, action, mine)).toBe(false);
  }
  expect(can(manager, 'case.read', OTHER)).toBe(true);
  expect(can(manager, 'case.write', OTHER)).toBe(false);
  expect(can(manager, 'case.write', { ...OTHER, memberIds: ['me'] })).toBe(false);
  expect(can(manager, 'case.write', mine)).toBe(true);
});

const base = {
  method: 'get',
  path: '/api/x',
  operationId: 'x',
  summary: 'x',
  tag: 'x',
  handler: () => undefined,
} as const;

test('a route without a rule is a type error, and refused where types are evaded', () => {
  // @ts-expect-error access is missing
  expect(() => defineRoute({ ...base })).toThrow(/has no rule/);
  // @ts-expect-error this action is not in the table
  expect(() => defineRoute({ ...base, access: 'case.burn' })).toThrow(/has no rule/);
  expect(() => defineRoute({ ...base, access: 'public' })).not.toThrow();
});

test('a route whose permission depends on an owner must say how the resource is loaded', () => {
  const params = z.object({ id: z.uuid() });
  const owned = ACTIONS.filter((action) =>
    ROLES.some((role) => ['own', 'involved'].includes(PERMISSIONS[role][action])),
  );
  expect(owned).toEqual(
    expect.arrayContaining<Action>(['case.read', 'case.write', 'session.own', 'token.own']),
  );
  for (const access of owned) {
    expect(() => defineRoute({ ...base, access, params })).toThrow(/depends on the owner/);
    expect(() => defineRoute({ ...base, access, params, resource: ownAccount })).not.toThrow();
  }
});
