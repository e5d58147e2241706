import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { estimateBody } from '../../api.ts';

/** Question and answer as they cross the wire: the first part can be sent again as it is. */
export function planJson(document: CaseDocument, answer: RunPlan): string {
  const request = { ...document.runPlan, estimate: estimateBody(document) };
  return `${JSON.stringify({ request, answer }, null, 2)}\n`;
}
