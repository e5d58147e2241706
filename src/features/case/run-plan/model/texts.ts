import type { Draft } from '../../model/editor.ts';
import { without } from '../../model/without.ts';

const DETECTOR = /^\/runPlan\/detectors\/(\d+)(\/.*)?$/;

/** Where a text belongs after a change; null where its field is gone. */
type Move = (pointer: string) => string | null;

function moved<T>(texts: Readonly<Record<string, T>>, move: Move): Record<string, T> {
  const kept: Record<string, T> = {};
  for (const [pointer, text] of Object.entries(texts)) {
    const place = move(pointer);
    if (place !== null) kept[place] = text;
  }
  return kept;
}

/** What was typed, valid or not, moved with the fields it stands in. */
export function withTexts(draft: Draft, move: Move): Draft {
  const entered = moved(draft.document.entered ?? {}, move);
  const rest = without(draft.document, 'entered');
  const document = Object.keys(entered).length === 0 ? rest : { ...rest, entered };
  return { ...draft, document, open: moved(draft.open, move) };
}

/** Texts of fields that are there no longer go with them: a fault without a field could never be mended. */
export const withoutTexts = (draft: Draft, gone: RegExp): Draft =>
  withTexts(draft, (pointer) => (gone.test(pointer) ? null : pointer));

/** Texts after one detector is gone: its own go, those behind it move up. */
export function withoutDetectorTexts(draft: Draft, removed: number): Draft {
  return withTexts(draft, (pointer) => {
    const match = DETECTOR.exec(pointer);
    if (!match) return pointer;
    const index = Number(match[1]);
    if (index === removed) return null;
    return index < removed ? pointer : `/runPlan/detectors/${index - 1}${match[2] ?? ''}`;
  });
}
