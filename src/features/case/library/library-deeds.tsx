import { useState } from 'react';
import { LibraryBig, Upload } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { mayEver, useSession } from '#src/lib/session.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemsByStation } from '../model/problems.ts';
import { PublishFromCase } from './publish-from-case.tsx';
import { TakeFromLibrary } from './take-dialog.tsx';

/** What the Interaction station gives to the library and takes from it. */
export function LibraryDeeds() {
  const session = useSession();
  const { readOnly, problems } = useEditing();
  const [open, setOpen] = useState<'take' | 'publish' | null>(null);
  const publishes = mayEver(session, 'interaction.publish');
  const unsound = problemsByStation(problems).interaction.length > 0;
  const close = () => setOpen(null);
  return (
    <>
      {!readOnly && (
        <Button size="small" onClick={() => setOpen('take')}>
          <LibraryBig aria-hidden="true" className="size-4" /> From the library
        </Button>
      )}
      {publishes && (
        <Button size="small" disabled={unsound} onClick={() => setOpen('publish')}>
          <Upload aria-hidden="true" className="size-4" /> Publish to the library
        </Button>
      )}
      {open === 'take' && <TakeFromLibrary onClose={close} />}
      {open === 'publish' && <PublishFromCase onClose={close} />}
    </>
  );
}
