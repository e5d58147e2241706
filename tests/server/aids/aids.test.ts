import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { fileCase } from '../cases/case-requests.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';

let app: TestApp;
let agent: Agent;
beforeAll(async () => {
  app = await createTestApp();
  ({ agent } = await app.person('experimentalist'));
});
afterAll(() => app.close());

interface Problem {
  code: string;
  errors: { path: string; message: string }[];
}

describe('what is asked beside an estimate', () => {
  test('is answered beside it and nothing else changes', async () => {
    const plain = await agent.post('/api/estimates').send(yukawaDocument).expect(200);
    const aids = { angleRange: { from: 30, to: 60 }, kinematics: true, reference: true };
    const asked = await agent
      .post('/api/estimates')
      .send({ ...yukawaDocument, aids })
      .expect(200);
    const { aids: answered, ...rest } = asked.body as Record<string, unknown>;
    expect(rest).toEqual(plain.body);
    expect(answered).toMatchObject({
      elasticBetween: { from: 30, to: 60, unit: 'angstrom2' },
      reference: { unavailable: true },
    });
  });

  test('a fault names its field', async () => {
    const answer = await agent
      .post('/api/estimates')
      .send({ ...yukawaDocument, aids: { angleRange: { from: 60, to: 30 } } })
      .expect(422);
    expect((answer.body as Problem).errors[0]?.path).toBe('/aids/angleRange/to');
    const unknown = await agent
      .post('/api/estimates')
      .send({ ...yukawaDocument, aids: { horoscope: true } })
      .expect(422);
    expect((unknown.body as Problem).errors[0]?.path).toBe('/aids/horoscope');
  });

  test('is no part of a case', async () => {
    const answer = await agent
      .post('/api/cases')
      .send({ title: 'With aids', document: { ...yukawaDocument, aids: { kinematics: true } } })
      .expect(422);
    expect((answer.body as Problem).errors[0]?.path).toBe('/document/aids');
    const { filed } = await fileCase(agent, {});
    const version = await agent.get(`/api/cases/${filed.id}/versions/1`).expect(200);
    expect((version.body as { result: { estimate: object } }).result.estimate).not.toHaveProperty(
      'aids',
    );
  });
});

describe('POST /api/material-aids', () => {
  const estimate = { ...yukawaDocument, format: 1 };
  test('takes a saved document as it is', async () => {
    const answer = await agent
      .post('/api/material-aids')
      .send({ estimate, material: { key: 'gold' }, thickness: { value: 1, unit: 'nm' } })
      .expect(200);
    expect(answer.body).toMatchObject({
      scatterer: 'Au',
      material: { formula: 'Au', units: { unit: '1/cm3' } },
    });
  });

  test.each([
    [{}, '/material'],
    [{ material: {} }, '/material'],
    [{ material: { key: 'gold', density: { value: 0, unit: 'g/cm3' } } }, '/material'],
    [{ material: { key: 'goldd' } }, '/material/key'],
    [{ material: { formula: 'C'.repeat(300), density: { value: 1, unit: 'g/cm3' } } }, '/material'],
    [{ material: { key: 'gold' }, thickness: { value: 1, unit: 'eV' } }, '/thickness/unit'],
    [
      { material: { key: 'gold' }, estimate: { ...estimate, energy: undefined } },
      '/estimate/energy',
    ],
    [{ material: { key: 'gold' }, angleRange: { from: 90, to: 10 } }, '/angleRange/to'],
  ])('%o is refused at %s', async (change, path) => {
    const answer = await agent
      .post('/api/material-aids')
      .send({ estimate, ...change })
      .expect(422);
    expect(
      (answer.body as Problem).errors.map((error) => error.path.slice(0, path.length)),
    ).toContain(path);
  });
});
