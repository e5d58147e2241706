import type { ReactNode } from 'react';
import { ChevronDown } from 'lucide-react';
import { unitSymbol } from '#shared/units/format.ts';
import { unitsOf } from '#shared/units/vocabulary.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { Field } from './field.tsx';

interface QuantityInputProps {
  label: ReactNode;
  dimension: Dimension;
  /** What stands in the field, valid or not. */
  text: string;
  /** Unit of the value the text stands for. */
  unit: string;
  onText: (text: string) => void;
  /** The person chose another unit: the value is to be converted, never relabelled. */
  onUnit: (unit: string) => void;
  hint?: ReactNode;
  error?: ReactNode;
  disabled?: boolean;
  /** Spoken name of the unit menu. */
  unitLabel: string;
  className?: string;
}

/** A number with its unit in one field, typed as people write it, with a menu that converts. */
export function QuantityInput(props: QuantityInputProps) {
  const { label, dimension, text, unit, onText, onUnit, hint, error, disabled, unitLabel } = props;
  return (
    <Field label={label} hint={hint} error={error} {...classNameOf(props)}>
      {(control) => (
        <span className="flex rounded border border-edge bg-paper has-[input:focus-visible]:outline-2 has-[input:focus-visible]:outline-offset-2 has-[input:focus-visible]:outline-ink has-[input[aria-invalid]]:border-fault has-[input[aria-invalid]]:bg-fault-soft">
          <input
            {...control}
            type="text"
            autoComplete="off"
            spellCheck={false}
            disabled={disabled}
            value={text}
            onChange={(event) => onText(event.target.value)}
            className="min-h-9 min-w-0 flex-1 rounded-l bg-transparent px-2.5 py-1.5 font-mono text-base outline-none disabled:opacity-60"
          />
          <span className="relative border-l border-line">
            <select
              aria-label={unitLabel}
              disabled={disabled}
              value={unit}
              onChange={(event) => onUnit(event.target.value)}
              className="h-full min-h-9 appearance-none rounded-r bg-transparent pr-7 pl-2.5 text-sm text-muted disabled:opacity-60"
            >
              {unitsOf(dimension).map((name) => (
                <option key={name} value={name} className="bg-sheet text-ink">
                  {unitSymbol(name)}
                </option>
              ))}
            </select>
            <ChevronDown
              aria-hidden="true"
              className="pointer-events-none absolute top-1/2 right-2 size-4 -translate-y-1/2 text-muted"
            />
          </span>
        </span>
      )}
    </Field>
  );
}

function classNameOf({ className }: { className?: string }): { className?: string } {
  return className === undefined ? {} : { className };
}
