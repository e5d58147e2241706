import { SPECIES } from '#shared/contracts/estimates.ts';
import type { Faults } from '#src/lib/form-faults.ts';
import { Field, TextArea, TextInput } from '../field.tsx';
import { TagsField } from '../tags-field.tsx';
import type { PublishTexts } from './publish-texts.ts';

interface PublishFieldsProps {
  texts: PublishTexts;
  onChange: (texts: PublishTexts) => void;
  /** By the names of the server, without the leading slash. */
  faults: Faults;
}

function SpeciesChoice({ texts, onChange }: Omit<PublishFieldsProps, 'faults'>) {
  const chosen = new Set(texts.species);
  return (
    <fieldset>
      <legend className="text-sm text-muted">Particles it is meant for (none: any)</legend>
      <div className="mt-1 flex flex-wrap gap-x-4 gap-y-1">
        {SPECIES.map((species) => (
          <label key={species} className="flex min-h-7 items-center gap-1.5">
            <input
              type="checkbox"
              className="accent-barn"
              checked={chosen.has(species)}
              onChange={({ target }) => {
                const next = SPECIES.filter((one) =>
                  one === species ? target.checked : chosen.has(one),
                );
                onChange({ ...texts, species: next });
              }}
            />
            {species}
          </label>
        ))}
      </div>
    </fieldset>
  );
}

function Validity({ texts, onChange, faults }: PublishFieldsProps) {
  return (
    <>
      <Field
        label="Where it holds"
        error={faults['validity/words']}
        hint="In words: energies, particles, targets, and what it leaves out."
      >
        {(control) => (
          <TextArea
            {...control}
            name="validity/words"
            rows={2}
            maxLength={2000}
            value={texts.words}
            onChange={({ target }) => onChange({ ...texts, words: target.value })}
          />
        )}
      </Field>
      <div className="grid gap-3 sm:grid-cols-2">
        <Field label="Lowest energy, lab (may be empty)" error={faults['validity/energy/from']}>
          {(control) => (
            <TextInput
              {...control}
              name="validity/energy/from"
              autoComplete="off"
              placeholder="50 eV"
              value={texts.from}
              onChange={({ target }) => onChange({ ...texts, from: target.value })}
            />
          )}
        </Field>
        <Field
          label="Highest energy, lab (may be empty)"
          error={faults['validity/energy/to'] ?? faults['validity/energy']}
        >
          {(control) => (
            <TextInput
              {...control}
              name="validity/energy/to"
              autoComplete="off"
              placeholder="10 keV"
              value={texts.to}
              onChange={({ target }) => onChange({ ...texts, to: target.value })}
            />
          )}
        </Field>
      </div>
      <SpeciesChoice texts={texts} onChange={onChange} />
    </>
  );
}

/** Everything a published interaction says besides its terms. */
export function PublishFields(props: PublishFieldsProps) {
  const { texts, onChange, faults } = props;
  return (
    <>
      <Field label="Name" error={faults['name']}>
        {(control) => (
          <TextInput
            {...control}
            name="name"
            data-autofocus
            autoComplete="off"
            maxLength={120}
            value={texts.name}
            onChange={({ target }) => onChange({ ...texts, name: target.value })}
          />
        )}
      </Field>
      <Field label="Description" error={faults['description']}>
        {(control) => (
          <TextArea
            {...control}
            name="description"
            maxLength={4000}
            value={texts.description}
            onChange={({ target }) => onChange({ ...texts, description: target.value })}
          />
        )}
      </Field>
      <Validity {...props} />
      <Field
        label="Source"
        error={faults['source']}
        hint="Where the form and the numbers are from, as a paper would cite it."
      >
        {(control) => (
          <TextArea
            {...control}
            name="source"
            rows={2}
            maxLength={1000}
            value={texts.source}
            onChange={({ target }) => onChange({ ...texts, source: target.value })}
          />
        )}
      </Field>
      <TagsField text={texts.tags} onText={(tags) => onChange({ ...texts, tags })} />
      <Field label="Note on this version (may be empty)" error={faults['note']}>
        {(control) => (
          <TextInput
            {...control}
            name="note"
            autoComplete="off"
            maxLength={2000}
            value={texts.note}
            onChange={({ target }) => onChange({ ...texts, note: target.value })}
          />
        )}
      </Field>
    </>
  );
}
