import { z } from 'zod';
import { quantitySchema } from '#shared/units/quantity.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { aidsRequestSchema, aidsSchema } from './aids.ts';
import { termSchema } from './terms.ts';

export type { InteractionTerm } from './terms.ts';

/** The methods an estimate may ask for; those the engine cannot do yet answer `unavailable`. */
export const METHODS = ['born1', 'born2', 'eikonal', 'partialWaves'] as const;
export type Method = (typeof METHODS)[number];

export const SPECIES = [
  'electron',
  'positron',
  'muon-',
  'muon+',
  'proton',
  'neutron',
  'deuteron',
  'triton',
  'helion',
  'alpha',
] as const;
export const speciesSchema = z.enum(SPECIES);
export type Species = z.infer<typeof speciesSchema>;

export const MAX_ANGLES = 5000;
export const DEFAULT_ANGLES = { unit: 'deg', from: 0, to: 180, count: 181 } as const;

const finite = (what: string) => z.number(`${what} must be a number.`);
const chargeNumber = z.int('A charge is a whole number of elementary charges.').min(-200).max(200);
const spin = z
  .number()
  .min(0)
  .max(20)
  .refine((s) => Number.isInteger(2 * s), 'A spin is a whole or half-whole number.');

export const projectileSchema = z.union(
  [
    z.strictObject({ species: speciesSchema }),
    z.strictObject({ nuclide: z.string().min(1).max(12) }),
    z.strictObject({
      species: z.literal('custom'),
      mass: quantitySchema('mass'),
      charge: chargeNumber,
      spin,
    }),
  ],
  'A projectile is {"species": "electron"} (or another known species), {"nuclide": "C-12"}, or {"species": "custom", "mass", "charge", "spin"}.',
);
export type Projectile = z.infer<typeof projectileSchema>;

export const targetSchema = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: z.literal('fixed'), charge: chargeNumber }),
    z.strictObject({ kind: z.literal('nuclide'), nuclide: z.string().min(1).max(12) }),
    z.strictObject({ kind: z.literal('species'), species: speciesSchema }),
    z.strictObject({
      kind: z.literal('custom'),
      mass: quantitySchema('mass'),
      charge: chargeNumber,
      spin,
    }),
  ],
  'A target is of kind "fixed" (with charge), "nuclide", "species" or "custom" (with mass, charge and spin).',
);
export type Target = z.infer<typeof targetSchema>;

export const interactionSchema = z.strictObject({
  terms: z
    .array(termSchema)
    .min(1, 'An interaction needs at least one term.')
    .max(12, 'An interaction may have at most 12 terms.'),
  /** Where the terms were taken from: a version of an interaction in the lab's library. Kept and shown, never computed with. */
  citation: z.strictObject({ id: z.uuid(), version: z.int().min(1) }).optional(),
});
export type Citation = NonNullable<z.infer<typeof interactionSchema>['citation']>;

const angleUnit = z.enum(Object.keys(UNITS.angle) as [string, ...string[]]);
export const anglesSchema = z.union(
  [
    z.strictObject({
      unit: angleUnit.default('deg'),
      values: z
        .array(finite('An angle'))
        .min(1, 'Give at least one angle.')
        .max(MAX_ANGLES, `At most ${MAX_ANGLES} angles in one request.`),
    }),
    z.strictObject({
      unit: angleUnit.default('deg'),
      from: finite('from'),
      to: finite('to'),
      count: z
        .int('count must be a whole number.')
        .min(2, 'count must be at least 2.')
        .max(MAX_ANGLES, `At most ${MAX_ANGLES} angles in one request.`),
    }),
  ],
  `Angles are {"values": […]} or {"from", "to", "count"}, at most ${MAX_ANGLES}.`,
);

/** Corrections beyond first order that are applied on request. */
export const CORRECTIONS = ['mckinleyFeshbach'] as const;
export type Correction = (typeof CORRECTIONS)[number];

export const FRAMES = ['cm', 'lab'] as const;
export const REGIMES = ['nonrelativistic', 'relativistic'] as const;

const unitsChoice = z.strictObject({
  length: z.enum(Object.keys(UNITS.length) as [string, ...string[]]).optional(),
  area: z.enum(Object.keys(UNITS.area) as [string, ...string[]]).optional(),
  energy: z.enum(Object.keys(UNITS.energy) as [string, ...string[]]).optional(),
});
export const DEFAULT_UNITS = { length: 'angstrom', area: 'angstrom2', energy: 'eV' } as const;

const body = {
  projectile: projectileSchema,
  target: targetSchema,
  energy: quantitySchema('energy').refine(
    (q) => q.value > 0,
    'The energy must be above zero: it is the kinetic energy of the projectile in the lab.',
  ),
  kinematics: z.enum(REGIMES).optional(),
  interaction: interactionSchema,
  methods: z
    .array(z.enum(METHODS))
    .min(1, 'Name at least one method, such as "born1".')
    .max(METHODS.length)
    .refine((m) => new Set(m).size === m.length, 'A method is named twice.'),
  angles: anglesSchema.optional(),
  frame: z.enum(FRAMES).optional(),
  identical: z.boolean().optional(),
  corrections: z
    .array(z.enum(CORRECTIONS))
    .max(CORRECTIONS.length)
    .refine((list) => new Set(list).size === list.length, 'A correction is named twice.')
    .optional(),
  goldenRule: z
    .strictObject({
      theta: finite('theta').optional(),
      boxSide: quantitySchema('length')
        .refine((q) => q.value > 0, 'The box side must be above zero.')
        .optional(),
    })
    .optional(),
  units: unitsChoice.optional(),
  /** What a person typed, by JSON Pointer; stored and shown, never computed with. */
  entered: z
    .record(z.string().max(200), z.string().max(200))
    .refine((r) => Object.keys(r).length <= 100, 'entered may keep at most 100 texts.')
    .optional(),
};

/** The body of an estimate without what only a document carries. */
export const estimateBodySchema = z.strictObject(body);

/** POST /api/estimates accepts and ignores `format` and `runPlan`, so that a saved document can be sent as it is. */
export const estimateRequestSchema = z
  .strictObject({
    ...body,
    format: z.int().optional(),
    runPlan: z.unknown().optional(),
    aids: aidsRequestSchema.optional(),
  })
  .meta({ id: 'EstimateRequest' });
export type EstimateRequest = z.infer<typeof estimateRequestSchema>;

/* The answer. */

const quantity = z.object({ value: z.number(), unit: z.string() });
const complexAmplitude = z.object({ re: z.number(), im: z.number() });

const divergent = z.object({ divergent: z.literal(true), reason: z.string() });
/** Exactly one of relativeError and absoluteError (in the value's unit) is given. */
const integral = z.union([
  quantity.extend({
    relativeError: z.number().optional(),
    absoluteError: z.number().optional(),
  }),
  divergent,
]);
export type Integral = z.infer<typeof integral>;

const branch = z.object({
  thetaCm: z.number(),
  q: z.number(),
  dcs: z.number().nullable(),
  relativeError: z.number().optional(),
  absoluteError: z.number().optional(),
  amplitude: complexAmplitude.nullable(),
  analysingPower: z.number().nullable().optional(),
});

export const differentialPointSchema = z.object({
  theta: z.number(),
  q: z.number().optional(),
  dcs: z.number().nullable(),
  reason: z.string().optional(),
  relativeError: z.number().optional(),
  absoluteError: z.number().optional(),
  amplitude: complexAmplitude.nullable().optional(),
  branches: z.array(branch).optional(),
  /** With a spin-orbit term: left-right asymmetry of a fully polarised beam, Madison convention; null where dcs is. */
  analysingPower: z.number().nullable().optional(),
});
export type DifferentialPoint = z.infer<typeof differentialPointSchema>;

export const unavailableSchema = z.object({ unavailable: z.literal(true), reason: z.string() });

/** A number that says whether a method may be used. */
export const conditionSchema = z.object({
  name: z.string(),
  value: z.number(),
  /** What it should stay below, or above; absent where it is only reported. */
  most: z.number().optional(),
  least: z.number().optional(),
  holds: z.boolean(),
  meaning: z.string(),
});
export type Condition = z.infer<typeof conditionSchema>;

export const phaseShiftSchema = z.object({
  l: z.int(),
  /** l + 1/2 or l - 1/2, with a spin-orbit term only. */
  j: z.number().optional(),
  /** rad, between -pi/2 and pi/2; relative to the Coulomb phase where there is one. */
  delta: z.number(),
  /** |S_l| */
  eta: z.number(),
  /** Bound of the numerical error of delta, rad. */
  absoluteError: z.number(),
  /** First-order phase of the same wave, rad; absent where first order has none. */
  born: z.number().optional(),
});
export type PhaseShift = z.infer<typeof phaseShiftSchema>;

const computedLength = quantity.extend({ absoluteError: z.number() });
export const lowEnergySchema = z.object({
  scatteringLength: computedLength.nullable(),
  effectiveRange: computedLength.nullable(),
  boundStates: z.int().nullable(),
  remark: z.string().nullable(),
});

export const computedMethodSchema = z.object({
  differential: z.array(differentialPointSchema),
  elastic: integral,
  absorption: integral,
  total: integral,
  momentumTransfer: integral,
  viscosity: integral,
  /** Conditions of this method, each with its number; absent for born1, whose conditions are the criteria of the verdict. */
  conditions: z.array(conditionSchema).optional(),
  /** partialWaves only. */
  phaseShifts: z.array(phaseShiftSchema).optional(),
  lMax: z.int().optional(),
  lowEnergy: lowEnergySchema.optional(),
  /** (4 pi/k) Im f(0) against elastic and absorption by integration: their difference relative to the total. */
  opticalTheorem: z.object({ residual: z.number() }).optional(),
});
export type ComputedMethod = z.infer<typeof computedMethodSchema>;
export const methodResultSchema = z.union([computedMethodSchema, unavailableSchema]);
export type MethodResult = z.infer<typeof methodResultSchema>;

export const criterionSchema = z.object({
  name: z.enum(['unitarity', 'secondOrder', 'slow', 'fast', 'eta']),
  value: z.number(),
  limits: z.object({ sound: z.number(), usable: z.number() }),
  /** In words: what the number is. */
  meaning: z.string(),
  /** True for the one whose value decided. */
  decides: z.boolean(),
});
export type Criterion = z.infer<typeof criterionSchema>;

export const VERDICTS = ['sound', 'usable', 'notValid', 'unassessed'] as const;
export const validitySchema = z.object({
  verdict: z.enum(VERDICTS),
  basis: z.enum(['exact', 'criteria']),
  /** What decided where the basis is exact: of the elastic total, or the weighted one where that diverges; relative. */
  deviation: z.number().optional(),
  /** First order against partial waves, relative; each curve's point to the larger value, or 1e-3 of the forward one. */
  deviations: z
    .object({
      largest: z.number(),
      /** Where, centre of mass, in the unit of `angles`. */
      largestAt: z.number(),
      /** Weighted by solid angle. */
      weighted: z.number(),
      /** Of the elastic total; absent where it diverges. */
      elastic: z.number().optional(),
      decides: z.enum(['elastic', 'weighted']),
      limits: z.object({ sound: z.number(), usable: z.number() }),
    })
    .optional(),
  reason: z.string().optional(),
  /** What to use instead, in words; absent where first order is sound. */
  instead: z.string().optional(),
  criteria: z.array(criterionSchema),
});
export type Validity = z.infer<typeof validitySchema>;

const noWindow = z.object({ none: z.string() });
export const goldenRuleSchema = z.object({
  theta: z.number(),
  boxSide: quantity,
  q: quantity,
  matrixElementTimesVolume: complexAmplitude.extend({
    unit: z.string(),
    relativeError: z.number().optional(),
    absoluteError: z.number().optional(),
  }),
  /** The same by quadrature, the independent route; left out where the form has none or q times its reach exceeds 20,000. */
  quadratureCheck: z
    .object({
      re: z.number(),
      im: z.number(),
      unit: z.string(),
      absoluteError: z.number(),
      evaluations: z.int(),
    })
    .optional(),
  densityOfStates: quantity,
  rate: quantity,
  flux: quantity,
  dcs: quantity,
  /**
   * Factors that stand after the golden rule: exchange, spin (with the recoil of a light target), mckinleyFeshbach, incoherent.
   * Each dcs is the cross section with this factor and those before it.
   */
  factorsAfter: z.array(z.object({ name: z.string(), dcs: quantity })),
  window: z.union([z.object({ t0Min: quantity, t0Max: quantity }), noWindow]),
});
export type GoldenRule = z.infer<typeof goldenRuleSchema>;

export const warningSchema = z.object({
  code: z.string(),
  message: z.string(),
  /** `info` where nothing is wrong; anything else asks for a decision. */
  level: z.enum(['caution', 'info']).optional(),
  path: z.string().optional(),
});
export type Warning = z.infer<typeof warningSchema>;

export const engineSchema = z.object({ name: z.literal('tallybarn'), version: z.string() });

export const estimateSchema = z
  .object({
    engine: engineSchema,
    kinematics: z.object({
      k: quantity,
      wavelength: quantity,
      speed: quantity,
      reducedMass: quantity,
      energyCm: quantity,
      beta: z.number(),
    }),
    identical: z.boolean(),
    potential: z.union([
      z.object({
        r: z.array(z.number()),
        v: z.array(z.union([z.number(), complexAmplitude])),
        unit: z.object({ r: z.string(), v: z.string() }),
      }),
      unavailableSchema,
    ]),
    methods: z.partialRecord(z.enum(METHODS), methodResultSchema),
    goldenRule: z.union([goldenRuleSchema, unavailableSchema]),
    validity: validitySchema,
    warnings: z.array(warningSchema),
    units: z.object({
      length: z.string(),
      area: z.string(),
      energy: z.string(),
      angle: z.string(),
    }),
    frame: z.enum(FRAMES),
    /** What was asked beside the estimate; absent where nothing was, and in saved results. */
    aids: aidsSchema.optional(),
  })
  .meta({ id: 'Estimate' });
export type Estimate = z.infer<typeof estimateSchema>;
