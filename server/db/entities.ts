import { Job } from '#server/jobs/job.entity.ts';
import { Renewal, Session, SignInFailure } from '#server/modules/auth/session.entity.ts';
import { Campaign, CampaignMember } from '#server/modules/campaigns/campaign.entity.ts';
import { CaseVersion, VersionStatus } from '#server/modules/cases/case-version.entity.ts';
import { Case } from '#server/modules/cases/case.entity.ts';
import {
  Interaction,
  InteractionStatusRow,
  InteractionVersion,
} from '#server/modules/library/interaction.entity.ts';
import { SettingsVersion } from '#server/modules/settings/settings-version.entity.ts';
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
  Campaign,
  CampaignMember,
  Case,
  CaseVersion,
  VersionStatus,
  Interaction,
  InteractionVersion,
  InteractionStatusRow,
  SettingsVersion,
  Job,
  TrailEntry,
  OutboxMessage,
  OutboxDelivery,
];
