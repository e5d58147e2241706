import { useState } from 'react';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Field } from '#src/components/field.tsx';
import { PublishDialog, type VersionOf } from '#src/components/library/publish-dialog.tsx';
import { EMPTY_TEXTS, textsOf } from '#src/components/library/publish-texts.ts';
import { Select } from '#src/components/select.tsx';
import { inWords } from '#src/lib/api.ts';
import { exampleText } from '#src/lib/interaction-words.ts';
import { interactionListOptions, interactionQuery } from '#src/lib/library.ts';
import { termText } from '#src/lib/term-words.ts';
import { say } from '#src/lib/toasts.ts';
import { useEditing } from '../editing/editor-context.ts';
import { cite, exampleOf } from '../model/citation.ts';

const NEW = '';

/** A new interaction, or the next version of one there is. */
function Choice({ value, onChange }: { value: string; onChange: (id: string) => void }) {
  const known = useQuery(interactionListOptions({ pageSize: 200 })).data?.items ?? [];
  return (
    <Field label="Publish as">
      {(control) => (
        <Select
          {...control}
          value={value}
          choices={[
            { value: NEW, label: 'a new interaction' },
            ...known.map(({ id, name, version }) => ({
              value: id,
              label: `version ${version.n + 1} of ${name}`,
            })),
          ]}
          onChange={onChange}
        />
      )}
    </Field>
  );
}

/** Publishing what stands at the Interaction station; the case cites it from then on. */
export function PublishFromCase({ onClose }: { onClose: () => void }) {
  const { draft, forms, editDocument } = useEditing();
  const client = useQueryClient();
  const [{ terms, example }] = useState(() => ({
    terms: draft.document.interaction.terms,
    example: exampleOf(draft.document),
  }));
  const [of, setOf] = useState<VersionOf | null>(null);
  const [texts, setTexts] = useState(EMPTY_TEXTS);

  async function choose(id: string): Promise<void> {
    if (id === NEW) {
      setOf(null);
      return;
    }
    try {
      const { data, etag } = await client.fetchQuery({ ...interactionQuery(id), staleTime: 0 });
      setOf({ id, newest: data.newestVersion, etag: etag ?? '' });
      setTexts(textsOf(data));
    } catch (fault) {
      say(inWords(fault), { tone: 'fault' });
    }
  }

  return (
    <PublishDialog
      of={of}
      texts={texts}
      onTexts={setTexts}
      content={{ terms, example }}
      onClose={onClose}
      onDone={(published) => {
        editDocument('/interaction/citation', (document) => cite(document, published));
        onClose();
      }}
    >
      <div className="rounded bg-soft px-3 py-2 text-sm">
        <p>{terms.map((term) => termText(term, forms)).join(' + ')}</p>
        <p className="text-muted">Shown with {exampleText(example)}.</p>
      </div>
      <Choice value={of?.id ?? NEW} onChange={(id) => void choose(id)} />
    </PublishDialog>
  );
}
