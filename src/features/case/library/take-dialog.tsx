import { useState } from 'react';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { InteractionItem } from '#shared/contracts/library.ts';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Failure } from '#src/components/failure.tsx';
import { SearchBox } from '#src/components/search-box.tsx';
import { Skeleton } from '#src/components/skeleton.tsx';
import { inWords } from '#src/lib/api.ts';
import { energyRangeText, speciesText } from '#src/lib/interaction-words.ts';
import { interactionListOptions, interactionVersionQuery } from '#src/lib/library.ts';
import { say } from '#src/lib/toasts.ts';
import { useEditing } from '../editing/editor-context.ts';
import { takeInteraction } from '../model/citation.ts';

const SHOWN = 20;

function Entry({ item, onTake }: { item: InteractionItem; onTake: () => void }) {
  return (
    <li className="flex flex-wrap items-start justify-between gap-x-4 gap-y-2 py-2.5">
      <div className="min-w-0 flex-1 basis-64">
        <p className="font-semibold">
          {item.name}{' '}
          <span className="text-sm font-normal text-muted">version {item.version.n}</span>
        </p>
        <p className="text-sm">{item.summary}</p>
        <p className="text-sm text-muted">
          {energyRangeText(item.validity)}, {speciesText(item.validity)}. {item.source}
        </p>
      </div>
      <Button size="small" onClick={onTake} aria-label={`Take ${item.name}`}>
        Take
      </Button>
    </li>
  );
}

/** Choosing an interaction of the library: it takes the place of every term of the case. */
export function TakeFromLibrary({ onClose }: { onClose: () => void }) {
  const { edit } = useEditing();
  const client = useQueryClient();
  const [q, setQ] = useState('');
  const { data, error, refetch } = useQuery(
    interactionListOptions({ pageSize: SHOWN, ...(q && { q }) }),
  );

  async function take({ id, name, version }: InteractionItem): Promise<void> {
    try {
      const taken = await client.fetchQuery(interactionVersionQuery(id, version.n));
      edit('take interaction', (draft) => takeInteraction(draft, taken));
      say(`“${name}”, version ${version.n}, is taken. Undo brings the terms of before back.`);
      onClose();
    } catch (fault) {
      say(inWords(fault), { tone: 'fault' });
    }
  }

  return (
    <Dialog
      open
      width="wide"
      onOpenChange={(open) => !open && onClose()}
      title="Take an interaction from the library"
      description="Its terms take the place of those of this case, which then cites its version. Beam and target stay."
      actions={<Button onClick={onClose}>Cancel</Button>}
    >
      <div className="flex">
        <SearchBox
          id="take-search"
          label="Search the library"
          placeholder="Name, form, particle or source"
          value={q}
          onSearch={setQ}
        />
      </div>
      {error && <Failure what="The library" error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Skeleton className="h-24" />}
      {data?.items.length === 0 && (
        <p className="text-muted">
          {q === '' ? 'Nothing is published yet.' : `No interaction fits “${q}”.`}
        </p>
      )}
      {data && data.items.length > 0 && (
        <ul aria-label="Interactions of the library" className="divide-y divide-line">
          {data.items.map((item) => (
            <Entry key={item.id} item={item} onTake={() => void take(item)} />
          ))}
        </ul>
      )}
      {data && data.total > data.items.length && (
        <p className="text-muted">
          {data.total - data.items.length} more: search for what you need.
        </p>
      )}
    </Dialog>
  );
}
