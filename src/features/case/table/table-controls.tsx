import { Field } from '#src/components/field.tsx';
import { Select } from '#src/components/select.tsx';
import { unitSymbol } from '#shared/units/format.ts';
import { unitsOf } from '#shared/units/vocabulary.ts';
import { columnName } from './model/columns.ts';
import { DECIMAL_NAMES, SEPARATOR_NAMES } from './model/layout.ts';
import type { TableReading } from './use-table-reading.ts';

const entries = <T extends string>(names: Record<T, string>) =>
  (Object.keys(names) as T[]).map((value) => ({ value, label: names[value] }));

interface ChoiceProps<T extends string> {
  label: string;
  value: T;
  choices: readonly { value: T; label: string }[];
  onChange: (value: T) => void;
}

function Choice<T extends string>({ label, ...rest }: ChoiceProps<T>) {
  return <Field label={label}>{(control) => <Select {...control} {...rest} />}</Field>;
}

function unitChoices(dimension: 'length' | 'energy') {
  return unitsOf(dimension).map((unit) => ({ value: unit, label: unitSymbol(unit) }));
}

/** How the text is cut, which columns are r and V, and in which units. */
export function TableControls({ reading }: { reading: TableReading }) {
  const { raw, columns, layout, lengthUnit, energyUnit, decide, cut } = reading;
  const listed = Array.from({ length: Math.max(1, raw.columns) }, (_, i) => ({
    value: String(i),
    label: columnName(raw, i),
  }));
  return (
    <div className="grid grid-cols-1 gap-x-3 gap-y-2 sm:grid-cols-2">
      <Choice
        label="Columns are separated by"
        value={layout.separator}
        choices={entries(SEPARATOR_NAMES)}
        onChange={(separator) => cut({ separator })}
      />
      <Choice
        label="Decimal sign"
        value={layout.decimal}
        choices={entries(DECIMAL_NAMES)}
        onChange={(decimal) => cut({ decimal })}
      />
      <Choice
        label="r stands in"
        value={String(columns.r)}
        choices={listed}
        onChange={(r) => decide({ columns: { ...columns, r: Number(r) } })}
      />
      <Choice
        label="Unit of r"
        value={lengthUnit}
        choices={unitChoices('length')}
        onChange={(unit) => decide({ lengthUnit: unit })}
      />
      <Choice
        label="V stands in"
        value={String(columns.V)}
        choices={listed}
        onChange={(V) => decide({ columns: { ...columns, V: Number(V) } })}
      />
      <Choice
        label="Unit of V"
        value={energyUnit}
        choices={unitChoices('energy')}
        onChange={(unit) => decide({ energyUnit: unit })}
      />
    </div>
  );
}
