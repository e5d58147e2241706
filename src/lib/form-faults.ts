import type { z } from 'zod';
import { ApiError } from './api.ts';

/** What is wrong, by the name of the input. */
export type Faults = Readonly<Partial<Record<string, string>>>;

/** The first thing wrong with each input, by the contract the server will use too. */
export function faultsOf(schema: z.ZodType, value: unknown): Faults {
  const faults: Partial<Record<string, string>> = {};
  for (const issue of schema.safeParse(value).error?.issues ?? []) {
    faults[issue.path.join('/')] ??= issue.message;
  }
  return faults;
}

/** What the server refused, under the same names: `/newPassword` becomes `newPassword`. */
export function faultsFrom(error: unknown): Faults {
  if (!(error instanceof ApiError)) return {};
  return Object.fromEntries(error.errors.map(({ path, message }) => [path.slice(1), message]));
}

/** Brings the focus to the first input that is wrong; says whether there was one. */
export function focusFirstFault(form: HTMLFormElement, faults: Faults): boolean {
  const names = Object.keys(faults);
  if (names.length === 0) return false;
  const inputs = [...form.querySelectorAll<HTMLInputElement>('[name]')];
  inputs.find((input) => names.includes(input.name))?.focus();
  return true;
}
