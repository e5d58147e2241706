// @ts-check
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { hashInputs } from './inputs-hash.mjs';
import { run } from './processes.mjs';
import { Failure, say } from './say.mjs';

const COMMON = ['shared', 'package.json', 'package-lock.json', 'tsconfig.json'];

/** What each half is made of, and where its compiler is. */
const HALVES = [
  {
    name: 'client',
    inputs: [...COMMON, 'src', 'index.html', 'vite.config.ts', 'tailwind.config.ts'],
    command: ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn'],
  },
  {
    name: 'server',
    inputs: [...COMMON, 'server', 'scripts/lib/build.mjs', 'scripts/lib/bundle-server.mjs'],
    command: ['scripts/lib/bundle-server.mjs'],
  },
];

/**
 * Where the server's processes begin. Outputs keep these paths: server/main.ts becomes dist/server/main.js.
 * @param {string} root
 * @returns {string[]}
 */
export function serverEntries(root) {
  const commands = join(root, 'server/commands');
  const names = existsSync(commands) ? readdirSync(commands).sort() : [];
  const wanted = [
    'server/main.ts',
    'server/worker.ts',
    'server/compute/engine-worker.ts',
    'server/compute/hash-worker.ts',
    ...names.filter((name) => name.endsWith('.ts')).map((name) => `server/commands/${name}`),
  ];
  return wanted.filter((path) => existsSync(join(root, path)));
}

/**
 * Builds what is not built yet, or from other files than those here now.
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {string} root
 */
export async function ensureBuild(shutdown, root) {
  for (const half of HALVES) {
    const folder = join(root, 'dist', half.name);
    const stampFile = join(root, 'dist', `${half.name}.stamp`);
    const stamp = hashInputs(root, half.inputs);
    if (existsSync(stampFile) && existsSync(folder) && readFileSync(stampFile, 'utf8') === stamp) {
      continue;
    }
    say(`Building the ${half.name} …`);
    const [script = '', ...args] = half.command;
    if (!existsSync(join(root, script))) {
      throw new Failure(`${script} is missing`, 'run: npm ci --include=dev');
    }
    mkdirSync(join(root, 'dist'), { recursive: true });
    rmSync(stampFile, { force: true });
    await run(shutdown, process.execPath, [script, ...args], {
      what: `the ${half.name} could not be built`,
      mend: 'the lines above name the file; in an unchanged clone remove node_modules and dist, then run it again',
      cwd: root,
      env: { ...process.env, NODE_ENV: 'production' },
      heartbeat: `building the ${half.name}`,
    });
    writeFileSync(stampFile, stamp);
  }
}
