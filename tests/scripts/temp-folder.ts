import { mkdtempSync, realpathSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onTestFinished } from 'vitest';

/** A folder of the test's own, gone after it. */
export function tempFolder(): string {
  const folder = realpathSync(mkdtempSync(join(tmpdir(), 'tallybarn-scripts-')));
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}
