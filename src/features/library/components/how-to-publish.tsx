import { useState } from 'react';
import { Plus } from 'lucide-react';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';

/** An interaction is made where it can be seen at work: in a case. */
export function NewInteraction() {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)}>
        <Plus aria-hidden="true" className="size-4" /> New interaction
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="A new interaction begins in a case"
        description="Choose its form and set its parameters at the Interaction station, and look at what it scatters. “Publish to the library” stands below its terms; the beam and target of the case are kept as the collision it is shown with."
        actions={
          <>
            <Button onClick={() => setOpen(false)}>Cancel</Button>
            <ButtonLink to="/cases/new" look="primary">
              Begin a case
            </ButtonLink>
          </>
        }
      />
    </>
  );
}
