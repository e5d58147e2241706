import { useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Field } from '#src/components/field.tsx';
import { Select } from '#src/components/select.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { MaterialAids } from '#shared/contracts/material-aids.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { anglesOf } from '../model/table.ts';
import { useAidsState } from './aids-context.ts';
import { MaterialAnswer } from './material-answer.tsx';
import { MaterialFields } from './material-fields.tsx';
import { atomsIn, mustChooseAtom } from './model/atoms-in.ts';
import { rangeOver } from './model/angle-range.ts';
import { FIRST_FIELDS, choiceOf } from './model/material-question.ts';
import { TypedQuantityField, emptyIn } from './typed-quantity.tsx';
import { materialsQuery, useLiveMaterial } from './use-material.ts';
import type { MaterialQuestion } from './use-material.ts';

function totalDiverges({ methods }: Estimate): boolean {
  const born = methods.born1;
  return born !== undefined && !('unavailable' in born) && 'divergent' in born.total;
}

/** The atom whose absorption the table cannot tell at this wavelength. */
function resonantOf(aids: MaterialAids | undefined): string | null {
  const neutron = aids?.neutron;
  if (!neutron || 'unavailable' in neutron || !('unavailable' in neutron.absorption)) return null;
  return /^(\S+) absorbs/.exec(neutron.absorption.reason)?.[1] ?? null;
}

function useQuestion() {
  const [fields, setFields] = useState(FIRST_FIELDS);
  const [scatterer, setScatterer] = useState('');
  const [thickness, setThickness] = useState(() => emptyIn('um'));
  const [absorber, setAbsorber] = useState<string | null>(null);
  const [absorption, setAbsorption] = useState(() => emptyIn('barn'));
  return {
    ...{ fields, setFields, scatterer, setScatterer, thickness, setThickness },
    ...{ absorber, setAbsorber, absorption, setAbsorption },
  };
}

/** The case in a material: how far between collisions, and for neutrons what a sample does to the beam. */
export function InMaterial({ estimate }: { estimate: Estimate }) {
  const { draft } = useEditing();
  const { range } = useAidsState();
  const materials = useQuery(materialsQuery);
  const asked = useQuestion();
  const { fields, scatterer, thickness, absorber, absorption } = asked;
  const item = materials.data?.find(({ key }) => key === fields.key);
  const choice = choiceOf(fields, item);
  const atoms = choice ? atomsIn(item?.formula ?? fields.formula) : [];
  const chosen = atoms.includes(scatterer) ? scatterer : '';
  const open = chosen === '' && mustChooseAtom(atoms, draft.document.target);
  const diverges = totalDiverges(estimate);
  const { from, to } = rangeOver(anglesOf(draft.document), range);
  const parts = JSON.stringify({
    choice: open ? null : choice,
    scatterer: chosen,
    thickness: thickness.value,
    absorption: absorber !== null && absorption.value ? { [absorber]: absorption.value } : null,
    angleRange: diverges && from > 0 && to > from ? { from, to } : null,
  });
  // The same question keeps its identity, so that it is asked once.
  const question = useMemo(() => questionOf(parts), [parts]);
  const { aids, stale, errors, failure } = useLiveMaterial(question);
  const resonant = resonantOf(aids);
  const asksAbsorption = absorber ?? resonant;

  return (
    <div className="grid gap-x-6 gap-y-4 @2xl:grid-cols-[17rem_minmax(0,1fr)]">
      <div className="flex flex-col gap-2.5">
        <MaterialFields
          fields={fields}
          onFields={(next) => {
            asked.setFields(next);
            if (next.key !== fields.key) asked.setAbsorber(null);
          }}
          materials={materials.data ?? []}
          errors={errors}
        />
        {atoms.length > 1 && (
          <Field
            label="Atoms the case describes"
            error={problemAt(errors, '/scatterer')}
            hint={open ? 'The numbers below wait for it.' : undefined}
          >
            {(control) => (
              <Select
                {...control}
                value={chosen}
                choices={[
                  { value: '', label: open ? 'Choose …' : 'those of the target' },
                  ...atoms.map((name) => ({ value: name, label: name })),
                ]}
                onChange={asked.setScatterer}
              />
            )}
          </Field>
        )}
        {fields.key !== '' && (
          <TypedQuantityField
            label="Thickness (may be empty)"
            name="the thickness"
            dimension="length"
            typed={thickness}
            onTyped={asked.setThickness}
            error={problemAt(errors, '/thickness')}
          />
        )}
        {asksAbsorption !== null && (
          <TypedQuantityField
            label={`Absorption of ${asksAbsorption} at this wavelength`}
            name={`the absorption of ${asksAbsorption}`}
            dimension="area"
            typed={absorption}
            onTyped={(typed) => {
              asked.setAbsorption(typed);
              asked.setAbsorber(asksAbsorption);
            }}
            error={problemAt(errors, `/absorption/${asksAbsorption}`)}
          />
        )}
      </div>
      <div
        aria-busy={(question !== null && stale) || undefined}
        className={classNames(stale && aids && 'stale')}
      >
        {question === null && (
          <p className="text-sm text-muted">
            Choose a material: the path between collisions follows from its number of atoms and the
            total cross section of this case.
          </p>
        )}
        {failure !== null && <p className="text-sm text-fault">{failure}</p>}
        {aids && <MaterialAnswer aids={aids} />}
      </div>
    </div>
  );
}

interface Parts {
  choice: MaterialQuestion['material'] | null;
  scatterer: string;
  thickness: MaterialQuestion['thickness'] | null;
  absorption: MaterialQuestion['absorption'] | null;
  angleRange: MaterialQuestion['angleRange'] | null;
}

function questionOf(parts: string): MaterialQuestion | null {
  const { choice, scatterer, thickness, absorption, angleRange } = JSON.parse(parts) as Parts;
  if (choice === null) return null;
  return {
    material: choice,
    ...(scatterer !== '' && { scatterer }),
    ...(thickness && { thickness }),
    ...(absorption && { absorption }),
    ...(angleRange && { angleRange }),
  };
}
