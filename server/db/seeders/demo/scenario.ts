import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Role } from '#shared/roles.ts';
import { ROLE_LABELS, ROLES } from '#shared/roles.ts';

/** Everything here is invented: the Lowmoor Beam Hall, its accounts and its campaigns. Accounts carry role names, not people's. */
export interface DemoAccount {
  role: Role;
  name: string;
  email: string;
}
export const DEMO_PASSWORD = 'lowmoor-demo';
export const DEMO_ACCOUNTS: readonly DemoAccount[] = ROLES.map((role) => ({
  role,
  name: ROLE_LABELS[role],
  email: `${role === 'administrator' ? 'admin' : role}@lowmoor.example`,
}));

/** The campaigns differ in their members, so that sharing can be seen by signing in as one and the other. */
export const DEMO_CAMPAIGNS = {
  carbon: { name: 'Carbon film survey', members: ['experimentalist', 'theorist'] },
  gold: { name: 'Light ions on gold', members: ['experimentalist'] },
  neutrons: { name: 'Thermal neutron port', members: ['theorist'] },
  theory: { name: 'Beyond the hall: reference cases', members: ['theorist'] },
} as const satisfies Record<string, { name: string; members: readonly Role[] }>;
export type DemoCampaign = keyof typeof DEMO_CAMPAIGNS;

/** One version of a worked case: what changed stands in its note. */
export interface DemoVersion {
  author: Role;
  note: string;
  document: CaseDocument;
}
export interface DemoCase {
  title: string;
  tags: string[];
  campaign: DemoCampaign | null;
  /** The author of the first version owns the case. */
  versions: readonly [DemoVersion, ...DemoVersion[]];
}
