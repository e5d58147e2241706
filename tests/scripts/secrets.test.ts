import { chmodSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { ensureSecrets } from '#scripts/lib/secrets.mjs';
import { tempFolder } from './temp-folder.ts';

const modeOf = (path: string) => statSync(path).mode & 0o777;

describe('ensureSecrets', () => {
  test('makes them in a folder and a file nobody else reads, all different', () => {
    const file = join(tempFolder(), 'keys', 'secrets.json');
    const { secrets, made } = ensureSecrets(file);
    expect(modeOf(file)).toBe(0o600);
    expect(modeOf(join(file, '..'))).toBe(0o700);
    expect(made).toHaveLength(4);
    expect(new Set(Object.values(secrets)).size).toBe(4);
    expect(Buffer.from(secrets.signingKey, 'base64url')).toHaveLength(48);
  });

  test('reads the same again, and keeps keys it does not know', () => {
    const file = join(tempFolder(), 'secrets.json');
    writeFileSync(file, JSON.stringify({ mailKey: 'kept', signingKey: 'k'.repeat(64) }));
    const first = ensureSecrets(file).secrets;
    const second = ensureSecrets(file);
    expect(second).toEqual({ secrets: first, made: [] });
    expect(first.signingKey).toBe('k'.repeat(64));
    expect(JSON.parse(readFileSync(file, 'utf8'))).toMatchObject({ mailKey: 'kept' });
  });

  test('takes back rights that others were given', () => {
    const file = join(tempFolder(), 'secrets.json');
    ensureSecrets(file);
    chmodSync(file, 0o644);
    ensureSecrets(file);
    expect(modeOf(file)).toBe(0o600);
  });

  test('a damaged file is refused and left as it is', () => {
    const file = join(tempFolder(), 'secrets.json');
    writeFileSync(file, '{"signingKey": "abc');
    expect(() => ensureSecrets(file)).toThrow(/cannot be read/);
    expect(readFileSync(file, 'utf8')).toBe('{"signingKey": "abc');
  });
});
