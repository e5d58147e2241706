import { parse, serialize } from 'cookie';

export interface CookieNames {
  session: string;
  renewal: string;
}

/** Under https the prefix binds the cookies to this host and to Secure; on plain http it would forbid them. */
export function cookieNames(https: boolean): CookieNames {
  const prefix = https ? '__Host-' : '';
  return { session: `${prefix}tallybarn`, renewal: `${prefix}tallybarn-renewal` };
}

export function readCookies(header: string | string[] | undefined): Record<string, string> {
  const found: Record<string, string> = {};
  const text = Array.isArray(header) ? header.join('; ') : (header ?? '');
  for (const [name, value] of Object.entries(parse(text))) {
    if (value !== undefined) found[name] = value;
  }
  return found;
}

/** A Set-Cookie line no script can read and no foreign form can use. Zero seconds remove the cookie. */
export function cookieLine(
  name: string,
  value: string,
  { https, seconds }: { https: boolean; seconds: number },
): string {
  return serialize(name, value, {
    httpOnly: true,
    sameSite: 'lax',
    secure: https,
    path: '/',
    maxAge: Math.max(0, Math.floor(seconds)),
  });
}
