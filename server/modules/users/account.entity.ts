import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { Role } from '#shared/roles.ts';

/** A person's account. Never deleted: cases and the trail name it. */
export const Account = defineEntity({
  name: 'Account',
  tableName: 'accounts',
  properties: (p) => ({
    id: p.uuid().primary(),
    email: p.text().unique(),
    name: p.text(),
    role: p.text().$type<Role>(),
    passwordHash: p.text().hidden(),
    active: p.boolean(),
    demo: p.boolean(),
    createdAt: p.datetime(),
    version: p.integer().version(),
  }),
});
export type Account = InferEntity<typeof Account>;
