import type { Page } from 'playwright-core';

export interface ConsoleWatch {
  /** A line that this test expects, such as the browser's own note of a refusal the test provokes. */
  expect: (pattern: RegExp) => void;
  complaints: () => string[];
}

/** The browser notes every refused fetch; asking who is signed in before anybody is, is refused by design. */
const NOBODY_YET = /401 \(Unauthorized\).*\/api\/auth\/session/;

/** Collects errors and warnings of a page, uncaught exceptions and breaches of the content policy among them. */
export function watchConsole(page: Page): ConsoleWatch {
  const lines: string[] = [];
  const expected = [NOBODY_YET];
  page.on('console', (message) => {
    if (message.type() !== 'error' && message.type() !== 'warning') return;
    lines.push(`${message.type()}: ${message.text()} ${message.location().url}`);
  });
  page.on('pageerror', (error) => lines.push(`uncaught: ${error.message}`));
  return {
    expect: (pattern) => expected.push(pattern),
    complaints: () => lines.filter((line) => !expected.some((pattern) => pattern.test(line))),
  };
}
