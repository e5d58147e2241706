import { afterAll, beforeAll, expect, test } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { energyScan, startScan } from './scan-requests.ts';

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(() => app.close());

test('a person with twenty jobs under way is asked to wait', async () => {
  const hasty = await app.signedIn('experimentalist');
  const ids: string[] = [];
  for (let i = 0; i < 20; i += 1) ids.push(await startScan(hasty));
  const refused = await hasty.post('/api/scans').send(energyScan).expect(429);
  expect((refused.body as { detail: string }).detail).toMatch(/20 of your jobs/);
  await hasty.post(`/api/scans/${ids[0]}/cancel`).expect(200);
  ids.push(await startScan(hasty));
  const active = await hasty.get('/api/jobs?active=true&pageSize=5').expect(200);
  expect(active.body).toMatchObject({ total: 20, pageSize: 5 });
  for (const id of ids.slice(1)) await hasty.post(`/api/jobs/${id}/cancel`).expect(200);
  expect((await hasty.get('/api/jobs?active=true').expect(200)).body).toMatchObject({ total: 0 });
  expect((await hasty.get('/api/jobs').expect(200)).body).toMatchObject({ total: 21 });
});
