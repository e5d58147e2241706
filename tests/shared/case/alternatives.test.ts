import { expect, test } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { setAlternative, setChoice } from '#src/features/case/model/terms.ts';

const described = { symbol: 'x', description: '' };
const FORM: FormInfo = {
  key: 'extendedCharge',
  label: 'extended charge',
  formula: '',
  transformFormula: '',
  source: '',
  parameters: [
    {
      ...described,
      key: 'kind',
      label: 'Kind',
      dimension: 'choice',
      default: 'fermi',
      choices: ['fermi', 'dipole'],
    },
    {
      ...described,
      key: 'diffuseness',
      label: 'Diffuseness',
      dimension: 'length',
      default: { value: 0.5, unit: 'fm' },
      when: { key: 'kind', is: ['fermi'] },
    },
  ],
};

function documentWith(
  term: Record<string, string | { value: number; unit: string }>,
): CaseDocument {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 6 },
    energy: { value: 1, unit: 'keV' },
    interaction: { terms: [{ form: FORM.key, ...term }] },
    methods: ['born1'],
  };
}

test('a choice takes away what hangs on another one, and brings what hangs on itself', () => {
  const fermi = documentWith({ kind: 'fermi', diffuseness: { value: 0.6, unit: 'fm' } });
  const dipole = setChoice(fermi, 0, FORM, { key: 'kind', value: 'dipole' });
  expect(dipole.interaction.terms).toEqual([{ form: 'extendedCharge', kind: 'dipole' }]);
  const again = setChoice(dipole, 0, FORM, { key: 'kind', value: 'fermi' });
  expect(again.interaction.terms).toEqual([
    { form: 'extendedCharge', kind: 'fermi', diffuseness: { value: 0.5, unit: 'fm' } },
  ]);
});

test('what was set stays where the choice does not change it', () => {
  const fermi = documentWith({ kind: 'fermi', diffuseness: { value: 0.6, unit: 'fm' } });
  expect(setChoice(fermi, 0, FORM, { key: 'kind', value: 'fermi' })).toEqual(fermi);
});

test('of alternatives exactly one is left', () => {
  const b = { ...described, key: 'b', label: 'b', dimension: 'length', oneOf: 'length' };
  const element = { ...described, key: 'element', label: 'Element', dimension: 'element' };
  const alternatives = [
    { ...b, default: { value: 6.646, unit: 'fm' } },
    { ...element, oneOf: 'length', default: 'Ni' },
  ];
  const byElement = setAlternative(
    documentWith({ b: { value: 1, unit: 'fm' } }),
    0,
    alternatives,
    'element',
  );
  expect(byElement.interaction.terms).toEqual([{ form: 'extendedCharge', element: 'Ni' }]);
});
