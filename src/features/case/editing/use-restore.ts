import { useEffect } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import { useLocation, useNavigate } from 'react-router-dom';
import { say } from '#src/lib/toasts.ts';
import { versionQuery } from '../api.ts';
import type { Work } from './use-work.ts';

function restoreAsked(state: unknown): number | null {
  if (typeof state !== 'object' || state === null || !('restore' in state)) return null;
  return typeof state.restore === 'number' ? state.restore : null;
}

/** Takes up an older version as an edit of the newest, when one came here for that. */
export function useRestore(work: Work, caseId: string | undefined): void {
  const location = useLocation();
  const navigate = useNavigate();
  const client = useQueryClient();
  const asked = restoreAsked(location.state);
  const { edit } = work.editor;
  useEffect(() => {
    if (asked === null || caseId === undefined) return;
    void navigate({ search: location.search }, { replace: true, state: { keepFocus: true } });
    client
      .fetchQuery(versionQuery(caseId, asked))
      .then((version) => {
        edit('restore', (draft) => ({
          ...draft,
          title: version.title,
          document: version.document,
          open: {},
        }));
        say(`Version ${asked} is taken up again, unsaved. Undo brings the newest back.`);
      })
      .catch(() =>
        say(`Version ${asked} could not be loaded. Try again from the record.`, { tone: 'fault' }),
      );
  }, [asked, caseId, client, edit, navigate, location.search]);
}
