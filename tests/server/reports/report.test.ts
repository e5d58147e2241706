import { afterAll, beforeAll, expect, test } from 'vitest';
import type { VersionDetail } from '#shared/contracts/cases.ts';
import { formatNumber } from '#shared/units/format.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { fileCase, read, save } from '../cases/case-requests.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';
import { citing, publish } from '../library/library-requests.ts';
import { readPdf } from '#tests/support/read-pdf.ts';
import { runPlanOf } from './saved-versions.ts';

let app: TestApp;
let agent: Agent;
beforeAll(async () => {
  app = await createTestApp();
  ({ agent } = await app.person('experimentalist'));
});
afterAll(() => app.close());

const document = { ...yukawaDocument, runPlan: runPlanOf(2) };

async function fileWith(who: Agent, path: string) {
  const answer = await who
    .get(path)
    .buffer(true)
    .parse((res, done) => {
      const pieces: Buffer[] = [];
      res.on('data', (piece: Buffer) => pieces.push(piece));
      res.on('end', () => done(null, Buffer.concat(pieces)));
    });
  return { answer, bytes: answer.body as Buffer };
}

test('the report of a version is a file made of what that version stored', async () => {
  const { filed, etag } = await fileCase(agent, { document });
  await save(agent, filed.id, etag, { title: 'Another title' }).expect(201);
  const saved = await read<VersionDetail>(agent, `/api/cases/${filed.id}/versions/1`);
  const { answer, bytes } = await fileWith(agent, `/api/cases/${filed.id}/versions/1/report.pdf`);
  expect(answer.status).toBe(200);
  expect(answer.headers).toMatchObject({
    'content-type': 'application/pdf',
    'content-disposition': `attachment; filename="case-${filed.number}-version-1-full.pdf"`,
    'cache-control': 'no-store',
  });
  const { flow, info } = await readPdf(bytes);
  expect(info['Title']).toBe('Yukawa well');
  expect(flow).toContain(saved.hash);
  const [first] = saved.result.runPlan?.detectors ?? [];
  if (!first) throw new Error('The version was saved with a plan.');
  const rates = [first.trueRate, first.observedRate].map(({ value }) => formatNumber(value, 6));
  expect(flow).toContain(rates.join(' '));
});

test('kind chooses between one page and everything, and nothing else is a kind', async () => {
  const { filed } = await fileCase(agent, { document });
  const path = `/api/cases/${filed.id}/versions/1/report.pdf`;
  const proposal = await readPdf((await fileWith(agent, `${path}?kind=proposal`)).bytes);
  const full = await readPdf((await fileWith(agent, `${path}?kind=full`)).bytes);
  expect(proposal.info['Pages']).toBe('1');
  expect(Number(full.info['Pages'])).toBeGreaterThan(1);
  const refused = await agent.get(`${path}?kind=poster`).expect(422);
  expect(JSON.stringify(refused.body)).toContain('kind is \\"proposal\\" (one page) or \\"full\\"');
});

test('a stored number is printed as it stands, computed anew by nobody', async () => {
  const { filed } = await fileCase(agent);
  const computed: string[] = [];
  const watched = await createTestApp({
    compute: (kind) => {
      computed.push(kind);
      throw new Error('Only the kind is looked at.');
    },
    databaseUrl: () => app.database.runtimeUrl,
  });
  const reader = await watched.signedIn('manager');
  await reader.get(`/api/cases/${filed.id}/versions/1/report.pdf`).expect(500);
  expect(computed).toEqual(['report']);
  await watched.close();
});

test('who may not read the version gets not found, as for a version that is not there', async () => {
  const { filed } = await fileCase(agent);
  const path = (n: string) => `/api/cases/${filed.id}/versions/${n}/report.pdf`;
  const outsider = await app.signedIn('theorist');
  await outsider.get(path('1')).expect(404);
  await (await app.signedIn('administrator')).get(path('1')).expect(404);
  await app.anonymous().get(path('1')).expect(401);
  await agent.get(path('2')).expect(404);
  await agent.get(path('0')).expect(404);
});

test('an interaction from the library is named with its version and where it was taken from', async () => {
  const { published } = await publish(await app.signedIn('theorist'));
  const { filed } = await fileCase(agent, { document: citing(published, 1) });
  const { bytes } = await fileWith(agent, `/api/cases/${filed.id}/versions/1/report.pdf`);
  const { flow } = await readPdf(bytes);
  expect(flow).toContain(`library: ${published.name}, version 1; source: Lab note 7 of the tests`);
});

test('the description of the API says that a file is answered, and no JSON', async () => {
  const { paths } = await read<{
    paths: Record<string, { get: { responses: Record<string, { content: object }> } }>;
  }>(agent, '/api/openapi.json');
  const { responses } = paths['/api/cases/{id}/versions/{n}/report.pdf']?.get ?? {};
  expect(Object.keys(responses?.['200']?.content ?? {})).toEqual(['application/pdf']);
});
