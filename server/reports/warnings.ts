import type { Warning } from '#shared/contracts/estimates.ts';
import { MUTED } from './paper.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';

/** Of the estimate and of the plan, as they were shown: what asks for a decision first. */
export function warningsOf({ version }: ReportInput): Warning[] {
  const { estimate, runPlan } = version.result;
  const all = [...estimate.warnings, ...(runPlan?.warnings ?? [])];
  const isInfo = ({ level }: Warning) => level === 'info';
  return [...all.filter((one) => !isInfo(one)), ...all.filter(isInfo)];
}

export const warningText = ({ level, message }: Warning): string =>
  `${level === 'info' ? 'Note' : 'Caution'}: ${message}`;

export function drawWarnings(paper: Paper, input: ReportInput): void {
  paper.heading('Warnings as shown');
  const warnings = warningsOf(input);
  if (warnings.length === 0) paper.text('None.');
  for (const warning of warnings) paper.text(warningText(warning));
}

/** As many as go above `bottom`, the rest counted. */
export function drawWarningsAbove(paper: Paper, input: ReportInput, bottom: number): void {
  const warnings = warningsOf(input);
  const style = { size: 8, after: 1.5 };
  const last = 14;
  for (const [index, warning] of warnings.entries()) {
    const text = warningText(warning);
    const rest = warnings.length - index;
    const room = bottom - paper.y - (rest > 1 ? last : 0);
    if (paper.heightOf(text, style) + style.after > room) {
      const what = rest === 1 ? 'warning stands' : 'warnings stand';
      paper.text(`${rest} more ${what} in the full report.`, { ...style, colour: MUTED });
      return;
    }
    paper.text(text, style);
  }
}
