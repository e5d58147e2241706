import type { AppConfig } from '#server/config.ts';

const FORWARDING = ['forwarded', 'via', 'x-real-ip'];
const LOCAL_HOST = /^(localhost|127(\.\d{1,3}){3}|\[::1\])(:\d+)?$/i;

/**
 * Everyone knows the passwords of the demo: its accounts are open on the machine itself only, never through a
 * proxy, and never under a foreign name that was made to point here.
 */
export function demoAccountsUsable(
  config: Pick<AppConfig, 'demoAccountsOpen'>,
  headers: Readonly<Record<string, string | string[] | undefined>>,
): boolean {
  const forwarded = Object.keys(headers).some(
    (name) => FORWARDING.includes(name) || name.startsWith('x-forwarded-'),
  );
  const { host } = headers;
  return config.demoAccountsOpen && !forwarded && typeof host === 'string' && LOCAL_HOST.test(host);
}
