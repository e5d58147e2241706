import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { fileCase } from './case-requests.ts';

let app: TestApp;
let caseId: string;

beforeAll(async () => {
  app = await createTestApp();
  const { agent } = await app.person('experimentalist');
  caseId = (await fileCase(agent)).filed.id;
});
afterAll(() => app.close());

const STATEMENTS = ['case_versions', 'version_statuses'].flatMap((table) => [
  `update ${table} set created_at = now()`,
  `delete from ${table}`,
  `truncate ${table} cascade`,
]);

describe('versions and statuses', () => {
  it.each(STATEMENTS)('the runtime role may not: %s', async (statement) => {
    await expect(query(app.database.runtimeUrl, statement)).rejects.toThrow(/permission denied/);
  });

  it.each(STATEMENTS)('the owner is stopped by the trigger: %s', async (statement) => {
    await expect(query(app.database.ownerUrl, statement)).rejects.toThrow(/only grows/);
  });

  it.each([
    'delete from cases',
    'delete from case_numbers',
    'insert into case_numbers (only_row, last) values (false, 7)',
    'select remove_demo_cases()',
    'alter table case_versions disable trigger all',
  ])('the runtime role may not: %s', async (statement) => {
    await expect(query(app.database.runtimeUrl, statement)).rejects.toThrow(
      /permission denied|must be owner/,
    );
  });

  it('the database alone refuses a second version of the same number', async () => {
    const copy = `insert into case_versions
      select gen_random_uuid(), case_id, n, title, tags, format, document, result, engine, hash, author_id, note, created_at
      from case_versions where case_id = $1`;
    await expect(query(app.database.runtimeUrl, copy, [caseId])).rejects.toThrow(
      /case_versions_case_id_n_key/,
    );
  });
});
