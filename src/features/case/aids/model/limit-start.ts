import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import type { Quantity } from '#shared/units/quantity.ts';

/** What a limiting form starts from. */
export interface Start {
  /** The case at 60° in the centre of mass. */
  body: EstimateRequest;
  /** Its wavenumber there, 1/angstrom. */
  k: number;
  /** The least its wavenumber can be without relativity at the same energy, 1/angstrom. */
  slowK: number;
  /** Reduced mass, eV. */
  reducedMass: number;
  /** Radius beyond which V is too small to be drawn, angstrom; null where it fades like a power of r, or is not drawn. */
  reach: number | null;
}

export const AT_60 = { place: 0 } as const;
/** Two clouds of charge in the same case; how identical particles interfere is another question. */
export const DISTINCT = { identical: false } as const;
export const SLOW = { identical: false, kinematics: 'nonrelativistic' } as const;

export function withTerms(
  body: EstimateRequest,
  terms: InteractionTerm[],
  change: Partial<EstimateRequest> = {},
): EstimateRequest {
  return { ...body, interaction: { terms }, ...change };
}

/** The energy at which the wavenumber without relativity is at least this, 1/angstrom; never below that of the case. */
export function atWavenumber({ body, slowK }: Start, k: number): Quantity {
  const share = Math.max(1, (k / slowK) ** 2);
  return { ...body.energy, value: body.energy.value * share };
}
