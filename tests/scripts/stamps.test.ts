import { mkdirSync, renameSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { hashInputs } from '#scripts/lib/inputs-hash.mjs';
import { isInstalled, packagesStamp } from '#scripts/lib/packages.mjs';
import { tempFolder } from './temp-folder.ts';

describe('hashInputs', () => {
  const paths = ['src', 'index.html', 'absent'];

  function project(): string {
    const root = tempFolder();
    mkdirSync(join(root, 'src/deep'), { recursive: true });
    writeFileSync(join(root, 'src/deep/a.ts'), 'one');
    writeFileSync(join(root, 'index.html'), 'page');
    return root;
  }

  test('is that of the contents, not of place or clock', () => {
    const [one, other] = [project(), project()];
    utimesSync(join(other, 'index.html'), 1, 1);
    expect(hashInputs(one, paths)).toBe(hashInputs(other, paths));
  });

  test('changes with a content, a name, and a new file', () => {
    const root = project();
    const hashes = [hashInputs(root, paths)];
    writeFileSync(join(root, 'src/deep/a.ts'), 'two');
    hashes.push(hashInputs(root, paths));
    renameSync(join(root, 'src/deep/a.ts'), join(root, 'src/deep/b.ts'));
    hashes.push(hashInputs(root, paths));
    writeFileSync(join(root, 'absent'), '');
    hashes.push(hashInputs(root, paths));
    expect(new Set(hashes).size).toBe(4);
  });

  test('what one file ends with is not what the next begins with', () => {
    const [one, other] = [tempFolder(), tempFolder()];
    writeFileSync(join(one, 'a'), 'x\nb\n1\ny');
    writeFileSync(join(other, 'a'), 'x');
    writeFileSync(join(other, 'b'), 'y');
    expect(hashInputs(one, ['a', 'b'])).not.toBe(hashInputs(other, ['a', 'b']));
  });
});

describe('isInstalled', () => {
  const lock = JSON.stringify({
    packages: {
      '': { version: '0.1.0' },
      'node_modules/a': { version: '1.0.0' },
      'node_modules/for-other-machines': { version: '2.0.0', optional: true },
    },
  });
  const installed = (version: string) =>
    JSON.stringify({ packages: { 'node_modules/a': { version } } });

  test('every package at its version; those for other machines may be missing', () => {
    expect(isInstalled(lock, installed('1.0.0'))).toBe(true);
    expect(isInstalled(lock, installed('1.0.1'))).toBe(false);
    expect(isInstalled(lock, JSON.stringify({ packages: {} }))).toBe(false);
  });

  test('nothing installed, or an installation cut short, is not', () => {
    expect(isInstalled(lock, '')).toBe(false);
  });

  test('the stamp changes with the lock file', () => {
    expect(packagesStamp(lock)).not.toBe(packagesStamp(`${lock} `));
  });
});
