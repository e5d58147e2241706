import { useCallback } from 'react';
import { useNavigate } from 'react-router-dom';
import { saveDraft } from '#src/lib/drafts.ts';
import { useSession } from '#src/lib/session.ts';
import type { Content } from '../model/fields.ts';
import { ownKey } from './kept-draft.ts';

/** Opens a content as a new case of its own, in the work kept on this computer. */
export function useDuplicate(): (content: Content) => void {
  const navigate = useNavigate();
  const { user } = useSession();
  return useCallback(
    ({ title, tags, document }: Content) => {
      const name = crypto.randomUUID().slice(0, 8);
      const href = `/cases/new?draft=${name}`;
      const copy = `Copy of ${title}`.slice(0, 200);
      saveDraft(user.id, {
        key: ownKey(`case:new:${name}`),
        title: copy,
        href,
        value: { draft: { title: copy, tags, document, open: {} }, base: null },
      });
      void navigate(href);
    },
    [navigate, user.id],
  );
}
