import type { z } from 'zod';

type RawIssue = Parameters<z.core.$ZodErrorMap>[0];

const WORDS: Record<string, string> = {
  string: 'text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  object: 'an object',
  record: 'an object',
  null: 'null',
};

function kindOf(value: unknown): string {
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'boolean') return String(value);
  return WORDS[typeof value] ?? typeof value;
}

/** Words for the faults whose schema brings none of its own. */
export const issueMessages: z.core.$ZodErrorMap = (issue: RawIssue) => {
  if (issue.code === 'invalid_type') {
    const expected = WORDS[issue.expected] ?? issue.expected;
    if (issue.input === undefined) return `This is missing; give ${expected}.`;
    return `This must be ${expected}, not ${kindOf(issue.input)}.`;
  }
  if (issue.code === 'invalid_value') {
    const allowed = issue.values.map((value) => JSON.stringify(value)).join(', ');
    const lead = issue.input === undefined ? 'This is missing' : 'This is not one of the choices';
    return `${lead}; allowed: ${allowed}.`;
  }
  return undefined;
};
