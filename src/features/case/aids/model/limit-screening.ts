import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { BOHR_ANGSTROM } from '#shared/units/codata.ts';
import { chargeNumberOf } from './charge-numbers.ts';

/** One exponential of a screening function: weight · exp(-r/length), length in angstrom. */
export interface Screen {
  weight: number;
  length: number;
}

/** Two charges behind a sum of exponentials. */
export interface ScreenedCharges {
  product: number;
  screens: readonly Screen[];
}

interface Published {
  /** Weights and decays as printed. */
  parts: readonly (readonly [weight: number, decay: number])[];
  /** Screening length over the Bohr radius. */
  length: (Z1: number, Z2: number) => number;
}

/** Entered here beside the engine's table on purpose: a table that checks itself would show nothing. */
const PUBLISHED: Readonly<Record<string, Published>> = {
  // G. Molière, Z. Naturforsch. 2a (1947) 133.
  moliere: {
    parts: [
      [0.1, 6],
      [0.55, 1.2],
      [0.35, 0.3],
    ],
    length: (_, Z2) => 0.88534 / Math.cbrt(Z2),
  },
  // W. D. Wilson, L. G. Haggmark and J. P. Biersack, Phys. Rev. B 15 (1977) 2458.
  krc: {
    parts: [
      [0.190945, 0.278544],
      [0.473674, 0.637174],
      [0.335381, 1.919249],
    ],
    length: (Z1, Z2) => 0.8853 / Math.cbrt(Math.sqrt(Z1) + Math.sqrt(Z2)) ** 2,
  },
  // J. F. Ziegler, J. P. Biersack and U. Littmark, The Stopping and Range of Ions in Solids (1985).
  universalIon: {
    parts: [
      [0.1818, 3.2],
      [0.5099, 0.9423],
      [0.2802, 0.4029],
      [0.02817, 0.2016],
    ],
    length: (Z1, Z2) => 0.8854 / (Z1 ** 0.23 + Z2 ** 0.23),
  },
};

type Particles = Pick<EstimateRequest, 'projectile' | 'target'>;

/** Charge numbers of the two atoms of a term: its own, else those of the case. */
function chargesOf(term: InteractionTerm, { projectile, target }: Particles) {
  const own = (key: string) => (typeof term[key] === 'number' ? term[key] : null);
  if (term.form === 'moliere') {
    return [chargeNumberOf(projectile), own('Z') ?? chargeNumberOf(target)] as const;
  }
  return [own('Z1'), own('Z2')] as const;
}

/** A published screening function with its lengths; null for other forms, and where a charge is not known here. */
export function screenedCharges(
  term: InteractionTerm,
  particles: Particles,
): ScreenedCharges | null {
  const published = PUBLISHED[term.form];
  const [Z1, Z2] = chargesOf(term, particles);
  if (!published || Z1 === null || Z2 === null || !(Z2 >= 1)) return null;
  const a = published.length(Z1, Z2) * BOHR_ANGSTROM;
  return {
    product: Z1 * Z2,
    screens: published.parts.map(([weight, decay]) => ({ weight, length: a / decay })),
  };
}
