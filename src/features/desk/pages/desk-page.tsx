import { Navigate } from 'react-router-dom';
import { Plus } from 'lucide-react';
import { ButtonLink } from '#src/components/button.tsx';
import { PageTitle } from '#src/components/page-title.tsx';
import { caseListOptions } from '#src/lib/case-list.ts';
import { mayEver, useSession } from '#src/lib/session.ts';
import { CaseGroup } from '../components/case-group.tsx';
import { Starts } from '../components/starts.tsx';
import { UnsavedWork } from '../components/unsaved-work.tsx';

const DRAFTS = caseListOptions({ owner: 'me', status: 'draft', sort: '-updated', pageSize: 6 });
const RECENT = caseListOptions({ sort: '-updated', pageSize: 8 });

export default function DeskPage() {
  const session = useSession();
  if (!mayEver(session, 'case.list')) return <Navigate to="/people" replace />;
  return (
    <div className="flex flex-col gap-8">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <PageTitle title="Desk" />
        <ButtonLink to="/cases/new" look="primary">
          <Plus aria-hidden="true" className="size-4" /> New case
        </ButtonLink>
      </div>
      <UnsavedWork accountId={session.user.id} />
      <div className="grid items-start gap-x-8 gap-y-8 xl:grid-cols-2">
        <CaseGroup
          title="My drafts"
          options={DRAFTS}
          more="/cases?owner=me&status=draft"
          empty={{
            title: 'No drafts of yours.',
            words:
              'A case that is saved but not yet reviewed waits here. Begin one below, and the curve follows while you type.',
          }}
        />
        <CaseGroup
          title="Recently changed"
          options={RECENT}
          more="/cases"
          empty={{
            title: 'No case yet that you may read.',
            words: 'Your own cases and those of campaigns you are a member of appear here.',
          }}
        />
      </div>
      <Starts />
    </div>
  );
}
