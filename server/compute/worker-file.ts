import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

export interface WorkerFile {
  filename: string;
  execArgv: string[];
}

/**
 * Node.js 20 and 22 abort the whole process when a thread is ended while it loads an ES module by require(), which
 * the pool tries first. With this the attempt is refused and the pool falls back to import(), which can be ended.
 */
const WITHOUT_REQUIRE_OF_MODULES = process.allowedNodeEnvironmentFlags.has(
  '--experimental-require-module',
)
  ? ['--no-experimental-require-module']
  : [];

/** A TypeScript worker needs the loader that the parent runs under. */
export function workerFile(path: string): WorkerFile {
  const execArgv = [...WITHOUT_REQUIRE_OF_MODULES];
  if (!path.endsWith('.ts')) return { filename: path, execArgv };
  const loader = pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;
  return { filename: path, execArgv: [...execArgv, '--import', loader] };
}

/** A worker of this folder: beside this file as .ts, or in the bundle, whose shared chunks lie in folders of their own. */
export function workerFileOf(name: 'engine-worker' | 'hash-worker'): WorkerFile {
  const here = fileURLToPath(import.meta.url);
  if (here.endsWith('.ts')) return workerFile(join(dirname(here), `${name}.ts`));
  for (let folder = dirname(here); folder !== dirname(folder); folder = dirname(folder)) {
    const candidate = join(folder, 'compute', `${name}.js`);
    if (existsSync(candidate)) return workerFile(candidate);
  }
  throw new Error(`compute/${name}.js is not in the bundle around ${here}: build the server.`);
}
