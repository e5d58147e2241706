import { DEFAULT_UNITS } from '#shared/contracts/estimates.ts';
import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { DomainError } from '#shared/errors.ts';
import { fromInternal } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { UNITS, isUnit } from '#shared/units/vocabulary.ts';
import { askedAngles } from './to-angles.ts';

/** Nothing that is not a number leaves: a value beyond double precision is refused in words. */
export function finite(value: number): number {
  if (Number.isFinite(value)) return value === 0 ? 0 : value;
  throw new DomainError(
    'invalidInput',
    'A result leaves double precision: check the units of energy, strength and range.',
  );
}

/** Turns internal values into those of the units that were asked for. */
export class AnswerUnits {
  readonly length: string;
  readonly area: string;
  readonly energy: string;
  readonly angle: string;
  private readonly lengthFactor: number;
  private readonly areaFactor: number;
  private readonly angleFactor: number;

  constructor(request: EstimateRequest) {
    const { units } = request;
    this.length = units?.length ?? DEFAULT_UNITS.length;
    this.area = units?.area ?? DEFAULT_UNITS.area;
    this.energy = units?.energy ?? DEFAULT_UNITS.energy;
    this.angle = askedAngles(request).unit;
    this.lengthFactor = UNITS.length[this.length] ?? 1;
    this.areaFactor = UNITS.area[this.area] ?? 1;
    this.angleFactor = UNITS.angle[this.angle] ?? 1;
  }

  lengthOf(angstrom: number): number {
    return finite(angstrom / this.lengthFactor);
  }
  areaOf(angstrom2: number): number {
    return finite(angstrom2 / this.areaFactor);
  }
  /** Wave numbers and momentum transfers. */
  inverseLengthOf(perAngstrom: number): number {
    return finite(perAngstrom * this.lengthFactor);
  }
  angleOf(radians: number): number {
    return finite(radians / this.angleFactor);
  }
  energyOf(electronvolt: number): number {
    return finite(fromInternal(electronvolt, this.energy, 'energy').value);
  }

  lengthQuantity(angstrom: number): Quantity {
    return { value: this.lengthOf(angstrom), unit: this.length };
  }
  inverseLengthQuantity(perAngstrom: number): Quantity {
    return { value: this.inverseLengthOf(perAngstrom), unit: `1/${this.length}` };
  }
  energyQuantity(electronvolt: number): Quantity {
    return { value: this.energyOf(electronvolt), unit: this.energy };
  }
  /** mc² in the unit of energy where that is one of mass too, in eV otherwise. */
  massQuantity(electronvolt: number): Quantity {
    const unit = isUnit(this.energy, 'mass') ? this.energy : 'eV';
    return { value: finite(fromInternal(electronvolt, unit, 'mass').value), unit };
  }
  dcsQuantity(angstrom2: number): Quantity {
    return { value: this.areaOf(angstrom2), unit: `${this.area}/sr` };
  }

  get volumeEnergyUnit(): string {
    return `${this.energy} ${this.length}3`;
  }
  volumeEnergyOf(value: number): number {
    return finite(value * composedFactor('eV angstrom3', this.volumeEnergyUnit));
  }
  /** A value in a composed internal unit, in that of the answer. */
  composed(value: number, from: string, to: string): Quantity {
    return { value: finite(value * composedFactor(from, to)), unit: to };
  }
}

/** relativeError, or absoluteError in the unit of the value where the value is zero, below the floor or not known to itself. */
export function errorOf(
  value: number,
  error: number,
  belowFloor = false,
): { relativeError: number } | { absoluteError: number } {
  const relative = error / Math.abs(value);
  if (belowFloor || !(relative < 1)) return { absoluteError: finite(error) };
  return { relativeError: relative };
}
