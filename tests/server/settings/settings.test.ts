import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DEFAULT_SETTINGS } from '#shared/contracts/settings.ts';
import type { Settings, SettingsVersion } from '#shared/contracts/settings.ts';
import type { Problem } from '#shared/contracts/problem-details.ts';
import { currentSettings } from '#server/modules/settings/current-settings.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { read } from '../cases/case-requests.ts';

const stricter = {
  verdict: { exact: { sound: 0.01, usable: 0.1 }, criteria: { sound: 0.05, usable: 0.5 } },
};
const sound = (value: number) => ({
  verdict: { ...stricter.verdict, exact: { sound: value, usable: 0.5 } },
});

function change(agent: Agent, etag: string, body: object) {
  return agent.put('/api/settings').set('If-Match', etag).send(body);
}

describe('the settings of the lab', () => {
  let app: TestApp;
  let administrator: Agent;
  let reader: Agent;

  beforeAll(async () => {
    app = await createTestApp();
    administrator = await app.signedIn('administrator');
    reader = await app.signedIn('experimentalist');
  });
  afterAll(() => app.close());

  it('are the defaults until somebody changes them', async () => {
    const answer = await reader.get('/api/settings').expect(200);
    expect(answer.headers['etag']).toBe('"0"');
    expect(answer.body).toEqual({
      ...DEFAULT_SETTINGS,
      version: 0,
      changed: null,
      defaults: DEFAULT_SETTINGS,
    });
    expect(DEFAULT_SETTINGS.verdict).toEqual({
      exact: { sound: 0.02, usable: 0.2 },
      criteria: { sound: 0.1, usable: 1 },
    });
    expect(await currentSettings({ em: app.em() })).toEqual(DEFAULT_SETTINGS);
    expect(await read(reader, '/api/settings/history')).toMatchObject({ items: [], total: 0 });
  });

  it('are changed by an administrator, for everyone, with an entry of the trail', async () => {
    const note = 'Agreed in the group.';
    const answer = await change(administrator, '"0"', { ...stricter, note }).expect(200);
    expect(answer.headers['etag']).toBe('"1"');
    expect(answer.body).toMatchObject({ ...stricter, version: 1, changed: { note } });
    expect(await read<Settings>(reader, '/api/settings')).toEqual(answer.body);
    expect(await currentSettings({ em: app.em() })).toEqual(stricter);
    const entries = await query(
      app.database.ownerUrl,
      `select actor_name <> '' as named, subject_type, before, after from trail where action = 'settings.change'`,
    );
    expect(entries).toEqual([
      {
        named: true,
        subject_type: 'settings',
        before: { version: 0, ...DEFAULT_SETTINGS },
        after: { version: 1, ...stricter, note },
      },
    ]);
  });

  it('need If-Match (428), refuse a stale one (412) and change nothing then', async () => {
    await administrator.put('/api/settings').send(sound(0.2)).expect(428);
    const stale = await change(administrator, '"0"', sound(0.2)).expect(412);
    expect(stale.body).toMatchObject({ currentVersion: 1, currentEtag: '"1"' });
    await change(administrator, '1', sound(0.2)).expect(400);
    expect(await currentSettings({ em: app.em() })).toEqual(stricter);
  });

  it('let exactly one of several changes at once win', async () => {
    const answers = await Promise.all(
      [0.11, 0.12, 0.13, 0.14].map((value) => change(administrator, '"1"', sound(value))),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412, 412, 412]);
    const { total } = await read<{ total: number }>(reader, '/api/settings/history');
    expect(total).toBe(2);
  });

  it('keep who changed what when, newest first, from the defaults on', async () => {
    await change(administrator, '"2"', { ...DEFAULT_SETTINGS, note: 'Back.' }).expect(200);
    const { items } = await read<{ items: SettingsVersion[] }>(reader, '/api/settings/history');
    expect(items.map(({ version }) => version)).toEqual([3, 2, 1]);
    expect(items[0]).toMatchObject({ after: DEFAULT_SETTINGS, note: 'Back.' });
    expect(items[2]).toMatchObject({ before: DEFAULT_SETTINGS, after: stricter });
    expect(items[0]?.before).toEqual(items[1]?.after);
    expect(await currentSettings({ em: app.em() })).toEqual(DEFAULT_SETTINGS);
  });

  it('make no version where nothing changes', async () => {
    const answer = await change(administrator, '"3"', DEFAULT_SETTINGS).expect(200);
    expect(answer.body).toMatchObject({ version: 3 });
    expect(answer.headers['etag']).toBe('"3"');
  });

  it.each([
    [{ exact: { sound: 0, usable: 0.2 } }, '/verdict/exact/sound'],
    [{ exact: { sound: -0.01, usable: 0.2 } }, '/verdict/exact/sound'],
    [{ exact: { sound: 0.2, usable: 0.2 } }, '/verdict/exact/usable'],
    [{ exact: { sound: 0.3, usable: 0.2 } }, '/verdict/exact/usable'],
    [{ exact: { sound: 0.02, usable: 10.5 } }, '/verdict/exact/usable'],
    [{ exact: { sound: '0.02', usable: 0.2 } }, '/verdict/exact/sound'],
    [{ exact: { sound: 0.02 } }, '/verdict/exact/usable'],
    [{ criteria: { sound: 1, usable: 0.1 } }, '/verdict/criteria/usable'],
    [{ criteria: { sound: 0.1, usable: 101 } }, '/verdict/criteria/usable'],
    [{ criteria: { sound: 0.1, usable: 1, fair: 0.5 } }, '/verdict/criteria/fair'],
  ])('refuse %j', async (part, path) => {
    const body = { verdict: { ...DEFAULT_SETTINGS.verdict, ...part } };
    const answer = await change(administrator, '"3"', body).expect(422);
    expect((answer.body as Problem).errors?.map((error) => error.path)).toContain(path);
  });

  it('refuse a number no double holds, and a body that is not whole', async () => {
    const text = `{"verdict":{"exact":{"sound":1e-3,"usable":1e999},"criteria":{"sound":0.1,"usable":1}}}`;
    const huge = administrator.put('/api/settings').set('If-Match', '"3"');
    await huge.set('Content-Type', 'application/json').send(text).expect(422);
    await change(administrator, '"3"', {}).expect(422);
    const { version } = await read<Settings>(reader, '/api/settings');
    expect(version).toBe(3);
  });

  it('may not be changed by anyone else', async () => {
    for (const role of ['experimentalist', 'theorist', 'manager'] as const) {
      await change(await app.signedIn(role), '"3"', stricter).expect(403);
    }
  });
});
