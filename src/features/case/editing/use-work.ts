import { useEffect, useMemo, useState } from 'react';
import { clearDraft } from '#src/lib/drafts.ts';
import type { Draft } from '../model/editor.ts';
import type { Content } from '../model/fields.ts';
import { same } from '#src/lib/same.ts';
import { keep, otherWork, ownKey, ownWork } from './kept-draft.ts';
import type { KeptWork } from './kept-draft.ts';
import { useEditor } from './use-editor.ts';
import type { Editor } from './use-editor.ts';

/** The saved version that the work rests on. `content` is missing where kept work rests on an older version than the newest. */
export interface Base {
  version: number;
  etag: string;
  content: Content | null;
}

export const draftOf = (content: Content): Draft => ({ ...content, open: {} });
export const contentOf = ({ title, tags, document }: Draft): Content => ({ title, tags, document });

export interface Work {
  editor: Editor;
  base: Base | null;
  setBase: (base: Base | null) => void;
  dirty: boolean;
  /** False when the browser refuses to keep unsaved work. */
  kept: boolean;
  /** Someone saved a version after the one this unsaved work rests on. */
  overtaken: boolean;
  /** When the unsaved work shown was typed, if it was taken up again. */
  restoredAt: string | null;
  /** Throws the unsaved work away and shows what is saved. */
  discard: () => void;
  /** Work on the same case from another tab, waiting to be taken over. */
  other: { savedAt: string; takeOver: () => void; forget: () => void } | null;
}

interface WorkInput {
  account: string;
  /** `case:ID`, `case:new`. */
  subject: string;
  /** Address of the page that takes the work up again. */
  href: string;
  saved: { content: Content; base: Omit<Base, 'content'> | null };
  readOnly: boolean;
}

function baseFor(work: KeptWork, saved: WorkInput['saved']): Base | null {
  if (work.base === null) return null;
  const current = saved.base?.etag === work.base.etag;
  return { ...work.base, content: current ? saved.content : null };
}

/** The draft of a case, kept on this computer with every keystroke until it is saved. */
export function useWork({ account, subject, href, saved, readOnly }: WorkInput): Work {
  const [found] = useState(() => (readOnly ? undefined : ownWork(account, subject)));
  const [restoredAt, setRestoredAt] = useState(found?.savedAt ?? null);
  const [elsewhere, setElsewhere] = useState(() =>
    readOnly || found ? undefined : otherWork(account, subject),
  );
  const [base, setBase] = useState<Base | null>(() =>
    found ? baseFor(found.value, saved) : saved.base && { ...saved.base, content: saved.content },
  );
  const editor = useEditor(found?.value.draft ?? draftOf(saved.content));
  const draft = editor.state.present;
  const [kept, setKept] = useState(true);
  const [seen, setSeen] = useState(saved.base?.etag);

  const dirty = useMemo(() => {
    if (readOnly) return false;
    const reference = base === null ? saved.content : base.content;
    if (reference === null) return true;
    const open = Object.values(draft.open).some(({ problem }) => problem !== null);
    return open || !same(contentOf(draft), reference);
  }, [readOnly, base, saved.content, draft]);

  // The case may be saved or withdrawn elsewhere while this page is open.
  if (saved.base && base && saved.base.etag !== seen) {
    setSeen(saved.base.etag);
    if (saved.base.version === base.version) {
      setBase({ ...base, etag: saved.base.etag });
    } else if (saved.base.version > base.version && !dirty) {
      setBase({ ...saved.base, content: saved.content });
      editor.load(draftOf(saved.content));
    }
  }

  useEffect(() => {
    if (readOnly) return;
    if (!dirty) {
      clearDraft(account, ownKey(subject));
      return;
    }
    const stored = keep(account, subject, href, {
      draft,
      base: base && { version: base.version, etag: base.etag },
    });
    // Storage is the outside world here: whether it took the work is known only afterwards.
    queueMicrotask(() => setKept(stored));
  }, [readOnly, dirty, account, subject, href, draft, base]);

  return {
    editor,
    base,
    setBase,
    dirty,
    kept,
    overtaken: dirty && base !== null && (saved.base?.version ?? 0) > base.version,
    restoredAt: dirty ? restoredAt : null,
    discard: () => {
      editor.load(draftOf(saved.content));
      setBase(saved.base && { ...saved.base, content: saved.content });
      setRestoredAt(null);
    },
    other: elsewhere
      ? {
          savedAt: elsewhere.savedAt,
          takeOver: () => {
            editor.edit('take over', () => elsewhere.value.draft);
            setBase(baseFor(elsewhere.value, saved));
            clearDraft(account, elsewhere.key);
            setElsewhere(undefined);
          },
          forget: () => {
            clearDraft(account, elsewhere.key);
            setElsewhere(undefined);
          },
        }
      : null,
  };
}
