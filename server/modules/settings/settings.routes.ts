import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import {
  changeSettingsSchema,
  settingsSchema,
  settingsVersionSchema,
} from '#shared/contracts/settings.ts';
import { defineRoute } from '#server/http/route.ts';
import { IF_MATCH_HEADER, etagOf } from '#server/modules/cases/etag.ts';
import { changeSettings } from './change-settings.ts';
import { readSettings } from './current-settings.ts';
import { listSettingsVersions } from './list-settings-versions.ts';

const tag = 'Settings';

export const settingsRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/settings',
    operationId: 'readSettings',
    summary: 'Settings of the lab, such as the thresholds of the verdict, with their ETag',
    tag,
    access: 'settings.read',
    response: settingsSchema,
    async handler({ em, setHeader }) {
      const settings = await readSettings({ em });
      setHeader('ETag', etagOf(settings.version));
      return settings;
    },
  }),
  defineRoute({
    method: 'put',
    path: '/api/settings',
    operationId: 'changeSettings',
    summary: 'Change the settings of the lab, whole, on top of the version named by If-Match',
    tag,
    access: 'settings.write',
    body: changeSettingsSchema,
    response: settingsSchema,
    headers: [{ ...IF_MATCH_HEADER, description: 'ETag of the settings the change starts from.' }],
    refusals: ['preconditionRequired', 'staleVersion'],
    async handler({ em, actor, now, body, ifMatch, setHeader }) {
      await changeSettings({ em, actor, now }, ifMatch, body);
      const settings = await readSettings({ em });
      setHeader('ETag', etagOf(settings.version));
      return settings;
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/settings/history',
    operationId: 'listSettingsVersions',
    summary: 'Who changed the settings of the lab, when and how, newest first',
    tag,
    access: 'settings.read',
    query: pageQuerySchema,
    response: listSchema(settingsVersionSchema),
    async handler({ em, query: { page, pageSize } }) {
      const { items, total } = await listSettingsVersions(em, { page, pageSize });
      return { items, page, pageSize, total };
    },
  }),
];
