// @ts-check
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { findChromium } from './lib/chromium.mjs';
import { installDebianPackages } from './lib/debian.mjs';
import { hasPoppler } from './lib/poppler.mjs';
import { checkNode, prepareClone } from './lib/prepare.mjs';
import { findBinaries } from './lib/postgres/binaries.mjs';
import { startTestCluster } from './lib/postgres/test-cluster.mjs';
import { run } from './lib/processes.mjs';
import { Failure, describeFailure, say } from './lib/say.mjs';
import { ROOT } from './lib/settings.mjs';
import { Stopped, live } from './lib/shutdown.mjs';
import { countTests } from './lib/test-report.mjs';

/** @typedef {import('./lib/shutdown.mjs').Shutdown} Shutdown */

const CHECKS = [
  { name: 'types', command: ['node_modules/typescript/bin/tsc', '--noEmit'] },
  { name: 'lint', command: ['node_modules/eslint/bin/eslint.js', '.'] },
  { name: 'format', command: ['node_modules/prettier/bin/prettier.cjs', '--check', '.'] },
];

/** @param {Shutdown} shutdown */
async function installWhatIsMissing(shutdown) {
  const missing = [
    ...(findBinaries().length === 0 ? ['postgresql'] : []),
    ...(findChromium() === undefined ? ['chromium', 'fonts-liberation'] : []),
    ...(hasPoppler() ? [] : ['poppler-utils']),
  ];
  await installDebianPackages(shutdown, missing);
}

/**
 * One step of the tests: says whether it passed, and leaves the rest to the next ones.
 * @param {string} name
 * @param {() => Promise<unknown>} work
 * @returns {Promise<boolean>}
 */
async function passes(name, work) {
  const began = Date.now();
  say(`— ${name} …`);
  try {
    await work();
    say(`  ${name}: passed (${Math.round((Date.now() - began) / 1000)} s)`);
    return true;
  } catch (error) {
    if (error instanceof Stopped) throw error;
    say(error instanceof Failure ? `  ${error.message}` : describeFailure(error));
    say(`  ${name}: FAILED`);
    return false;
  }
}

/**
 * @param {Shutdown} shutdown
 * @param {readonly string[]} filters
 */
async function runTests(shutdown, filters) {
  const { adminUrl, stop } = await startTestCluster(shutdown);
  const file = join(ROOT, '.test/vitest.json');
  mkdirSync(join(ROOT, '.test'), { recursive: true });
  rmSync(file, { force: true });
  const args = [
    ...['node_modules/vitest/vitest.mjs', 'run', '--reporter=default'],
    ...['--reporter=json', `--outputFile.json=${file}`, ...filters],
  ];
  const plain = process.stdout.isTTY ? { FORCE_COLOR: '1' } : { NO_COLOR: '1' };
  const endedWell = await passes('tests', () =>
    run(shutdown, process.execPath, args, {
      what: 'some tests failed',
      mend: 'the lines above name them',
      cwd: ROOT,
      env: { ...process.env, ...plain, NODE_ENV: 'test', TEST_DATABASE_ADMIN_URL: adminUrl },
      echo: true,
      stopWith: [
        ['SIGINT', 5_000],
        ['SIGTERM', 5_000],
        ['SIGKILL', 5_000],
      ],
    }),
  );
  await stop();
  const report = existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined;
  return countTests(report, endedWell);
}

/**
 * @param {Shutdown} shutdown
 * @param {readonly string[]} filters
 * @returns {Promise<{ passed: number, failed: number }>}
 */
async function checkEverything(shutdown, filters) {
  let passed = 0;
  let failed = 0;
  for (const { name, command } of filters.length === 0 ? CHECKS : []) {
    const options = { what: `${name}: see the lines above`, mend: '', cwd: ROOT, echo: true };
    if (await passes(name, () => run(shutdown, process.execPath, command, options))) passed += 1;
    else failed += 1;
  }
  if (!(await passes('build', () => prepareClone(shutdown)))) failed += 1;
  const tests = await runTests(shutdown, filters);
  if (tests.passed + tests.failed === 0) {
    say('No test ran, which counts as failed.');
    failed += 1;
  }
  if (filters.length === 0 && tests.skipped > 0) {
    say(`${tests.skipped} tests were skipped, which counts as failed.`);
    failed += tests.skipped;
  }
  return { passed: passed + tests.passed, failed: failed + tests.failed };
}

// npm test: everything. npm test -- FILTER …: the tests named alone, without the static checks.
await live(async (shutdown) => {
  const counts = { passed: 0, failed: 1 };
  try {
    checkNode();
    await installWhatIsMissing(shutdown);
    await prepareClone(shutdown, { build: false });
    Object.assign(counts, await checkEverything(shutdown, process.argv.slice(2)));
  } catch (error) {
    if (shutdown.isRequested) throw error;
    say(describeFailure(error));
  }
  say(`${counts.passed} passed, ${counts.failed} failed`);
  return counts.failed === 0 ? 0 : 1;
});
