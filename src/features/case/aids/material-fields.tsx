import { Field, TextInput } from '#src/components/field.tsx';
import { Select } from '#src/components/select.tsx';
import type { MaterialItem } from '#shared/contracts/reference.ts';
import type { FieldError } from '#shared/errors.ts';
import { formatQuantity } from '#shared/units/format.ts';
import { problemAt } from '../model/problems.ts';
import { BY_FORMULA, GAS_BY_FORMULA, isGas, withMaterial } from './model/material-question.ts';
import type { MaterialFields as Fields } from './model/material-question.ts';
import { TypedQuantityField } from './typed-quantity.tsx';

interface MaterialFieldsProps {
  fields: Fields;
  onFields: (fields: Fields) => void;
  materials: readonly MaterialItem[];
  errors: readonly FieldError[];
}

function choicesOf(materials: readonly MaterialItem[]) {
  const group = (name: string, phase: MaterialItem['phase']) => ({
    group: name,
    choices: materials
      .filter((item) => item.phase === phase)
      .map(({ key, label, formula }) => ({ value: key, label: `${label} (${formula})` })),
  });
  return [
    { value: '', label: 'Choose a material …' },
    {
      group: 'Anything else',
      choices: [
        { value: BY_FORMULA, label: 'Solid or liquid by formula and density' },
        { value: GAS_BY_FORMULA, label: 'Gas by formula, pressure and temperature' },
      ],
    },
    group('Solids', 'solid'),
    group('Liquids', 'liquid'),
    group('Gases', 'gas'),
  ];
}

function densityHint(item: MaterialItem | undefined): string | undefined {
  if (!item?.range) return undefined;
  const [low, high] = item.range;
  return `Sold between ${formatQuantity(low, 4)} and ${formatQuantity(high, 4)}.`;
}

/** Which material: one of the table, or a formula with what makes a number of atoms of it. */
export function MaterialFields({ fields, onFields, materials, errors }: MaterialFieldsProps) {
  const item = materials.find(({ key }) => key === fields.key);
  const byFormula = fields.key === BY_FORMULA || fields.key === GAS_BY_FORMULA;
  const put = (part: Partial<Fields>) => onFields({ ...fields, ...part });
  const gas = isGas(fields, item);
  return (
    <>
      <Field label="Material" error={problemAt(errors, '/material/key')}>
        {(control) => (
          <Select
            {...control}
            value={fields.key}
            choices={choicesOf(materials)}
            onChange={(key) =>
              onFields(
                withMaterial(
                  fields,
                  key,
                  materials.find((entry) => entry.key === key),
                ),
              )
            }
          />
        )}
      </Field>
      {byFormula && (
        <Field
          label="Formula"
          hint="As in C10H8O4, D2O, [10B]4C or Fe0.95O."
          error={problemAt(errors, '/material/formula')}
        >
          {(control) => (
            <TextInput
              {...control}
              className="font-mono"
              autoComplete="off"
              spellCheck={false}
              value={fields.formula}
              onChange={(event) => put({ formula: event.target.value })}
            />
          )}
        </Field>
      )}
      {fields.key !== '' && !gas && (
        <TypedQuantityField
          label="Density"
          name="the density"
          dimension="density"
          typed={fields.density}
          onTyped={(density) => put({ density })}
          hint={densityHint(item)}
          error={problemAt(errors, '/material/density')}
        />
      )}
      {gas && (
        <>
          <TypedQuantityField
            label="Pressure"
            name="the pressure"
            dimension="pressure"
            typed={fields.pressure}
            onTyped={(pressure) => put({ pressure })}
            error={problemAt(errors, '/material/pressure')}
          />
          <TypedQuantityField
            label="Temperature"
            name="the temperature"
            dimension="temperature"
            typed={fields.temperature}
            onTyped={(temperature) => put({ temperature })}
            error={problemAt(errors, '/material/temperature')}
          />
        </>
      )}
    </>
  );
}
