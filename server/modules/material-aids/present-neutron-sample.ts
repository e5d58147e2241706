import type { NeutronSample } from '#shared/contracts/material-aids.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { fromInternal } from '#shared/units/quantity.ts';
import type { Sample, Told } from '#server/physics/observables/neutron-sample.ts';
import {
  scatteringLengthDensity,
  tenPercentThickness,
  transmission,
  unitAbsorption,
  unitScattering,
} from '#server/physics/observables/neutron-sample.ts';
import { NEUTRON_EDITION } from '#server/physics/tables/neutron-lengths.ts';
import { fittingLength } from './fitting-length.ts';

const barn = (angstrom2: number): Quantity => fromInternal(angstrom2, 'barn', 'area');
const perCentimetre = (perAngstrom: number): Quantity => ({
  value: perAngstrom * composedFactor('1/angstrom', '1/cm'),
  unit: '1/cm',
});
const because = (reason: string) => ({ unavailable: true as const, reason });
const reasonOf = <T extends object>(...all: Told<T>[]): string =>
  all.map((one) => ('unavailable' in one ? one.unavailable : '')).find((reason) => reason !== '') ??
  '';

function lengthDensityOf(sample: Sample): NeutronSample['scatteringLengthDensity'] {
  const found = scatteringLengthDensity(sample);
  if ('unavailable' in found) return because(found.unavailable);
  const { value, uncertainty, critical } = found;
  return {
    value,
    unit: '1/angstrom2',
    ...(uncertainty !== null && { uncertainty }),
    ...(critical && {
      criticalTransfer: { value: critical.q, unit: '1/angstrom' },
      criticalAngle: fromInternal(critical.angle, 'deg', 'angle'),
    }),
  };
}

/** What a sample does to slow neutrons, each number in its own unit or with the reason why there is none. */
export function presentNeutronSample(sample: Sample, thickness: number | null): NeutronSample {
  const { numberDensity, wavelength } = sample;
  const scattering = unitScattering(sample);
  const absorption = unitAbsorption(sample);
  const both = 'unavailable' in scattering ? null : scattering.coherent + scattering.incoherent;
  const absorbed = 'unavailable' in absorption ? null : absorption.value;
  return {
    wavelength: { value: wavelength, unit: 'angstrom' },
    edition: NEUTRON_EDITION,
    scatteringLengthDensity: lengthDensityOf(sample),
    scattering:
      'unavailable' in scattering
        ? because(scattering.unavailable)
        : {
            coherent: barn(scattering.coherent),
            incoherent: barn(scattering.incoherent),
            macroscopic: perCentimetre(numberDensity * (both ?? 0)),
          },
    absorption:
      'unavailable' in absorption
        ? because(absorption.unavailable)
        : {
            ...barn(absorption.value),
            macroscopic: perCentimetre(numberDensity * absorption.value),
          },
    tenPercentThickness:
      both === null
        ? because(reasonOf(scattering))
        : both > 0
          ? fittingLength(tenPercentThickness(numberDensity, both))
          : because('Nothing scatters here.'),
    ...(thickness !== null && {
      transmission:
        both === null || absorbed === null
          ? because(reasonOf<object>(scattering, absorption))
          : {
              thickness: fittingLength(thickness),
              ...transmission(numberDensity, thickness, {
                scattering: both,
                absorption: absorbed,
              }),
            },
    }),
  };
}
