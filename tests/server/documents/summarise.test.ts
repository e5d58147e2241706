import { describe, expect, it } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { enteredQuantity, plainNumber, plainQuantity } from '#server/documents/plain-quantity.ts';
import { summarise } from '#server/documents/summarise.ts';
import { yukawaDocument } from './sample-documents.ts';

const alphaOnProton: CaseDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'species', species: 'proton' },
  energy: { value: 100, unit: 'MeV' },
  kinematics: 'relativistic',
  entered: { '/energy': '25 MeV/u', '/interaction/terms/1/a': '6.5e-6 angstrom' },
  interaction: {
    terms: [
      { form: 'coulomb', chargeProduct: 2 },
      {
        form: 'woodsSaxon',
        a: { value: 0.65, unit: 'fm' },
        R: { value: 4, unit: 'fm' },
        W0: { value: -3, unit: 'MeV' },
        V0: { value: -45.5, unit: 'MeV' },
      },
      { form: 'contact', nuclide: 'V-51' },
    ],
  },
  methods: ['born1'],
  frame: 'lab',
};

describe('summarise', () => {
  it('writes the four stations of the example', () => {
    expect(summarise(yukawaDocument)).toEqual({
      beam: 'electron, 100 eV',
      target: 'fixed centre',
      interaction: 'Yukawa, V₀ −10 eV, a 1 Å',
      detectors: '5 angles, 0° to 180°',
    });
  });

  it('shows what a person typed with the number behind it, sums, complex depths and the frame', () => {
    expect(summarise(alphaOnProton)).toEqual({
      beam: 'alpha, 25 MeV/u (100 MeV), relativistic',
      target: 'proton',
      interaction:
        'Coulomb, Z₁Z₂ 2 + Woods–Saxon, V₀ −45.5 MeV, W₀ −3 MeV, R 4 fm, a 6.5e-6 angstrom (0.65 fm) + contact, V-51',
      detectors: '181 angles, 0° to 180°, lab',
    });
  });

  it.each([
    [{ form: 'moliere', Z: 6 }, 'Molière, Z 6'],
    [{ form: 'universalIon', Z2: 79, Z1: 2 }, 'universal screening, Z₁ 2, Z₂ 79'],
    [{ form: 'atomicElectron', element: 'Au' }, 'neutral atom, Au'],
    [
      {
        form: 'extendedCharge',
        diffuseness: { value: 0.55, unit: 'fm' },
        radius: { value: 3.6, unit: 'fm' },
        kind: 'fermi',
      },
      'extended charge, Fermi, R 3.6 fm, a 0.55 fm',
    ],
    [
      {
        form: 'tabulated',
        tail: 'zero',
        lengthUnit: 'fm',
        energyUnit: 'MeV',
        points: [
          [0, -1],
          [1, 0],
        ] as [number, number][],
      },
      'table, 2 points, tail zero',
    ],
    [
      { form: 'expression', parameters: { V0: { value: 2, unit: 'eV' } }, formula: 'V0 * 1' },
      'formula, V0 * 1, V₀ 2 eV',
    ],
  ])('writes %o', (term, line) => {
    const document: CaseDocument = { ...yukawaDocument, interaction: { terms: [term] } };
    expect(summarise(document).interaction).toBe(line);
  });

  it('names custom particles, nuclides, charges and other angles', () => {
    const document: CaseDocument = {
      ...yukawaDocument,
      projectile: { species: 'custom', mass: { value: 2, unit: 'u' }, charge: -1, spin: 0.5 },
      target: { kind: 'nuclide', nuclide: 'Ca-40' },
      angles: { unit: 'mrad', from: 1, to: 50.5, count: 100 },
    };
    expect(summarise(document)).toMatchObject({
      beam: 'custom (2 u, charge −1, spin 1/2), 100 eV',
      target: 'Ca-40',
      detectors: '100 angles, 1 to 50.5 mrad, cm',
    });
    const target = { kind: 'fixed', charge: 79 } as const;
    const angles = { unit: 'deg', values: [60] };
    expect(summarise({ ...yukawaDocument, target, angles })).toMatchObject({
      target: 'fixed centre, charge +79',
      detectors: '1 angle, 60°',
    });
  });

  it('copes with 5,000 angles in any order', () => {
    const values = Array.from({ length: 5000 }, (_, index) => ((index * 7919) % 5000) / 50);
    const document = { ...yukawaDocument, angles: { unit: 'deg', values } };
    expect(summarise(document).detectors).toBe('5000 angles, 0° to 99.98°');
  });
});

describe('plain numbers', () => {
  it.each([
    [100, '100'],
    [5000, '5000'],
    [0.5, '0.5'],
    [-10, '−10'],
    [5.486, '5.486'],
    [1 / 3, '0.333333'],
    [123456.7, '123457'],
    [1e6, '1 × 10⁶'],
    [1.2e-5, '1.2 × 10⁻⁵'],
    [0, '0'],
  ])('writes %d as %s', (value, text) => {
    expect(plainNumber(value)).toBe(text);
  });

  it('does not repeat what was typed when it says nothing more', () => {
    const energy = { value: 1.5, unit: 'keV' };
    for (const typed of ['1.5 keV', '1.5keV', ' 1.50 keV ', '15e-1 keV', '', undefined]) {
      expect(enteredQuantity(energy, typed)).toBe('1.5 keV');
    }
    expect(enteredQuantity(energy, '1500 eV')).toBe('1500 eV (1.5 keV)');
    expect(enteredQuantity({ value: 25.25, unit: 'meV' }, '1.8 angstrom')).toBe(
      '1.8 angstrom (25.25 meV)',
    );
    expect(plainQuantity({ value: 3, unit: 'eV angstrom' })).toBe('3 eV Å');
  });
});
