import { z } from 'zod';
import type { Quantity } from '#shared/units/quantity.ts';

/** What a term may hold at most; the whole request has to stay below 1 MB besides. */
export const MAX_POINTS = 2000;
export const MAX_FORMULA = 2000;
export const MAX_ORIGINAL = 500_000;
export const MAX_PARAMETERS = 40;

const finite = (what: string) => z.number(`${what} must be a number.`);

const anyQuantity = z.strictObject({ value: finite('value'), unit: z.string().max(24) });

const row = z.tuple([finite('r'), finite('V')], 'A point is a pair [r, V] of two numbers.');
/** (r, V) of a table, in the lengthUnit and energyUnit that stand beside it. */
const pointsSchema = z
  .array(row)
  .max(
    MAX_POINTS,
    `A table may have at most ${MAX_POINTS} rows; a spline through every tenth row is as good where V is smooth.`,
  );
export type TablePoints = z.infer<typeof pointsSchema>;

/** Named parameters of a formula: quantities, or plain numbers where they have no unit. */
const namedQuantities = z
  .record(z.string().min(1).max(40), z.union([anyQuantity, finite('A parameter')]))
  .refine(
    (all) => Object.keys(all).length <= MAX_PARAMETERS,
    `A formula may have at most ${MAX_PARAMETERS} parameters.`,
  );
export type NamedQuantities = z.infer<typeof namedQuantities>;

/** The text a table was read from, as it was pasted or uploaded: kept and shown, never computed with. */
const original = z.strictObject({
  name: z.string().max(200),
  text: z
    .string()
    .max(MAX_ORIGINAL, `The original of a table may have at most ${MAX_ORIGINAL} characters.`),
});
export type OriginalText = z.infer<typeof original>;

/** A term as the browser knows it: a form and its parameters. The register on the server validates it strictly. */
export const termSchema = z
  .object({ form: z.string().min(1).max(40) })
  .catchall(
    z.union(
      [
        anyQuantity,
        finite('A parameter'),
        z.string().max(MAX_FORMULA, `A text may have at most ${MAX_FORMULA} characters.`),
        pointsSchema,
        original,
        namedQuantities,
      ],
      'A parameter is a quantity {"value", "unit"}, a plain number, a text, a table [[r, V], …] or {"name": quantity, …}.',
    ),
  );
export type InteractionTerm = z.infer<typeof termSchema>;
export type TermValue = InteractionTerm[string];

function isMembers(
  value: TermValue | undefined,
): value is Exclude<TermValue & object, TablePoints> {
  return typeof value === 'object' && !Array.isArray(value);
}

export function isPoints(value: TermValue | undefined): value is TablePoints {
  return Array.isArray(value);
}

export function isQuantity(value: TermValue | undefined): value is Quantity {
  return isMembers(value) && 'unit' in value && typeof value.unit === 'string';
}

export function isOriginal(value: TermValue | undefined): value is OriginalText {
  return isMembers(value) && 'text' in value && typeof value.text === 'string';
}

export function isNamedQuantities(value: TermValue | undefined): value is NamedQuantities {
  return isMembers(value) && !isQuantity(value) && !isOriginal(value);
}
