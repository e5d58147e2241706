import { Renewal, Session, SignInFailure } from '#server/modules/auth/session.entity.ts';
import { PersonalToken } from '#server/modules/tokens/personal-token.entity.ts';
import { Account } from '#server/modules/users/account.entity.ts';
import { OutboxDelivery, OutboxMessage } from '#server/outbox/outbox.entity.ts';
import { TrailEntry } from '#server/trail/trail-entry.entity.ts';

export const ENTITIES = [
  Account,
  Session,
  Renewal,
  SignInFailure,
  PersonalToken,
  TrailEntry,
  OutboxMessage,
  OutboxDelivery,
];
