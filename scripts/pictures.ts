/**
 * Makes the pictures of README from the running application: `npm run pictures` with the demo served at BASE_URL
 * (default http://127.0.0.1:4780).
 */
import { mkdirSync } from 'node:fs';
import { chromium } from 'playwright-core';
import type { Browser } from 'playwright-core';

const BASE_URL = process.env.BASE_URL ?? 'http://127.0.0.1:4780';
const FOLDER = 'src/public/pictures';
const CREDENTIALS = { email: 'experimentalist@lowmoor.example', password: 'lowmoor-demo' };
const SHOWN_CASE = 'Forward cone of 1 keV electrons on carbon';
const PLANNED_CASE = 'A shift of alphas on a gold foil, four positions';

interface Picture {
  name: string;
  path: string;
  theme: 'light' | 'dark';
  width: number;
  height: number;
}

async function take(browser: Browser, picture: Picture): Promise<void> {
  const { width, height, theme } = picture;
  const context = await browser.newContext({ viewport: { width, height }, colorScheme: theme });
  const signedIn = await context.request.post(`${BASE_URL}/api/auth/sign-in`, {
    data: CREDENTIALS,
    headers: { origin: BASE_URL },
  });
  if (!signedIn.ok()) throw new Error(`Sign-in answered ${signedIn.status()}: is the demo on?`);
  const page = await context.newPage();
  await page.goto(BASE_URL + picture.path, { waitUntil: 'networkidle' });
  await page.getByRole('heading', { level: 1 }).waitFor();
  // Curves are drawn after their code has come and their answer is in.
  await page.waitForTimeout(1500);
  await page.screenshot({ path: `${FOLDER}/${picture.name}.png` });
  await context.close();
  console.log(`${FOLDER}/${picture.name}.png`);
}

async function idOf(browser: Browser, title: string): Promise<string> {
  const context = await browser.newContext();
  await context.request.post(`${BASE_URL}/api/auth/sign-in`, {
    data: CREDENTIALS,
    headers: { origin: BASE_URL },
  });
  const answer = await context.request.get(`${BASE_URL}/api/cases?q=${encodeURIComponent(title)}`);
  const list = (await answer.json()) as { items: { id: string; title: string }[] };
  await context.close();
  const found = list.items.find((item) => item.title === title);
  if (!found) throw new Error(`The demo has no case "${title}".`);
  return found.id;
}

const browser = await chromium.launch({
  executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run'],
});
try {
  mkdirSync(FOLDER, { recursive: true });
  const shown = `/cases/${await idOf(browser, SHOWN_CASE)}`;
  const planned = `/cases/${await idOf(browser, PLANNED_CASE)}`;
  const wide = { width: 1440, height: 1000 };
  const pictures: Picture[] = [
    { name: 'case-light', path: shown, theme: 'light', ...wide },
    { name: 'golden-rule-dark', path: `${shown}?section=golden-rule`, theme: 'dark', ...wide },
    { name: 'validity-light', path: `${shown}?section=validity`, theme: 'light', ...wide },
    { name: 'run-plan-light', path: `${planned}?section=run-plan`, theme: 'light', ...wide },
    { name: 'cases-light', path: '/cases', theme: 'light', ...wide },
    { name: 'case-narrow', path: shown, theme: 'light', width: 390, height: 844 },
  ];
  for (const picture of pictures) await take(browser, picture);
} finally {
  await browser.close();
}
