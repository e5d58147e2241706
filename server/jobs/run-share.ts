import { DomainError } from '#shared/errors.ts';
import { isDatabaseAway } from '#server/db/faults.ts';
import { finiteJson } from '#server/http/finite-json.ts';
import { VERSION } from '#server/version.ts';
import { Keeper, LetGo, persistently } from './keeper.ts';
import type { ShareContext } from './keeper.ts';
import type { JobKind, OpenJob, PartTools } from './job-kind.ts';
import { JOB_KINDS } from './kinds.ts';
import { failJob, findParts, keepShare, keptParts, partValues, releaseShare } from './shares.ts';
import type { Part, Share } from './shares.ts';

const HEARTBEAT_MILLISECONDS = 700;
/** Two parts are with the thread at once, so that it never waits for the way to and fro. */
const AHEAD = 2;
/** Workers lost on one share before its job is given up: it would end every worker in turn. */
const MOST_LOSSES = 5;

/** A fault of the work itself, not of what keeps it: another worker would meet it too. */
class WorkFault extends Error {
  override readonly name = 'WorkFault';
}

async function theWork<T>(work: () => Promise<T> | T): Promise<T> {
  try {
    return await work();
  } catch (cause) {
    throw new WorkFault('the work itself failed', { cause });
  }
}

/** Gives signs of life for a share; `lost` aborts when it is another's, or its job no longer runs. A wanted one is handed back between parts. */
function watchShare(share: Share, { em, logger }: ShareContext) {
  const lost = new AbortController();
  let beating = false;
  let wanted = false;
  const beat = async () => {
    if (beating) return;
    beating = true;
    try {
      const state = await keepShare(em(), share);
      wanted = state === 'wanted';
      if (state === 'lost') lost.abort();
    } catch (fault) {
      // Whether the share is still ours shows when the database is back.
      if (!isDatabaseAway(fault)) logger.error({ err: fault }, 'no sign of life could be given');
    } finally {
      beating = false;
    }
  };
  const timer = setInterval(() => void beat(), HEARTBEAT_MILLISECONDS);
  return { lost: lost.signal, isWanted: () => wanted, end: () => clearInterval(timer) };
}

/** Parts of the share that are to be computed still, after those that were computed before under the same content. */
async function missingParts(share: Share, job: OpenJob, context: ShareContext, keeper: Keeper) {
  const kept = await persistently(() => keptParts(context.em(), share), context);
  const numbers = Array.from({ length: share.end - share.first }, (_, i) => share.first + i);
  const missing = numbers
    .filter((n) => !kept.has(n))
    .map((n) => ({ n, contentHash: job.contentHash?.(n) ?? null }));
  const hashes = missing.flatMap(({ contentHash }) => contentHash ?? []);
  const known = await persistently(() => findParts(context.em(), hashes), context);
  const fresh: typeof missing = [];
  for (const part of missing) {
    const found = part.contentHash === null ? undefined : known.get(part.contentHash);
    if (found) await keeper.add({ ...found, n: part.n });
    else fresh.push(part);
  }
  return fresh;
}

async function computeParts(
  share: Share,
  job: OpenJob,
  context: ShareContext,
  tools: PartTools,
  isWanted: () => boolean,
): Promise<Keeper> {
  const keeper = new Keeper(share, context);
  const underWay: Promise<Part>[] = [];
  const begin = ({ n, contentHash }: { n: number; contentHash: string | null }) => {
    const part = theWork(async () => {
      const value = await job.part(n, tools);
      finiteJson(value);
      return { n, contentHash, engine: VERSION, value };
    });
    // Looked at in its turn; meanwhile its failure is nobody's.
    part.catch(() => undefined);
    underWay.push(part);
  };
  const collect = async () => {
    const part = await underWay.shift();
    tools.signal.throwIfAborted();
    if (part) await keeper.add(part);
  };
  for (const missing of await missingParts(share, job, context, keeper)) {
    tools.signal.throwIfAborted();
    if (isWanted()) break;
    begin(missing);
    if (underWay.length >= AHEAD) await collect();
  }
  while (underWay.length > 0) await collect();
  if (isWanted()) {
    await keeper.keep();
    throw new LetGo('another job has its turn');
  }
  return keeper;
}

async function work(
  share: Share,
  context: ShareContext,
  tools: PartTools,
  isWanted: () => boolean,
): Promise<void> {
  const kind: JobKind = JOB_KINDS[share.kind];
  if (share.first < share.end) {
    const job = await theWork(() => kind.open(share.input));
    const keeper = await computeParts(share, job, context, tools, isWanted);
    await keeper.keep({ finished: true });
    return;
  }
  const parts = await persistently(() => partValues(context.em(), share.jobId), context);
  const result = await theWork(() => kind.finish?.(share.input, parts, tools));
  tools.signal.throwIfAborted();
  await new Keeper(share, context).keep({ finished: true, result });
}

function wordsOf(fault: unknown): string {
  if (fault instanceof DomainError) return fault.message;
  return 'Something went wrong on our side; the log of the worker has the details.';
}

/**
 * Computes one share to its end. Left in the middle, by a stop, for another job's turn or because it was lost, what was computed
 * is kept and the rest is free for others; a fault of the work itself ends the job.
 */
export async function runShare(share: Share, context: ShareContext): Promise<void> {
  const { em, logger, stopping } = context;
  const log = logger.child({ job: share.jobId, share: share.n, attempt: share.attempt });
  if (share.losses >= MOST_LOSSES) {
    const words = `It was given up: ${share.losses} workers ended or fell silent on the same share of it.`;
    await persistently(() => failJob(em(), share, words), context);
    log.error(words);
    return;
  }
  const { lost, isWanted, end } = watchShare(share, context);
  const signal = AbortSignal.any([lost, stopping]);
  try {
    await work(share, context, { compute: context.compute, signal }, isWanted);
  } catch (fault) {
    if (lost.aborted || fault instanceof LetGo || stopping.aborted) {
      log.info('the share was let go');
      // Without effect where it is another worker's by now.
      await releaseShare(em(), share).catch((err: unknown) => {
        log.warn({ err }, 'the share could not be given back; another worker takes it in seconds');
      });
    } else if (fault instanceof WorkFault) {
      log.error({ err: fault.cause }, 'the job failed');
      await persistently(() => failJob(em(), share, wordsOf(fault.cause)), context);
    } else {
      // Not given back: it counts as a loss when it is taken again, so that this has an end.
      log.error({ err: fault }, 'the share could not be kept');
    }
  } finally {
    end();
  }
}
