import { useCallback, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useSearchParams } from 'react-router-dom';
import type { User } from '#shared/contracts/users.ts';
import { Button } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Notice } from '#src/components/notice.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Pagination } from '#src/components/pagination.tsx';
import { SearchBox } from '#src/components/search-box.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { mayEver, useSession } from '#src/lib/session.ts';
import { usersOptions } from '../api.ts';
import { ActivityDialog } from '../components/activity.tsx';
import { EditPerson } from '../components/edit-person.tsx';
import { NewPerson } from '../components/new-person.tsx';
import { PeopleTable } from '../components/people-table.tsx';

/** Search and page in the address, as in every list. */
function usePeopleAddress() {
  const [search, setSearch] = useSearchParams();
  const q = (search.get('q') ?? '').slice(0, 200);
  const asked = Number(search.get('page') ?? '1');
  const page = Number.isInteger(asked) && asked >= 1 && asked <= 1_000_000 ? asked : 1;
  const onSearch = useCallback(
    (text: string) =>
      setSearch(text ? { q: text } : {}, { replace: true, state: { keepFocus: true } }),
    [setSearch],
  );
  const hrefOf = (target: number) => {
    const next = new URLSearchParams(search);
    next.set('page', String(target));
    return `?${next.toString()}`;
  };
  return { q, page, onSearch, hrefOf };
}

function People({ selfId }: { selfId: string }) {
  const { q, page, onSearch, hrefOf } = usePeopleAddress();
  const { data, error, refetch } = useQuery(usersOptions({ ...(q && { q }), page }));
  const [edited, setEdited] = useState<User | null>(null);
  const [turned, setTurned] = useState<User | null>(null);
  return (
    <>
      <div className="flex max-w-md">
        <SearchBox
          id="people-search"
          label="Search the people"
          placeholder="Name or e-mail"
          value={q}
          onSearch={onSearch}
        />
      </div>
      {error && <Failure what="The accounts" error={error} onRetry={() => void refetch()} />}
      {!data && !error && (
        <Waiting what="the accounts">
          <Skeleton className="mb-2 h-12" />
          <Skeleton className="mb-2 h-12" />
          <Skeleton className="h-12" />
        </Waiting>
      )}
      {data && data.items.length > 0 && (
        <PeopleTable
          people={data.items}
          selfId={selfId}
          onEdit={setEdited}
          onActivity={setTurned}
        />
      )}
      {data?.items.length === 0 && (
        <EmptyState title={q ? `Nobody's name or e-mail holds “${q}”.` : 'Nobody on this page.'} />
      )}
      {data && <Pagination {...data} noun="people" hrefOf={hrefOf} />}
      <EditPerson user={edited} onClose={() => setEdited(null)} />
      <ActivityDialog user={turned} onClose={() => setTurned(null)} />
    </>
  );
}

export default function PeoplePage() {
  const session = useSession();
  const [making, setMaking] = useState(false);
  if (!mayEver(session, 'user.list')) {
    return (
      <div className="flex flex-col gap-4">
        <PageHead title="People" />
        <Notice tone="info" title="Accounts are kept by administrators.">
          Ask one of them for a new account, another role or a new password.
        </Notice>
      </div>
    );
  }
  return (
    <div className="flex max-w-5xl flex-col gap-4">
      <PageHead title="People">
        <Button look="primary" onClick={() => setMaking(true)}>
          <Plus aria-hidden="true" className="size-4" /> New account
        </Button>
      </PageHead>
      <People selfId={session.user.id} />
      <NewPerson open={making} onOpenChange={setMaking} />
    </div>
  );
}
