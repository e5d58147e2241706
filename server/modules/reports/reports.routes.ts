import { z } from 'zod';
import { OtherAnswer } from '#server/http/other-answer.ts';
import { defineRoute } from '#server/http/route.ts';
import { caseRow } from '#server/modules/cases/case-rows.ts';
import { loadCase } from '#server/modules/cases/case-resource.ts';
import { readVersion } from '#server/modules/cases/read-version.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';
import { REPORT_KINDS } from '#server/reports/report-input.ts';
import { citedName } from './cited-name.ts';

const PDF = 'application/pdf';
/** Of a file with 200 detectors on a busy machine. */
const DEADLINE_MILLISECONDS = 30_000;

const params = z.object({
  id: z.uuid(),
  n: z.coerce.number().int().min(1).max(1_000_000),
});
const query = z.object({
  kind: z.enum(REPORT_KINDS, 'kind is "proposal" (one page) or "full".').default('full'),
});

export const reportRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/cases/:id/versions/:n/report.pdf',
    operationId: 'readReport',
    summary: 'A version as it was saved, on paper: PDF',
    tag: 'Cases',
    access: 'case.read',
    visibleBy: 'case.read',
    resource: ({ em, params: { id } }) => loadCase(em, id),
    params,
    query,
    status: 200,
    otherTypes: [PDF],
    refusals: ['tooMuchWork', 'tooManyRequests'],
    async handler({ em, actor, compute, signal, resource, params: { n }, query: { kind } }) {
      const version = await readVersion(em, resource.id, n);
      const { number: caseNumber } = await caseRow(em, resource.id, n);
      const cited = await citedName(em, version.document.interaction.citation);
      const input = { kind, caseNumber, version, ...(cited !== undefined && { cited }) };
      const options = { signal, deadline: DEADLINE_MILLISECONDS };
      const bytes = await withSlot(actor.id, () => compute('report', input, options));
      return new OtherAnswer((res) => {
        const name = `case-${caseNumber}-version-${n}-${kind}.pdf`;
        res
          .setHeader('Content-Disposition', `attachment; filename="${name}"`)
          .type(PDF)
          .send(Buffer.from(bytes));
      });
    },
  }),
];
