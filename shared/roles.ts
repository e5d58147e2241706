/** Roles and the one table of what each may do. Ownership is decided by `can` on the server, and there only. */
export const ROLES = ['experimentalist', 'theorist', 'manager', 'administrator'] as const;
export type Role = (typeof ROLES)[number];

export const ROLE_LABELS: Record<Role, string> = {
  experimentalist: 'Experimentalist',
  theorist: 'Theorist',
  manager: 'Lab manager',
  administrator: 'Administrator',
};

/**
 * How far a permission reaches: `any` resource, only an `own` one, one the actor is `involved` in
 * (owner or member of its campaign), or `none`.
 */
export type Reach = 'any' | 'involved' | 'own' | 'none';

export const ACTIONS = [
  'estimate.compute',
  'reference.read',
  'case.list',
  'case.create',
  'case.read',
  'case.write',
  'case.withdraw',
  'campaign.list',
  'scan.create',
  'job.list',
  'job.read',
  'job.cancel',
  'interaction.read',
  'interaction.publish',
  'interaction.retire',
  'settings.read',
  'settings.write',
  'session.own',
  'token.own',
  'user.list',
  'user.write',
] as const;
export type Action = (typeof ACTIONS)[number];

const everyone = {
  'estimate.compute': 'any',
  'reference.read': 'any',
  'session.own': 'own',
  'token.own': 'own',
  'campaign.list': 'any',
  'interaction.read': 'any',
  'interaction.publish': 'none',
  'interaction.retire': 'none',
  'settings.read': 'any',
  'settings.write': 'none',
} as const satisfies Partial<Record<Action, Reach>>;

const researcher = {
  ...everyone,
  'case.list': 'any',
  'case.create': 'any',
  'case.read': 'involved',
  'case.write': 'involved',
  'case.withdraw': 'own',
  'scan.create': 'any',
  'job.list': 'any',
  'job.read': 'involved',
  'job.cancel': 'own',
  'user.list': 'none',
  'user.write': 'none',
} as const satisfies Record<Action, Reach>;

/** The table. An administrator reads no case; a lab manager reads all and writes their own; a theorist keeps the library. */
export const PERMISSIONS: Record<Role, Record<Action, Reach>> = {
  experimentalist: researcher,
  theorist: { ...researcher, 'interaction.publish': 'any', 'interaction.retire': 'own' },
  manager: {
    ...researcher,
    'case.read': 'any',
    'case.write': 'own',
    'job.read': 'any',
    'job.cancel': 'any',
    'interaction.retire': 'any',
  },
  administrator: {
    ...everyone,
    'case.list': 'none',
    'case.create': 'none',
    'case.read': 'none',
    'case.write': 'none',
    'case.withdraw': 'none',
    'scan.create': 'none',
    'job.list': 'none',
    'job.read': 'none',
    'job.cancel': 'none',
    'user.list': 'any',
    'user.write': 'any',
    'settings.write': 'any',
  },
};
