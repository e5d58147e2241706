import type { Rule } from '#tests/support/walk-routes.ts';
import { RULES as DOMAIN } from './domain.rules.ts';

const { readVersion } = DOMAIN;
if (!readVersion) throw new Error('A version has no rule: a report has that of its version.');

/** The report of a version is read by those who read the version. */
export const RULES: Record<string, Rule> = { readReport: readVersion };
