// @ts-check
import { existsSync } from 'node:fs';

/** @returns {string | undefined} Debian's browser */
export function findChromium() {
  return ['/usr/bin/chromium', '/usr/bin/chromium-browser'].find((path) => existsSync(path));
}
