import { createRequire } from 'node:module';
import type PDFDocument from 'pdfkit';

const load = createRequire(import.meta.url);

/** Both faces of a report, whole: Source Sans 3 holds Greek, raised and lowered digits and the signs of formulas. */
export const FACES = {
  plain: load.resolve('source-sans/TTF/SourceSans3-Regular.ttf'),
  bold: load.resolve('source-sans/TTF/SourceSans3-Semibold.ttf'),
} as const;
export type Face = keyof typeof FACES;

/** Loaded with the first report, not with the thread: most threads never draw one. */
export function openDocument(
  options: ConstructorParameters<typeof PDFDocument>[0],
): InstanceType<typeof PDFDocument> {
  const Document = load('pdfkit') as typeof PDFDocument;
  return new Document(options);
}

interface Glyphs {
  hasGlyphForCodePoint: (code: number) => boolean;
}

/** The font that the document writes in now, as its parser gives it. */
export function glyphsOf(
  document: InstanceType<typeof PDFDocument> & { _font?: { font: Glyphs } },
): Glyphs {
  const glyphs = document._font?.font;
  if (!glyphs) throw new Error('A report chooses its font before it writes.');
  return glyphs;
}

/** A sign the typeface lacks. */
export const MISSING = '□';
const LOOKALIKES: Readonly<Record<string, string>> = { ₕ: 'h', '⋅': '·', '\t': ' ' };
/** Controls, directions and joiners, which paper has no use for, and what modifies a sign that is not there either. */
const UNSEEN = /[\p{Cc}\p{Cf}\p{Variation_Selector}\p{Emoji_Modifier}]/gu;

/** A text as the typeface can write it; line ends stay. */
export function writable(text: string, glyphs: Glyphs): string {
  const lines = text.normalize('NFC').split(/\r\n|\r|\n/);
  const clean = lines.map((line) =>
    [...line.replaceAll('\t', ' ').replace(UNSEEN, '')]
      .map((sign) => LOOKALIKES[sign] ?? sign)
      .map((sign) => (glyphs.hasGlyphForCodePoint(sign.codePointAt(0) ?? 0) ? sign : MISSING))
      .join(''),
  );
  return clean.join('\n');
}
