import { describe, expect, test } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm, Projectile, Target } from '#shared/contracts/estimates.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import { oppositeOf } from '#src/features/case/validity/model/opposite.ts';

function caseOf(
  terms: InteractionTerm[],
  rest: { projectile?: Projectile; target?: Target } = {},
): CaseDocument {
  return { ...DEFAULT_DOCUMENT, ...rest, interaction: { terms } };
}

function opposite(document: CaseDocument): CaseDocument {
  const found = oppositeOf(document);
  if ('none' in found) throw new Error(found.none);
  return found.document;
}

const MeV = (value: number) => ({ value, unit: 'MeV' });
const fm = (value: number) => ({ value, unit: 'fm' });
const proton: Projectile = { species: 'proton' };

describe('the case with the opposite sign', () => {
  test.each<[string, InteractionTerm, InteractionTerm]>([
    [
      'a real strength',
      { form: 'yukawa', V0: MeV(-10), a: fm(1) },
      { form: 'yukawa', V0: MeV(10), a: fm(1) },
    ],
    [
      'what absorbs goes on absorbing',
      { form: 'woodsSaxon', V0: MeV(-45), W0: MeV(-8), R: fm(4), a: fm(0.6) },
      { form: 'woodsSaxon', V0: MeV(45), W0: MeV(-8), R: fm(4), a: fm(0.6) },
    ],
    [
      'a shell',
      { form: 'deltaShell', g: { value: 2, unit: 'eV angstrom' }, R: fm(1) },
      { form: 'deltaShell', g: { value: -2, unit: 'eV angstrom' }, R: fm(1) },
    ],
    [
      'a table',
      {
        form: 'tabulated',
        points: [
          [0, -5],
          [1, 2],
        ],
      },
      {
        form: 'tabulated',
        points: [
          [0, 5],
          [1, -2],
        ],
      },
    ],
    [
      'a formula',
      { form: 'expression', formula: 'r < R ? V0 : 0' },
      { form: 'expression', formula: '-(r < R ? V0 : 0)' },
    ],
    [
      'a product of charges',
      { form: 'coulomb', chargeProduct: 158 },
      { form: 'coulomb', chargeProduct: -158 },
    ],
  ])('%s', (_, term, expected) => {
    const turned = opposite(caseOf([term], { projectile: proton }));
    expect(turned.interaction.terms).toEqual([expected]);
    expect(turned.projectile).toEqual(proton);
    // Twice turned is the case itself, but for a formula, which keeps its brackets.
    if (term.form !== 'expression') {
      expect(opposite(turned).interaction.terms).toEqual([term]);
    }
  });

  test('leptons on charges become their antiparticles, and polarization attracts them as before', () => {
    const term: InteractionTerm = { form: 'screenedCoulomb', a: fm(1) };
    const cloud: InteractionTerm = {
      form: 'polarization',
      alpha: { value: 1.38, unit: 'bohr3' },
      d: { value: 1, unit: 'bohr' },
    };
    const given = caseOf([term, cloud], { target: { kind: 'fixed', charge: 2 } });
    const found = oppositeOf(given);
    expect(found).toMatchObject({
      antiparticle: 'positron',
      document: { projectile: { species: 'positron' }, target: given.target },
    });
    expect(opposite(given).interaction.terms).toEqual([term, cloud]);
    expect(opposite(opposite(given)).projectile).toEqual({ species: 'electron' });
  });

  test('a product of charges written into the term turns with the lepton', () => {
    const turned = opposite(caseOf([{ form: 'coulomb', chargeProduct: -2 }]));
    expect(turned.projectile).toEqual({ species: 'positron' });
    expect(turned.interaction.terms).toEqual([{ form: 'coulomb', chargeProduct: 2 }]);
  });

  test('a fixed centre takes the opposite charge', () => {
    const turned = opposite(
      caseOf([{ form: 'coulomb' }], { projectile: proton, target: { kind: 'fixed', charge: 79 } }),
    );
    expect(turned.target).toEqual({ kind: 'fixed', charge: -79 });
    expect(turned.interaction.terms).toEqual([{ form: 'coulomb' }]);
  });

  test('what was typed is left out, corrections stay', () => {
    const turned = opposite({
      ...caseOf([{ form: 'yukawa', V0: MeV(1), a: fm(1) }]),
      entered: { '/energy': '100 eV' },
      corrections: ['mckinleyFeshbach'],
    });
    expect(turned).not.toHaveProperty('entered');
    expect(turned.corrections).toEqual(['mckinleyFeshbach']);
  });

  test.each<[string, CaseDocument]>([
    ['hard sphere', caseOf([{ form: 'hardSphere', R: fm(1) }])],
    ['two atoms', caseOf([{ form: 'krc', Z1: 2, Z2: 79 }], { projectile: proton })],
    [
      'charges of nuclei',
      caseOf([{ form: 'coulomb' }], {
        projectile: { species: 'alpha' },
        target: { kind: 'nuclide', nuclide: 'Au-197' },
      }),
    ],
    [
      'a polarized atom alone',
      caseOf([{ form: 'polarization', alpha: { value: 1, unit: 'bohr3' }, d: fm(1) }]),
    ],
    ['a length of the table', caseOf([{ form: 'contact', nuclide: 'H-1' }])],
  ])('has no opposite, and why is said: %s', (_, document) => {
    const found = oppositeOf(document);
    expect('none' in found && found.none.length).toBeGreaterThan(20);
  });
});
