import { useState, type FormEvent } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { LabSettings, Settings } from '#shared/contracts/settings.ts';
import { fullDigits } from '#shared/units/format.ts';
import { Button } from '#src/components/button.tsx';
import { DifferenceTable } from '#src/components/difference-table.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { ApiError, inWords } from '#src/lib/api.ts';
import { faultsFrom, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { say } from '#src/lib/toasts.ts';
import { changeSettings } from '../api.ts';
import {
  THRESHOLDS,
  changeOf,
  placeOf,
  settingsDifferences,
  textsOf,
} from '../model/thresholds.ts';
import type { Texts } from '../model/thresholds.ts';

const BASES = [
  {
    basis: 'exact',
    title: 'Against the exact calculation',
    words:
      'The relative deviation of first order from the sum over phase shifts: of the elastic total, or weighted by solid angle where that diverges.',
  },
  {
    basis: 'criteria',
    title: 'By the criteria alone',
    words:
      'Where there is no exact calculation, the largest of unitarity, second-order size and the slow or fast parameter decides.',
  },
] as const;

interface GroupProps {
  basis: (typeof BASES)[number];
  texts: Texts;
  onText: (place: string, text: string) => void;
  faults: Faults;
  defaults: LabSettings;
}

function Group({ basis: { basis, title, words }, texts, onText, faults, defaults }: GroupProps) {
  return (
    <fieldset className="rounded border border-line bg-sheet px-4 pt-2 pb-4">
      <legend className="px-1 font-semibold">{title}</legend>
      <p className="mb-3 max-w-prose text-sm text-muted">{words}</p>
      <div className="grid gap-4 sm:grid-cols-2">
        {THRESHOLDS.filter((one) => one.basis === basis).map((one) => {
          const place = placeOf(one);
          return (
            <Field
              key={place}
              label={one.label}
              error={faults[place]}
              hint={`Default ${fullDigits(defaults.verdict[basis][one.limit])}`}
            >
              {(control) => (
                <TextInput
                  {...control}
                  name={place}
                  autoComplete="off"
                  inputMode="decimal"
                  className="font-mono"
                  value={texts[place] ?? ''}
                  onChange={({ target }) => onText(place, target.value)}
                />
              )}
            </Field>
          );
        })}
      </div>
    </fieldset>
  );
}

/** What the fields rest on: the settings as they were when one began to change them. */
interface Base {
  settings: Settings;
  etag: string;
}

function useChanging(onDone: (base: Base) => void) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: changeSettings,
    onSuccess: async ({ data, etag }) => {
      say(`The settings are changed; they are at version ${data.version}.`, { tone: 'sound' });
      onDone({ settings: data, etag: etag ?? '' });
      await client.invalidateQueries({ queryKey: ['settings'] });
      // What was computed with the thresholds of before is no longer what the server would say.
      await client.invalidateQueries({ queryKey: ['estimate'] });
    },
    onError: async (error) => {
      if (error instanceof ApiError && error.code === 'staleVersion') {
        await client.invalidateQueries({ queryKey: ['settings'] });
      }
    },
  });
}

/** The fields, kept while somebody else changes the settings: what was typed is never thrown away unasked. */
function useFields(now: Base) {
  const [base, setBase] = useState(now);
  const [texts, setTexts] = useState<Texts>(() => textsOf(now.settings));
  const take = (from: Base) => {
    setBase(from);
    setTexts(textsOf(from.settings));
  };
  const newer = now.settings.version > base.settings.version;
  const typed = THRESHOLDS.some(
    (one) => texts[placeOf(one)] !== textsOf(base.settings)[placeOf(one)],
  );
  if (newer && !typed) take(now);
  return {
    base,
    texts,
    put: (place: string, text: string) => setTexts((before) => ({ ...before, [place]: text })),
    fill: (settings: LabSettings) => setTexts(textsOf(settings)),
    take,
    overtaken: newer && typed,
    keepMine: () => setBase(now),
  };
}

function Overtaken({
  base,
  now,
  fields,
}: {
  base: Base;
  now: Base;
  fields: ReturnType<typeof useFields>;
}) {
  const who = now.settings.changed?.by.name ?? 'Somebody';
  return (
    <Notice
      live
      tone="attention"
      title={`${who} changed the settings after you began.`}
      actions={
        <>
          <Button size="small" onClick={() => fields.take(now)}>
            Take theirs
          </Button>
          <Button size="small" onClick={fields.keepMine}>
            Keep what I typed
          </Button>
        </>
      }
    >
      <DifferenceTable differences={settingsDifferences(base.settings, now.settings)} />
    </Notice>
  );
}

/** The thresholds of the verdict, to be changed by an administrator. */
export function ThresholdForm(now: Base) {
  const fields = useFields(now);
  const { base, texts } = fields;
  const [note, setNote] = useState('');
  const [tried, setTried] = useState(false);
  const changing = useChanging((changed) => {
    fields.take(changed);
    setNote('');
    setTried(false);
  });
  const { body, faults } = changeOf(texts, note);
  const refused = faultsFrom(changing.error);
  const sound = Object.keys(faults).length === 0;
  const unchanged = sound && settingsDifferences(base.settings, body).length === 0;
  const stale = changing.error instanceof ApiError && changing.error.code === 'staleVersion';

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    setTried(true);
    if (focusFirstFault(event.currentTarget, faults) || unchanged || changing.isPending) return;
    changing.mutate({ body, etag: base.etag });
  }

  return (
    <form noValidate onSubmit={submit} className="flex flex-col gap-4">
      {fields.overtaken && <Overtaken base={base} now={now} fields={fields} />}
      {BASES.map((basis) => (
        <Group
          key={basis.basis}
          basis={basis}
          texts={texts}
          onText={fields.put}
          faults={{ ...refused, ...(tried && faults) }}
          defaults={base.settings.defaults}
        />
      ))}
      <Field label="Note: why? (may be empty)">
        {(control) => (
          <TextInput
            {...control}
            name="note"
            autoComplete="off"
            maxLength={2000}
            value={note}
            onChange={({ target }) => setNote(target.value)}
          />
        )}
      </Field>
      {changing.error && !stale && Object.keys(refused).length === 0 && (
        <Notice live tone="fault" title="Nothing was changed. What you typed is kept.">
          {inWords(changing.error)}
        </Notice>
      )}
      {tried && unchanged && (
        <p role="status" className="text-muted">
          These are the settings in force; change a threshold first.
        </p>
      )}
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={() => fields.fill(base.settings.defaults)}>Fill in the defaults</Button>
        <Button look="primary" type="submit" busy={changing.isPending}>
          Change the settings
        </Button>
      </div>
    </form>
  );
}
