import { useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { Chip } from '#src/components/chip.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Notice } from '#src/components/notice.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { inWords } from '#src/lib/api.ts';
import type { Stale } from '../editing/use-saving.ts';
import type { Content } from '../model/fields.ts';
import { compareWork, mergeWork } from '../model/merge.ts';
import type { Dispute, Side } from '../model/merge.ts';
import { momentText } from '../model/moments.ts';

const CHANGED: Record<Dispute['changedBy'], string> = {
  mine: 'changed by you',
  theirs: 'changed there',
  both: 'changed by both: decide',
};

interface ChoiceProps {
  dispute: Dispute;
  side: Side;
  chosen: boolean;
  onChoose: () => void;
}

function SideChoice({ dispute, side, chosen, onChoose }: ChoiceProps) {
  return (
    <label
      className={classNames(
        'flex cursor-pointer gap-2.5 rounded border px-3 py-2 has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink',
        chosen ? 'border-barn bg-barn-soft' : 'border-edge hover:bg-soft',
      )}
    >
      <input
        type="radio"
        name={`dispute ${dispute.key}`}
        checked={chosen}
        onChange={onChoose}
        className="mt-1 size-4 shrink-0 accent-barn"
      />
      <span className="min-w-0">
        <span className="block text-sm text-muted">
          {side === 'mine' ? 'Keep mine' : 'Take theirs'}
        </span>
        <span className="block break-words font-semibold">{dispute[side]}</span>
      </span>
    </label>
  );
}

function DisputeRow(props: {
  dispute: Dispute;
  decision: Side | undefined;
  onDecide: (side: Side) => void;
}) {
  const { dispute, decision, onDecide } = props;
  return (
    <fieldset className="border-t border-line pt-2.5">
      <legend className="float-left mb-1.5 flex w-full flex-wrap items-center gap-2">
        <span className="font-semibold">{dispute.label}</span>
        <Chip tone={dispute.changedBy === 'both' ? 'attention' : 'plain'}>
          {CHANGED[dispute.changedBy]}
        </Chip>
        <span className="text-sm text-muted">was {dispute.base}</span>
      </legend>
      <div className="clear-both grid gap-2 sm:grid-cols-2">
        {(['mine', 'theirs'] as const).map((side) => (
          <SideChoice
            key={side}
            side={side}
            dispute={dispute}
            chosen={decision === side}
            onChoose={() => onDecide(side)}
          />
        ))}
      </div>
    </fieldset>
  );
}

interface StaleDialogProps {
  stale: Stale;
  mine: Content;
  forms: readonly FormInfo[];
  busy: boolean;
  error: unknown;
  onClose: () => void;
  onSave: (merged: Content) => void;
}

/** Someone saved first: both sides field by field, nothing lost on either. */
export function StaleDialog({
  stale,
  mine,
  forms,
  busy,
  error,
  onClose,
  onSave,
}: StaleDialogProps) {
  const { current } = stale;
  const { fields, disputes } = compareWork(stale.base, mine, stale.theirs, forms);
  const [made, setMade] = useState<Readonly<Record<string, Side>>>({});
  const decisionOf = ({ key, changedBy }: Dispute) =>
    made[key] ?? (changedBy === 'both' ? undefined : changedBy);
  const undecided = disputes.filter((dispute) => decisionOf(dispute) === undefined);
  const next = current.version.n + 1;

  function save(): void {
    const decisions: Record<string, Side> = {};
    for (const dispute of disputes) {
      const decision = decisionOf(dispute);
      if (decision) decisions[dispute.key] = decision;
    }
    onSave(mergeWork(mine, stale.theirs, fields, decisions));
  }

  return (
    <Dialog
      open
      width="wide"
      onOpenChange={(open) => !open && onClose()}
      title={`Version ${current.version.n} was saved meanwhile`}
      description={
        <>
          By {current.version.author.name}, {momentText(current.version.createdAt)}
          {current.version.note ? `: “${current.version.note}”` : ''}. Nothing is lost: theirs is on
          record, yours is still here. Decide field by field what version {next} shall say.
        </>
      }
      actions={
        <>
          {undecided.length > 0 && (
            <span className="mr-auto self-center text-sm text-straw">
              {undecided.length === 1 ? 'One field is' : `${undecided.length} fields are`} still to
              be decided.
            </span>
          )}
          <Button onClick={onClose}>Not now</Button>
          <Button look="primary" busy={busy} disabled={undecided.length > 0} onClick={save}>
            Save version {next}
          </Button>
        </>
      }
    >
      {disputes.length === 0 ? (
        <p>Both sides say the same; saving adds a version that changes nothing.</p>
      ) : (
        <div className="flex flex-col gap-3">
          {disputes.map((dispute) => (
            <DisputeRow
              key={dispute.key}
              dispute={dispute}
              decision={decisionOf(dispute)}
              onDecide={(side) => setMade((before) => ({ ...before, [dispute.key]: side }))}
            />
          ))}
        </div>
      )}
      {error !== null && (
        <Notice live tone="fault" title="Nothing was saved. What you typed is kept.">
          {inWords(error)}
        </Notice>
      )}
    </Dialog>
  );
}
