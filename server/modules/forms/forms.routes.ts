import { createHash } from 'node:crypto';
import { formsSchema } from '#shared/contracts/forms.ts';
import { defineRoute } from '#server/http/route.ts';
import { FORMS } from '#server/physics/potentials/register.ts';
import { presentForm } from './present-forms.ts';

/** The register does not change while the server runs: one answer, one tag. */
const ANSWER = { forms: FORMS.map(presentForm) };
const ETAG = `"${createHash('sha256').update(JSON.stringify(ANSWER)).digest('base64url').slice(0, 22)}"`;

export const formRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/forms',
    operationId: 'listForms',
    summary: 'The interaction forms with their parameters, bounds, formulas and sources',
    tag: 'Reference',
    access: 'reference.read',
    response: formsSchema,
    handler({ setHeader }) {
      setHeader('ETag', ETAG);
      setHeader('Cache-Control', 'private, no-cache');
      return ANSWER;
    },
  }),
];
