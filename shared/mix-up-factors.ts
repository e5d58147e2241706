import { computedSlip } from './mix-ups.ts';
import type { Slip } from './mix-ups.ts';

/** What a case says of itself that slips are made with. */
export interface CaseFacts {
  /** m1/(m1 + m2), zero for a fixed target; null where it does not decide (relativistic kinematics). */
  massShare: number | null;
  /** Lorentz factor of the projectile in the lab. */
  gamma: number;
  /** Charge number of a scatterer whose charge may have been left out, or null. */
  charge: number | null;
}

/** Atoms of one kind in the usual formula units; 2 and 4 are among the usual slips already. */
const COUNTS = [3, 5, 6];

const bothWays = (key: string, factor: number, over: string, under: string): (Slip | null)[] => [
  computedSlip(key, over, factor, 1),
  computedSlip(`${key} inverse`, under, 1, factor),
];

/**
 * Slips whose factor follows from masses, speed and charge of the case.
 *
 * Formula: (1 + m1/m2)² bound to free and projectile to reduced mass; γ² of the mass in the amplitude; Z² of one charge; n of a formula unit.
 */
export function slipsOfCase({ massShare, gamma, charge }: CaseFacts): Slip[] {
  const reduced = massShare === null ? 1 : (1 - massShare) ** -2;
  return [
    ...bothWays(
      'bound',
      reduced,
      'is of the bound scatterer, or was made with the mass of the projectile for the reduced one: (1 + m/M)²',
      'is of the free scatterer, or was made with the reduced mass twice: (1 + m/M)⁻²',
    ),
    ...bothWays(
      'gamma',
      gamma ** 2,
      'has the relativistic mass once too often: γ²',
      'has the rest mass where the relativistic one belongs: γ⁻²',
    ),
    ...bothWays(
      'charge',
      charge === null ? 1 : charge ** 2,
      'has the charge of the target once too often: Z²',
      'leaves the charge of the target out, as for hydrogen: Z⁻²',
    ),
    ...COUNTS.flatMap((count) =>
      bothWays(
        `count ${count}`,
        count,
        `is per molecule or formula unit of ${count} scatterers, not per scatterer`,
        `was divided by ${count}, as if it had been per formula unit`,
      ),
    ),
  ].filter((slip) => slip !== null);
}
