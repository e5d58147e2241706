import { describe, expect, it } from 'vitest';
import { FINE_STRUCTURE, PROTON_MASS } from '#server/physics/constants/codata2022.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import { coulombAmplitude } from '#server/physics/methods/coulomb-amplitude.ts';
import { exchangeDcs } from '#server/physics/methods/exchange.ts';
import { coulombPhases } from '#server/physics/numerics/coulomb-phase.ts';
import { nuclearMassEnergy, nuclide } from '#server/physics/tables/nuclides.ts';
import { species } from '#server/physics/tables/species.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const DEG = Math.PI / 180;

function pairOf(mass: number, charge: number, energyCm: number) {
  const { k, relativeVelocity } = twoBody({
    projectileMass: mass,
    targetMass: mass,
    energy: 2 * energyCm,
    regime: 'nonrelativistic',
  });
  return { k, eta: (charge * charge * FINE_STRUCTURE) / relativeVelocity };
}

/** dσ/dΩ of two identical charges in the centre of mass, barn/sr. */
function identical(pair: { k: number; eta: number }, spin: number) {
  const f = coulombAmplitude(pair.eta, pair.k);
  return (theta: number) => {
    const direct = f(2 * pair.k * Math.sin(theta / 2));
    const exchanged = f(2 * pair.k * Math.cos(theta / 2));
    if (direct === null || exchanged === null) throw new Error('forward or backward');
    return exchangeDcs(direct, exchanged, spin).value * 1e8;
  };
}

describe('amplitude of two point charges', () => {
  it.each([
    [0.89, 3],
    [-21, 0.7],
    [300, 12],
    [-1e-4, 1e-3],
  ])("eta = %d, k = %d: its square is Rutherford's formula", (eta, k) => {
    const f = coulombAmplitude(eta, k);
    for (const theta of [0.1, 5, 90, 179, 180]) {
      const sine = Math.sin((theta / 2) * DEG);
      const { re, im } = f(2 * k * sine) ?? { re: NaN, im: NaN };
      expectRelative(re * re + im * im, (eta / (2 * k * sine * sine)) ** 2, 1e-14);
    }
  });

  it('is negative where weak charges repel, as first order is, and straight back has the phase 2 sigma_0 alone', () => {
    expect(coulombAmplitude(1e-6, 1)(1)?.re).toBeLessThan(0);
    expect(coulombAmplitude(-1e-6, 1)(1)?.re).toBeGreaterThan(0);
    const eta = 2.5;
    const back = coulombAmplitude(eta, 3)(6) ?? { re: NaN, im: NaN };
    const sigma = coulombPhases(0, eta).sigma[0] ?? NaN;
    expectRelative(
      Math.atan2(-back.im, -back.re),
      Math.atan2(Math.sin(2 * sigma), Math.cos(2 * sigma)),
      1e-13,
    );
  });

  it('is the sum of its waves: (1 - x)^3 f has the partial waves of the Coulomb phases', () => {
    // (1-x) Σ (2l+1) a_l P_l has the coefficients b_l = (2l+1) a_l - (l+1) a_{l+1} - l a_{l-1}, divided by 2l+1 each: the sum then converges.
    const [eta, k] = [1.3, 2];
    const top = 4000;
    const { sigma } = coulombPhases(top, eta);
    let waves = Array.from(sigma, (phase) => ({
      re: Math.sin(2 * phase) / (2 * k),
      im: -(Math.cos(2 * phase) - 1) / (2 * k),
    }));
    const reduce = (list: typeof waves) =>
      list.slice(0, -1).map((here, l) => {
        const up = list[l + 1] ?? here;
        const down = list[l - 1] ?? { re: 0, im: 0 };
        const part = (a: number, b: number, c: number) => a - ((l + 1) * b + l * c) / (2 * l + 1);
        return { re: part(here.re, up.re, down.re), im: part(here.im, up.im, down.im) };
      });
    for (let i = 0; i < 3; i++) waves = reduce(waves);
    for (const x of [-0.95, -0.3, 0.2, 0.8]) {
      let [re, im, before, p] = [0, 0, 0, 1];
      waves.forEach((wave, l) => {
        re += (2 * l + 1) * wave.re * p;
        im += (2 * l + 1) * wave.im * p;
        [before, p] = [p, ((2 * l + 1) * x * p - l * before) / (l + 1)];
      });
      const f = coulombAmplitude(eta, k)(k * Math.sqrt(2 * (1 - x))) ?? { re: NaN, im: NaN };
      const size = Math.hypot(f.re, f.im);
      expect(Math.abs(re / (1 - x) ** 3 - f.re)).toBeLessThan(1e-8 * size);
      expect(Math.abs(im / (1 - x) ** 3 - f.im)).toBeLessThan(1e-8 * size);
    }
  });

  it('diverges forward, vanishes without charge, and its error covers the roundings of q and of a long phase', () => {
    expect(coulombAmplitude(1, 1)(0)).toBeNull();
    expect(coulombAmplitude(0, 1)(0.3)).toEqual({ re: 0, im: 0, error: 0 });
    const f = coulombAmplitude(250, 5);
    const q = 0.37;
    const [here, beside] = [f(q), f(q * (1 + 4 * Number.EPSILON))];
    if (here === null || beside === null) throw new Error('no amplitude');
    const moved = Math.hypot(here.re - beside.re, here.im - beside.im);
    expect(moved).toBeGreaterThan(0);
    expect(moved).toBeLessThan(here.error);
    expect(here.error).toBeLessThan(5e-12 * Math.hypot(here.re, here.im));
  });

  it('refuses a momentum transfer beyond 2k and a wave number of zero', () => {
    expect(() => coulombAmplitude(1, 1)(2.1)).toThrow(RangeError);
    expect(() => coulombAmplitude(1, 1)(NaN)).toThrow(RangeError);
    expect(() => coulombAmplitude(1, 0)).toThrow(RangeError);
    expect(() => coulombAmplitude(NaN, 1)).toThrow(RangeError);
  });
});

describe('identical charges, values recomputed with mpmath and numpy from CODATA 2018', () => {
  it.each([
    [30, 4.17983],
    [45, 0.995318],
    [60, 0.492021],
    [90, 0.33176],
  ])('two alpha particles, 1 MeV in the centre of mass, %d degrees: %d b/sr', (theta, expected) => {
    const pair = pairOf(species('alpha').mass, 2, 1e6);
    expectRelative(pair.eta, 0.8910399, 1e-7);
    expectRelative(pair.k / 1e5, 0.3094, 2e-4);
    expectRelative(identical(pair, 0)(theta * DEG), expected, 2e-6);
  });

  it.each([
    [45, 3.1717],
    [60, 1.8094],
    [80, 0.27211],
    [90, 1.0749],
  ])('two C-12 nuclei, 5 MeV in the centre of mass, %d degrees: %d b/sr', (theta, expected) => {
    const pair = pairOf(nuclearMassEnergy(nuclide('C-12')), 6, 5e6);
    expectRelative(pair.eta, 6.20975, 4e-6);
    expectRelative(identical(pair, 0)(theta * DEG), expected, 3e-5);
  });

  it.each([
    [30, 1.085303],
    [60, 0.0649246],
    [90, 0.020735],
  ])(
    'two protons, 0.5 MeV in the centre of mass, %d degrees: %d b/sr, charge alone',
    (theta, expected) => {
      const pair = pairOf(PROTON_MASS, 1, 0.5e6);
      expectRelative(pair.eta, 0.158057, 3e-6);
      expectRelative(identical(pair, 0.5)(theta * DEG), expected, 3e-6);
    },
  );

  // Canto, Hussein and Mittig, Phys. Rev. C 89 (2014) 024610, print 0.40, 1.2 and 7.1 MeV (from memory).
  it.each([
    ['He-4', 2, 0, 0.397],
    ['Li-6', 3, 1, 1.21],
    ['B-10', 5, 3, 7.05],
  ])('%s on itself is flat at 90 degrees where eta² = 3s + 2', (name, charge, spin, energyMeV) => {
    const mass = name === 'He-4' ? species('alpha').mass : nuclearMassEnergy(nuclide(name));
    const atOne = pairOf(mass, charge, 1e6);
    const energy = (1e6 * atOne.eta ** 2) / (3 * spin + 2);
    expectRelative(energy / 1e6, energyMeV, 3e-3);
    const bend = (energyCm: number) => {
      const dcs = identical(pairOf(mass, charge, energyCm), spin);
      return dcs(88 * DEG) + dcs(92 * DEG) - 2 * dcs(90 * DEG);
    };
    expect(bend(1.02 * energy) * bend(0.98 * energy)).toBeLessThan(0);
  });
});
