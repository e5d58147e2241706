import type { IncomingHttpHeaders } from 'node:http';
import { DomainError } from '#shared/errors.ts';

function sameOrigin(origin: string, host: string | undefined, publicUrl: URL | undefined): boolean {
  if (!URL.canParse(origin)) return false;
  const from = new URL(origin);
  if (publicUrl && from.origin === publicUrl.origin) return true;
  return host !== undefined && /^https?:$/.test(from.protocol) && from.host === host.toLowerCase();
}

/**
 * The defence against requests another site makes in a person's browser. A browser names the origin of every
 * such request, so a foreign one is always refused; one without any is refused where a cookie would be believed.
 */
export function checkOrigin(
  headers: IncomingHttpHeaders,
  { publicUrl, needed }: { publicUrl: URL | undefined; needed: boolean },
): void {
  const { origin, host } = headers;
  const site = headers['sec-fetch-site'];
  if (origin !== undefined) {
    if (sameOrigin(origin, host, publicUrl)) return;
    throw new DomainError(
      'forbidden',
      `Requests from ${origin.slice(0, 200)} are not accepted; use the application at its own address (behind a proxy, set PUBLIC_URL to it).`,
    );
  }
  if (site === 'same-origin' || site === 'none') return;
  if (site !== undefined || needed) {
    throw new DomainError(
      'forbidden',
      'With a session cookie, a request that changes something must name its origin: send the header Origin, or use a personal token.',
    );
  }
}
