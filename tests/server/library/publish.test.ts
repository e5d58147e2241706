import { createHash, randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import { interactionContentSchema } from '#shared/contracts/library.ts';
import type { InteractionDetail, InteractionVersion } from '#shared/contracts/library.ts';
import type { Problem } from '#shared/contracts/problem-details.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { read } from '../cases/case-requests.ts';
import { addVersion, publication, publish, yukawaTerms } from './library-requests.ts';

let app: TestApp;
let account: Account;
let agent: Agent;

beforeAll(async () => {
  app = await createTestApp();
  ({ account, agent } = await app.person('theorist'));
});
afterAll(() => app.close());

const trailOf = (id: string) =>
  query(
    app.database.ownerUrl,
    'select action, before, after from trail where subject_id = $1 order by id',
    [id],
  );

describe('POST /api/interactions', () => {
  it('publishes version 1, with a hash over what it says and an entry of the trail', async () => {
    const content = publication();
    const note = 'As used since spring.';
    const sent = { ...content, note };
    const answer = await agent.post('/api/interactions').send(sent).expect(201);
    expect(answer.headers['etag']).toBe('"1"');
    const published = answer.body as InteractionDetail;
    expect(published).toMatchObject({
      ...content,
      status: 'published',
      retired: null,
      owner: { id: account.id },
      newestVersion: 1,
      version: { n: 1, note, author: { id: account.id, name: account.name } },
      may: { publish: true, retire: true },
      summary: 'Yukawa, V₀ −10 eV, a 1 Å',
    });
    const said = interactionContentSchema.strip().parse(published);
    const hash = createHash('sha256').update(canonicalJson(said)).digest('hex');
    expect(published.version.hash).toBe(hash);
    expect(published.versions).toEqual([published.version]);
    expect(await trailOf(published.id)).toEqual([
      {
        action: 'interaction.publish',
        before: null,
        after: { name: sent.name, n: 1, hash, tags: ['screened'], note },
      },
    ]);
  });

  it('keeps the collision it was checked with: the one given, or one made from the validity', async () => {
    const { published } = await publish(agent);
    expect(published.example).toMatchObject({
      projectile: { species: 'electron' },
      target: { kind: 'fixed', charge: 0 },
      energy: { value: 50, unit: 'eV' },
    });
    const example = {
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'Au-197' },
      energy: { value: 2, unit: 'MeV' },
    };
    const terms = [{ form: 'screenedCoulomb', a: { value: 0.1, unit: 'angstrom' } }];
    const ion = await publish(agent, { terms, example });
    expect(ion.published.example).toEqual(example);
  });

  it.each([
    ['an unknown form', [{ form: 'yukawwa' }], '/terms/0/form', /Did you mean yukawa/],
    ['a missing parameter', [{ form: 'yukawa' }], '/terms/0/V0', /missing/],
    [
      'a unit of another dimension',
      [
        {
          form: 'yukawa',
          V0: { value: 1, unit: 'angstrom' },
          a: { value: 1, unit: 'angstrom' },
        },
      ],
      '/terms/0/V0',
      /energy/,
    ],
    ['no term', [], '/terms', /at least one/],
    ['an unknown member', [{ ...yukawaTerms(-1)[0], depth: 3 }], '/terms/0/depth', /no parameter/],
  ])('refuses %s as a case would, by its place in the publication', async (_, terms, at, words) => {
    const answer = await agent.post('/api/interactions').send(publication({ terms })).expect(422);
    const { errors = [] } = answer.body as Problem;
    expect(errors.map(({ path }) => path)).toContain(at);
    expect(errors.find(({ path }) => path === at)?.message).toMatch(words);
  });

  it.each([
    [{ name: '  ' }, '/name'],
    [{ source: '' }, '/source'],
    [{ description: 'x'.repeat(4001) }, '/description'],
    [{ validity: { words: '' } }, '/validity/words'],
    [{ validity: { words: 'x', energy: {} } }, '/validity/energy'],
    [{ validity: { words: 'x', species: ['pion'] } }, '/validity/species/0'],
    [
      {
        validity: {
          words: 'x',
          energy: { from: { value: 1, unit: 'keV' }, to: { value: 900, unit: 'eV' } },
        },
      },
      '/validity/energy/to',
    ],
    [{ tags: ['a'.repeat(41)] }, '/tags/0'],
    [{ strength: 3 }, '/strength'],
  ])('refuses what does not fit at its place (%#)', async (changes, path) => {
    const answer = await agent.post('/api/interactions').send(publication(changes)).expect(422);
    expect((answer.body as Problem).errors?.map((error) => error.path)).toContain(path);
  });

  it('refuses an example that does not go with the terms, and says where', async () => {
    const boundless = { words: 'x', energy: { from: { value: 1e308, unit: 'GeV' } } };
    const assumed = await agent
      .post('/api/interactions')
      .send(publication({ validity: boundless }))
      .expect(422);
    expect((assumed.body as Problem).errors).toEqual([
      { path: '/example', message: expect.stringMatching(/^Give a collision to check/) as string },
    ]);
    const example = {
      projectile: { species: 'electron' },
      target: { kind: 'nuclide', nuclide: 'Xx-1' },
      energy: { value: 1, unit: 'keV' },
    };
    const given = await agent.post('/api/interactions').send(publication({ example })).expect(422);
    expect((given.body as Problem).errors?.[0]?.path).toBe('/example/target/nuclide');
  });

  it('lets two interactions of one name not stand side by side, whatever their letters', async () => {
    const { published } = await publish(agent);
    const name = published.name.toUpperCase();
    const answers = await Promise.all(
      [name, name].map((again) =>
        agent.post('/api/interactions').send(publication({ name: again })),
      ),
    );
    for (const answer of answers) {
      expect(answer.status).toBe(409);
      expect(answer.body).toMatchObject({ code: 'conflict', errors: [{ path: '/name' }] });
    }
  });

  it('publishes once for one Idempotency-Key, also when two requests come at once', async () => {
    const key = randomUUID();
    const sent = publication();
    const send = (body: object) =>
      agent.post('/api/interactions').set('Idempotency-Key', key).send(body);
    const answers = await Promise.all([send(sent), send(sent)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    const [one, other] = answers.map(({ body }) => (body as InteractionDetail).id);
    expect(one).toBe(other);
    await send(publication()).expect(409);
    await agent.post('/api/interactions').set('Idempotency-Key', 'again').send(sent).expect(400);
  });
});

describe('POST /api/interactions/:id/versions', () => {
  it('appends a version and keeps the old one as it was', async () => {
    const { published, etag } = await publish(agent);
    const path = `/api/interactions/${published.id}`;
    const old = await read<InteractionVersion>(agent, `${path}/versions/1`);
    const changes = { note: 'Deeper', tags: ['deeper'], source: 'Lab note 8' };
    const answer = await addVersion(agent, published, etag, changes).expect(201);
    expect(answer.headers['etag']).toBe('"2"');
    expect(answer.body).toMatchObject({ newestVersion: 2, tags: ['deeper'], source: 'Lab note 8' });
    const now = await read<InteractionDetail>(agent, path);
    expect(now.versions.map(({ n, note }) => [n, note])).toEqual([
      [2, 'Deeper'],
      [1, ''],
    ]);
    expect(now.terms).toEqual(yukawaTerms(-12));
    const { terms, version, newestVersion } = await read<InteractionVersion>(
      agent,
      `${path}/versions/1`,
    );
    expect({ terms, version }).toEqual({ terms: old.terms, version: old.version });
    expect(newestVersion).toBe(2);
    await agent.get(`${path}/versions/3`).expect(404);
    const [, added] = await trailOf(published.id);
    expect(added).toMatchObject({
      action: 'interaction.addVersion',
      before: { n: 1, hash: old.version.hash },
      after: { n: 2, hash: now.version.hash },
    });
  });

  it('asks for If-Match (428) and refuses a stale one (412), naming the newest', async () => {
    const { published, etag } = await publish(agent);
    const { id, name } = published;
    const body = publication({ name, terms: yukawaTerms(-20) });
    await agent.post(`/api/interactions/${id}/versions`).send(body).expect(428);
    await addVersion(agent, published, '2').expect(400);
    await addVersion(agent, published, etag).expect(201);
    const stale = await addVersion(agent, published, etag, { terms: yukawaTerms(-20) }).expect(412);
    expect(stale.body).toMatchObject({ currentVersion: 2, currentEtag: '"2"' });
    await addVersion(agent, published, '"2"', { terms: yukawaTerms(-20) }).expect(201);
  });

  it('lets exactly one of several versions at once win', async () => {
    const { published, etag } = await publish(agent);
    const answers = await Promise.all(
      [-21, -22, -23, -24].map((depth) =>
        addVersion(agent, published, etag, { terms: yukawaTerms(depth) }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 412, 412, 412]);
    const { versions } = await read<InteractionDetail>(agent, `/api/interactions/${published.id}`);
    expect(versions.map(({ n }) => n)).toEqual([2, 1]);
  });

  it('refuses a version that says nothing new, a retry apart', async () => {
    const { published, etag } = await publish(agent);
    const { name, description, validity, source, terms, tags, example } = published;
    const same = { name, description, validity, source, terms, tags, example };
    const path = `/api/interactions/${published.id}/versions`;
    const answer = await agent.post(path).set('If-Match', etag).send(same).expect(409);
    expect(answer.body).toMatchObject({
      detail: expect.stringMatching(/Nothing differs/) as string,
    });
    const key = randomUUID();
    const send = () =>
      agent
        .post(path)
        .set('If-Match', etag)
        .set('Idempotency-Key', key)
        .send({ ...same, source: 'Another' });
    expect((await send().expect(201)).body).toMatchObject({ newestVersion: 2 });
    expect((await send().expect(201)).body).toMatchObject({ newestVersion: 2 });
  });

  it('may give a new name, not one that another bears', async () => {
    const { published, etag } = await publish(agent);
    const other = await publish(agent);
    const taken = { name: other.published.name };
    expect((await addVersion(agent, published, etag, taken).expect(409)).body).toMatchObject({
      errors: [{ path: '/name' }],
    });
    const renamed = await addVersion(agent, published, etag, { name: 'A name of its own' });
    expect(renamed.body).toMatchObject({ name: 'A name of its own' });
    expect(await read(agent, `/api/interactions/${published.id}/versions/1`)).toMatchObject({
      name: published.name,
    });
  });
});

describe('retiring', () => {
  it('takes an interaction out of the list, with its reason, and back', async () => {
    const { published, etag } = await publish(agent);
    const path = `/api/interactions/${published.id}`;
    await agent.post(`${path}/reinstate`).send({ reason: 'Never gone.' }).expect(409);
    await agent.post(`${path}/retire`).set('If-Match', '"9"').send({ reason: 'x' }).expect(412);
    await agent.post(`${path}/retire`).send({}).expect(422);
    const manager = await app.signedIn('manager');
    const reason = 'Superseded by the table.';
    const retired = await manager.post(`${path}/retire`).send({ reason }).expect(200);
    expect(retired.body).toMatchObject({ status: 'retired', retired: { reason } });
    expect(retired.headers['etag']).not.toBe(etag);
    await manager.post(`${path}/retire`).send({ reason }).expect(409);
    const found = (status: string) =>
      read<{ total: number }>(
        agent,
        `/api/interactions?q=${encodeURIComponent(published.name)}&status=${status}`,
      );
    expect((await found('published')).total).toBe(0);
    expect((await found('retired')).total).toBe(1);
    const tag = retired.headers['etag'] ?? '';
    await addVersion(agent, published, tag).expect(409);
    await agent.post(`${path}/reinstate`).send({ reason: 'Needed again.' }).expect(200);
    expect((await found('published')).total).toBe(1);
    const actions = (await trailOf(published.id)).map(({ action }) => action);
    expect(actions).toEqual(['interaction.publish', 'interaction.retire', 'interaction.reinstate']);
  });
});

describe('the tables', () => {
  const STATEMENTS = ['interaction_versions', 'interaction_statuses', 'settings_versions'].flatMap(
    (table) => [
      `update ${table} set created_at = now()`,
      `delete from ${table}`,
      `truncate ${table} cascade`,
    ],
  );

  it.each(STATEMENTS)('the runtime role may not: %s', async (statement) => {
    await expect(query(app.database.runtimeUrl, statement)).rejects.toThrow(/permission denied/);
  });

  it.each(STATEMENTS)('the owner is stopped by the trigger: %s', async (statement) => {
    await expect(query(app.database.ownerUrl, statement)).rejects.toThrow(/only grows/);
  });

  it.each([
    'delete from interactions',
    'select remove_demo_interactions()',
    'alter table interaction_versions disable trigger all',
  ])('the runtime role may not: %s', async (statement) => {
    await expect(query(app.database.runtimeUrl, statement)).rejects.toThrow(
      /permission denied|must be owner/,
    );
  });

  it('the database alone refuses a second version of the same number', async () => {
    const { published } = await publish(agent);
    const copy = `insert into interaction_versions
      select gen_random_uuid(), interaction_id, n, content, hash, author_id, note, created_at
      from interaction_versions where interaction_id = $1`;
    await expect(query(app.database.runtimeUrl, copy, [published.id])).rejects.toThrow(
      /interaction_versions_interaction_id_n_key/,
    );
  });
});
