import { FACES, glyphsOf, openDocument, writable } from './typeface.ts';
import type { Face } from './typeface.ts';

export const INK = '#23201B';
export const MUTED = '#6A6256';
export const LINE = '#C9BFAE';
export const SOFT = '#F3EEE4';
export const BARN = '#9E2B25';

const MARGIN = 40;
const FOOT = 50;

export interface PaperInfo {
  title: string;
  author: string;
  subject: string;
  /** Of the version, so that one version always gives one file. */
  date: Date;
}

interface TextStyle {
  face?: Face;
  size?: number;
  colour?: string;
  /** Lines at most; what is more ends in an ellipsis. */
  lines?: number;
  /** Space after, points. */
  after?: number;
}

/** Pages of A4 with one column of text; everything is written from the top down, and what does not fit goes on over the page. */
export class Paper {
  readonly document;
  readonly left = MARGIN;
  readonly width: number;

  constructor({ title, author, subject, date }: PaperInfo) {
    this.document = openDocument({
      size: 'A4',
      margins: { top: MARGIN, left: MARGIN, right: MARGIN, bottom: FOOT },
      bufferPages: true,
      pdfVersion: '1.7',
      lang: 'en',
      displayTitle: true,
      info: {
        Title: title,
        Author: author,
        Subject: subject,
        Creator: 'Tallybarn',
        CreationDate: date,
        ModDate: date,
      },
    });
    for (const [name, file] of Object.entries(FACES)) this.document.registerFont(name, file);
    this.width = this.document.page.width - 2 * MARGIN;
    this.use('plain', 9);
  }

  get y(): number {
    return this.document.y;
  }

  /** The lowest place of text on this page. */
  get bottom(): number {
    return this.document.page.height - FOOT;
  }

  get pages(): number {
    return this.document.bufferedPageRange().count;
  }

  use(face: Face, size: number, colour = INK): void {
    this.document.font(face).fontSize(size).fillColor(colour);
  }

  written(text: string): string {
    return writable(text, glyphsOf(this.document));
  }

  goTo(y: number): void {
    this.document.x = this.left;
    this.document.y = y;
  }

  skip(points: number): void {
    this.goTo(this.y + points);
  }

  /** A new page unless this much is left on this one. */
  need(points: number): void {
    if (this.y + points > this.bottom) this.turn();
  }

  turn(): void {
    this.document.addPage();
    this.goTo(MARGIN);
  }

  text(text: string, style: TextStyle = {}): void {
    const { face = 'plain', size = 9, colour = INK, lines, after = 3 } = style;
    this.use(face, size, colour);
    const height = lines && { height: lines * this.lineHeight() - 0.5, ellipsis: '…' };
    this.document.text(this.written(text), this.left, this.y, { width: this.width, ...height });
    this.skip(after);
  }

  /** What `text` would take, space after left out. */
  heightOf(text: string, { face = 'plain', size = 9 }: TextStyle = {}): number {
    this.use(face, size);
    return this.document.heightOfString(this.written(text), { width: this.width });
  }

  lineHeight(): number {
    return this.document.currentLineHeight(true);
  }

  /** An entry of the outline, leading to this page. */
  mark(title: string): void {
    this.document.outline.addItem(title);
  }

  /** A heading with room for something below it. */
  heading(text: string, level: 1 | 2 = 1): void {
    this.need(level === 1 ? 70 : 50);
    this.skip(level === 1 ? 8 : 4);
    this.text(text, { face: 'bold', size: level === 1 ? 12.5 : 10, after: 2 });
    if (level === 1) {
      this.rule();
      this.skip(4);
    }
  }

  rule(): void {
    const { document, left, width, y } = this;
    document
      .moveTo(left, y)
      .lineTo(left + width, y)
      .lineWidth(0.6)
      .stroke(LINE);
  }

  /** Pages numbered, and every page says what it belongs to. */
  foot(text: string): void {
    const { document, left, width } = this;
    const { start, count } = document.bufferedPageRange();
    for (let page = start; page < start + count; page += 1) {
      document.switchToPage(page);
      // Below the margin a text would open a page of its own.
      document.page.margins.bottom = 0;
      this.use('plain', 7.5, MUTED);
      const y = document.page.height - FOOT + 16;
      const number = `page ${page - start + 1} of ${count}`;
      document.text(this.written(text), left, y, { lineBreak: false });
      document.text(number, left, y, { width, align: 'right', lineBreak: false });
    }
  }

  /** The file. What was drawn lies in the stream already: nothing is left to wait for. */
  close(): Uint8Array {
    this.document.end();
    const bytes: unknown = this.document.read();
    if (!(bytes instanceof Uint8Array)) throw new Error('A report came out empty.');
    return new Uint8Array(bytes);
  }
}
