import { Navigate } from 'react-router-dom';
import { Plus } from 'lucide-react';
import { ButtonLink } from '#src/components/button.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { caseListOptions } from '#src/lib/case-list.ts';
import { mayEver, useSession } from '#src/lib/session.ts';
import { CaseGroup } from '../components/case-group.tsx';
import { Starts } from '../components/starts.tsx';
import { UnsavedWork } from '../components/unsaved-work.tsx';

const DRAFTS = caseListOptions({ owner: 'me', status: 'draft', sort: '-updated', pageSize: 6 });
const RECENT = caseListOptions({ sort: '-updated', pageSize: 30 });

export default function DeskPage() {
  const session = useSession();
  if (!mayEver(session, 'case.list')) return <Navigate to="/people" replace />;
  return (
    <div className="flex flex-col gap-8">
      <PageHead title="Desk">
        <ButtonLink to="/cases/new" look="primary">
          <Plus aria-hidden="true" className="size-4" /> New case
        </ButtonLink>
      </PageHead>
      <UnsavedWork accountId={session.user.id} />
      <div className="grid items-start gap-x-8 gap-y-8 xl:grid-cols-2">
        <CaseGroup
          title="My drafts"
          options={DRAFTS}
          atMost={6}
          more="/cases?owner=me&status=draft"
          moreLabel="all my drafts"
          empty={{
            title: 'No drafts of yours.',
            begins: true,
            words:
              'A case that is saved but not yet reviewed waits here. Begin one below, and the curve follows while you type.',
          }}
        />
        <CaseGroup
          title="Other recent changes"
          options={RECENT}
          wants={(item) => item.owner.id !== session.user.id || item.status !== 'draft'}
          atMost={8}
          more="/cases"
          moreLabel="all cases"
          empty={{
            title: 'Nothing else has changed.',
            words:
              'Cases of campaigns you are a member of appear here, and your own once they are past the draft.',
          }}
        />
      </div>
      <Starts />
    </div>
  );
}
