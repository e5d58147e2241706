import { afterAll, beforeAll, expect, test } from 'vitest';
import { FORMS } from '#server/physics/potentials/register.ts';
import { formsSchema } from '#shared/contracts/forms.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { startingParameters } from '#shared/contracts/forms.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import { isUnit } from '#shared/units/vocabulary.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { CONTRACT_BODY } from '#tests/physics/observables/bodies.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let agent: Agent;
beforeAll(async () => {
  app = await createTestApp();
  agent = await app.signedIn('theorist');
});
afterAll(() => app.close());

async function forms(): Promise<FormInfo[]> {
  return formsSchema.parse((await agent.get('/api/forms').expect(200)).body).forms;
}

test('the register is served whole, bounds in the unit of the default', async () => {
  const served = await forms();
  expect(served.map(({ key }) => key)).toEqual(FORMS.map(({ key }) => key));
  for (const { parameters } of served) {
    for (const parameter of parameters) {
      const { dimension, default: start, minimum = -Infinity, maximum = Infinity } = parameter;
      if (dimension === 'choice') expect(parameter.choices).toContain(start);
      const value = typeof start === 'number' ? start : isQuantity(start) ? start.value : null;
      if (value === null) continue;
      expect(value).toBeGreaterThanOrEqual(minimum);
      expect(value).toBeLessThanOrEqual(maximum);
      if (isQuantity(start)) expect(isUnit(start.unit, dimension as Dimension)).toBe(true);
    }
  }
  const depth = served.find(({ key }) => key === 'woodsSaxon')?.parameters[0];
  expect(depth).toMatchObject({ default: { unit: 'MeV' }, maximum: 1e9 });
});

test('the defaults of every form make an estimate', async () => {
  for (const { key, parameters } of await forms()) {
    const needed = startingParameters(parameters);
    const term = Object.fromEntries(needed.map((parameter) => [parameter.key, parameter.default]));
    const target = { kind: 'fixed', charge: 6 };
    const body = { ...CONTRACT_BODY, target, interaction: { terms: [{ form: key, ...term }] } };
    await agent.post('/api/estimates').send(body).expect(200);
  }
});

test('a page that knows the register is spared it', async () => {
  const first = await agent.get('/api/forms').expect(200);
  const etag = first.headers['etag'] ?? '';
  expect(etag).toMatch(/^"/);
  await agent.get('/api/forms').set('If-None-Match', etag).expect(304);
  await agent.get('/api/forms').set('If-None-Match', '"old"').expect(200);
});
