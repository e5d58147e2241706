import { z } from 'zod';
import { passwordSchema, userSchema } from './users.ts';

export const signInSchema = z.strictObject({
  email: z.string().trim().toLowerCase().min(1, 'Type your e-mail address.').max(254),
  password: z.string().min(1, 'Type your password.').max(200),
});
export const signedInSchema = z.object({ user: userSchema });
/** GET /api/auth/session: who is signed in, and whether the demo banner must be shown. */
export const sessionSchema = z.object({ user: userSchema, demo: z.boolean() });
export type Session = z.infer<typeof sessionSchema>;

export const changePasswordSchema = z.strictObject({
  currentPassword: z.string().min(1, 'Type your current password.').max(200),
  newPassword: passwordSchema,
});

/** What a personal token may do: read only, or everything its owner may. */
export const TOKEN_SCOPES = ['read', 'write'] as const;
export const createTokenSchema = z.strictObject({
  name: z.string().trim().min(1, 'Name the token, so that you know it later.').max(80),
  scope: z.enum(TOKEN_SCOPES),
  expiresInDays: z.int().min(1).max(365),
});
export const tokenSchema = z
  .object({
    id: z.string(),
    name: z.string(),
    scope: z.enum(TOKEN_SCOPES),
    createdAt: z.string(),
    expiresAt: z.string(),
    lastUsedAt: z.string().nullable(),
  })
  .meta({ id: 'Token' });
export type Token = z.infer<typeof tokenSchema>;
/** The secret is shown once and kept only as a hash. */
export const createdTokenSchema = tokenSchema.extend({ secret: z.string() });
