import type { ScanRequest } from '#shared/contracts/scans.ts';
import type { VerbContext } from '#server/http/context.ts';
import { createJob } from '#server/jobs/create-job.ts';
import { currentSettings } from '#server/modules/settings/current-settings.ts';
import { requireCampaign } from '#server/modules/campaigns/require-campaign.ts';
import { Grid } from './grid.ts';
import { namesOf } from './pointer.ts';

const WHAT = {
  total: 'Total cross section',
  dcs: 'Angular distribution',
  verdict: 'Verdict',
} as const;

function titleOf(request: ScanRequest, grid: Grid): string {
  if (request.title !== undefined) return request.title;
  const over = grid.axes.map(({ path }) => namesOf(path).at(-1) ?? path).join(' and ');
  return `${WHAT[request.output]} over ${over}`.slice(0, 200);
}

/** Files a scan for the workers. Axes are checked here; a point that cannot be computed is empty in the result. */
export async function createScan(context: VerbContext, request: ScanRequest): Promise<string> {
  const { em, actor } = context;
  const grid = new Grid(request);
  const campaignId = request.campaignId ?? null;
  if (campaignId !== null) await requireCampaign(em, actor, campaignId);
  const { verdict: thresholds } = await currentSettings({ em });
  const input = { ...request, ...(request.output === 'verdict' && { thresholds }) };
  return createJob(context, { kind: 'scan', title: titleOf(request, grid), campaignId, input });
}
