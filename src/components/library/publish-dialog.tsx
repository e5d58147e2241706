import { useState, type FormEvent, type ReactNode } from 'react';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { InteractionContent, InteractionDetail } from '#shared/contracts/library.ts';
import { ApiError, inWords } from '#src/lib/api.ts';
import { formsQuery } from '#src/lib/forms.ts';
import { faultsFrom, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { interactionDifferences } from '#src/lib/interaction-words.ts';
import {
  addInteractionVersion,
  forgetLibrary,
  interactionQuery,
  interactionVersionQuery,
  publishInteraction,
} from '#src/lib/library.ts';
import { useOneKey } from '#src/lib/one-key.ts';
import { say } from '#src/lib/toasts.ts';
import { Button } from '../button.tsx';
import { DifferenceTable } from '../difference-table.tsx';
import { Dialog } from '../dialog.tsx';
import { Notice } from '../notice.tsx';
import { PublishFields } from './publish-fields.tsx';
import { publicationOf, type PublishTexts } from './publish-texts.ts';

/** The interaction a further version is of; its tag is that of what the person has seen. */
export interface VersionOf {
  id: string;
  newest: number;
  etag: string;
}

interface PublishDialogProps {
  /** Null for a new interaction. */
  of: VersionOf | null;
  texts: PublishTexts;
  onTexts: (texts: PublishTexts) => void;
  /** What is published, and shown above the fields. */
  content: Pick<InteractionContent, 'terms' | 'example'>;
  children?: ReactNode;
  onClose: () => void;
  onDone: (published: InteractionDetail) => void;
}

const FIELDS = [
  ...['name', 'description', 'validity/words', 'validity/energy', 'validity/energy/from'],
  ...['validity/energy/to', 'source', 'note'],
];

/** What the server refused and no field of this form can show. */
function elsewhere(error: unknown, refused: Faults): string | null {
  if (error === null) return null;
  if (!(error instanceof ApiError) || error.errors.length === 0) return inWords(error);
  const lost = Object.entries(refused).filter(([key]) => !FIELDS.includes(key));
  return lost.length === 0 ? null : lost.map(([, message]) => message).join(' ');
}

const isStale = (error: unknown): boolean =>
  error instanceof ApiError && error.code === 'staleVersion';

/** Somebody published a version meanwhile: what it changed, and the way on with what was typed. */
function Overtaken({ of, onGoOn }: { of: VersionOf; onGoOn: (of: VersionOf) => void }) {
  const forms = useQuery(formsQuery).data ?? [];
  const before = useQuery(interactionVersionQuery(of.id, of.newest)).data;
  const now = useQuery({ ...interactionQuery(of.id), refetchOnMount: 'always' }).data;
  const newest = now?.data.newestVersion ?? of.newest;
  if (!now || !before || newest === of.newest) return null;
  const found = interactionDifferences(before, now.data, forms);
  return (
    <Notice
      live
      tone="attention"
      title={`${now.data.version.author.name} published version ${newest} after you began.`}
      actions={
        <Button size="small" onClick={() => onGoOn({ id: of.id, newest, etag: now.etag ?? '' })}>
          Go on to version {newest + 1}
        </Button>
      }
    >
      Nothing was published; what you typed is kept. This is what version {newest} changed:
      <DifferenceTable differences={found} />
    </Notice>
  );
}

function usePublishing({ of, onDone }: Pick<PublishDialogProps, 'of' | 'onDone'>) {
  const client = useQueryClient();
  const keyFor = useOneKey();
  return useMutation({
    mutationFn: ({ body }: ReturnType<typeof publicationOf>) => {
      const key = keyFor({ of, body });
      return of === null
        ? publishInteraction(body, key)
        : addInteractionVersion(of.id, body, { etag: of.etag, key });
    },
    onSuccess: async ({ data }) => {
      say(`Published “${data.name}”, version ${data.newestVersion}.`, { tone: 'sound' });
      await forgetLibrary(client);
      onDone(data);
    },
  });
}

/** Publishing to the library: a new interaction, or a further version of one. */
export function PublishDialog(props: PublishDialogProps) {
  const { texts, onTexts, content, children, onClose, onDone } = props;
  const [tried, setTried] = useState(false);
  const [later, setLater] = useState<VersionOf | null>(null);
  const of = later !== null && later.id === props.of?.id ? later : props.of;
  const publishing = usePublishing({ of, onDone });
  const stale = isStale(publishing.error);
  const publication = publicationOf(texts, content);
  const refused = faultsFrom(publishing.error);
  const faults = { ...refused, ...(tried && publication.faults) };
  const failure = elsewhere(publishing.error, refused);
  const deed = of === null ? 'Publish' : `Publish version ${of.newest + 1}`;

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    setTried(true);
    if (focusFirstFault(event.currentTarget, publication.faults) || publishing.isPending) return;
    publishing.mutate(publication);
  }

  return (
    <Dialog
      open
      width="wide"
      onOpenChange={(open) => !open && onClose()}
      title={of === null ? 'Publish to the library' : `Publish version ${of.newest + 1}`}
      description="Everyone in the lab can read it and use it in a case. A version never changes: what you mend later is a further one."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button look="primary" type="submit" form="publish" busy={publishing.isPending}>
            {deed}
          </Button>
        </>
      }
    >
      <form id="publish" noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
        {children}
        <PublishFields texts={texts} onChange={onTexts} faults={faults} />
        {stale && of !== null && (
          <Overtaken
            of={of}
            onGoOn={(next) => {
              setLater(next);
              publishing.reset();
            }}
          />
        )}
        {failure !== null && !stale && (
          <Notice live tone="fault" title="Nothing was published. What you typed is kept.">
            {failure}
          </Notice>
        )}
      </form>
    </Dialog>
  );
}
