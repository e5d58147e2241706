import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Field, TextArea, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Select } from '#src/components/select.tsx';
import type { FieldError } from '#shared/errors.ts';
import { inWords } from '#src/lib/api.ts';
import { campaignsQuery } from '../api.ts';
import type { FilingChoice } from '../editing/use-saving.ts';
import { DEFAULT_TITLE } from '../model/default-document.ts';
import { TagsField, tagsOf, tagsProblem } from '#src/components/tags-field.tsx';
import { Unsound } from './open-texts.tsx';

interface FileDialogProps {
  title: string;
  tags: readonly string[];
  problems: readonly FieldError[];
  busy: boolean;
  error: unknown;
  onClose: () => void;
  onFile: (choice: FilingChoice) => void;
}

const NONE = '';

function CampaignField({ value, onChange }: { value: string; onChange: (id: string) => void }) {
  const { data, isError } = useQuery(campaignsQuery);
  return (
    <Field
      label="Campaign"
      hint={
        isError
          ? 'The campaigns could not be loaded; the case can be filed without one.'
          : 'Members of the campaign read the case and save versions of it.'
      }
    >
      {(control) => (
        <Select
          {...control}
          value={value}
          choices={[
            { value: NONE, label: 'none: only you and lab managers read it' },
            ...(data ?? []).map(({ id, name }) => ({ value: id, label: name })),
          ]}
          onChange={onChange}
        />
      )}
    </Field>
  );
}

/** Filing a new case: what it is called, and where it belongs. */
export function FileDialog(props: FileDialogProps) {
  const [title, setTitle] = useState(props.title === DEFAULT_TITLE ? '' : props.title);
  const [campaign, setCampaign] = useState(NONE);
  const [tags, setTags] = useState(props.tags.join(', '));
  const [note, setNote] = useState('');
  const [tried, setTried] = useState(false);
  const list = tagsOf(tags);
  const untitled = title.trim() === '';
  const ready = !untitled && tagsProblem(list) === undefined && props.problems.length === 0;

  function file(): void {
    setTried(true);
    if (!ready || props.busy) return;
    props.onFile({
      title: title.trim(),
      campaignId: campaign === NONE ? null : campaign,
      tags: list,
      note: note.trim(),
    });
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => !open && props.onClose()}
      title="Save as a new case"
      description="The document and its result are kept as version 1; later saves add versions and change none."
      actions={
        <>
          <Button onClick={props.onClose}>Cancel</Button>
          <Button look="primary" type="submit" form="file-case" busy={props.busy}>
            Save case
          </Button>
        </>
      }
    >
      <form
        id="file-case"
        className="flex flex-col gap-3.5"
        onSubmit={(event) => {
          event.preventDefault();
          file();
        }}
      >
        <Unsound problems={props.problems} />
        <Field
          label="Title"
          error={
            tried && untitled ? 'Give the case a title, so that it is found again.' : undefined
          }
        >
          {(control) => (
            <TextInput
              {...control}
              data-autofocus
              maxLength={200}
              autoComplete="off"
              value={title}
              onChange={(event) => setTitle(event.target.value)}
            />
          )}
        </Field>
        <CampaignField value={campaign} onChange={setCampaign} />
        <TagsField text={tags} onText={setTags} />
        <Field label="Note (may be empty)">
          {(control) => (
            <TextArea
              {...control}
              maxLength={2000}
              value={note}
              onChange={(event) => setNote(event.target.value)}
            />
          )}
        </Field>
        {props.error !== null && (
          <Notice live tone="fault" title="The case was not saved. What you typed is kept.">
            {inWords(props.error)}
          </Notice>
        )}
      </form>
    </Dialog>
  );
}
