import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { parseConfig, readSigningKey, requireDatabaseUrl } from '#server/config.ts';
import { VERSION } from '#server/version.ts';

test('with nothing set, the defaults of the contract hold', () => {
  expect(parseConfig({})).toMatchObject({
    host: '127.0.0.1',
    port: 4780,
    demo: true,
    https: false,
    publicUrl: undefined,
    databaseUrl: undefined,
    passwordCost: 12,
  });
  expect(parseConfig({ DATA_DIR: '/srv/x' }).secretsFile).toBe('/srv/x/secrets.json');
});

test('an empty variable is as good as none', () => {
  const names = ['HOST', 'DATABASE_URL', 'MIGRATION_DATABASE_URL', 'SECRETS_FILE', 'DEMO'];
  const empty = Object.fromEntries([...names, 'PUBLIC_URL', 'SMTP_URL'].map((name) => [name, '']));
  expect(parseConfig(empty)).toEqual(parseConfig({}));
});

test.each([
  ['PORT', 'http'],
  ['PORT', '65536'],
  ['PORT', '-1'],
  ['PORT', '80.5'],
  ['DEMO', 'yes'],
  ['DATABASE_URL', 'mysql://x'],
  ['MIGRATION_DATABASE_URL', 'localhost'],
  ['PUBLIC_URL', 'tallybarn.example.org'],
  ['PUBLIC_URL', 'ftp://tallybarn.example.org'],
  ['PUBLIC_URL', 'https://example.org/path'],
  ['LOG_LEVEL', 'loud'],
])('%s=%s is refused, and the message names the variable', (name, value) => {
  expect(() => parseConfig({ [name]: value })).toThrow(new RegExp(`^${name} is not usable: `));
});

test('https at the public address makes cookies Secure', () => {
  expect(parseConfig({ PUBLIC_URL: 'https://tallybarn.example.org' }).https).toBe(true);
  expect(parseConfig({ PUBLIC_URL: 'http://tallybarn.example.org' }).https).toBe(false);
});

test('a missing database is said with the mend', () => {
  expect(() => requireDatabaseUrl(parseConfig({}))).toThrow(/DATABASE_URL is not set.*npm start/);
});

test('the signing key must be there and be long', () => {
  const folder = mkdtempSync(join(tmpdir(), 'secrets-'));
  const file = join(folder, 'secrets.json');
  expect(() => readSigningKey(file)).toThrow(/SECRETS_FILE .* cannot be read/);
  for (const text of ['', '{}', '{"signingKey":"short"}', '{"signingKey":5}']) {
    writeFileSync(file, text);
    expect(() => readSigningKey(file)).toThrow(/at least 32 characters/);
  }
  writeFileSync(file, JSON.stringify({ signingKey: 'x'.repeat(64), other: 1 }));
  expect(readSigningKey(file)).toBe('x'.repeat(64));
});

test('the version is that of package.json', () => {
  const file = new URL('../../../package.json', import.meta.url);
  const { version } = JSON.parse(readFileSync(file, 'utf8')) as { version: string };
  expect(VERSION).toBe(version);
});
