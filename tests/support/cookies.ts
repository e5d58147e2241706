import type { Response } from 'supertest';

/** Cookies an answer sets, by name; a removed one is the empty text. */
export function cookiesOf(answer: Response): Record<string, string> {
  const lines = answer.get('Set-Cookie') ?? [];
  return Object.fromEntries(
    lines.map((line) => {
      const [pair = ''] = line.split(';');
      const at = pair.indexOf('=');
      return [pair.slice(0, at), decodeURIComponent(pair.slice(at + 1))];
    }),
  );
}

export function cookieHeader(cookies: Record<string, string>): string {
  return Object.entries(cookies)
    .map(([name, value]) => `${name}=${value}`)
    .join('; ');
}
