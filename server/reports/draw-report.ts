import { drawAssumptions, drawGoldenRule } from './assumptions.ts';
import { cautionsHeight, drawCautions } from './cautions.ts';
import {
  drawConditions,
  drawCrossSection,
  drawIntegrals,
  drawNumbers,
  drawPhases,
  drawTotals,
  drawUnavailable,
} from './cross-section.ts';
import { drawHead } from './head.ts';
import { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';
import { drawBudget, drawFactors } from './run-plan-detail.ts';
import {
  drawPlanInBrief,
  drawRates,
  drawReasons,
  drawRunSheet,
  drawTargetChecks,
  plannedRun,
} from './run-plan.ts';
import { drawVerdict, drawVerdictInFull } from './verdict.ts';
import { drawWarnings, drawWarningsAbove } from './warnings.ts';

/**
 * A saved version on paper, as a PDF file. Drawn from what was stored, nothing is computed anew, and nothing of the day
 * goes in: one version always gives the same file.
 */
export function drawReport(input: ReportInput): Uint8Array {
  const { kind, caseNumber, version } = input;
  const what = `Case ${caseNumber}, version ${version.n}`;
  const open = () =>
    new Paper({
      title: version.title,
      author: version.author.name,
      subject: `${what}: ${kind === 'proposal' ? 'proposal page' : 'full report'}; SHA-256 ${version.hash}`,
      date: new Date(version.createdAt),
    });
  const paper = kind === 'proposal' ? drawProposal(open, input) : open();
  if (kind === 'full') drawFull(paper, input);
  paper.foot(`Tallybarn · ${what} · ${version.hash.slice(0, 16)}`);
  return paper.close();
}

/** One page: what does not go on it is counted, and stands in the full report. */
function drawProposal(open: () => Paper, input: ReportInput): Paper {
  const first = plannedRun(input) ? 190 : 290;
  for (const height of [first, 150, 110]) {
    const paper = open();
    drawOnePage(paper, input, height);
    if (paper.pages === 1) return paper;
  }
  const paper = open();
  drawOnePage(paper, input, 0);
  return paper;
}

/** The plot `height` points high, or left out where its room goes to words. */
function drawOnePage(paper: Paper, input: ReportInput, height: number): void {
  const planned = plannedRun(input);
  const bottom = paper.bottom - cautionsHeight(paper, input) - 4;
  drawHead(paper, input);
  drawVerdict(paper, input);
  drawTotals(paper, input);
  drawUnavailable(paper, input);
  if (height > 0) drawCrossSection(paper, input, height);
  if (planned) {
    drawPlanInBrief(paper, planned);
    drawRates(paper, planned, bottom - 40);
  }
  drawWarningsAbove(paper, input, bottom);
  paper.goTo(bottom);
  drawCautions(paper, input);
}

function drawFull(paper: Paper, input: ReportInput): void {
  const planned = plannedRun(input);
  const chapter = (title: string, draw: () => void) => {
    paper.need(90);
    paper.mark(title);
    draw();
  };
  chapter('Summary', () => {
    drawHead(paper, input);
    drawVerdict(paper, input);
  });
  chapter('Differential cross section', () => {
    paper.heading('Differential cross section');
    drawCrossSection(paper, input, 300);
    drawUnavailable(paper, input);
  });
  chapter('Integrated cross sections', () => drawIntegrals(paper, input));
  chapter('Validity', () => {
    drawVerdictInFull(paper, input);
    drawConditions(paper, input);
  });
  chapter('Assumptions', () => drawAssumptions(paper, input));
  if (planned) {
    chapter('Run plan', () => {
      paper.heading('Run plan');
      drawPlanInBrief(paper, planned);
      drawRates(paper, planned);
      drawReasons(paper, planned);
      drawFactors(paper, planned.plan);
      drawBudget(paper, planned.plan);
      drawRunSheet(paper, planned);
      drawTargetChecks(paper, planned);
    });
  }
  chapter('Warnings', () => drawWarnings(paper, input));
  chapter('Cautions', () => {
    paper.skip(8);
    drawCautions(paper, input);
  });
  chapter('Golden rule', () => drawGoldenRule(paper, input));
  chapter('Numbers', () => {
    drawNumbers(paper, input);
    drawPhases(paper, input);
  });
}
