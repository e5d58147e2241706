import { ROLE_LABELS, ROLES, type Role } from '#shared/roles.ts';

export const ROLE_CHOICES = ROLES.map((role) => ({ value: role, label: ROLE_LABELS[role] }));

export const ROLE_WORDS: Record<Role, string> = {
  experimentalist: 'Creates cases, edits their own and those of their campaigns.',
  theorist: 'Creates cases, edits their own and those of their campaigns.',
  manager: 'Reads every case, writes their own.',
  administrator: 'Keeps accounts and settings; reads no case.',
};
