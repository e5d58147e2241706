import { authRoutes } from '#server/modules/auth/auth.routes.ts';
import { campaignRoutes } from '#server/modules/campaigns/campaigns.routes.ts';
import { caseRoutes } from '#server/modules/cases/cases.routes.ts';
import { versionRoutes } from '#server/modules/cases/versions.routes.ts';
import { estimateRoutes } from '#server/modules/estimates/estimates.routes.ts';
import { formRoutes } from '#server/modules/forms/forms.routes.ts';
import { healthRoutes } from '#server/modules/health/health.routes.ts';
import { jobRoutes } from '#server/modules/jobs/jobs.routes.ts';
import { libraryRoutes } from '#server/modules/library/library.routes.ts';
import { materialAidRoutes } from '#server/modules/material-aids/material-aids.routes.ts';
import { referenceRoutes } from '#server/modules/reference/reference.routes.ts';
import { reportRoutes } from '#server/modules/reports/reports.routes.ts';
import { scanRoutes } from '#server/modules/scans/scans.routes.ts';
import { runPlanRoutes } from '#server/modules/run-plans/run-plans.routes.ts';
import { searchRoutes } from '#server/modules/search/search.routes.ts';
import { settingsRoutes } from '#server/modules/settings/settings.routes.ts';
import { tokenRoutes } from '#server/modules/tokens/tokens.routes.ts';
import { userRoutes } from '#server/modules/users/users.routes.ts';
import type { Route } from './route.ts';

/** Every route there is. The router, the OpenAPI document and the permission test read this list. */
export const ROUTES: readonly Route[] = [
  ...healthRoutes,
  ...authRoutes,
  ...tokenRoutes,
  ...userRoutes,
  ...campaignRoutes,
  ...caseRoutes,
  ...versionRoutes,
  ...reportRoutes,
  ...estimateRoutes,
  ...materialAidRoutes,
  ...runPlanRoutes,
  ...scanRoutes,
  ...jobRoutes,
  ...formRoutes,
  ...referenceRoutes,
  ...libraryRoutes,
  ...settingsRoutes,
  ...searchRoutes,
];
