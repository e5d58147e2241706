import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  ATOMIC_MASS_UNIT,
  BOHR,
  ELECTRON_MASS,
  HBAR_C_EV_ANGSTROM,
  NEUTRON_MASS,
  PROTON_MASS,
} from '#server/physics/constants/codata2022.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import type { Regime } from '#server/physics/kinematics/two-body.ts';
import { DomainError } from '#shared/errors.ts';
import { energyFromWavelength, wavelengthFromEnergy } from '#shared/units/de-broglie.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const fixed = (projectileMass: number, energy: number, regime: Regime = 'nonrelativistic') =>
  twoBody({ projectileMass, targetMass: Infinity, energy, regime });

describe('beams on a fixed target, against handbooks', () => {
  // Check value 11: electron microscopes; handbooks print 3.70, 2.51 and 1.97 pm.
  it.each([
    [100e3, 3.701437e-2, 0.548221],
    [200e3, 2.507934e-2, 0.695314],
    [300e3, 1.968749e-2, 0.776525],
  ])('electrons of %d eV', (energy, wavelength, beta) => {
    const beam = fixed(ELECTRON_MASS, energy, 'relativistic');
    expectRelative(beam.wavelength, wavelength, 2e-7);
    expectRelative(beam.betaLab, beta, 1e-6);
    expectRelative(beam.relativeVelocity, beta, 1e-6);
  });

  it('electrons of 100 keV without relativity (check value 11)', () => {
    expectRelative(fixed(ELECTRON_MASS, 100e3).wavelength, 3.878299e-2, 2e-7);
  });

  // Check value 12: interaction constant 1/(hbar v), rad/(V angstrom).
  it.each([
    [100e3, 0.924396e-3],
    [200e3, 0.72884e-3],
    [300e3, 0.652616e-3],
  ])('interaction constant of electrons of %d eV', (energy, constant) => {
    const { relativeVelocity } = fixed(ELECTRON_MASS, energy, 'relativistic');
    expectRelative(1 / (HBAR_C_EV_ANGSTROM * relativeVelocity), constant, 1e-6);
  });

  it('neutrons: E = 81.80421/λ² meV, v = 3956.0340/λ m/s, E = 2.07212486 k² meV (check value 13)', () => {
    for (const energy of [1e-4, 0.0253, 1]) {
      const { wavelength, speedLab, k } = fixed(NEUTRON_MASS, energy);
      expectRelative(energy * 1e3 * wavelength ** 2, 81.80421, 1e-7);
      expectRelative(speedLab * wavelength, 3956.034, 1e-8);
      // Printed with the neutron mass of 2018, which moves the last digit by one.
      expectRelative((energy * 1e3) / k ** 2, 2.07212486, 5e-9);
    }
  });

  it('neutrons of 2200 m/s: 25.29886 meV, 1.798197 angstrom, 3.494 per angstrom (check value 14, Sears 1992)', () => {
    const beam = fixed(NEUTRON_MASS, 25.29886e-3);
    expectRelative(beam.speedLab, 2200, 3e-7);
    expectRelative(beam.wavelength, 1.798197, 4e-7);
    expectRelative(beam.k, 3.494, 2e-4);
  });

  it('electrons of 100 eV, and of one rydberg: k = 1/a0 (check value 15)', () => {
    expectRelative(fixed(ELECTRON_MASS, 100).k, 5.123167, 1e-7);
    expectRelative(fixed(ELECTRON_MASS, 13.60569312299).k, 1 / BOHR, 1e-9);
    expectRelative(1 / BOHR, 1.8897261, 2e-8);
  });

  it('hbar²/2m_e = 3.80998212 eV angstrom², hbar²/2u = 20.9007964 MeV fm² (check value 16)', () => {
    // Printed with the electron mass of 2018, which moves the last digit by one.
    expectRelative(1 / fixed(ELECTRON_MASS, 1).twoMuOverHbar2, 3.80998212, 3e-9);
    expectRelative(1 / fixed(ATOMIC_MASS_UNIT, 1).twoMuOverHbar2, 20.9007964e6 * 1e-10, 5e-9);
  });
});

describe('limits and scaling', () => {
  const masses = fc.double({ min: 1e5, max: 3e11, noNaN: true });
  const energies = fc.double({ min: 1e-4, max: 1e10, noNaN: true });

  it('a very heavy target is a fixed one, in either regime', () => {
    for (const regime of ['nonrelativistic', 'relativistic'] as const) {
      const heavy = twoBody({ projectileMass: PROTON_MASS, targetMass: 1e30, energy: 1e6, regime });
      const held = fixed(PROTON_MASS, 1e6, regime);
      for (const key of ['k', 'reducedMass', 'energyCm', 'relativeVelocity', 'betaLab'] as const) {
        expectRelative(heavy[key], held[key], 1e-15);
      }
    }
  });

  it('relativity departs from the simple formulas in proportion to T/m, down to 1e-6 eV', () => {
    for (const energy of [1e-6, 1, 1e4]) {
      const input = { projectileMass: NEUTRON_MASS, targetMass: 12 * PROTON_MASS, energy };
      const slow = twoBody({ ...input, regime: 'nonrelativistic' });
      const exact = twoBody({ ...input, regime: 'relativistic' });
      const small = energy / NEUTRON_MASS;
      expectRelative(exact.k, slow.k, small + 1e-15);
      expectRelative(exact.reducedMass, slow.reducedMass, small + 1e-15);
      expectRelative(exact.energyCm, slow.energyCm, small + 1e-15);
    }
  });

  it('masses and energy scaled alike scale k alike and leave velocities', () => {
    fc.assert(
      fc.property(masses, masses, energies, (m1, m2, energy) => {
        for (const regime of ['nonrelativistic', 'relativistic'] as const) {
          const one = twoBody({ projectileMass: m1, targetMass: m2, energy, regime });
          const eight = twoBody({
            projectileMass: 8 * m1,
            targetMass: 8 * m2,
            energy: 8 * energy,
            regime,
          });
          expectRelative(eight.k, 8 * one.k, 1e-15);
          expectRelative(eight.relativeVelocity, one.relativeVelocity, 1e-15);
          expectRelative(eight.frame.rho, one.frame.rho, 1e-15);
        }
      }),
    );
  });

  it('the centre of mass has the same p for both bodies: p² = 2 mu E_cm, relative velocity = p/mu', () => {
    fc.assert(
      fc.property(masses, masses, energies, (m1, m2, energy) => {
        const slow = twoBody({
          projectileMass: m1,
          targetMass: m2,
          energy,
          regime: 'nonrelativistic',
        });
        expectRelative(slow.momentumCm ** 2, 2 * slow.reducedMass * slow.energyCm, 2e-15);
        expectRelative(slow.relativeVelocity, slow.betaLab, 2e-15);
        const exact = twoBody({
          projectileMass: m1,
          targetMass: m2,
          energy,
          regime: 'relativistic',
        });
        const e1 = Math.hypot(exact.momentumCm, m1);
        const e2 = Math.hypot(exact.momentumCm, m2);
        expectRelative(exact.reducedMass, (e1 * e2) / (e1 + e2), 2e-15);
        expectRelative(
          exact.relativeVelocity,
          exact.momentumCm / e1 + exact.momentumCm / e2,
          3e-15,
        );
      }),
    );
  });
});

describe('the wavelength formulas of the page', () => {
  it('equal the engine, and lead back', () => {
    const energies = fc.double({ min: 1e-6, max: 1e12, noNaN: true });
    const masses = fc.constantFrom(ELECTRON_MASS, NEUTRON_MASS, PROTON_MASS);
    const regimes = fc.constantFrom<Regime>('nonrelativistic', 'relativistic');
    fc.assert(
      fc.property(energies, masses, regimes, (energy, mass, regime) => {
        const wavelength = wavelengthFromEnergy(energy, mass, regime);
        expectRelative(wavelength, fixed(mass, energy, regime).wavelength, 1e-15);
        expectRelative(energyFromWavelength(wavelength, mass, regime), energy, 3e-15);
      }),
    );
  });

  it('give 81.80421 meV to a neutron of 1 angstrom', () => {
    expectRelative(energyFromWavelength(1, NEUTRON_MASS, 'nonrelativistic'), 81.80421e-3, 1e-7);
  });
});

describe('refusals', () => {
  const good = { projectileMass: 1e6, targetMass: 1e6, energy: 1, regime: 'relativistic' as const };
  it.each([
    ['energy', 0],
    ['energy', -1],
    ['energy', NaN],
    ['energy', Infinity],
    ['projectileMass', 0],
    ['projectileMass', NaN],
    ['projectileMass', Infinity],
    ['targetMass', 0],
    ['targetMass', NaN],
    ['targetMass', -5],
  ])('%s of %d is refused in words', (key, value) => {
    expect(() => twoBody({ ...good, [key]: value })).toThrow(DomainError);
    expect(() => twoBody({ ...good, [key]: value })).toThrow(/must be/);
  });

  it('refuses what leaves double precision', () => {
    for (const change of [
      { energy: 1e300 },
      { energy: 1e-320, projectileMass: 1e-10 },
      { targetMass: 1e300 },
    ]) {
      expect(() => twoBody({ ...good, ...change })).toThrow(/too far apart/);
    }
  });
});
