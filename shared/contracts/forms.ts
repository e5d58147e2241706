import { z } from 'zod';

/** One parameter of a form, as GET /api/forms serves it: bounds in the unit of `default`. */
export const formParameterSchema = z.object({
  key: z.string(),
  label: z.string(),
  symbol: z.string(),
  dimension: z.string(),
  default: z.union([z.object({ value: z.number(), unit: z.string() }), z.number()]),
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
