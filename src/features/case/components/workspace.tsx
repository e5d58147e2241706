import { useCallback, useEffect, useMemo, useState } from 'react';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useLocation, useNavigate } from 'react-router-dom';
import { Failure } from '#src/components/failure.tsx';
import type { CaseDetail } from '#shared/contracts/cases.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { saveDraft } from '#src/lib/drafts.ts';
import { say } from '#src/lib/toasts.ts';
import { useSession } from '#src/lib/session.ts';
import { formsQuery, massQuery, versionQuery } from '../api.ts';
import { useAreaUnit } from '../editing/area-unit.ts';
import { EditingContext } from '../editing/editor-context.ts';
import type { Editing } from '../editing/editor-context.ts';
import { ownKey } from '../editing/kept-draft.ts';
import { useShortcuts } from '../editing/use-editor.ts';
import { useLiveEstimate } from '../editing/use-estimate.ts';
import { contentOf, useWork } from '../editing/use-work.ts';
import type { Work } from '../editing/use-work.ts';
import type { Content } from '../model/fields.ts';
import { ownMass } from '../model/beam-context.ts';
import { allProblems } from '../model/problems.ts';
import { CaseBody } from './case-body.tsx';
import { CaseHeader } from './case-header.tsx';
import { WorkNotices } from './notices.tsx';
import { SaveFlow } from './save-flow.tsx';
import { SectionContent } from './section-content.tsx';
import { useSection } from './section-tabs.tsx';

export interface Saved {
  detail: CaseDetail;
  etag: string;
}

interface WorkspaceProps {
  subject: string;
  href: string;
  content: Content;
  saved: Saved | null;
}

const NO_FORMS: readonly FormInfo[] = [];

/** Opens the content as a new case of its own, in the work kept on this computer. */
export function useDuplicate() {
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

function restoreAsked(state: unknown): number | null {
  if (typeof state !== 'object' || state === null || !('restore' in state)) return null;
  return typeof state.restore === 'number' ? state.restore : null;
}

/** Takes up an older version as an edit of the newest, when one came here for that. */
function useRestore(work: Work, saved: Saved | null): void {
  const location = useLocation();
  const navigate = useNavigate();
  const client = useQueryClient();
  const asked = restoreAsked(location.state);
  const { edit } = work.editor;
  const caseId = saved?.detail.id;
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

/** A case that can be changed: filed already or not yet. */
export function Workspace({ subject, href, content, saved }: WorkspaceProps) {
  const { user } = useSession();
  const section = useSection();
  const readOnly = saved !== null && !saved.detail.mayEdit;
  const work = useWork({
    account: user.id,
    subject,
    href,
    readOnly,
    saved: {
      content,
      base: saved && { version: saved.detail.version.n, etag: saved.etag },
    },
  });
  useRestore(work, saved);
  const { editor } = work;
  const { present: draft, past, future } = editor.state;
  const { document } = draft;
  const live = useLiveEstimate(document);
  const forms = useQuery(formsQuery);
  const known = ownMass(document.projectile);
  const asked = useQuery({ ...massQuery(document.projectile), enabled: known === undefined });
  const [areaUnit, setAreaUnit] = useAreaUnit(live.estimate?.units.area ?? 'angstrom2');
  const [saving, setSaving] = useState(false);
  const duplicate = useDuplicate();
  const mass = known ?? asked.data;

  const problems = useMemo(() => allProblems(draft.open, live.errors), [draft.open, live.errors]);
  const editing = useMemo<Editing>(
    () => ({
      draft,
      readOnly,
      edit: editor.edit,
      editDocument: editor.editDocument,
      forms: forms.data ?? NO_FORMS,
      estimate: live.estimate,
      stale: live.stale,
      problems,
      mass,
      areaUnit,
      setAreaUnit,
    }),
    [
      draft,
      readOnly,
      editor.edit,
      editor.editDocument,
      forms.data,
      live.estimate,
      live.stale,
      problems,
      mass,
      areaUnit,
      setAreaUnit,
    ],
  );
  const openSave = useCallback(() => {
    if (!readOnly) setSaving(true);
  }, [readOnly]);
  useShortcuts({ undo: editor.undo, redo: editor.redo, save: openSave });

  return (
    <EditingContext value={editing}>
      <CaseHeader
        detail={saved?.detail ?? null}
        title={draft.title}
        readOnly={readOnly}
        dirty={work.dirty}
        onTitle={(title) => editor.edit('title', (before) => ({ ...before, title }))}
        undo={past.length > 0 ? editor.undo : null}
        redo={future.length > 0 ? editor.redo : null}
        onDuplicate={() => duplicate(contentOf(draft))}
        onSave={openSave}
        saving={false}
      />
      <CaseBody
        section={section}
        notices={
          <>
            <WorkNotices work={work} newest={saved?.detail.version ?? null} />
            {forms.isError && (
              <Failure
                what="The list of interaction forms"
                error={forms.error}
                onRetry={() => void forms.refetch()}
              />
            )}
          </>
        }
      >
        <SectionContent
          section={section}
          saved={saved}
          failure={live.failure}
          onRetry={live.retry}
        />
      </CaseBody>
      <SaveFlow
        open={saving}
        onClose={() => setSaving(false)}
        work={work}
        saved={saved}
        subject={subject}
        problems={problems}
      />
    </EditingContext>
  );
}
