import { z } from 'zod';
import {
  caseSchema,
  createVersionSchema,
  versionDetailSchema,
  versionHeadSchema,
} from '#shared/contracts/cases.ts';
import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import { defineRoute } from '#server/http/route.ts';
import { caseRow } from './case-rows.ts';
import { loadCase } from './case-resource.ts';
import { IF_MATCH_HEADER, etagOf } from './etag.ts';
import { presentCase } from './present-case.ts';
import { listVersions, readVersion } from './read-version.ts';
import { SAVE_KEY_HEADER, saveKeyOf } from './save-key.ts';
import { saveVersion } from './save-version.ts';

const params = z.object({ id: z.uuid() });
const tag = 'Cases';

export const versionRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/cases/:id/versions',
    operationId: 'listVersions',
    summary: 'Heads of the versions of a case, newest first',
    tag,
    access: 'case.read',
    visibleBy: 'case.read',
    resource: ({ em, params: { id } }) => loadCase(em, id),
    params,
    query: pageQuerySchema,
    response: listSchema(versionHeadSchema),
    async handler({ em, resource, query: { page, pageSize } }) {
      const { items, total } = await listVersions(em, resource.id, { page, pageSize });
      return { items, page, pageSize, total };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/cases/:id/versions',
    operationId: 'saveVersion',
    summary: 'Save a new version on top of the one named by If-Match',
    tag,
    access: 'case.write',
    visibleBy: 'case.read',
    resource: ({ em, params: { id } }) => loadCase(em, id),
    params,
    body: createVersionSchema,
    response: caseSchema,
    status: 201,
    headers: [IF_MATCH_HEADER, SAVE_KEY_HEADER],
    refusals: [
      'preconditionRequired',
      'staleVersion',
      'conflict',
      'tooMuchWork',
      'tooManyRequests',
    ],
    async handler({ em, actor, resource, body, headers, ifMatch, setHeader, ...context }) {
      const { id } = resource;
      const key = saveKeyOf(headers['idempotency-key'], actor.id, { save: id, body });
      const request = { caseId: id, ifMatch, key };
      const { n, lock } = await saveVersion({ ...context, em, actor }, request, body);
      setHeader('ETag', etagOf(lock));
      return presentCase(await caseRow(em, id, n));
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/cases/:id/versions/:n',
    operationId: 'readVersion',
    summary: 'A version: document, result as it was shown, engine and hash',
    tag,
    access: 'case.read',
    visibleBy: 'case.read',
    resource: ({ em, params: { id } }) => loadCase(em, id),
    params: params.extend({ n: z.coerce.number().int().min(1).max(1_000_000) }),
    response: versionDetailSchema,
    handler: ({ em, resource, params: { n } }) => readVersion(em, resource.id, n),
  }),
];
