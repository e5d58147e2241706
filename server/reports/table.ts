import { INK, LINE, MUTED, SOFT } from './paper.ts';
import type { Paper } from './paper.ts';
import type { Face } from './typeface.ts';

export interface Column {
  head: string;
  /** Share of the width, beside those of the others. */
  share: number;
  /** Numbers stand right, words left. */
  align?: 'left' | 'right';
}

interface Row {
  cells: readonly string[];
  face: Face;
  colour: string;
}

const SIZE = 7.5;
const PAD = 4;
const RISE = 3;

/** A table whose head stands on top of every page it reaches. */
export function drawTable(
  paper: Paper,
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
): void {
  const head: Row = { cells: columns.map((column) => column.head), face: 'bold', colour: MUTED };
  const drawHead = () => drawRow(paper, columns, head, heightOf(paper, columns, head), true);
  paper.need(48);
  drawHead();
  for (const cells of rows) {
    const row: Row = { cells, face: 'plain', colour: INK };
    const height = heightOf(paper, columns, row);
    if (paper.y + height > paper.bottom) {
      paper.turn();
      drawHead();
    }
    drawRow(paper, columns, row, height, false);
  }
  paper.skip(5);
}

/** How many rows of one line go between here and `bottom`, head included. */
export function rowsThatFit(paper: Paper, columns: readonly Column[], bottom: number): number {
  const head: Row = { cells: columns.map((column) => column.head), face: 'bold', colour: MUTED };
  const line: Row = { cells: columns.map(() => '0'), face: 'plain', colour: INK };
  const left = bottom - paper.y - heightOf(paper, columns, head) - 5;
  return Math.max(0, Math.floor(left / heightOf(paper, columns, line)));
}

function widths(paper: Paper, columns: readonly Column[]): number[] {
  const whole = columns.reduce((sum, { share }) => sum + share, 0);
  return columns.map(({ share }) => (paper.width * share) / whole);
}

function heightOf(paper: Paper, columns: readonly Column[], row: Row): number {
  paper.use(row.face, SIZE);
  const line = paper.lineHeight();
  const heights = widths(paper, columns).map((width, index) => {
    const text = paper.written(row.cells[index] ?? '');
    const room = width - 2 * PAD;
    // To measure one line is cheap, to break it into several is not.
    if (!text.includes('\n') && paper.document.widthOfString(text) <= room) return line;
    return paper.document.heightOfString(text, { width: room });
  });
  return Math.max(line, ...heights) + RISE;
}

function drawRow(
  paper: Paper,
  columns: readonly Column[],
  row: Row,
  height: number,
  isHead: boolean,
): void {
  const { document, left, y, width: whole } = paper;
  if (isHead) document.rect(left, y, whole, height).fill(SOFT);
  paper.use(row.face, SIZE, row.colour);
  let x = left;
  for (const [index, width] of widths(paper, columns).entries()) {
    const text = paper.written(row.cells[index] ?? '');
    const room = width - 2 * PAD;
    const align = columns[index]?.align ?? 'left';
    const length = document.widthOfString(text);
    if (!text.includes('\n') && length <= room) {
      const start = align === 'right' ? x + PAD + room - length : x + RISE;
      document.text(text, start, y + RISE / 2, { lineBreak: false });
    } else document.text(text, x + PAD, y + RISE / 2, { width: room, align });
    x += width;
  }
  const foot = y + height;
  document
    .moveTo(left, foot)
    .lineTo(left + whole, foot)
    .lineWidth(0.4)
    .stroke(LINE);
  paper.goTo(foot);
}

/** Names and what they stand for, in two columns without a head. */
export function drawPairs(paper: Paper, pairs: readonly (readonly [string, string])[]): void {
  const name = 112;
  const room = paper.width - name;
  for (const [label, text] of pairs) {
    paper.use('plain', 9);
    const written = paper.written(text);
    const height = Math.max(
      paper.lineHeight(),
      paper.document.heightOfString(written, { width: room }),
    );
    paper.need(Math.min(height, 200));
    const { y } = paper;
    paper.use('plain', 9, MUTED);
    paper.document.text(paper.written(label), paper.left, y, { width: name - 6 });
    const below = paper.y;
    const pages = paper.pages;
    paper.use('plain', 9);
    paper.document.text(written, paper.left + name, y, { width: room });
    paper.goTo((paper.pages === pages ? Math.max(paper.y, below) : paper.y) + 1.5);
  }
}
