import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { describe, expect, onTestFinished, test } from 'vitest';
import { identify, isSameAndRunning } from '#scripts/lib/identity.mjs';
import { takeLock } from '#scripts/lib/lock.mjs';
import { tempFolder } from './temp-folder.ts';

async function sleeper(): Promise<number> {
  const child = spawn('sleep', ['60']);
  onTestFinished(() => void child.kill('SIGKILL'));
  await once(child, 'spawn');
  if (child.pid === undefined) throw new Error('no process');
  return child.pid;
}

describe('takeLock', () => {
  test('a living holder keeps it and is named', async () => {
    const path = join(tempFolder(), 'lock');
    const pid = await sleeper();
    writeFileSync(path, JSON.stringify(identify(pid)));
    expect(await takeLock(path)).toMatchObject({ holder: { pid } });
  });

  test('the lock of a killed holder is taken over', async () => {
    const path = join(tempFolder(), 'lock');
    const child = spawn('sleep', ['60']);
    await once(child, 'spawn');
    writeFileSync(path, JSON.stringify(identify(child.pid ?? 0)));
    child.kill('SIGKILL');
    await once(child, 'exit');
    expect(await takeLock(path)).toHaveProperty('release');
  });

  test('a number that went to another process does not hold it', async () => {
    const path = join(tempFolder(), 'lock');
    writeFileSync(path, JSON.stringify({ ...identify(await sleeper()), startedAt: '1' }));
    expect(await takeLock(path)).toHaveProperty('release');
  });

  test('a file cut short is no lock', async () => {
    const path = join(tempFolder(), 'lock');
    writeFileSync(path, '{"pid": 1');
    expect(await takeLock(path)).toHaveProperty('release');
  });

  test('of many at once one wins, also over a dead holder, and nothing is left after release', async () => {
    const folder = tempFolder();
    const path = join(folder, 'lock');
    for (const stale of [false, true]) {
      if (stale) writeFileSync(path, JSON.stringify({ pid: 999_999_999, startedAt: '', boot: '' }));
      const outcomes = await Promise.all(Array.from({ length: 12 }, () => takeLock(path)));
      const won = outcomes.filter((outcome) => 'release' in outcome);
      expect(won).toHaveLength(1);
      expect(JSON.parse(readFileSync(path, 'utf8'))).toMatchObject({ pid: process.pid });
      for (const outcome of won) outcome.release();
      expect(readdirSync(folder)).toEqual([]);
    }
  });
});

test('a process that ended is not running, and this one is', async () => {
  const child = spawn('true');
  await once(child, 'spawn');
  const identity = identify(child.pid ?? 0);
  await once(child, 'exit');
  expect(isSameAndRunning(identity)).toBe(false);
  expect(isSameAndRunning(identify(process.pid))).toBe(true);
});
