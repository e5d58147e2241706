import { describe, expect, test } from 'vitest';
import { materialAidsRequestSchema } from '#shared/contracts/material-aids.ts';
import type { MaterialAids, NeutronSample } from '#shared/contracts/material-aids.ts';
import { toInternal } from '#shared/units/quantity.ts';
import { computeMaterialAids } from '#server/modules/material-aids/compute-material-aids.ts';
import { CONTRACT_BODY, Q } from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

function aidsOf(body: object): MaterialAids {
  return computeMaterialAids(materialAidsRequestSchema.parse(body));
}

/** 2200 m/s: 25.29886 meV, 1.798197 angstrom. */
const neutrons = (energy = 25.29886, unit = 'meV') => ({
  projectile: { species: 'neutron' },
  target: { kind: 'fixed', charge: 0 },
  energy: Q(energy, unit),
  interaction: { terms: [{ form: 'contact', b: Q(1, 'fm') }] },
  methods: ['born1'],
});

function sampleOf(material: object, rest: object = {}): NeutronSample {
  const found = aidsOf({ estimate: neutrons(), scatterer: undefined, material, ...rest }).neutron;
  if (!found || 'unavailable' in found) throw new Error(JSON.stringify(found));
  return found;
}

function valueOf(entry: { value: number; unit: string } | { unavailable: true; reason: string }) {
  if ('unavailable' in entry) throw new Error(entry.reason);
  return entry;
}
const lengthOf = (entry: Parameters<typeof valueOf>[0]) => toInternal(valueOf(entry), 'length');

const ANY = { scatterer: 'H' };

describe('scattering length densities', () => {
  // Recomputed with Debian's python3-periodictable 1.6.0, which carries the edition of 2003 too.
  test.each([
    ['H2O', 1.0, -0.5605, 'H'],
    ['D2O', 1.107, 6.3754, 'H-2'],
    ['Si', 2.33, 2.0737, 'Si'],
    ['SiO2', 2.2, 3.4753, 'Si'],
    ['Ni', 8.902, 9.4078, 'Ni'],
    ['CH2', 0.94, -0.3363, 'H'],
  ])('%s at %d g/cm3: %d e-6 per square angstrom', (formula, density, expected, scatterer) => {
    const found = sampleOf({ formula, density: Q(density, 'g/cm3') }, { scatterer });
    expectRelative(valueOf(found.scatteringLengthDensity).value, expected * 1e-6, 2e-3);
  });

  test('critical edge of nickel and silicon', () => {
    for (const [formula, density, q, angle] of [
      ['Ni', 8.902, 0.0217459, 0.09915],
      ['Si', 2.33, 0.0102096, null],
    ] as const) {
      const { scatteringLengthDensity, wavelength } = sampleOf({
        formula,
        density: Q(density, 'g/cm3'),
      });
      if ('unavailable' in scatteringLengthDensity) throw new Error('none');
      expectRelative(scatteringLengthDensity.criticalTransfer?.value ?? NaN, q, 2e-4);
      const perAngstrom = (scatteringLengthDensity.criticalAngle?.value ?? NaN) / wavelength.value;
      if (angle !== null) expectRelative(perAngstrom, angle, 2e-4);
    }
    const water = sampleOf({ formula: 'H2O', density: Q(1, 'g/cm3') }, ANY);
    expect(water.scatteringLengthDensity).not.toHaveProperty('criticalAngle');
  });
});

describe('thickness that scatters a tenth', () => {
  // The rule of thumb of the trade, to the digits it is quoted with.
  test.each([
    [{ key: 'vanadium' }, 2.86, 5e-3, 'V'],
    [{ key: 'water' }, 0.19, 3e-2, 'H'],
    [{ key: 'polyethylene' }, 0.15, 3e-2, 'H'],
  ])('%o: %d mm', (material, millimetres, tolerance, scatterer) => {
    const found = lengthOf(sampleOf(material, { scatterer }).tenPercentThickness);
    expectRelative(found / 1e7, millimetres, tolerance);
  });

  test('there a tenth is lost by scattering, by definition', () => {
    const thickness = valueOf(sampleOf({ key: 'vanadium' }).tenPercentThickness);
    const { transmission } = sampleOf({ key: 'vanadium' }, { thickness });
    if (!transmission || 'unavailable' in transmission) throw new Error('none');
    expectRelative(transmission.byScattering, 0.9, 1e-12);
    expectRelative(
      transmission.value,
      transmission.byScattering * transmission.byAbsorption,
      1e-14,
    );
  });
});

describe('absorption', () => {
  test('helium-3 at 10 bar, 293.15 K, 2.5 cm absorbs 0.96290 at 1.798 angstrom', () => {
    const { transmission } = sampleOf(
      { formula: '3He', pressure: Q(10, 'bar'), temperature: Q(293.15, 'K') },
      { thickness: Q(2.5, 'cm') },
    );
    if (!transmission || 'unavailable' in transmission) throw new Error('none');
    expectRelative(1 - transmission.byAbsorption, 0.9629, 2e-4);
  });

  test('follows 1/v: half the wavelength, half the absorption', () => {
    const at = (energy: number) => {
      const found = aidsOf({ estimate: neutrons(energy), material: { key: 'vanadium' } }).neutron;
      if (!found || 'unavailable' in found) throw new Error('none');
      return valueOf(found.absorption).value;
    };
    expectRelative(at(4 * 25.29886), at(25.29886) / 2, 1e-12);
    expectRelative(at(25.29886), 5.08, 1e-3);
  });

  test('a resonant absorber is refused in words, and taken with a cross section of its own', () => {
    const body = { thickness: Q(1, 'mm') };
    const refused = sampleOf({ key: 'cadmium' }, body);
    for (const entry of [
      refused.absorption,
      refused.scatteringLengthDensity,
      refused.transmission,
    ]) {
      expect(JSON.stringify(entry)).toMatch(/resonance/);
    }
    const given = sampleOf({ key: 'cadmium' }, { ...body, absorption: { Cd: Q(2520, 'barn') } });
    if (!given.transmission || 'unavailable' in given.transmission) throw new Error('none');
    // One millimetre of cadmium, absorption alone.
    expectRelative(given.transmission.byAbsorption, 8.48e-6, 3e-3);
  });

  test('fast neutrons get no bound length', () => {
    const { neutron } = aidsOf({ estimate: neutrons(14, 'MeV'), material: { key: 'vanadium' } });
    expect(neutron).toMatchObject({ unavailable: true });
    expect(aidsOf({ estimate: CONTRACT_BODY, material: { key: 'gold' } })).not.toHaveProperty(
      'neutron',
    );
  });
});

describe('the mean free path', () => {
  test('is one over number density and total cross section, for electrons in carbon', () => {
    const { meanFreePath, material, scatterer } = aidsOf({
      estimate: CONTRACT_BODY,
      material: { formula: 'C', density: Q(2.0, 'g/cm3') },
      thickness: Q(1, 'nm'),
    });
    if (!('value' in meanFreePath)) throw new Error('none');
    expect(scatterer).toBe('C');
    // 2.0 g/cm³ · 6.02214076e23/12.011, and the closed total of the case, 0.8167890 angstrom².
    const n = (2 * 0.602214076) / 12.011;
    expectRelative(material.units.value, n * 1e24, 1e-9);
    expectRelative(toInternal(meanFreePath, 'length'), 1 / (n * 0.816789), 1e-6);
    expectRelative(meanFreePath.collisions ?? NaN, n * 0.816789 * 10, 1e-6);
  });

  test('of a bare Coulomb potential is said to diverge, and is finite beyond an angle', () => {
    const estimate = {
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'Au-197' },
      energy: Q(5.486, 'MeV'),
      interaction: { terms: [{ form: 'coulomb' }] },
      methods: ['born1'],
      frame: 'cm',
    };
    const whole = aidsOf({ estimate, material: { key: 'gold' } });
    expect(whole.meanFreePath).toMatchObject({ divergent: true });
    const { between } = aidsOf({
      estimate,
      material: { key: 'gold', density: Q(19.3, 'g/cm3') },
      angleRange: { from: 90, to: 180 },
      thickness: Q(1, 'um'),
    });
    if (!between || !('value' in between)) throw new Error('none');
    // The fraction a micrometre of gold turns back, n t π(d/2)², at 5.486 MeV and with recoil.
    const halfDistance = 42.314e-5 / 2;
    expectRelative(
      between.collisions ?? NaN,
      5.900865e-2 * 1e4 * Math.PI * halfDistance ** 2,
      1e-4,
    );
  });

  test('warns above a tenth of a collision, and says single scattering fails above one', () => {
    const at = (thickness: number) =>
      aidsOf({
        estimate: CONTRACT_BODY,
        material: { key: 'graphite' },
        thickness: Q(thickness, 'nm'),
      }).warnings.map(({ code }) => code);
    expect(at(0.05)).toEqual([]);
    expect(at(0.5)).toEqual(['multipleScattering']);
    expect(at(50)).toEqual(['singleScatteringNotValid']);
  });
});

describe('the scatterer', () => {
  const onOxygen = {
    ...neutrons(),
    target: { kind: 'nuclide', nuclide: 'O-16' },
  };
  test('is the element of the target where the formula has it', () => {
    const found = aidsOf({ estimate: onOxygen, material: { key: 'water' } });
    expect(found.scatterer).toBe('O');
    expect(found.warnings.map(({ code }) => code)).toContain('otherAtoms');
  });
  test('must be named where it could be one of several', () => {
    expect(() => aidsOf({ estimate: neutrons(), material: { key: 'water' } })).toThrow(
      /\/scatterer: Say which atoms of H2O/,
    );
  });
  test.each([
    [{ material: { key: 'golt' } }, '/material/key'],
    [{ material: { formula: 'Xx', density: Q(1, 'g/cm3') } }, '/material/formula'],
    [{ material: { key: 'helium-gas' } }, '/material/pressure'],
    [{ material: { formula: 'C', density: Q(300, 'g/cm3') } }, '/material/density'],
    [{ material: { key: 'water' }, scatterer: 'Fe' }, '/scatterer'],
    [{ material: { key: 'iron' }, absorption: { Cd: Q(1, 'barn') } }, '/absorption/Cd'],
    [
      {
        estimate: { ...neutrons(), interaction: { terms: [{ form: 'nope' }] } },
        material: { key: 'iron' },
      },
      '/estimate/interaction/terms/0/form',
    ],
  ])('%o is refused at %s', (change, path) => {
    expect(() => aidsOf({ estimate: neutrons(), ...change })).toThrow(path);
  });
});
