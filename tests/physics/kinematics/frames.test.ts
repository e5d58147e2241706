import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import {
  cmToLab,
  kinematicFactor,
  labToCm,
  recoilAngle,
  recoilFraction,
} from '#server/physics/kinematics/frames.ts';
import type { Frame } from '#server/physics/kinematics/frames.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import type { Regime } from '#server/physics/kinematics/two-body.ts';
import {
  atomicMassEnergy,
  naturalIsotopes,
  nuclearMassEnergy,
  nuclide,
} from '#server/physics/tables/nuclides.ts';
import { species } from '#server/physics/tables/species.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const DEG = Math.PI / 180;
const PROTON = species('proton').mass;
const ALPHA = species('alpha').mass;
const bare = (name: string) => nuclearMassEnergy(nuclide(name));

function frame(m1: number, m2: number, energy = 1e6, regime: Regime = 'nonrelativistic'): Frame {
  return twoBody({ projectileMass: m1, targetMass: m2, energy, regime }).frame;
}

/** Mean mass of an element's natural atoms, eV. */
const elementMass = (symbol: string) =>
  naturalIsotopes(symbol).reduce(
    (sum, entry) => sum + (entry.abundance ?? 0) * atomicMassEnergy(entry),
    0,
  );

describe('check values', () => {
  it.each([
    ['alpha on a proton', ALPHA, 14.57957],
    ['deuteron on a proton', species('deuteron').mass, 30.01643],
    ['C-12 on a proton', bare('C-12'), 4.816],
  ])('59: largest lab angle of %s', (_, mass, degrees) => {
    expectRelative(frame(mass, PROTON).thetaMax / DEG, degrees, degrees === 4.816 ? 1e-4 : 4e-7);
  });

  it('60: equal masses have theta = 2 L and 4 cos L', () => {
    const equal = frame(PROTON, PROTON);
    for (const lab of [1e-6, 5, 30, 60, 89.999]) {
      const [only, ...more] = labToCm(lab * DEG, equal);
      expect(more).toEqual([]);
      expectRelative(only?.thetaCm ?? NaN, 2 * lab * DEG, 1e-15);
      expectRelative(only?.jacobian ?? NaN, 4 * Math.cos(lab * DEG), 1e-15);
    }
    expectRelative(labToCm(30 * DEG, equal)[0]?.jacobian ?? NaN, 3.4641016, 1e-8);
    expect(labToCm(90 * DEG, equal)).toEqual([]);
    expect(labToCm(120 * DEG, equal)).toEqual([]);
  });

  it.each([
    ['proton on C-12', PROTON, 'C-12', 32.40606, 1.149838],
    ['alpha on C-12', ALPHA, 'C-12', 39.60037, 1.648348],
    ['alpha on Au-197', ALPHA, 'Au-197', 30.58214, 1.035454],
  ])('61: 30 degrees in the lab, %s', (_, mass, target, cm, jacobian) => {
    const [only] = labToCm(30 * DEG, frame(mass, bare(target)));
    expectRelative(only?.thetaCm ?? NaN, cm * DEG, 3e-7);
    expectRelative(only?.jacobian ?? NaN, jacobian, 1e-6);
  });

  it('61b: both branches of an alpha on a proton at 10 degrees', () => {
    const [forward, backward] = labToCm(10 * DEG, frame(ALPHA, PROTON));
    expectRelative(forward?.thetaCm ?? NaN, 53.61703 * DEG, 2e-7);
    expectRelative(forward?.jacobian ?? NaN, 29.68986, 4e-7);
    expectRelative(backward?.thetaCm ?? NaN, 146.38297 * DEG, 1e-7);
    expectRelative(backward?.jacobian ?? NaN, 14.04088, 1e-6);
  });

  // Chu, Mayer and Nicolet, Backscattering Spectrometry (1978); masses of whole atoms, as there.
  it.each([
    ['C', 0.2526],
    ['O', 0.3625],
    ['Al', 0.5525],
    ['Si', 0.5657],
    ['Cu', 0.7785],
    ['Au', 0.9225],
  ])('31: kinematic factor of He at 170 degrees on %s', (symbol, factor) => {
    const setup = frame(atomicMassEnergy(nuclide('He-4')), elementMass(symbol));
    const [only] = labToCm(170 * DEG, setup);
    expect(Math.abs(kinematicFactor(only?.thetaCm ?? NaN, setup) - factor)).toBeLessThanOrEqual(
      1.1e-4,
    );
  });

  it.each([
    ['Au', 79, 32.822],
    ['Cu', 29, 4.392],
    ['Si', 14, 0.99076],
    ['C', 6, 0.15024],
  ])(
    '30: Rutherford cross section of 1 MeV He at 170 degrees in the lab on %s, barn/sr',
    (symbol, z, expected) => {
      const { energyCm, frame: setup } = twoBody({
        projectileMass: atomicMassEnergy(nuclide('He-4')),
        targetMass: elementMass(symbol),
        energy: 1e6,
        regime: 'nonrelativistic',
      });
      const [only] = labToCm(170 * DEG, setup);
      const { thetaCm, jacobian } = only ?? { thetaCm: NaN, jacobian: NaN };
      const length = (2 * z * COULOMB_EV_ANGSTROM) / (4 * energyCm);
      expectRelative((length / Math.sin(thetaCm / 2) ** 2) ** 2 * jacobian * 1e8, expected, 1e-4);
    },
  );

  it('41: an electron of 1 GeV leaves a proton at 90 degrees with 484.0765 MeV', () => {
    const electron = species('electron').mass;
    const setup = frame(electron, PROTON, 1e9 - electron, 'relativistic');
    const [only] = labToCm(90 * DEG, setup);
    const left = electron + (1e9 - electron) * kinematicFactor(only?.thetaCm ?? NaN, setup);
    // The printed figure neglects the electron's mass, (m/E)² = 2.6e-7 of it and more after the collision.
    expectRelative(left, 484.0765e6, 6e-7);
  });
});

const masses = fc.double({ min: 1e8, max: 2e11, noNaN: true });
const energies = fc.double({ min: 1e4, max: 1e11, noNaN: true });
const angles = fc.double({ min: 1e-3, max: Math.PI - 1e-3, noNaN: true });
const regimes = fc.constantFrom<Regime>('nonrelativistic', 'relativistic');

describe('four-vectors, boosted here', () => {
  it('give the same angles, energies and recoil', () => {
    fc.assert(
      fc.property(masses, masses, energies, angles, (m1, m2, energy, theta) => {
        const { frame: setup, momentumCm: p } = twoBody({
          projectileMass: m1,
          targetMass: m2,
          energy,
          regime: 'relativistic',
        });
        const beta = Math.sqrt(energy * (energy + 2 * m1)) / (energy + m1 + m2);
        const gamma = 1 / Math.sqrt(1 - beta * beta);
        const boost = (e: number, z: number) =>
          [gamma * (e + beta * z), gamma * (z + beta * e)] as const;
        const across = p * Math.sin(theta);
        const along = p * Math.cos(theta);
        const [e1, z1] = boost(Math.hypot(p, m1), along);
        const [e2, z2] = boost(Math.hypot(p, m2), -along);
        expect(Math.abs(cmToLab(theta, setup).thetaLab - Math.atan2(across, z1))).toBeLessThan(
          1e-8,
        );
        expect(Math.abs(recoilAngle(theta, setup) - Math.atan2(across, z2))).toBeLessThan(1e-5);
        const mass = Math.max(m1, m2);
        const slack = 1e-12 * gamma * gamma * (1 + mass / energy);
        expect(Math.abs(kinematicFactor(theta, setup) - (e1 - m1) / energy)).toBeLessThan(slack);
        expect(Math.abs(recoilFraction(theta, setup) - (e2 - m2) / energy)).toBeLessThan(slack);
      }),
    );
  });
});

describe('round trips and sums', () => {
  it('cm → lab → cm comes back on one of the branches, with the same ratio of solid angles', () => {
    fc.assert(
      fc.property(masses, masses, energies, angles, regimes, (m1, m2, energy, theta, regime) => {
        const setup = frame(m1, m2, energy, regime);
        const { thetaLab, jacobian } = cmToLab(theta, setup);
        // Within 1e-3 of the cone's edge the inverse is ill-conditioned by nature.
        fc.pre(!(setup.rhoMinusOne >= 0) || thetaLab < setup.thetaMax * (1 - 1e-3));
        const nearest = labToCm(thetaLab, setup).sort(
          (a, b) => Math.abs(a.thetaCm - theta) - Math.abs(b.thetaCm - theta),
        )[0];
        expect(Math.abs((nearest?.thetaCm ?? NaN) - theta)).toBeLessThan(1e-11);
        expectRelative(nearest?.jacobian ?? NaN, jacobian, 1e-9);
      }),
      { numRuns: 300 },
    );
  });

  it('keeps the energy: what the target takes and what is left add up to one', () => {
    fc.assert(
      fc.property(masses, masses, energies, angles, regimes, (m1, m2, energy, theta, regime) => {
        const setup = frame(m1, m2, energy, regime);
        expectRelative(kinematicFactor(theta, setup) + recoilFraction(theta, setup), 1, 1e-14);
      }),
    );
  });

  it.each([
    ['lighter', PROTON, bare('C-12'), 1e6, 'nonrelativistic'],
    ['lighter', PROTON, bare('C-12'), 1e10, 'relativistic'],
    ['equal', PROTON, PROTON, 1e9, 'relativistic'],
    ['heavier', ALPHA, PROTON, 1e6, 'nonrelativistic'],
    ['heavier', ALPHA, PROTON, 2e10, 'relativistic'],
    ['far heavier', bare('Au-197'), PROTON, 1e6, 'nonrelativistic'],
  ] as const)(
    'the ratio of solid angles integrates to 4π over all branches: %s',
    (_, m1, m2, energy, regime) => {
      const setup = frame(m1, m2, energy, regime);
      // L = thetaMax sin(u) takes away the integrable singularity at the edge of the cone.
      const steps = 4000;
      const top = Math.PI / 2;
      let sum = 0;
      for (let i = 0; i < steps; i += 1) {
        const u = ((i + 0.5) / steps) * top;
        const lab = setup.thetaMax * Math.sin(u);
        const weight = Math.sin(lab) * setup.thetaMax * Math.cos(u);
        sum += labToCm(lab, setup).reduce((total, branch) => total + branch.jacobian, 0) * weight;
      }
      expectRelative((2 * Math.PI * sum * top) / steps, 4 * Math.PI, 1e-5);
    },
  );

  it('a fixed target leaves angles and energy alone', () => {
    const setup = frame(PROTON, Infinity);
    for (const theta of [0, 1e-9, 1, Math.PI / 2, 3, Math.PI]) {
      expect(cmToLab(theta, setup)).toEqual({ thetaLab: theta, jacobian: 1 });
      expect(labToCm(theta, setup)).toEqual([{ thetaCm: theta, jacobian: 1 }]);
      expect(kinematicFactor(theta, setup)).toBe(1);
      expect(recoilFraction(theta, setup)).toBe(0);
    }
  });
});

describe('edges', () => {
  it('both branches of a heavy projectile exist straight ahead', () => {
    const setup = frame(ALPHA, PROTON);
    const ratio = ALPHA / PROTON;
    const [forward, backward] = labToCm(0, setup);
    expect(forward?.thetaCm).toBe(0);
    expectRelative(backward?.thetaCm ?? NaN, Math.PI, 1e-15);
    expectRelative(forward?.jacobian ?? NaN, (ratio + 1) ** 2, 1e-14);
    expectRelative(backward?.jacobian ?? NaN, (ratio - 1) ** 2, 1e-14);
  });

  it('nothing is seen at and beyond the edge of the cone, and the branches meet just inside', () => {
    const setup = frame(ALPHA, PROTON);
    expect(labToCm(setup.thetaMax, setup)).toEqual([]);
    expect(labToCm(setup.thetaMax * 1.01, setup)).toEqual([]);
    expect(labToCm(Math.PI, setup)).toEqual([]);
    const [forward, backward] = labToCm(setup.thetaMax * (1 - 1e-14), setup);
    const edge = Math.acos(-PROTON / ALPHA);
    expect(Math.abs((forward?.thetaCm ?? NaN) - edge)).toBeLessThan(1e-6);
    expect(Math.abs((backward?.thetaCm ?? NaN) - edge)).toBeLessThan(1e-6);
    expect(Number.isFinite(forward?.jacobian)).toBe(true);
  });

  it('the Jacobian falls off from the edge as one over the square root, to every digit', () => {
    const setup = frame(ALPHA, PROTON);
    const at = (delta: number) => labToCm(setup.thetaMax - delta, setup)[0]?.jacobian ?? NaN;
    expectRelative(at(1e-8) / at(4e-8), 2, 2e-3);
    expectRelative(at(1e-12) / at(4e-12), 2, 1e-3);
  });

  it('a projectile that turns round reaches 180 degrees, and one on an equal target stops', () => {
    expectRelative(labToCm(Math.PI, frame(PROTON, ALPHA))[0]?.thetaCm ?? NaN, Math.PI, 1e-15);
    expect(kinematicFactor(Math.PI, frame(PROTON, PROTON))).toBeLessThan(1e-31);
    expectRelative(recoilAngle(Math.PI, frame(PROTON, PROTON)) + 1, 1, 1e-15);
  });

  it('angles that are none have no branch', () => {
    for (const angle of [-0.1, NaN, Infinity, 4]) {
      expect(labToCm(angle, frame(PROTON, ALPHA))).toEqual([]);
    }
  });
});
