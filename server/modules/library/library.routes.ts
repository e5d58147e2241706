import type { EntityManager } from '@mikro-orm/postgresql';
import { z } from 'zod';
import {
  citingCaseSchema,
  interactionDetailSchema,
  interactionItemSchema,
  interactionListQuerySchema,
  interactionVersionSchema,
  publishInteractionSchema,
  retireInteractionSchema,
} from '#shared/contracts/library.ts';
import type { InteractionDetail } from '#shared/contracts/library.ts';
import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import type { Actor } from '#server/http/actor.ts';
import { defineRoute } from '#server/http/route.ts';
import { IF_MATCH_HEADER, etagOf } from '#server/modules/cases/etag.ts';
import { listCitingCases } from '#server/modules/cases/list-citing-cases.ts';
import { SAVE_KEY_HEADER, saveKeyOf } from '#server/modules/cases/save-key.ts';
import { addInteractionVersion } from './add-interaction-version.ts';
import { loadInteraction } from './interaction-rows.ts';
import { listInteractions } from './list-interactions.ts';
import {
  presentInteraction,
  presentInteractionItem,
  presentInteractionVersion,
} from './present-interaction.ts';
import { publishInteraction } from './publish-interaction.ts';
import { interactionHeads, readInteraction } from './read-interaction.ts';
import { setInteractionStatus } from './retire-interaction.ts';

const params = z.object({ id: z.uuid() });
const tag = 'Library';
const IF_MATCH = {
  ...IF_MATCH_HEADER,
  description: 'ETag of the interaction the change starts from, as GET on it answers it.',
};

interface Answering {
  em: EntityManager;
  actor: Actor;
  setHeader: (name: string, value: string) => void;
}

async function answer({ em, actor, setHeader }: Answering, id: string): Promise<InteractionDetail> {
  const row = await readInteraction(em, id);
  setHeader('ETag', etagOf(row.lock));
  return presentInteraction(row, await interactionHeads(em, id), actor);
}

export const libraryRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/interactions',
    operationId: 'listInteractions',
    summary: 'The lab’s published interactions: search, filter, sort, page',
    tag,
    access: 'interaction.read',
    query: interactionListQuerySchema,
    response: listSchema(interactionItemSchema),
    async handler({ em, query }) {
      const { page, pageSize } = query;
      const { rows, total } = await listInteractions(em, query);
      return { items: rows.map(presentInteractionItem), page, pageSize, total };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/interactions',
    operationId: 'publishInteraction',
    summary: 'Publish an interaction; its terms are checked as those of a case are',
    tag,
    access: 'interaction.publish',
    body: publishInteractionSchema,
    response: interactionDetailSchema,
    status: 201,
    headers: [SAVE_KEY_HEADER],
    refusals: ['conflict', 'tooMuchWork', 'tooManyRequests'],
    async handler({ body, headers, ...context }) {
      const key = saveKeyOf(headers['idempotency-key'], context.actor.id, { publish: body });
      const { interactionId } = await publishInteraction(context, body, { key });
      return answer(context, interactionId);
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/interactions/:id',
    operationId: 'readInteraction',
    summary: 'An interaction at its newest version, with the heads of all and its ETag',
    tag,
    access: 'interaction.read',
    params,
    response: interactionDetailSchema,
    handler: ({ params: { id }, ...context }) => answer(context, id),
  }),
  defineRoute({
    method: 'get',
    path: '/api/interactions/:id/versions/:n',
    operationId: 'readInteractionVersion',
    summary: 'A version of an interaction, as it was published',
    tag,
    access: 'interaction.read',
    params: params.extend({ n: z.coerce.number().int().min(1).max(1_000_000) }),
    response: interactionVersionSchema,
    handler: async ({ em, actor, params: { id, n } }) =>
      presentInteractionVersion(await readInteraction(em, id, n), actor),
  }),
  defineRoute({
    method: 'post',
    path: '/api/interactions/:id/versions',
    operationId: 'addInteractionVersion',
    summary: 'Publish a further version, whole, on top of the one named by If-Match',
    tag,
    access: 'interaction.publish',
    resource: ({ em, params: { id } }) => loadInteraction(em, id),
    params,
    body: publishInteractionSchema,
    response: interactionDetailSchema,
    status: 201,
    headers: [IF_MATCH, SAVE_KEY_HEADER],
    refusals: [
      'preconditionRequired',
      'staleVersion',
      'conflict',
      'tooMuchWork',
      'tooManyRequests',
    ],
    async handler({ body, headers, ifMatch, resource: { id }, ...context }) {
      const key = saveKeyOf(headers['idempotency-key'], context.actor.id, { version: id, body });
      await addInteractionVersion(context, { interactionId: id, ifMatch, key }, body);
      return answer(context, id);
    },
  }),
  ...(['retire', 'reinstate'] as const).map((deed) =>
    defineRoute({
      method: 'post',
      path: `/api/interactions/:id/${deed}`,
      operationId: `${deed}Interaction`,
      summary:
        deed === 'retire'
          ? 'Retire an interaction, with a reason; cases that cite it keep it'
          : 'Take a retired interaction back into the library, with a reason',
      tag,
      access: 'interaction.retire',
      resource: ({ em, params: { id } }) => loadInteraction(em, id),
      params,
      body: retireInteractionSchema,
      response: interactionDetailSchema,
      headers: [{ ...IF_MATCH, required: false }],
      refusals: ['conflict', 'staleVersion'],
      async handler({ body: { reason }, ifMatch, resource: { id }, ...context }) {
        const status = deed === 'retire' ? 'retired' : 'published';
        await setInteractionStatus(context, { id, ifMatch }, { status, reason });
        return answer(context, id);
      },
    }),
  ),
  defineRoute({
    method: 'get',
    path: '/api/interactions/:id/cases',
    operationId: 'listCitingCases',
    summary: 'Cases you may read whose newest version cites this interaction',
    tag,
    access: 'interaction.read',
    params,
    query: pageQuerySchema,
    response: listSchema(citingCaseSchema),
    async handler({ em, actor, params: { id }, query: { page, pageSize } }) {
      await readInteraction(em, id);
      const { items, total } = await listCitingCases(em, actor, id, { page, pageSize });
      return { items, page, pageSize, total };
    },
  }),
];
