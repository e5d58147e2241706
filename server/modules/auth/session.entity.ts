import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';

/** A sign-in that lasts until it is ended, idle for long, or old. */
export const Session = defineEntity({
  name: 'Session',
  tableName: 'sessions',
  properties: (p) => ({
    id: p.uuid().primary(),
    accountId: p.uuid(),
    createdAt: p.datetime(),
    lastSeenAt: p.datetime(),
    endedAt: p.datetime().nullable(),
    endReason: p.text().nullable(),
  }),
});
export type Session = InferEntity<typeof Session>;

/** A renewal token of a session, kept as a hash. All tokens of one session are a family. */
export const Renewal = defineEntity({
  name: 'Renewal',
  tableName: 'renewals',
  properties: (p) => ({
    id: p.uuid().primary(),
    session: () => p.manyToOne(Session),
    tokenHash: p.text().unique().hidden(),
    createdAt: p.datetime(),
    usedAt: p.datetime().nullable(),
  }),
});
export type Renewal = InferEntity<typeof Renewal>;

/** A failed sign-in, counted against an account name and an address. */
export const SignInFailure = defineEntity({
  name: 'SignInFailure',
  tableName: 'sign_in_failures',
  properties: (p) => ({
    id: p.bigint('string').primary(),
    /** A hash: people type passwords into the wrong field. */
    accountKey: p.text(),
    address: p.text(),
    at: p.datetime(),
  }),
});
export type SignInFailure = InferEntity<typeof SignInFailure>;
