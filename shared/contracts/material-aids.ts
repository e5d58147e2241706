import { z } from 'zod';
import { quantitySchema } from '#shared/units/quantity.ts';
import { estimateBodySchema, warningSchema } from './estimates.ts';

/* A case in a material: how far a particle goes between collisions, and for neutrons what a sample does to the beam. */

const positive = (dimension: 'density' | 'pressure' | 'temperature' | 'length', what: string) =>
  quantitySchema(dimension).refine((q) => q.value > 0, `${what} must be above zero.`);
const formula = z.string().min(1).max(200);
const density = positive('density', 'A density');
const pressure = positive('pressure', 'A pressure');
const temperature = positive('temperature', 'A temperature');
const finite = (what: string) => z.number(`${what} must be a number.`);

/** A material of the table (its density may be replaced; a gas needs pressure and temperature), or a formula with the same. */
export const materialChoiceSchema = z.union(
  [
    z.strictObject({
      key: z.string().min(1).max(60),
      density: density.optional(),
      pressure: pressure.optional(),
      temperature: temperature.optional(),
    }),
    z.strictObject({ formula, density }),
    z.strictObject({ formula, pressure, temperature }),
  ],
  'A material is {"key": "gold"}, {"formula", "density"}, or for a gas {"formula", "pressure", "temperature"}.',
);
export type MaterialChoice = z.infer<typeof materialChoiceSchema>;

export const materialAidsRequestSchema = z
  .strictObject({
    estimate: estimateBodySchema.extend({
      format: z.int().optional(),
      runPlan: z.unknown().optional(),
    }),
    material: materialChoiceSchema,
    /** The kind of atom of the formula that the case describes; the target's own, or the only one, where it is left out. */
    scatterer: z.string().min(1).max(12).optional(),
    thickness: positive('length', 'A thickness').optional(),
    /** For a total that diverges: collisions between these angles count, in the unit and frame of the estimate. */
    angleRange: z.strictObject({ from: finite('from'), to: finite('to') }).optional(),
    /** Absorption cross sections at the wavelength of the beam by kind of atom, for those that follow no 1/v law. */
    absorption: z
      .record(z.string().min(1).max(12), quantitySchema('area'))
      .refine((all) => Object.keys(all).length <= 30, 'At most 30 absorption cross sections.')
      .optional(),
  })
  .meta({ id: 'MaterialAidsRequest' });
export type MaterialAidsRequest = z.infer<typeof materialAidsRequestSchema>;

const quantity = z.object({ value: z.number(), unit: z.string() });
const unavailable = z.object({ unavailable: z.literal(true), reason: z.string() });
const divergent = z.object({ divergent: z.literal(true), reason: z.string() });

/** 1/(n σ) in a unit that fits; `collisions` is n t σ for the thickness asked. */
export const meanFreePathSchema = z.union([
  quantity.extend({
    relativeError: z.number().optional(),
    crossSection: quantity,
    collisions: z.number().optional(),
  }),
  divergent,
  unavailable,
]);
export type MeanFreePath = z.infer<typeof meanFreePathSchema>;

/** What a sample does to slow neutrons: bound cross sections of the table, per formula unit. */
export const neutronSampleSchema = z.object({
  wavelength: quantity,
  edition: z.string(),
  scatteringLengthDensity: z.union([
    quantity.extend({
      uncertainty: z.number().optional(),
      criticalTransfer: quantity.optional(),
      criticalAngle: quantity.optional(),
    }),
    unavailable,
  ]),
  /** Coherent and incoherent; `macroscopic` is n times their sum. */
  scattering: z.union([
    z.object({ coherent: quantity, incoherent: quantity, macroscopic: quantity }),
    unavailable,
  ]),
  absorption: z.union([quantity.extend({ macroscopic: quantity }), unavailable]),
  tenPercentThickness: z.union([quantity, unavailable]),
  /** Left out without a thickness. */
  transmission: z
    .union([
      z.object({
        thickness: quantity,
        value: z.number(),
        byScattering: z.number(),
        byAbsorption: z.number(),
      }),
      unavailable,
    ])
    .optional(),
});
export type NeutronSample = z.infer<typeof neutronSampleSchema>;

export const materialAidsSchema = z
  .object({
    material: z.object({
      label: z.string(),
      formula: z.string(),
      density: quantity.nullable(),
      /** Formula units per volume. */
      units: quantity,
      atoms: z.array(z.object({ name: z.string(), count: z.number(), numberDensity: quantity })),
      source: z.string(),
      notes: z.string(),
    }),
    scatterer: z.string(),
    meanFreePath: meanFreePathSchema,
    /** With `angleRange`: counting only collisions that turn the particle between these angles. */
    between: meanFreePathSchema.optional(),
    neutron: z.union([neutronSampleSchema, unavailable]).optional(),
    warnings: z.array(warningSchema),
  })
  .meta({ id: 'MaterialAids' });
export type MaterialAids = z.infer<typeof materialAidsSchema>;
