import type { ReactNode } from 'react';
import { Field, TextInput } from '#src/components/field.tsx';
import { convertQuantity } from '#src/components/convert-quantity.ts';
import { QuantityInput } from '#src/components/quantity-input.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { fullDigits, unitSymbol } from '#shared/units/format.ts';
import { parseQuantity } from '#shared/units/parse.ts';
import type { ParseContext } from '#shared/units/parse.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { outside, readPlainNumber, shownText, takeText, takeValue } from '../model/typing.ts';
import type { NumberRules, Reading } from '../model/typing.ts';

interface QuantityFieldProps {
  pointer: string;
  label: ReactNode;
  name: string;
  dimension: Dimension;
  value: Quantity | undefined;
  /** Unit of a plain number while the field is empty. */
  fallbackUnit: string;
  put: (document: CaseDocument, value: Quantity | undefined) => CaseDocument;
  optional?: boolean;
  hint?: ReactNode;
  rules?: NumberRules & { unit: string };
  context?: ParseContext;
  /** True where the text can only be read once something has been looked up. */
  waits?: (text: string) => boolean;
}

function read(
  text: string,
  props: QuantityFieldProps,
  unit: string,
): Reading<Quantity | undefined> {
  const { dimension, optional, rules } = props;
  if (optional && text.trim() === '') return { value: undefined };
  if (props.waits?.(text)) return { waiting: true };
  const parsed = parseQuantity(text, dimension, { ...props.context, unit });
  if (!parsed.ok) return { problem: parsed.message };
  if (!rules) return { value: parsed.quantity };
  // Bounds are those of the register, in the unit of its default.
  const { value } = convertQuantity(parsed.quantity, rules.unit, dimension);
  const problem = outside(value, rules, unitSymbol(rules.unit));
  return problem === null ? { value: parsed.quantity } : { problem };
}

/** A quantity of the document, typed as people write it. */
export function QuantityField(props: QuantityFieldProps) {
  const { pointer, dimension, value, put, context = {} } = props;
  const { draft, edit, readOnly, problems } = useEditing();
  const unit = value?.unit ?? props.fallbackUnit;
  const text = shownText(draft, pointer, value, dimension, context);
  const open = draft.open[pointer];
  const parsed = open ? null : parseQuantity(text, dimension, { ...context, unit });
  const note = parsed?.ok ? parsed.note : undefined;
  const waiting = open?.problem === null ? 'Looking up the particle …' : null;

  return (
    <QuantityInput
      label={props.label}
      dimension={dimension}
      text={text}
      unit={unit}
      unitLabel={`Unit of ${props.name}`}
      disabled={readOnly}
      error={problemAt(problems, pointer)}
      hint={
        (waiting ?? note ?? props.hint) && (
          <>
            {waiting ?? (note && <span className="block text-slate">{note}</span>)}
            {props.hint}
          </>
        )
      }
      onText={(typed) =>
        edit(pointer, (before) => takeText(before, pointer, typed, read(typed, props, unit), put))
      }
      onUnit={(next) =>
        edit(`${pointer} unit`, (before) =>
          takeValue(before, pointer, (document) =>
            value ? put(document, convertQuantity(value, next, dimension)) : document,
          ),
        )
      }
    />
  );
}

interface NumberFieldProps {
  pointer: string;
  label: ReactNode;
  value: number | undefined;
  rules: NumberRules;
  put: (document: CaseDocument, value: number | undefined) => CaseDocument;
  optional?: boolean;
  hint?: ReactNode;
  suffix?: string;
}

/** A plain number of the document. */
export function NumberField(props: NumberFieldProps) {
  const { pointer, label, value, rules, put, optional } = props;
  const { draft, edit, readOnly, problems } = useEditing();
  const text = draft.open[pointer]?.text ?? (value === undefined ? '' : fullDigits(value));
  const reading = (typed: string): Reading<number | undefined> =>
    optional && typed.trim() === '' ? { value: undefined } : readPlainNumber(typed, rules);
  return (
    <Field label={label} hint={props.hint} error={problemAt(problems, pointer)}>
      {(control) => (
        <span className="relative block">
          <TextInput
            {...control}
            inputMode="decimal"
            autoComplete="off"
            disabled={readOnly}
            value={text}
            className="font-mono"
            onChange={(event) => {
              const typed = event.target.value;
              edit(pointer, (before) => {
                const next = takeText(before, pointer, typed, reading(typed), put);
                // A plain number says all that was typed.
                return next.open[pointer] ? next : takeValue(next, pointer, (same) => same);
              });
            }}
          />
          {props.suffix && (
            <span className="pointer-events-none absolute inset-y-0 right-2.5 grid place-items-center text-sm text-muted">
              {props.suffix}
            </span>
          )}
        </span>
      )}
    </Field>
  );
}
