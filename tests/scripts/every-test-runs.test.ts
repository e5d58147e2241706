import { execFileSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { expect, test } from 'vitest';
import { ROOT } from '#scripts/lib/settings.mjs';

test('every test file below tests/ belongs to exactly one project', () => {
  const vitest = join(ROOT, 'node_modules/vitest/vitest.mjs');
  const listed = execFileSync(process.execPath, [vitest, 'list', '--filesOnly', '--json'], {
    cwd: ROOT,
    encoding: 'utf8',
  });
  const projects = JSON.parse(listed) as { file: string }[];
  const files = readdirSync(join(ROOT, 'tests'), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.(test|spec)\.[cm]?[jt]sx?$/.test(name))
    .map((name) => join(ROOT, 'tests', name));
  expect(projects.map(({ file }) => file).sort()).toEqual(files.sort());
});
