import type { Term } from '#server/physics/potentials/types.ts';
import type { FirstBorn } from './born1.ts';

/** What every method is given: an interaction at one energy. */
export interface MethodInput {
  terms: readonly Term[];
  /** First order of the same interaction. */
  born: FirstBorn;
  /** 1/angstrom */
  k: number;
  /** 1/(eV angstrom²) */
  twoMuOverHbar2: number;
}
