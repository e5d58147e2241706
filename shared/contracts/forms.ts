import { z } from 'zod';

const quantity = z.object({ value: z.number(), unit: z.string() });

/** One parameter of a form, as GET /api/forms serves it: bounds in the unit of `default`. */
export const formParameterSchema = z.object({
  key: z.string(),
  label: z.string(),
  symbol: z.string(),
  dimension: z.string(),
  /** A quantity, a plain number, a name, points [[r, V], …], or quantities by name. */
  default: z.union([
    quantity,
    z.number(),
    z.string(),
    z.array(z.tuple([z.number(), z.number()])),
    z.record(z.string(), z.union([quantity, z.number()])),
  ]),
  /** What a parameter of dimension `choice` may be. */
  choices: z.array(z.string()).optional(),
  /** What a `formula` knows by itself: r, constants and functions; every other name is a parameter. */
  words: z.array(z.string()).optional(),
  /** The parameter belongs to these values of another one alone: needed with them, refused with others. */
  when: z.object({ key: z.string(), is: z.array(z.string()) }).optional(),
  /** Of the parameters that share this name exactly one is given. */
  oneOf: z.string().optional(),
  minimum: z.number().optional(),
  maximum: z.number().optional(),
  exclusiveMinimum: z.boolean().optional(),
  optional: z.boolean().optional(),
  integer: z.boolean().optional(),
  description: z.string(),
});
export type FormParameterInfo = z.infer<typeof formParameterSchema>;

export const formSchema = z.object({
  key: z.string(),
  label: z.string(),
  formula: z.string(),
  transformFormula: z.string(),
  source: z.string(),
  parameters: z.array(formParameterSchema),
});
export type FormInfo = z.infer<typeof formSchema>;

export const formsSchema = z.object({ forms: z.array(formSchema) }).meta({ id: 'Forms' });

/** Whether these members of a term ask for the parameter at all. */
export function parameterApplies(
  { when }: FormParameterInfo,
  members: Readonly<Record<string, unknown>>,
): boolean {
  return when === undefined || when.is.some((value) => value === members[when.key]);
}

/** What a new term starts with: nothing that may be left out, of alternatives the first, of what hangs on a choice what its default asks for. */
export function startingParameters(parameters: readonly FormParameterInfo[]): FormParameterInfo[] {
  const starts = Object.fromEntries(parameters.map((one) => [one.key, one.default]));
  return parameters.filter(
    (one) =>
      !one.optional &&
      parameterApplies(one, starts) &&
      (one.oneOf === undefined || parameters.find(({ oneOf }) => oneOf === one.oneOf) === one),
  );
}
