import { useCallback, useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Failure } from '#src/components/failure.tsx';
import type { CaseDetail } from '#shared/contracts/cases.ts';
import { DEFAULT_UNITS } from '#shared/contracts/estimates.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { useSession } from '#src/lib/session.ts';
import { formsQuery, massQuery } from '../api.ts';
import { useAreaUnit } from '../editing/area-unit.ts';
import { EditingContext } from '../editing/editor-context.ts';
import type { Editing } from '../editing/editor-context.ts';
import { useDuplicate } from '../editing/use-duplicate.ts';
import { useRestore } from '../editing/use-restore.ts';
import { WORD_MS, useShownProblems } from '../editing/shown-problems.ts';
import { useShortcuts } from '../editing/use-editor.ts';
import { useLiveEstimate } from '../editing/use-estimate.ts';
import { contentOf, useWork } from '../editing/use-work.ts';
import { CitationNotices } from '../library/citation-notices.tsx';
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
  useRestore(work, saved?.detail.id);
  const { editor } = work;
  const { present: draft, past, future } = editor.state;
  const { document } = draft;
  const live = useLiveEstimate(document);
  const forms = useQuery(formsQuery);
  const known = ownMass(document.projectile);
  const asked = useQuery({ ...massQuery(document.projectile), enabled: known === undefined });
  const [areaUnit, setAreaUnit] = useAreaUnit(document.units?.area ?? DEFAULT_UNITS.area);
  const [saving, setSaving] = useState(false);
  const duplicate = useDuplicate();
  const mass = known ?? asked.data;

  const problems = useMemo(() => allProblems(draft.open, live.errors), [draft.open, live.errors]);
  const shownProblems = useShownProblems(problems, WORD_MS);
  const editing = useMemo<Editing>(
    () => ({
      draft,
      readOnly,
      edit: editor.edit,
      editDocument: editor.editDocument,
      forms: forms.data ?? NO_FORMS,
      estimate: live.estimate,
      stale: live.stale,
      problems: shownProblems,
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
      shownProblems,
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
            <CitationNotices />
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
