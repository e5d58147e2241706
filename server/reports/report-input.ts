import type { VersionDetail } from '#shared/contracts/cases.ts';

export const REPORT_KINDS = ['proposal', 'full'] as const;
export type ReportKind = (typeof REPORT_KINDS)[number];

/** Everything a report is made of: what was saved, and nothing computed anew. */
export interface ReportInput {
  kind: ReportKind;
  caseNumber: number;
  version: VersionDetail;
  /** The name of the cited interaction of the library, in the version cited. */
  cited?: string;
}
