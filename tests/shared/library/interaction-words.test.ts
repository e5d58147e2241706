import { describe, expect, it } from 'vitest';
import type { InteractionContent } from '#shared/contracts/library.ts';
import { EMPTY_TEXTS, publicationOf, textsOf } from '#src/components/library/publish-texts.ts';
import {
  energyRangeText,
  exampleText,
  interactionDifferences,
  speciesText,
} from '#src/lib/interaction-words.ts';

const content: InteractionContent = {
  name: 'A bell',
  description: 'Round.',
  validity: {
    words: 'Anywhere.',
    energy: { from: { value: 1, unit: 'keV' } },
    species: ['electron'],
  },
  source: 'Lab note 7',
  terms: [{ form: 'gaussian', V0: { value: -3, unit: 'eV' }, a: { value: 2, unit: 'angstrom' } }],
  tags: ['bell'],
  example: {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: 2, unit: 'keV' },
  },
};
const [term = { form: '' }] = content.terms;

describe('words of a published interaction', () => {
  it('say between which energies, for which particles and with what it is shown', () => {
    const eV = (value: number) => ({ value, unit: 'eV' });
    const range = (energy: object) => energyRangeText({ words: 'x', energy });
    expect(range({ from: eV(1), to: eV(2) })).toBe('1 eV to 2 eV');
    expect(range({ from: eV(1) })).toBe('from 1 eV on');
    expect(range({ to: eV(2) })).toBe('up to 2 eV');
    expect(energyRangeText({ words: 'x' })).toBe('any energy');
    expect(speciesText({ words: 'x' })).toBe('any particle');
    expect(exampleText({ ...content.example, kinematics: 'relativistic' })).toBe(
      'electron, 2 keV, relativistic, on fixed centre, charge 0',
    );
  });

  it('name what changed, parameter by parameter', () => {
    const after = {
      ...content,
      source: 'Lab note 8',
      terms: [{ ...term, V0: { value: -4, unit: 'eV' } }],
    };
    expect(interactionDifferences(content, after, [])).toEqual([
      { key: 'terms/0/V0', label: 'gaussian: V0', before: '−3 eV', after: '−4 eV' },
      { key: 'source', label: 'Source', before: 'Lab note 7', after: 'Lab note 8' },
    ]);
    expect(interactionDifferences(content, content, [])).toEqual([]);
  });

  it('take the terms as a whole where the forms differ or there is one more', () => {
    const after = { ...content, terms: [term, { form: 'contact', b: { value: 1, unit: 'fm' } }] };
    expect(interactionDifferences(content, after, [])).toEqual([
      {
        key: 'terms',
        label: 'Terms',
        before: 'gaussian, V0 = −3 eV, a = 2 Å',
        after: 'gaussian, V0 = −3 eV, a = 2 Å + contact, b = 1 fm',
      },
    ]);
  });
});

describe('the texts of a publication', () => {
  it('come back as the content they were made from', () => {
    const { body, faults } = publicationOf(textsOf(content), content);
    expect(faults).toEqual({});
    expect(body).toEqual(content);
  });

  it('are refused by the names the server uses', () => {
    const { faults } = publicationOf({ ...EMPTY_TEXTS, from: '5', to: '2 nm' }, content);
    expect(Object.keys(faults).sort()).toEqual([
      'description',
      'name',
      'source',
      'validity/energy/from',
      'validity/energy/to',
      'validity/words',
    ]);
    const turned = { ...textsOf(content), from: '2 keV', to: '1 keV' };
    expect(publicationOf(turned, content).faults).toEqual({
      'validity/energy/to': 'The range ends above the energy it begins at.',
    });
  });

  it('leave out what was left empty', () => {
    const { body } = publicationOf(
      { ...textsOf(content), from: '', species: [], note: '  ' },
      content,
    );
    expect(body.validity).toEqual({ words: 'Anywhere.' });
    expect(body.note).toBeUndefined();
  });
});
