import { createHash, randomBytes } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { z } from 'zod';

export const SESSION_TOKEN_SECONDS = 600;

const payloadSchema = z.object({ sub: z.uuid(), sid: z.uuid() });

/** A short-lived signed name of a session; the session itself is looked up on every request. */
export function signSessionToken(
  { accountId, sessionId }: { accountId: string; sessionId: string },
  key: string,
  now: Date,
): string {
  const issued = Math.floor(now.getTime() / 1000);
  return jwt.sign(
    { sub: accountId, sid: sessionId, iat: issued, exp: issued + SESSION_TOKEN_SECONDS },
    key,
    { algorithm: 'HS256' },
  );
}

/** The session a token names; undefined where it is forged, expired, of another algorithm, or no token. */
export function readSessionToken(
  token: string | undefined,
  key: string,
  now: Date,
): { accountId: string; sessionId: string } | undefined {
  if (token === undefined) return undefined;
  try {
    const payload = payloadSchema.parse(
      jwt.verify(token, key, {
        algorithms: ['HS256'],
        clockTimestamp: Math.floor(now.getTime() / 1000),
      }),
    );
    return { accountId: payload.sub, sessionId: payload.sid };
  } catch (fault) {
    if (fault instanceof jwt.JsonWebTokenError || fault instanceof z.ZodError) return undefined;
    throw fault;
  }
}

/** 256 random bits that fit a header. */
export function newSecret(prefix = ''): string {
  return prefix + randomBytes(32).toString('base64url');
}

/** Secrets of 256 random bits need no slow hash: nobody can try them all. */
export function hashSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}
