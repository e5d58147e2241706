import type { z } from 'zod';

/**
 * Unsaved work, kept on this computer per account: it survives a reload and a lost session, and is offered or cleared at sign-out,
 * since control-room computers are shared.
 */
export interface Draft<T = unknown> {
  /** What it belongs to, such as `case:ID` or `case:new`. */
  key: string;
  /** What a person would call it. */
  title: string;
  /** Where the page stands that takes it up again. */
  href: string;
  savedAt: string;
  value: T;
}

const prefix = (accountId: string) => `tallybarn.draft.${accountId}.`;

function parse(key: string, text: string | null): Draft | undefined {
  if (text === null) return undefined;
  try {
    const draft: unknown = JSON.parse(text);
    if (typeof draft !== 'object' || draft === null || !('value' in draft)) return undefined;
    const { title, href, savedAt } = draft as Record<string, unknown>;
    if (typeof title !== 'string' || typeof savedAt !== 'string') return undefined;
    if (typeof href !== 'string') return undefined;
    return { key, title, href, savedAt, value: draft.value };
  } catch (damaged) {
    console.info(`The draft ${key} cannot be read`, damaged);
    return undefined;
  }
}

/** False when the browser has no room or allows no storage: the page must then say that work is not kept. */
export function saveDraft(accountId: string, draft: Omit<Draft, 'savedAt'>): boolean {
  const { key, title, href, value } = draft;
  try {
    const text = JSON.stringify({ title, href, savedAt: new Date().toISOString(), value });
    localStorage.setItem(prefix(accountId) + key, text);
    return true;
  } catch (refused) {
    console.info('Unsaved work cannot be kept on this computer', refused);
    return false;
  }
}

/** Undefined when there is none, or when what is kept no longer has the shape asked for. */
export function loadDraft<S extends z.ZodType>(
  accountId: string,
  key: string,
  shape: S,
): Draft<z.output<S>> | undefined {
  const draft = listDrafts(accountId).find((entry) => entry.key === key);
  if (!draft) return undefined;
  const parsed = shape.safeParse(draft.value);
  return parsed.success ? { ...draft, value: parsed.data } : undefined;
}

/** Newest first. */
export function listDrafts(accountId: string): Draft[] {
  const start = prefix(accountId);
  try {
    return Object.keys(localStorage)
      .filter((name) => name.startsWith(start))
      .flatMap((name) => parse(name.slice(start.length), localStorage.getItem(name)) ?? [])
      .sort((a, b) => b.savedAt.localeCompare(a.savedAt));
  } catch (refused) {
    console.info('Storage is closed to this page', refused);
    return [];
  }
}

export function clearDraft(accountId: string, key: string): void {
  try {
    localStorage.removeItem(prefix(accountId) + key);
  } catch (refused) {
    console.info('Storage is closed to this page', refused);
  }
}

export function clearDrafts(accountId: string): void {
  for (const draft of listDrafts(accountId)) clearDraft(accountId, draft.key);
}
