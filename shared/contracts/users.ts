import { z } from 'zod';
import { ROLES } from '#shared/roles.ts';
import { requiredTextSchema } from './text.ts';

/** bcrypt reads at most 72 bytes, so a longer password would be cut silently: refused instead. */
export const passwordSchema = z
  .string()
  .min(12, 'A password needs at least 12 characters.')
  .refine(
    (p) => new TextEncoder().encode(p).length <= 72,
    'A password may be at most 72 bytes long; shorten it.',
  )
  .refine((p) => !p.includes('\u0000'), 'A password may not contain a NUL character.');

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(254)
  .pipe(z.email('Type an e-mail address such as name@example.org.'));

export const userSchema = z
  .object({
    id: z.string(),
    name: z.string(),
    email: z.string(),
    role: z.enum(ROLES),
    active: z.boolean(),
    demo: z.boolean(),
    createdAt: z.string(),
  })
  .meta({ id: 'User' });
export type User = z.infer<typeof userSchema>;

export const createUserSchema = z.strictObject({
  name: requiredTextSchema(120, 'The name'),
  email: emailSchema,
  role: z.enum(ROLES),
  password: passwordSchema,
});
export const updateUserSchema = z
  .strictObject({
    name: requiredTextSchema(120, 'The name'),
    role: z.enum(ROLES),
    active: z.boolean(),
    password: passwordSchema,
  })
  .partial();
