import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { findChromium } from '#scripts/lib/chromium.mjs';
import type { Account } from '#server/modules/users/account.entity.ts';
import type { Role } from '#shared/roles.ts';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';
import { createTestApp, type TestApp } from '#tests/support/test-app.ts';
import { watchConsole, type ConsoleWatch } from './console-watch.ts';

/** Chromium as it runs without a display and as root, with nothing of its own on the network. */
const FLAGS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export interface View {
  width?: 1440 | 390;
  theme?: 'light' | 'dark';
}

export interface Visitor {
  context: BrowserContext;
  page: Page;
  console: ConsoleWatch;
  /** Opens an address of the application and waits until its heading stands. */
  goTo: (path: string) => Promise<void>;
}

export interface Stage {
  app: TestApp;
  browser: Browser;
  /** Somebody at a browser of their own: nobody yet, or signed in as a new account of a role, or as this one. */
  visitor: (who?: Role | Account, view?: View) => Promise<Visitor>;
  /** Fails when any page said something unexpected on its console; closes the pages. */
  settle: () => Promise<void>;
  close: () => Promise<void>;
}

function builtClient(): string {
  const folder = process.env['CLIENT_DIR'] ?? join(process.cwd(), 'dist/client');
  if (existsSync(join(folder, 'index.html'))) return folder;
  throw new Error(
    `No built client in ${folder}: run \`npx vite build\` first (\`npm test\` does).`,
  );
}

function launch(): Promise<Browser> {
  const executablePath = findChromium();
  if (!executablePath) throw new Error('Chromium is missing: `npm test` installs it.');
  return chromium.launch({ executablePath, args: FLAGS });
}

/** Hands a signed-in session to the browser, as the cookies of a real sign-in. */
async function signInContext(context: BrowserContext, app: TestApp, account: Account) {
  const answer = await context.request.post(`${app.url}/api/auth/sign-in`, {
    data: { email: account.email, password: TEST_PASSWORD },
    headers: { origin: app.url },
  });
  if (!answer.ok()) throw new Error(`Sign-in answered ${answer.status()}: ${await answer.text()}`);
}

/** The built client on the real application on a private database, and a browser in front of it. */
export async function openStage(): Promise<Stage> {
  const app = await createTestApp({ config: { clientDir: builtClient() } });
  const browser = await launch();
  let visitors: Visitor[] = [];

  async function visitor(who?: Role | Account, view: View = {}): Promise<Visitor> {
    const { width = 1440, theme = 'light' } = view;
    const context = await browser.newContext({
      baseURL: app.url,
      viewport: { width, height: width === 390 ? 844 : 900 },
      colorScheme: theme,
      reducedMotion: 'reduce',
      permissions: ['clipboard-read', 'clipboard-write'],
    });
    context.setDefaultTimeout(15_000);
    if (who) {
      const account = typeof who === 'string' ? await makeAccount(app.em(), { role: who }) : who;
      await signInContext(context, app, account);
    }
    const page = await context.newPage();
    const someone: Visitor = {
      context,
      page,
      console: watchConsole(page),
      async goTo(path) {
        await page.goto(path);
        await page.locator('h1').first().waitFor();
      },
    };
    visitors.push(someone);
    return someone;
  }

  return {
    app,
    browser,
    visitor,
    async settle() {
      const done = visitors;
      visitors = [];
      const complaints = done.flatMap((someone) => someone.console.complaints());
      await Promise.all(done.map((someone) => someone.context.close()));
      if (complaints.length > 0) {
        throw new Error(`Unexpected on the console of the page:\n${complaints.join('\n')}`);
      }
    },
    async close() {
      await browser.close();
      await app.close();
    },
  };
}
