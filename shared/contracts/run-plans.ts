import { z } from 'zod';
import { quantitySchema } from '#shared/units/quantity.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { METHODS, engineSchema, estimateBodySchema, warningSchema } from './estimates.ts';

/* A run: beam, target and detectors around a cross section; in return rates, times and what they rest on. */

const positive = (dimension: Dimension, what: string) =>
  quantitySchema(dimension).refine((q) => q.value > 0, `${what} must be above zero.`);
const notNegative = (dimension: Dimension, what: string) =>
  quantitySchema(dimension).refine((q) => q.value >= 0, `${what} must be at least zero.`);
const plain = (what: string) => z.number(`${what} must be a number.`);
const fraction = (what: string) =>
  plain(what).gt(0, `${what} must be above zero.`).max(1, `${what} is at most 1 (100 %).`);
const name = z.string().min(1).max(40);
const atom = z.string().min(1).max(12);

const inFlight = estimateBodySchema.extend({
  format: z.int().optional(),
  runPlan: z.unknown().optional(),
});
const method = z.enum(METHODS).optional();

export const beamSchema = z.strictObject({
  /** Mean electric current; needs chargeState. */
  current: positive('current', 'A beam current').optional(),
  chargeState: z
    .int('A charge state is a whole number of elementary charges.')
    .min(-120)
    .max(120)
    .refine((n) => n !== 0, 'A particle without charge carries no current.')
    .optional(),
  particlesPerSecond: z
    .union(
      [plain('particlesPerSecond').gt(0), positive('rate', 'A beam rate')],
      'particlesPerSecond is a number above zero.',
    )
    .optional(),
  dutyFactor: fraction('A duty factor').optional(),
  /** Standard deviation of a Gaussian. */
  energySpread: notNegative('energy', 'An energy spread').optional(),
});
export type BeamSent = z.infer<typeof beamSchema>;

const isotopes = z
  .record(
    atom,
    plain('A fraction').min(0, 'A fraction is at least zero.').max(1, 'A fraction is at most 1.'),
  )
  .refine((all) => Object.keys(all).length <= 40, 'At most 40 isotopes.')
  .optional();
const formula = z.string().min(1).max(200);

export const foilSchema = z.strictObject({
  formula: formula.optional(),
  density: positive('density', 'A density').optional(),
  thickness: positive('length', 'A thickness').optional(),
  arealDensity: positive('arealDensity', 'An areal density').optional(),
  /** Degrees between the normal of the slab and the beam; positive turns the normal towards positive angles. */
  tilt: plain('A tilt')
    .gt(-90, 'A slab tilted by 90 degrees is never entered; tilt it less.')
    .lt(90, 'A slab tilted by 90 degrees is never entered; tilt it less.')
    .optional(),
  scatterer: atom.optional(),
  isotopes,
});
export type FoilSent = z.infer<typeof foilSchema>;

export const gasSchema = z.strictObject({
  formula,
  pressure: positive('pressure', 'A pressure'),
  temperature: positive('temperature', 'A temperature'),
  length: positive('length', 'The length of a gas target'),
  scatterer: atom.optional(),
  isotopes,
});
export type GasSent = z.infer<typeof gasSchema>;

export const DEAD_TIME_MODELS = ['nonParalysable', 'paralysable'] as const;
const FULL_SPHERE = 4 * Math.PI;

export const detectorSchema = z.strictObject({
  name,
  /** Degrees in the lab; below zero on the other side of the beam. */
  angle: plain('An angle')
    .min(-180, 'A detector stands between -180 and 180 degrees.')
    .max(180, 'A detector stands between -180 and 180 degrees.'),
  distance: positive('length', 'A distance').optional(),
  apertureRadius: positive('length', 'The radius of an aperture').optional(),
  /** With apertureRadius: an annular detector, the beam or the central ray passing through its hole. */
  innerRadius: positive('length', 'An inner radius').optional(),
  /** A rectangular aperture in place of a radius: width in the plane of beam and detector, height across it. */
  width: positive('length', 'A width').optional(),
  height: positive('length', 'A height').optional(),
  /** sr, taken as a circular cone. */
  solidAngle: plain('A solid angle')
    .gt(0, 'A solid angle must be above zero.')
    .max(FULL_SPHERE, 'A solid angle is at most 4π sr, the whole sphere; give it in steradian.')
    .optional(),
  efficiency: fraction('An efficiency').optional(),
  deadTime: notNegative('time', 'A dead time').optional(),
  deadTimeModel: z.enum(DEAD_TIME_MODELS).optional(),
  backgroundRate: notNegative('rate', 'A background rate').optional(),
  /** Counted without the target while the beam of this plan is on, beside backgroundRate: it grows with the charge, not with time. */
  beamBackgroundRate: notNegative('rate', 'A background rate').optional(),
});
export type DetectorSent = z.infer<typeof detectorSchema>;
export const MAX_DETECTORS = 200;

const relative = (what: string) =>
  plain(what)
    .min(0, `${what} is at least zero.`)
    .max(1, `${what} is a relative standard uncertainty: at most 1 (100 %).`)
    .optional();

export const UNCERTAIN_INPUTS = [
  'current',
  'thickness',
  'density',
  'efficiency',
  'solidAngle',
  'background',
  'energy',
  'angle',
] as const;
export type UncertainInput = (typeof UNCERTAIN_INPUTS)[number];

export const uncertaintiesSchema = z.strictObject({
  current: relative('The uncertainty of the current'),
  thickness: relative('The uncertainty of the thickness'),
  density: relative('The uncertainty of the density'),
  efficiency: relative('The uncertainty of the efficiency'),
  solidAngle: relative('The uncertainty of the solid angle'),
  background: relative('The uncertainty of the background'),
  energy: relative('The uncertainty of the energy'),
  /** Absolute, degrees. */
  angle: plain('The uncertainty of the angle')
    .min(0, 'The uncertainty of the angle is at least zero, in degrees.')
    .max(10, 'The uncertainty of the angle is at most 10 degrees.')
    .optional(),
});
export type UncertaintiesSent = z.infer<typeof uncertaintiesSchema>;

export const INPUT_DISTRIBUTIONS = ['normal', 'rectangular', 'triangular', 'arcsine'] as const;
/** How an uncertainty is known; whatever the distribution, its value is the standard uncertainty, not a half-width. */
const kindOfUncertainty = z.strictObject({
  type: z.enum(['A', 'B']).optional(),
  distribution: z.enum(INPUT_DISTRIBUTIONS).optional(),
  freedom: plain('Degrees of freedom').gt(0, 'Degrees of freedom are above zero.').optional(),
});
export const uncertaintyKindsSchema = z.partialRecord(z.enum(UNCERTAIN_INPUTS), kindOfUncertainty);
export type UncertaintyKindsSent = z.infer<typeof uncertaintyKindsSchema>;

export const contributionSchema = z.strictObject({ scatterer: atom, estimate: inFlight, method });

/** A run plan without its estimate, as a saved document carries it. */
export const runPlanBodySchema = z.strictObject({
  method,
  beam: beamSchema,
  foil: foilSchema.optional(),
  gas: gasSchema.optional(),
  detectors: z
    .array(detectorSchema)
    .min(1, 'A run plan needs at least one detector.')
    .max(MAX_DETECTORS, `At most ${MAX_DETECTORS} detectors in one plan.`),
  contributions: z.array(contributionSchema).max(20, 'At most 20 contributions.').optional(),
  aim: z
    .strictObject({
      /** Standard uncertainty of the net counts, relative. */
      relativePrecision: plain('A relative precision')
        .gt(0, 'A relative precision must be above zero.')
        .lt(1, 'A relative precision is a fraction: 0.02 stands for 2 %.')
        .optional(),
      /** Beam time there is, sample and blank together. */
      beamTime: positive('time', 'A beam time').optional(),
      /** Without beam, before every position: moving, pumping, checking. */
      setupTime: notNegative('time', 'A setup time').optional(),
      /** Length of a shift; 8 h where it is left out. */
      shift: positive('time', 'A shift').optional(),
    })
    .optional(),
  uncertainties: uncertaintiesSchema.optional(),
  /** Type, distribution and degrees of freedom of what is uncertain; type B, normal and known without end where left out. */
  uncertaintyKinds: uncertaintyKindsSchema.optional(),
  /** A detector whose counts the others are divided by: current, thickness and density then cancel. */
  monitor: name.optional(),
  /** Asks for the recorded rate of every detector against the current, for a page that is offline. */
  rateTable: z.boolean().optional(),
});
export type RunPlanBody = z.infer<typeof runPlanBodySchema>;

export const runPlanRequestSchema = runPlanBodySchema
  .extend({ estimate: inFlight })
  .meta({ id: 'RunPlanRequest' });
export type RunPlanRequest = z.infer<typeof runPlanRequestSchema>;

/* The answer. */

const quantity = z.object({ value: z.number(), unit: z.string() });
const unavailable = z.object({ unavailable: z.literal(true), reason: z.string() });

const detectionPair = z.object({ decisionThreshold: quantity, detectionLimit: quantity });
const budgetLineSchema = z.object({
  input: z.enum(UNCERTAIN_INPUTS),
  /** Of the angle: absolute, degrees. */
  relativeStandardUncertainty: z.number(),
  /** Relative change of the signal rate for a relative change of the input; of the angle: per degree. */
  sensitivity: z.number(),
  /** Relative standard uncertainty of the result from this input alone. */
  contribution: z.number(),
  type: z.enum(['A', 'B']),
  distribution: z.enum(INPUT_DISTRIBUTIONS),
  /** Degrees of freedom; null where the uncertainty itself is known. */
  freedom: z.number().nullable(),
  /** Whether all detectors share it: fully correlated between them. */
  shared: z.boolean(),
});
export type BudgetLine = z.infer<typeof budgetLineSchema>;

const factorSchema = z.object({
  name: z.enum(['beamRate', 'arealDensity', 'slant', 'dcs', 'solidAngle', 'efficiency']),
  value: z.number(),
  unit: z.string(),
});

const kineticPartnerSchema = z.object({
  scatterer: z.string(),
  /** Kinetic energy of the projectile after an elastic collision with this atom at the central angle; null out of reach. */
  energy: quantity.nullable(),
  /** Relative to that of the scatterer of the plan. */
  separation: z.number().nullable(),
});

export const plannedDetectorSchema = z.object({
  name: z.string(),
  angle: z.number(),
  solidAngle: z.number(),
  /** Half of the opening of the cone, or of a cone of the same solid angle, degrees. */
  halfAngle: z.number(),
  /** Over acceptance, energies and depth; null where it diverges, with the reason. */
  averagedDcs: quantity.extend({ relativeError: z.number() }).nullable(),
  pointDcs: quantity.extend({ relativeError: z.number() }).nullable(),
  reason: z.string().optional(),
  /** What the average multiplies the product of factors by, one after the other. */
  averaging: z.object({ acceptance: z.number(), energies: z.number(), attenuation: z.number() }),
  factors: z.array(factorSchema),
  /** Their product, before averaging and attenuation. */
  product: quantity.nullable(),
  trueRate: quantity,
  observedRate: quantity,
  deadTimeFraction: z.number(),
  /** Signal plus background while the beam is on: what the dead time acts on. */
  instantaneousRate: quantity,
  /** Before dead time, contributions of other elements among it. */
  backgroundRate: quantity,
  contributions: z.array(z.object({ scatterer: z.string(), rate: quantity })),
  timeForPrecision: z.union([
    z.object({ signal: quantity, blank: quantity, total: quantity }),
    unavailable,
  ]),
  /** Counts expected in these times. */
  expectedCounts: z.object({ gross: z.number(), blank: z.number() }).optional(),
  decisionThreshold: z.union([quantity, unavailable]),
  detectionLimit: z.union([quantity, unavailable]),
  currie: z.object({ paired: detectionPair, wellKnown: detectionPair }).optional(),
  uncertaintyBudget: z.array(budgetLineSchema),
  /** Of the inputs above, relative. */
  combined: z.number(),
  /** With the statistical part of the aim. */
  combinedWithCounting: z.number(),
  /** The same times the coverage factor of 95 %; degrees of freedom null where they are without end. */
  expanded: z.object({
    coverage: z.number(),
    freedom: z.number().nullable(),
    coverageFactor: z.number(),
    relative: z.number(),
  }),
  /** Of the ratio to the monitor, inputs alone; only with a monitor. */
  combinedOfRatio: z.number().optional(),
  /** Past it the inputs outweigh the statistics of counting: more beam is useless. */
  usefulTime: z.union([quantity, unavailable]),
  /** Relative change of the signal rate per degree that the detector stands further out. */
  angleSensitivity: z.number().nullable(),
  sameAngle: z.array(kineticPartnerSchema),
  /** Only with rateTable. */
  rateAgainstCurrent: z
    .array(
      z.object({
        /** Of the planned current. */
        factor: z.number(),
        particlesPerSecond: z.number(),
        observedRate: z.number(),
        deadTimeFraction: z.number(),
      }),
    )
    .optional(),
  /** What would reach the precision within the beam time; only with aim.beamTime. */
  needed: z
    .union([
      z.object({
        /** The signal rate to have, and what it is multiplied by. */
        trueRate: quantity,
        factor: z.number(),
        /** The same for the current, where the beam brings background of its own. */
        factorOfCurrent: z.union([z.number(), unavailable]),
        current: quantity.optional(),
        /** By factorOfCurrent; where that is unavailable, of a beam without background of its own. */
        particlesPerSecond: quantity,
        arealDensity: quantity,
        solidAngle: z.union([z.number(), unavailable]),
        time: quantity,
      }),
      unavailable,
    ])
    .optional(),
});
export type PlannedDetector = z.infer<typeof plannedDetectorSchema>;

export const VERDICTS_OF_A_PLAN = [
  'feasible',
  'tight',
  'notFeasible',
  'singleScatteringNotValid',
] as const;

export const runPlanSchema = z
  .object({
    engine: engineSchema,
    method: z.enum(METHODS),
    /** Nuclei of `scatterer`, along the normal of the slab. */
    arealDensity: quantity,
    scatterer: z.string(),
    beamRate: quantity,
    /** Every atom of the target. */
    atoms: z.array(z.object({ name: z.string(), arealDensity: quantity })),
    target: z.object({
      /** n t sigma along the beam. */
      collisions: z.number(),
      /** Where the total diverges: collisions that turn the projectile by more than this, degrees in the lab. */
      collisionsBeyond: z.number().optional(),
      radiationLengths: z.number().optional(),
      /** Plane angle of multiple scattering after the whole target (Highland). */
      multipleScattering: z.union([quantity, unavailable]),
      /** Mean energy loss in the whole target along the beam (Bethe). */
      energyLoss: z.union([quantity, unavailable]),
      beamPower: quantity,
      /** Mean power left in the target by energy loss. */
      depositedPower: z.union([quantity, unavailable]),
    }),
    detectors: z.array(plannedDetectorSchema),
    /** All detectors counting at once: the longest signal time and the longest blank. */
    totalTime: z.union([quantity, unavailable]),
    /** One position after the other. */
    totalTimeInTurn: z.union([quantity, unavailable]),
    /** Shares of aim.beamTime that give every position one precision, in turn; only with aim.beamTime. */
    equalPrecision: z
      .union([
        z.object({
          relativePrecision: z.number(),
          shares: z.array(z.object({ name: z.string(), signal: quantity, blank: quantity })),
        }),
        unavailable,
      ])
      .optional(),
    /** Positions measured in turn, ordered by angle so that moves are short. */
    runSheet: z.union([
      z.object({
        positions: z.array(
          z.object({
            name: z.string(),
            angle: z.number(),
            start: quantity,
            setup: quantity,
            signal: quantity,
            blank: quantity,
            /** Shift in which it begins, from 1. */
            shift: z.int(),
          }),
        ),
        total: quantity,
        shifts: z.int(),
        shift: quantity,
      }),
      unavailable,
    ]),
    aim: z.object({ relativePrecision: z.number(), beamTime: quantity.optional() }),
    verdict: z.enum(VERDICTS_OF_A_PLAN),
    decidedBy: z.object({
      factor: z.string(),
      detector: z.string().optional(),
      message: z.string(),
    }),
    warnings: z.array(warningSchema),
  })
  .meta({ id: 'RunPlan' });
export type RunPlan = z.infer<typeof runPlanSchema>;
