import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { CaseDetail, VersionDetail } from '#shared/contracts/cases.ts';
import { formsQuery } from '../api.ts';
import { useAreaUnit } from '../editing/area-unit.ts';
import { EditingContext } from '../editing/editor-context.ts';
import type { Editing } from '../editing/editor-context.ts';
import { useDuplicate } from '../editing/use-duplicate.ts';
import { draftOf } from '../editing/use-work.ts';
import { CitationNotices } from '../library/citation-notices.tsx';
import { momentText } from '../model/moments.ts';
import { CaseBody } from './case-body.tsx';
import { CaseHeader } from './case-header.tsx';
import { SectionContent } from './section-content.tsx';
import { useSection } from './section-tabs.tsx';

interface VersionViewProps {
  detail: CaseDetail;
  etag: string;
  version: VersionDetail;
}

const nothing = () => undefined;

/** A version as it was saved, with the result it was saved with. Nothing here can be changed. */
export function VersionView({ detail, etag, version }: VersionViewProps) {
  const navigate = useNavigate();
  const section = useSection();
  const duplicate = useDuplicate();
  const forms = useQuery(formsQuery);
  const { estimate } = version.result;
  const [areaUnit, setAreaUnit] = useAreaUnit(estimate.units.area);
  const editing = useMemo<Editing>(
    () => ({
      draft: draftOf({ title: version.title, tags: detail.tags, document: version.document }),
      readOnly: true,
      edit: nothing,
      editDocument: nothing,
      forms: forms.data ?? [],
      estimate,
      stale: false,
      problems: [],
      mass: undefined,
      areaUnit,
      setAreaUnit,
    }),
    [version, detail.tags, forms.data, estimate, areaUnit, setAreaUnit],
  );
  const newest = `/cases/${detail.id}`;
  return (
    <EditingContext value={editing}>
      <CaseHeader
        detail={detail}
        version={version}
        title={version.title}
        readOnly
        dirty={false}
        onTitle={nothing}
        undo={null}
        redo={null}
        saving={false}
        onSave={nothing}
        onDuplicate={() => duplicate(editing.draft)}
        instead={
          detail.mayEdit && (
            <Button
              look="primary"
              onClick={() => void navigate(newest, { state: { restore: version.n } })}
            >
              Restore as new version
            </Button>
          )
        }
      />
      <CaseBody
        section={section}
        notices={
          <>
            <Notice
              tone="info"
              title={`Version ${version.n}, as it was saved.`}
              actions={
                <ButtonLink size="small" to={newest}>
                  Open the newest
                </ButtonLink>
              }
            >
              By {version.author.name}, {momentText(version.createdAt)}, computed by{' '}
              {version.engine.name} {version.engine.version}
              {version.note ? `: “${version.note}”` : '.'} Its inputs and result do not change.
            </Notice>
            <CitationNotices />
          </>
        }
      >
        <SectionContent
          section={section}
          saved={{ detail, etag }}
          version={version}
          failure={null}
          onRetry={nothing}
        />
      </CaseBody>
    </EditingContext>
  );
}
