import { summarise } from '#server/documents/summarise.ts';
import { BARN, INK, LINE, MUTED } from './paper.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';
import { MISSING } from './typeface.ts';
import { utcText } from './words.ts';

const STATIONS = [
  ['Beam', 'beam'],
  ['Target', 'target'],
  ['Interaction', 'interaction'],
  ['Detectors', 'detectors'],
] as const;
/** Set smaller past it, so that no title is cut. */
const LONG_TITLE = 80;

/** Title, what it is a report of, and the beam line of the case. */
export function drawHead(paper: Paper, { kind, caseNumber, version }: ReportInput): void {
  const { n, title, author, createdAt, hash, engine, status, note } = version;
  const what = kind === 'proposal' ? 'Proposal page' : 'Full report';
  paper.text(`Tallybarn · ${what}`, { size: 8, colour: BARN, after: 1 });
  const proposal = kind === 'proposal';
  paper.text(title, { face: 'bold', size: title.length > LONG_TITLE ? 11 : proposal ? 14 : 18 });
  if (paper.written(title).includes(MISSING) && !title.includes(MISSING)) {
    paper.text(
      `${MISSING} stands for a sign that this typeface lacks; the title in the file has it.`,
      {
        size: 7.5,
        colour: MUTED,
      },
    );
  }
  paper.text(
    `Case ${caseNumber}, version ${n} (${status === 'inReview' ? 'in review' : status}) · ${author.name} · saved ${utcText(createdAt)} · computed by ${engine.name} ${engine.version}`,
    { size: 8.5, colour: MUTED, after: 0, ...(proposal && { lines: 2 }) },
  );
  paper.text(`SHA-256 ${hash}`, { size: 8, colour: MUTED, after: 5 });
  if (note) {
    const question = `Question: ${proposal ? note.replace(/\s+/g, ' ') : note}`;
    paper.text(question, { after: 4, ...(proposal && { lines: 2 }) });
  }
  drawBeamLine(paper, summarise(version.document));
}

/** The four stations along one line, each with its summary. */
function drawBeamLine(paper: Paper, summary: ReturnType<typeof summarise>): void {
  const { document, left, width } = paper;
  paper.need(70);
  const y = paper.y + 5;
  const step = width / STATIONS.length;
  document
    .moveTo(left, y)
    .lineTo(left + width, y)
    .lineWidth(1)
    .stroke(LINE);
  let lowest = y;
  for (const [index, [name, key]] of STATIONS.entries()) {
    const x = left + index * step;
    document.circle(x + 3, y, 3).fill(INK);
    paper.use('bold', 8.5);
    document.text(name, x, y + 6, { width: step - 8 });
    paper.use('plain', 8);
    const height = 4 * paper.lineHeight() - 0.5;
    const text = paper.written(summary[key]);
    document.text(text, x, paper.y, { width: step - 8, height, ellipsis: '…' });
    lowest = Math.max(lowest, paper.y);
  }
  paper.goTo(lowest + 6);
}
