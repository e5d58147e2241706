import { z } from 'zod';
import {
  caseDetailSchema,
  caseListItemSchema,
  caseListQuerySchema,
  caseSchema,
  createCaseSchema,
  withdrawSchema,
} from '#shared/contracts/cases.ts';
import { listSchema } from '#shared/contracts/list.ts';
import { can } from '#server/http/can.ts';
import { defineRoute } from '#server/http/route.ts';
import { caseRow } from './case-rows.ts';
import { loadCase } from './case-resource.ts';
import { createCase } from './create-case.ts';
import { IF_MATCH_HEADER, etagOf } from './etag.ts';
import { listCases } from './list-cases.ts';
import { presentCase, presentListItem } from './present-case.ts';
import { readDocumentOf } from './read-version.ts';
import { SAVE_KEY_HEADER, saveKeyOf } from './save-key.ts';
import { withdrawCase } from './withdraw-case.ts';

const params = z.object({ id: z.uuid() });
const tag = 'Cases';

export const caseRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/cases',
    operationId: 'listCases',
    summary: 'Cases you may read: search, filter, sort, page',
    tag,
    access: 'case.list',
    query: caseListQuerySchema,
    response: listSchema(caseListItemSchema),
    async handler({ em, actor, query }) {
      const { page, pageSize } = query;
      const { rows, total } = await listCases(em, actor, query);
      return { items: rows.map(presentListItem), page, pageSize, total };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/cases',
    operationId: 'createCase',
    summary: 'File a new case; its result is computed by the server',
    tag,
    access: 'case.create',
    body: createCaseSchema,
    response: caseSchema,
    status: 201,
    headers: [SAVE_KEY_HEADER],
    refusals: ['conflict', 'tooMuchWork', 'tooManyRequests'],
    async handler({ em, actor, body, headers, setHeader, ...context }) {
      const key = saveKeyOf(headers['idempotency-key'], actor.id, { create: body });
      const { caseId, n, lock } = await createCase({ ...context, em, actor }, body, key);
      setHeader('ETag', etagOf(lock));
      return presentCase(await caseRow(em, caseId, n));
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/cases/:id',
    operationId: 'readCase',
    summary: 'A case with its newest document and its ETag',
    tag,
    access: 'case.read',
    visibleBy: 'case.read',
    resource: ({ em, params: { id } }) => loadCase(em, id),
    params,
    response: caseDetailSchema,
    async handler({ em, actor, resource, setHeader }) {
      const row = await caseRow(em, resource.id);
      setHeader('ETag', etagOf(row.lock));
      return {
        ...presentCase(row),
        document: await readDocumentOf(em, row.id, row.n),
        mayEdit: can(actor, 'case.write', resource),
      };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/cases/:id/withdraw',
    operationId: 'withdrawCase',
    summary: 'Withdraw the newest version, a draft or one in review, with a reason',
    tag,
    access: 'case.withdraw',
    visibleBy: 'case.read',
    resource: ({ em, params: { id } }) => loadCase(em, id),
    params,
    body: withdrawSchema,
    response: caseSchema,
    headers: [{ ...IF_MATCH_HEADER, required: false }],
    refusals: ['conflict', 'staleVersion'],
    async handler({ em, actor, now, resource, body, ifMatch, setHeader }) {
      await withdrawCase({ em, actor, now }, { caseId: resource.id, ifMatch }, body.reason);
      const row = await caseRow(em, resource.id);
      setHeader('ETag', etagOf(row.lock));
      return presentCase(row);
    },
  }),
];
