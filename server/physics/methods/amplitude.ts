import type { Complex } from '#server/physics/potentials/types.ts';

/** A scattering amplitude, angstrom; `error` bounds its distance from the true one in the complex plane. */
export interface Amplitude extends Complex {
  error: number;
}

/** The amplitude of one interaction at one energy, as the observables take it; lengths in angstrom, q in 1/angstrom. */
export interface ScatteringAmplitude {
  /**
   * f(q), 0 <= q <= 2k; null where it diverges (a Coulomb tail at q = 0). `blur` is a relative error of q beyond the roundings that
   * every amplitude allows for.
   */
  amplitude: (q: number, blur?: number) => Amplitude | null;
  /** f(q) without its Coulomb tail; f itself where there is none. */
  shortRange: (q: number, blur?: number) => Amplitude;
  /** (2 mu/hbar²) Σ strength · c, 1/angstrom: the Coulomb tail of the potential, zero without one. */
  tail: Complex;
  /** An amplitude below this is lost in rounding, angstrom. */
  floor: number;
}

/** A number that says whether a method may be used, and the words that go with it. */
export interface Condition {
  name: string;
  value: number;
  /** What it should stay below (`most`) or above (`least`); absent where the number is only reported. */
  most?: number;
  least?: number;
  holds: boolean;
  /** In words: what the number is. */
  meaning: string;
}

/** What a method beyond first order answers for one interaction at one energy. */
export interface MethodAmplitude extends ScatteringAmplitude {
  /** Spin-flip amplitude g(q), angstrom: with a spin-orbit term only. */
  flip: ((q: number) => Amplitude) | null;
  /** What complex depths remove, angstrom². */
  absorption: { value: number; error: number } | { divergent: string };
  conditions: Condition[];
}

/** One partial wave. */
export interface Wave {
  l: number;
  /** l + 1/2 or l - 1/2 with a spin-orbit term, null without one. */
  j: number | null;
  /** Phase shift, rad, between -pi/2 and pi/2; relative to the Coulomb phase where there is one. */
  delta: number;
  /** |S_l|. */
  eta: number;
  /** Bound of the error of S_l/2. */
  error: number;
  /** First-order phase -k ∫ j_l² U r² dr, rad; null where first order has none. */
  born: number | null;
}

/** What is left of the waves as the energy goes to zero, angstrom; null where it has no meaning, with the reason. */
export interface LowEnergy {
  /** a = -lim f; null where it diverges or does not exist. */
  scatteringLength: { value: number; error: number } | null;
  effectiveRange: { value: number; error: number } | null;
  /** Bound states of l = 0, nodes of the wave at zero energy; null with complex depths. */
  boundStates: number | null;
  /** Why one is null, or what is near: a resonance at zero energy. */
  remark: string | null;
}

export interface PartialWaves extends MethodAmplitude {
  waves: Wave[];
  /** Highest l whose wave was integrated; beyond it first-order phases stand. */
  lMax: number;
  lowEnergy: LowEnergy;
}

/** What an interaction does not allow, and why. */
export interface Unavailable {
  unavailable: string;
}
