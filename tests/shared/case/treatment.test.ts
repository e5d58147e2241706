import { describe, expect, test } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate, InteractionTerm, Projectile } from '#shared/contracts/estimates.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import { hasCoulombTail, treatmentOf } from '#src/features/case/validity/model/treatment.ts';

const NONE = { unavailable: true as const, reason: '' };
const area = { value: 1, unit: 'angstrom2', relativeError: 0 };
const COMPUTED = {
  differential: [],
  elastic: area,
  absorption: area,
  total: area,
  momentumTransfer: area,
  viscosity: area,
};

function estimateOf(identical: boolean, exact: boolean): Estimate {
  const quantity = { value: 1, unit: 'eV' };
  return {
    engine: { name: 'tallybarn', version: '0' },
    kinematics: {
      k: quantity,
      wavelength: quantity,
      speed: quantity,
      reducedMass: quantity,
      energyCm: quantity,
      beta: 0.1,
    },
    identical,
    potential: NONE,
    methods: { born1: COMPUTED, ...(exact && { partialWaves: COMPUTED }) },
    goldenRule: NONE,
    validity: { verdict: 'unassessed', basis: 'criteria', criteria: [] },
    warnings: [],
    units: { length: 'angstrom', area: 'angstrom2', energy: 'eV', angle: 'deg' },
    frame: 'cm',
  };
}

const caseOf = (projectile: Projectile, ...terms: InteractionTerm[]): CaseDocument => ({
  ...DEFAULT_DOCUMENT,
  projectile,
  interaction: { terms },
});
const COULOMB: InteractionTerm = { form: 'coulomb' };
const YUKAWA: InteractionTerm = { form: 'yukawa' };
const words = (...given: Parameters<typeof treatmentOf>) => treatmentOf(...given).join(' ');

describe('identity', () => {
  test.each<[Projectile, string]>([
    [{ species: 'alpha' }, 'bosons'],
    [{ species: 'deuteron' }, 'bosons'],
    [{ nuclide: 'C-12' }, 'bosons'],
    [{ nuclide: 'C-13' }, 'fermions'],
    [{ species: 'proton' }, 'fermions'],
    [{ species: 'electron' }, 'fermions'],
    [{ species: 'custom', mass: { value: 1, unit: 'u' }, charge: 0, spin: 1.5 }, 'fermions'],
    [{ species: 'custom', mass: { value: 1, unit: 'u' }, charge: 0, spin: 2 }, 'bosons'],
  ])('%j', (projectile, kind) => {
    expect(words(caseOf(projectile, YUKAWA), estimateOf(true, false))).toMatch(
      new RegExp(`^Identical ${kind}: .*half the integral`),
    );
  });

  test('two charges need phases: the exact curve has them, first order alone sends for it', () => {
    const alphas = caseOf({ species: 'alpha' }, COULOMB);
    expect(words(alphas, estimateOf(true, true))).toContain('with their phases');
    expect(words(alphas, estimateOf(true, false))).toContain('take the exact method');
    expect(words(caseOf({ species: 'alpha' }, YUKAWA), estimateOf(true, true))).not.toContain(
      'Coulomb',
    );
  });

  test('distinct particles computed in first order alone need no line', () => {
    expect(treatmentOf(caseOf({ species: 'alpha' }, COULOMB), estimateOf(false, false))).toEqual(
      [],
    );
  });
});

test('the exact calculation says what it leaves out, with a spin-orbit term less of it', () => {
  const plain = words(caseOf({ species: 'proton' }, YUKAWA), estimateOf(false, true));
  expect(plain).toMatch(/spin and the term in V² .* are left out/);
  const spin = words(
    caseOf({ species: 'proton' }, YUKAWA, { form: 'spinOrbit' }),
    estimateOf(false, true),
  );
  expect(spin).toMatch(/j = l ± ½; spin beyond the spin-orbit term/);
});

test.each<[InteractionTerm, boolean]>([
  [COULOMB, true],
  [{ form: 'extendedCharge', kind: 'fermi' }, true],
  [{ form: 'tabulated', tail: 'coulomb' }, true],
  [{ form: 'tabulated', tail: 'zero' }, false],
  [{ form: 'screenedCoulomb' }, false],
])('whether it falls as 1/r: %j', (term, falls) => {
  expect(hasCoulombTail(caseOf({ species: 'proton' }, YUKAWA, term))).toBe(falls);
});
