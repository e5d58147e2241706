import { Segmented } from '#src/components/segmented.tsx';
import { DEFAULT_UNITS } from '#shared/contracts/estimates.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { unitsOf } from '#shared/units/vocabulary.ts';
import { useEditing } from '../editing/editor-context.ts';
import {
  anglesOf,
  straightAngle,
  withAngleKind,
  withAngleUnit,
  withGoldenRule,
} from '../model/table.ts';
import { takeValue } from '../model/typing.ts';
import { AngleListField } from './angle-list-field.tsx';
import { ChoiceField } from './choice-field.tsx';
import { NumberField, QuantityField } from './typed-fields.tsx';

function StepFields() {
  const { draft } = useEditing();
  const angles = anglesOf(draft.document);
  const straight = straightAngle(angles.unit);
  if ('values' in angles) return null;
  const angle = { minimum: 0, maximum: straight, what: 'The angle' };
  const put =
    (key: 'from' | 'to' | 'count') => (document: typeof draft.document, value?: number) =>
      value === undefined ? document : { ...document, angles: { ...angles, [key]: value } };
  return (
    <div className="grid grid-cols-3 gap-2">
      <NumberField
        pointer="/angles/from"
        label="From"
        value={angles.from}
        rules={angle}
        put={put('from')}
      />
      <NumberField
        pointer="/angles/to"
        label="To"
        value={angles.to}
        rules={angle}
        put={put('to')}
      />
      <NumberField
        pointer="/angles/count"
        label="Angles"
        value={angles.count}
        rules={{ integer: true, minimum: 2, maximum: 5000, what: 'The number of angles' }}
        put={put('count')}
      />
    </div>
  );
}

function UnitField({ kind, label }: { kind: 'length' | 'area' | 'energy'; label: string }) {
  const { draft, editDocument, setAreaUnit } = useEditing();
  return (
    <ChoiceField<string>
      pointer={`/units/${kind}`}
      label={label}
      value={draft.document.units?.[kind] ?? DEFAULT_UNITS[kind]}
      choices={unitsOf(kind).map((unit) => ({ value: unit, label: unitSymbol(unit) }))}
      onChange={(unit) => {
        if (kind === 'area') setAreaUnit(unit);
        editDocument(`/units/${kind}`, (document) => ({
          ...document,
          units: { ...document.units, [kind]: unit },
        }));
      }}
    />
  );
}

function GoldenRuleFields() {
  const { draft } = useEditing();
  const { goldenRule } = draft.document;
  const { unit } = anglesOf(draft.document);
  const straight = straightAngle(unit);
  return (
    <div className="grid grid-cols-2 gap-3">
      <NumberField
        optional
        pointer="/goldenRule/theta"
        label={`Golden rule at θ (${unit === 'deg' ? '°' : unit}, cm)`}
        value={goldenRule?.theta}
        rules={{ minimum: 0, maximum: straight, what: 'The angle' }}
        put={(document, theta) => withGoldenRule(document, { theta })}
      />
      <QuantityField
        optional
        pointer="/goldenRule/boxSide"
        label="Box side L"
        name="the box side"
        dimension="length"
        value={goldenRule?.boxSide}
        fallbackUnit={goldenRule?.boxSide?.unit ?? 'nm'}
        rules={{ minimum: 0, exclusiveMinimum: true, what: 'The box side', unit: 'angstrom' }}
        put={(document, boxSide) => withGoldenRule(document, { boxSide })}
      />
    </div>
  );
}

/** What the table of dσ/dΩ is asked for: angles, frame, units, and the angle of the golden rule. */
export function DetectorsInputs() {
  const { draft, edit, editDocument, readOnly } = useEditing();
  const { document } = draft;
  const angles = anglesOf(document);
  const fixed = document.target.kind === 'fixed';
  return (
    <>
      <div className="flex flex-wrap items-center justify-between gap-2">
        <Segmented
          label="How the angles are given"
          value={'values' in angles ? 'list' : 'steps'}
          choices={[
            { value: 'steps', label: 'even steps' },
            { value: 'list', label: 'a list' },
          ]}
          onChange={(kind) =>
            !readOnly &&
            edit('/angles', (before) =>
              takeValue(before, '/angles/values', (into) => withAngleKind(into, kind)),
            )
          }
        />
        <Segmented
          label="Unit of the angles"
          value={angles.unit}
          choices={unitsOf('angle').map((unit) => ({ value: unit, label: unit }))}
          onChange={(unit) =>
            !readOnly &&
            edit('/angles/unit', (before) =>
              takeValue(before, '/angles/values', (into) => withAngleUnit(into, unit)),
            )
          }
        />
      </div>
      <StepFields />
      <AngleListField />
      <div className="flex flex-col items-start gap-1">
        <span className="text-sm text-muted" aria-hidden="true">
          Frame of the angles
        </span>
        <Segmented
          label="Frame of the angles"
          value={document.frame ?? 'cm'}
          choices={[
            { value: 'cm', label: 'centre of mass' },
            { value: 'lab', label: 'lab' },
          ]}
          onChange={(frame) =>
            !readOnly && editDocument('/frame', (before) => ({ ...before, frame }))
          }
        />
        {fixed && <p className="text-xs text-muted">On a fixed centre both frames are one.</p>}
      </div>
      <GoldenRuleFields />
      <div className="grid grid-cols-3 gap-2">
        <UnitField kind="length" label="Lengths in" />
        <UnitField kind="area" label="Areas in" />
        <UnitField kind="energy" label="Energies in" />
      </div>
    </>
  );
}
