import { z } from 'zod';

/** One line or more of text a person typed: trimmed, and free of U+0000, which PostgreSQL cannot store. */
export function textSchema(maximum: number, what: string) {
  return z
    .string(`${what} must be text.`)
    .refine((s) => !s.includes('\u0000'), `${what} contains a NUL character; remove it.`)
    .refine(
      (s) => s.isWellFormed(),
      `${what} contains half of a surrogate pair; retype that character.`,
    )
    .trim()
    .max(maximum, `${what} may have at most ${maximum} characters.`);
}

/** Text that must say something. */
export function requiredTextSchema(maximum: number, what: string) {
  return textSchema(maximum, what).min(1, `${what} is empty; type something.`);
}
