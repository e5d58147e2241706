import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

export interface WorkerFile {
  filename: string;
  execArgv: string[];
}

/** A TypeScript worker needs the loader that the parent runs under; a bundled one needs nothing. */
export function workerFile(path: string): WorkerFile {
  if (!path.endsWith('.ts')) return { filename: path, execArgv: [] };
  const loader = pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;
  return { filename: path, execArgv: ['--import', loader] };
}

/** The engine's own worker: beside this file as .ts, or in the bundle, whose shared chunks lie in folders of their own. */
export function engineWorkerFile(): WorkerFile {
  const here = fileURLToPath(import.meta.url);
  if (here.endsWith('.ts')) return workerFile(join(dirname(here), 'engine-worker.ts'));
  for (let folder = dirname(here); folder !== dirname(folder); folder = dirname(folder)) {
    const candidate = join(folder, 'compute', 'engine-worker.js');
    if (existsSync(candidate)) return workerFile(candidate);
  }
  throw new Error(
    `compute/engine-worker.js is not in the bundle around ${here}: build the server.`,
  );
}
