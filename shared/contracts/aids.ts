import { z } from 'zod';

/* Reading aids of an estimate: asked for beside it, answered beside it, never part of a saved document. */

const finite = (what: string) => z.number(`${what} must be a number.`);

/** What a request may ask for beside the estimate. */
export const aidsRequestSchema = z.strictObject({
  /** Angles in the unit of `angles` and the frame of the request: how much scatters elastically between them. */
  angleRange: z.strictObject({ from: finite('from'), to: finite('to') }).optional(),
  /** The cross section of two point charges beside every angle, and the ratio to it. */
  reference: z.boolean().optional(),
  /** Angles and energies of both partners for every angle. */
  kinematics: z.boolean().optional(),
});
export type AidsRequest = z.infer<typeof aidsRequestSchema>;

const unavailable = z.object({ unavailable: z.literal(true), reason: z.string() });

const range = z.object({
  from: z.number(),
  to: z.number(),
  /** The same in the centre of mass, in the unit of the angles: two parts where two branches lead to one lab angle, none outside the cone. */
  centreOfMass: z.array(z.object({ from: z.number(), to: z.number() })),
  /** What to know of this number, in words. */
  remarks: z.array(z.string()),
});

/** ∫ dσ/dΩ over the ring between two angles, all azimuths; of identical particles both are counted, as in the curve. */
export const elasticBetweenSchema = z.union([
  range.extend({
    value: z.number(),
    unit: z.string(),
    relativeError: z.number().optional(),
    absoluteError: z.number().optional(),
    /** The same from half of the lower angle, where the cross section grows without limit towards it. */
    fromHalf: z.object({ from: z.number(), value: z.number(), ratio: z.number() }).optional(),
  }),
  range.extend({ divergent: z.literal(true), reason: z.string() }),
]);
export type ElasticBetween = z.infer<typeof elasticBetweenSchema>;

/** The cross section of two point charges, Z1 Z2, in the same frame, regime and treatment of identical particles. */
export const referenceSchema = z.union([
  z.object({
    /** `mott` includes the spin of a relativistic lepton. */
    kind: z.enum(['rutherford', 'mott']),
    chargeProduct: z.number(),
    /** Where the charges were taken from. */
    charges: z.enum(['interaction', 'particles']),
    /** One entry an angle. `ratio` is dσ/dΩ over it; null, with the reason, where either has no value. */
    points: z.array(
      z.object({
        theta: z.number(),
        dcs: z.number().nullable(),
        ratio: z.number().nullable(),
        relativeError: z.number().optional(),
        reason: z.string().optional(),
      }),
    ),
    unit: z.string(),
  }),
  unavailable,
]);
export type Reference = z.infer<typeof referenceSchema>;

/** One way of a collision to one angle. Energies are kinetic, in the lab; null for a fixed centre, which takes none. */
export const kinematicsRowSchema = z.object({
  thetaCm: z.number(),
  thetaLab: z.number(),
  recoilAngle: z.number().nullable(),
  projectileEnergy: z.number(),
  recoilEnergy: z.number().nullable(),
  /** K: the share of its energy that the projectile keeps. */
  kept: z.number(),
  /** dΩ_cm/dΩ_lab; null on the edge of a cone, where it is infinite. */
  jacobian: z.number().nullable(),
});
export type KinematicsRow = z.infer<typeof kinematicsRowSchema>;

export const kinematicsTableSchema = z.object({
  unit: z.object({ angle: z.string(), energy: z.string() }),
  /** Edge of the cone in the lab for a projectile heavier than its target; null without one. */
  largestLabAngle: z.number().nullable(),
  /** One entry an angle; `ways` is empty where the lab angle cannot be reached, and holds two where two branches lead there. */
  rows: z.array(z.object({ theta: z.number(), ways: z.array(kinematicsRowSchema) })),
});
export type KinematicsTable = z.infer<typeof kinematicsTableSchema>;

/** Holds what was asked for, and nothing else. */
export const aidsSchema = z.object({
  elasticBetween: z.union([elasticBetweenSchema, unavailable]).optional(),
  reference: referenceSchema.optional(),
  kinematics: kinematicsTableSchema.optional(),
});
export type Aids = z.infer<typeof aidsSchema>;
