import type { CaseDocument } from '#shared/contracts/cases.ts';
import { without } from './without.ts';

/** The document with what was typed at `pointer` kept, or forgotten when `text` is null. */
export function withEntered(
  document: CaseDocument,
  pointer: string,
  text: string | null,
): CaseDocument {
  const others = without(document.entered ?? {}, pointer);
  const kept = text === null ? others : { ...others, [pointer]: text };
  const rest = without(document, 'entered');
  return Object.keys(kept).length === 0 ? rest : { ...rest, entered: kept };
}

/** Drops every text kept at or below `pointer`. */
export function withoutEntered(document: CaseDocument, pointer: string): CaseDocument {
  const below = Object.keys(document.entered ?? {}).filter((key) => isAtOrBelow(key, pointer));
  return below.reduce((kept, key) => withEntered(kept, key, null), document);
}

export function isAtOrBelow(pointer: string, above: string): boolean {
  return pointer === above || pointer.startsWith(`${above}/`);
}

/** Moves the texts of the terms after a removed one down by one place; those of the removed term go. */
export function withoutTermTexts<T>(
  texts: Readonly<Record<string, T>>,
  removed: number,
): Record<string, T> {
  const moved: Record<string, T> = {};
  for (const [pointer, text] of Object.entries(texts)) {
    const match = /^\/interaction\/terms\/(\d+)(\/.*)?$/.exec(pointer);
    const index = match ? Number(match[1]) : -1;
    if (match && index === removed) continue;
    const key =
      match && index > removed ? `/interaction/terms/${index - 1}${match[2] ?? ''}` : pointer;
    moved[key] = text;
  }
  return moved;
}
