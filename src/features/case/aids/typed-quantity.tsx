import type { ReactNode } from 'react';
import { convertQuantity } from '#src/components/convert-quantity.ts';
import { QuantityInput } from '#src/components/quantity-input.tsx';
import { parseQuantity } from '#shared/units/parse.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { typedForm } from '../model/typing.ts';

/** A quantity of an aid, which belongs to no document: its text, and the value once it is one. */
export interface TypedQuantity {
  text: string;
  unit: string;
  /** Null while the field is empty or not yet a quantity. */
  value: Quantity | null;
  problem: string | null;
}

export function asTyped(quantity: Quantity): TypedQuantity {
  return { text: typedForm(quantity), unit: quantity.unit, value: quantity, problem: null };
}

export const emptyIn = (unit: string): TypedQuantity => ({
  text: '',
  unit,
  value: null,
  problem: null,
});

/** What may follow a unit and changes nothing where the field already says it. */
const PER_STERADIAN = /\s*(?:\/\s*sr|sr(?:\^-1|⁻¹))\s*$/;

function readTyped(
  text: string,
  unit: string,
  { dimension, perSteradian }: Pick<TypedQuantityFieldProps, 'dimension' | 'perSteradian'>,
): TypedQuantity {
  if (text.trim() === '') return { ...emptyIn(unit), text };
  const plain = perSteradian ? text.replace(PER_STERADIAN, '') : text;
  const parsed = parseQuantity(plain, dimension, { unit });
  return parsed.ok
    ? { text, unit: parsed.quantity.unit, value: parsed.quantity, problem: null }
    : { text, unit, value: null, problem: parsed.message };
}

interface TypedQuantityFieldProps {
  label: ReactNode;
  /** Spoken in the name of the unit menu. */
  name: string;
  dimension: Dimension;
  typed: TypedQuantity;
  onTyped: (typed: TypedQuantity) => void;
  hint?: ReactNode;
  /** The quantity is per steradian, and may be typed so: `1.2 b/sr`. */
  perSteradian?: boolean;
  /** What the server says of it. */
  error?: string | undefined;
  className?: string;
}

/** A quantity typed as people write it, kept by the aid that asks for it. */
export function TypedQuantityField(props: TypedQuantityFieldProps) {
  const { label, name, dimension, typed, onTyped, hint, error, className } = props;
  return (
    <QuantityInput
      label={label}
      dimension={dimension}
      text={typed.text}
      unit={typed.unit}
      unitLabel={`Unit of ${name}`}
      hint={hint}
      error={typed.problem ?? error}
      {...(className === undefined ? {} : { className })}
      onText={(text) => onTyped(readTyped(text, typed.unit, props))}
      onUnit={(unit) =>
        onTyped(
          typed.value ? asTyped(convertQuantity(typed.value, unit, dimension)) : { ...typed, unit },
        )
      }
    />
  );
}
