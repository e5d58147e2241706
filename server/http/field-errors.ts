import type { z } from 'zod';
import type { FieldError } from '#shared/errors.ts';
import { jsonPointer } from './json-pointer.ts';

type Issue = z.core.$ZodIssue;
type UnionIssue = Extract<Issue, { code: 'invalid_union' }>;

const MAX_REPORTED = 50;
const NOT_THIS_SHAPE = 100;

/**
 * How far an input is from a branch of a union: a wrong kind of thing is not this branch at all; keys missing
 * or unknown and a failed literal speak against it; a wrong value inside the right shape speaks for it.
 */
function distance(issues: readonly Issue[]): number {
  let sum = 0;
  for (const issue of issues) {
    const atRoot = issue.path.length === 0;
    if (issue.code === 'invalid_type' && atRoot) return NOT_THIS_SHAPE;
    if (issue.code === 'unrecognized_keys') sum += 2 * issue.keys.length;
    else if (issue.code === 'invalid_type' && issue.input === undefined) sum += 2;
    else if (issue.code === 'invalid_value' && issue.values.length === 1) sum += 4;
    else if (issue.code === 'invalid_union' && issue.input === undefined) sum += 2;
    else sum += 0.5;
  }
  return sum;
}

function nearestBranch(issue: UnionIssue): readonly Issue[] | undefined {
  const ranked = issue.errors
    .map((issues) => ({ issues, far: distance(issues) }))
    .filter(({ issues, far }) => issues.length > 0 && far < NOT_THIS_SHAPE)
    .sort((a, b) => a.far - b.far);
  return ranked[0]?.issues;
}

function flatten(issue: Issue, prefix: readonly PropertyKey[]): FieldError[] {
  const path = [...prefix, ...issue.path];
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({
      path: jsonPointer([...path, key]),
      message: `The key "${key}" is not known here; remove it or check its spelling.`,
    }));
  }
  if (issue.code === 'invalid_union') {
    const branch = nearestBranch(issue);
    if (branch) return branch.flatMap((inner) => flatten(inner, path));
  }
  if (issue.code === 'invalid_key' || issue.code === 'invalid_element') {
    return issue.issues.flatMap((inner) => flatten(inner, path));
  }
  return [{ path: jsonPointer(path), message: issue.message }];
}

/** What a person can act upon: of a union the faults of the branch that was meant, unknown keys by name. */
export function fieldErrors(issues: readonly Issue[]): FieldError[] {
  return issues
    .slice(0, MAX_REPORTED)
    .flatMap((issue) => flatten(issue, []))
    .slice(0, MAX_REPORTED);
}
