import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { InteractionDetail, InteractionVersion } from '#shared/contracts/library.ts';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { PublishDialog } from '#src/components/library/publish-dialog.tsx';
import { textsOf } from '#src/components/library/publish-texts.ts';
import { caseWithHref, interactionHref } from '#src/lib/library.ts';
import { mayEver, useSession } from '#src/lib/session.ts';
import { StatusDialog } from './status-dialog.tsx';

interface DeedsProps {
  newest: InteractionDetail;
  etag: string;
  /** The version on the page. */
  shown: InteractionVersion;
}

function Correct({ newest, etag }: Omit<DeedsProps, 'shown'>) {
  const navigate = useNavigate();
  const [seen] = useState({ newest, etag });
  const [texts, setTexts] = useState(() => textsOf(newest));
  const [open, setOpen] = useState(true);
  if (!open) return null;
  // The tag is that of what was read; the terms are those of today, so that going on after somebody else takes theirs along.
  const { id, newestVersion, terms, example } = newest;
  return (
    <PublishDialog
      of={{ id, newest: seen.newest.newestVersion, etag: seen.etag }}
      texts={texts}
      onTexts={setTexts}
      content={{ terms, example }}
      onClose={() => setOpen(false)}
      onDone={() => {
        setOpen(false);
        void navigate(interactionHref(id), { state: { keepFocus: true } });
      }}
    >
      <p className="text-muted">
        The terms stay those of version {newestVersion}. To change their numbers, use it in a case
        and publish from there.
      </p>
    </PublishDialog>
  );
}

/** What can be done with an interaction, by this person. */
export function Deeds({ newest, etag, shown }: DeedsProps) {
  const session = useSession();
  const [correcting, setCorrecting] = useState(0);
  const [asking, setAsking] = useState(false);
  const published = newest.status === 'published';
  return (
    <>
      {newest.may.retire && (
        <Button onClick={() => setAsking(true)}>{published ? 'Retire' : 'Take back'}</Button>
      )}
      {newest.may.publish && published && (
        <Button onClick={() => setCorrecting((times) => times + 1)}>Correct the text</Button>
      )}
      {mayEver(session, 'case.create') && published && (
        <ButtonLink look="primary" to={caseWithHref(shown)}>
          Use in a case
        </ButtonLink>
      )}
      {correcting > 0 && <Correct key={correcting} newest={newest} etag={etag} />}
      {asking && <StatusDialog interaction={newest} etag={etag} onClose={() => setAsking(false)} />}
    </>
  );
}
