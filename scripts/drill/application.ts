import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { setTimeout as sleep } from 'node:timers/promises';
import { livingPostmaster } from '#scripts/lib/postgres/cluster.mjs';
import { findPlace } from '#scripts/lib/postgres/place.mjs';
import { ROOT } from '#scripts/lib/settings.mjs';

const READY = 'Tallybarn is ready at';
const START_MILLISECONDS = 300_000;

export interface Place {
  dataDir: string;
  port: number;
}

/** What `node scripts/start.mjs` started, and what it said. */
export interface Application {
  child: ChildProcess;
  output: () => string;
  milliseconds: number;
}

/** Starts the application as a service manager would, and waits for its ready line. */
export async function startApplication({ dataDir, port }: Place): Promise<Application> {
  // A shell of a person's own, whatever runs this drill.
  const unset = { DATABASE_URL: undefined, MIGRATION_DATABASE_URL: undefined, NODE_ENV: undefined };
  const where = { DATA_DIR: dataDir, HOST: '127.0.0.1', PORT: String(port), DEMO: '1' };
  const begun = Date.now();
  const child = spawn(process.execPath, [join(ROOT, 'scripts/start.mjs')], {
    env: { ...process.env, ...unset, ...where },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (chunk: Buffer) => (output += chunk.toString()));
  }
  while (!output.includes(READY)) {
    if (child.exitCode !== null || Date.now() - begun > START_MILLISECONDS) {
      child.kill('SIGTERM');
      throw new Error(`The application did not start:\n${output}`);
    }
    await sleep(50);
  }
  return { child, output: () => output, milliseconds: Date.now() - begun };
}

export async function stopApplication({ child }: Application): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const ended = once(child, 'exit');
  child.kill('SIGTERM');
  await ended;
}

export function killOutright(pid: number | undefined): boolean {
  if (pid === undefined) return false;
  try {
    return process.kill(pid, 'SIGKILL');
  } catch (fault) {
    // It died by itself between being looked up and being killed, or is just being started again.
    if (fault instanceof Error && 'code' in fault && fault.code === 'ESRCH') return false;
    throw fault;
  }
}

/** The process a start noted in a file of its DATA_DIR; undefined while it is being started again. */
function notedIn(dataDir: string, file: 'server.json' | 'worker.json'): number | undefined {
  const path = join(dataDir, file);
  if (!existsSync(path)) return undefined;
  return (JSON.parse(readFileSync(path, 'utf8')) as { pid: number }).pid;
}

/** kill -9 of the process that answers requests. */
export function killServer({ dataDir }: Place): boolean {
  return killOutright(notedIn(dataDir, 'server.json'));
}

/** kill -9 of the worker beside the server. */
export function killWorker({ dataDir }: Place): boolean {
  return killOutright(notedIn(dataDir, 'worker.json'));
}

/** kill -9 of the postmaster; its children end when they notice. */
export function killPostgres({ dataDir }: Place): boolean {
  return killOutright(livingPostmaster(findPlace(dataDir).home)?.pid);
}

/** Everything at once, the start script first so that nothing is mended: as near to a power cut as a process can get. */
export async function killEverything(application: Application, place: Place): Promise<void> {
  const ended = once(application.child, 'exit');
  killOutright(application.child.pid);
  killServer(place);
  killPostgres(place);
  await ended;
}
