import type { Dimension } from '#shared/units/vocabulary.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';

/** A complex number as it crosses module borders. */
export interface Complex {
  re: number;
  im: number;
}

/**
 * What a form may know of its surroundings. Internal units throughout: energy eV, length angstrom, masses as mc² in eV.
 */
export interface FormContext {
  /** 2 mu / hbar² in 1/(eV angstrom²). */
  twoMuOverHbar2: number;
  /** Charge numbers of projectile and target. */
  projectileCharge: number;
  targetCharge: number;
  /** Identity of the projectile (`electron`, `neutron`, …), null for a custom one; forms made for one particle ask for it. */
  projectile?: string | null;
  /** M/(m + M), 1 for a fixed target: bound lengths times it are free ones. */
  recoilFactor?: number;
}

/** Large-r behaviour of a shape: decides integrals, matching and what diverges. A `power` tail falls faster than 1/r³. */
export type Tail = 'compact' | 'exponential' | 'power' | 'coulomb' | 'point';

/**
 * A term of the interaction, V(r) = strength · s(r): a complex strength and one real radial shape s.
 * For `contact` and `deltaShell` V(r) is no function: `v` is then null with the reason in `noFunction`.
 */
export interface Term {
  form: string;
  /** eV, or eV·angstrom for deltaShell, or whatever makes strength · s(r) an energy. */
  strength: Complex;
  /** s(r), r > 0 in angstrom; null where V is no function of r. */
  v: ((r: number) => number) | null;
  noFunction?: string;
  /**
   * Closed-form transform of the shape: S(q) = ∫_0^∞ r² s(r) j0(qr) dr, q in 1/angstrom, q >= 0.
   * So f1 = -(2 mu/hbar²) Σ strength · S(q), and L³ V_fi = 4π Σ strength · S(q).
   * `error` is absolute and includes rounding. Infinity in `value` is allowed only where S diverges (bare Coulomb at q = 0).
   */
  closed: ((q: number) => NumericalResult) | null;
  /** The same transform by oscillatory quadrature, the independent route; null where there is nothing to integrate (contact). */
  quadrature: ((q: number) => NumericalResult) | null;
  /** Part of the transform that is a bare Coulomb tail, c in c/q² (0 if none): needed for divergence and the floor. */
  coulombTail: number;
  /**
   * S(q) - coulombTail/q², what the tail leaves, without the cancellation of the two and finite at q = 0: where the tails of several
   * terms cancel, a neutral whole, it alone is left. Terms with a tail have it, unless the tail leaves nothing (norm 0).
   */
  withoutTail?: (q: number) => NumericalResult;
  /** ∫ r² |s(r)| dr of what is left after the Coulomb tail is subtracted (the floor of the numerical error rests on it). */
  norm: number;
  /** ∫ r s(r) dr over 0..∞ (eV-free; slow criterion); null where it diverges or has no meaning. */
  firstMoment: number | null;
  /** ∫ s(r) dr from `from` > 0 to ∞ (fast criterion); null where it diverges or has no meaning. */
  lineIntegral: (from: number) => number | null;
  /** Length that sets the scale, angstrom; null for forms without one (coulomb, contact). */
  range: number | null;
  tail: Tail;
  /** s(r) is below 1e-17 of its scale beyond this radius; null for a Coulomb tail. */
  reach: number | null;
  /** Radii where s or its derivative jumps, angstrom, ascending. */
  breakpoints: number[];
  /** Radii where only a higher derivative of s jumps, as at the rows of a table, angstrom, ascending. Absent means none. */
  knots?: readonly number[];
  /** V(r) stands before l·sigma of a projectile of spin 1/2. Absent means a central potential. */
  spinOrbit?: boolean;
  /** q at which the slope of the transform jumps, 1/angstrom; integrals over angle are cut there. Absent means none. */
  kinks?: readonly number[];
  /** Why there is no first order (hard sphere); `closed` and `quadrature` are null then. */
  noBorn?: string;
  /** Z1 Z2 of an electrostatic term: how it acts on the spin of a relativistic lepton is then known. */
  chargeProduct?: number;
  /** What a person should know of this term as it was given: codes are stable, `caution` is the default level. */
  cautions?: readonly { code: string; message: string; level?: 'caution' | 'info' }[];
  /** Incoherent scattering, angstrom²/sr: adds to the cross section, never to the amplitude. Absent means none. */
  incoherent?: number;
  /**
   * How far S(q) moves when what lies between the points of a table is read as straight lines: a doubt about the table, no
   * numerical error, and no part of it. Same unit as S.
   */
  interpolationDoubt?: (q: number) => number;
}

interface Parameter {
  key: string;
  label: string;
  symbol: string;
  optional?: boolean;
  /** The parameter belongs to these values of a `choice` alone: needed with them, refused with others. */
  when?: { key: string; is: readonly string[] };
  /** Of the parameters that share this name exactly one is given; the first of them is what a new term starts with. */
  oneOf?: string;
  description: string;
}

/** A number among the parameters of a form, as the register publishes it. Values are in internal units. */
export interface FormParameter extends Parameter {
  dimension: Dimension | 'number';
  /** Bounds in internal units; absent means unbounded. `exclusive` marks an open lower bound. */
  min?: number;
  max?: number;
  exclusiveMin?: boolean;
  integer?: boolean;
  /** Default as a person would type it, unit included (a plain number for `number`). */
  default: { value: number; unit: string } | number;
}

/**
 * A parameter that is no number: a name of a list, an element or nuclide by its symbol, points (r, V), a formula, or
 * the named quantities of one.
 */
export interface NamedParameter extends Parameter {
  dimension: 'choice' | 'element' | 'nuclide' | 'points' | 'formula' | 'quantities';
  /** What a `choice` may be. */
  choices?: readonly string[];
  /** What a `formula` knows by itself: r, constants and functions. */
  words?: readonly string[];
  /** `points` in angstrom and eV. */
  default: string | Points | NamedQuantities;
}

export type AnyParameter = FormParameter | NamedParameter;

/** Quantities by name, as they were sent; a plain number has no unit. */
export type NamedQuantities = Readonly<Record<string, { value: number; unit: string } | number>>;

/** (r, V) in angstrom and eV. */
export type Points = readonly (readonly [number, number])[];

/** Parameter values by key, in internal units. */
export type FormValue = number | string | Points | NamedQuantities;
export type FormValues = Readonly<Record<string, FormValue>>;

/**
 * One interaction form: everything the input panel, validation, the engine and the Reference page need.
 */
export interface Form<Parameter extends AnyParameter = AnyParameter> {
  key: string;
  label: string;
  /** V(r) as TeX. */
  formula: string;
  /** Transform S(q) or amplitude as TeX, for display. */
  transformFormula: string;
  source: string;
  parameters: Parameter[];
  /** Builds the term from parameter values in internal units. Throws DomainError('invalidInput', …) naming the parameter where a combination is refused. */
  build: (values: FormValues, context: FormContext) => Term;
}
