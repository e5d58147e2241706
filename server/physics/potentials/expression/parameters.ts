import { DomainError } from '#shared/errors.ts';
import { composedUnit } from '#shared/units/composed.ts';
import type { NamedQuantities } from '../types.ts';
import type { Parameter } from './radii.ts';
import { PLAIN } from './unit.ts';
import { nameFault } from './words.ts';

/** Bases of composed units that a potential may be made of; an angle is a plain number of radians. */
const ALLOWED = ['eV', 'angstrom', 'rad'];
const LARGEST = 1e30;

function refuseParameter(name: string, message: string): never {
  throw new DomainError('invalidInput', message, {
    errors: [{ path: `/parameters/${name}`, message }],
  });
}

function readOne(name: string, sent: NamedQuantities[string]): Parameter {
  const fault = nameFault(name);
  if (fault !== null) refuseParameter(name, fault);
  const value = typeof sent === 'number' ? sent : sent.value;
  if (!(Math.abs(value) <= LARGEST)) {
    refuseParameter(name, `${name} must be a number of at most ${LARGEST} in size.`);
  }
  if (typeof sent === 'number') return { value, unit: PLAIN };
  try {
    const { factor, powers } = composedUnit(sent.unit);
    const strange = Object.keys(powers).find((base) => !ALLOWED.includes(base));
    if (strange !== undefined) {
      refuseParameter(
        name,
        `\`${sent.unit}\` has no place in a potential: units are made of energies and lengths, as eV, angstrom, eV angstrom or 1/angstrom.`,
      );
    }
    return {
      value: value * factor,
      unit: { energy: powers['eV'] ?? 0, length: powers['angstrom'] ?? 0 },
    };
  } catch (error) {
    if (error instanceof DomainError && !error.details.errors) {
      refuseParameter(
        name,
        `${error.message} Units are made of energies and lengths, as eV, angstrom, eV angstrom or 1/angstrom.`,
      );
    }
    throw error;
  }
}

/** The named parameters of a formula in eV and angstrom, with their units. Throws DomainError invalidInput at /parameters/NAME. */
export function readNamedParameters(sent: NamedQuantities): ReadonlyMap<string, Parameter> {
  return new Map(Object.entries(sent).map(([name, one]) => [name, readOne(name, one)]));
}
