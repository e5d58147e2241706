import { describe, expect, it } from 'vitest';
import type { InteractionVersion } from '#shared/contracts/library.ts';
import {
  cite,
  documentWith,
  outsideValidity,
  takeInteraction,
} from '#src/features/case/model/citation.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import type { Draft } from '#src/features/case/model/editor.ts';
import { differences, fieldsOf } from '#src/features/case/model/fields.ts';
import { setParameter } from '#src/features/case/model/terms.ts';

const terms = [
  { form: 'gaussian', V0: { value: -3, unit: 'eV' }, a: { value: 2, unit: 'angstrom' } },
];
const person = { id: 'p', name: 'Theorist' };
const published: InteractionVersion = {
  id: '11111111-1111-4111-8111-111111111111',
  name: 'A bell',
  description: 'x',
  validity: {
    words: 'x',
    energy: { from: { value: 1, unit: 'keV' }, to: { value: 10, unit: 'keV' } },
    species: ['electron', 'positron'],
  },
  source: 'x',
  terms,
  tags: [],
  example: {
    projectile: { species: 'positron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: 2, unit: 'keV' },
    units: { length: 'pm' },
  },
  status: 'published',
  retired: null,
  owner: person,
  createdAt: '2026-01-01T00:00:00.000Z',
  updatedAt: '2026-01-01T00:00:00.000Z',
  summary: 'x',
  version: { n: 2, hash: 'x', createdAt: '2026-01-01T00:00:00.000Z', author: person, note: '' },
  newestVersion: 3,
  may: { publish: false, retire: false },
};
const citation = { id: published.id, version: 2 };

const draft: Draft = {
  title: 'x',
  tags: [],
  document: {
    ...DEFAULT_DOCUMENT,
    entered: { '/energy': '1 angstrom', '/interaction/terms/0/V0': '-10eV' },
  },
  open: {
    '/interaction/terms/0/a': { text: 'wide', problem: 'no number' },
    '/energy': { text: 'fast', problem: 'no number' },
  },
};

describe('taking an interaction of the library', () => {
  it('replaces the terms and what was typed for them, and nothing else', () => {
    const taken = takeInteraction(draft, published);
    expect(taken.document.interaction).toEqual({ terms, citation });
    expect(taken.document.entered).toEqual({ '/energy': '1 angstrom' });
    expect(Object.keys(taken.open)).toEqual(['/energy']);
    expect(taken.document.projectile).toEqual(draft.document.projectile);
  });

  it('a changed term leaves the citation out', () => {
    const { document } = takeInteraction(draft, published);
    const changed = setParameter(document, 0, 'V0', { value: -4, unit: 'eV' });
    expect(changed.interaction.citation).toBeUndefined();
  });

  it('a publication is cited only while the terms are its own', () => {
    const own = { ...DEFAULT_DOCUMENT, interaction: { terms } };
    expect(cite(own, published).interaction.citation).toEqual(citation);
    expect(cite(DEFAULT_DOCUMENT, published)).toBe(DEFAULT_DOCUMENT);
  });

  it('a new case begins with the collision it was published with', () => {
    const document = documentWith(published);
    expect(document).toMatchObject({ ...published.example, interaction: { terms, citation } });
    expect(document.goldenRule?.boxSide).toBeUndefined();
  });
});

describe('a beam outside the validity', () => {
  const at = (value: number, projectile: Draft['document']['projectile']) =>
    outsideValidity({ projectile, energy: { value, unit: 'eV' } }, published.validity);

  it.each([1000, 5000, 10_000])('is not one of %i eV', (value) => {
    expect(at(value, { species: 'electron' })).toEqual([]);
  });

  it.each([999, 10_001])('is one of %i eV', (value) => {
    expect(at(value, { species: 'positron' })).toEqual([
      expect.stringMatching(/1 keV to 10 keV/) as string,
    ]);
  });

  it('is one of other particles, a nucleus too', () => {
    expect(at(2000, { species: 'proton' })).toEqual([
      'It is meant for electron, positron; this beam is proton.',
    ]);
    expect(at(1, { nuclide: 'C-12' })).toHaveLength(2);
  });

  it('does not exist where nothing is said', () => {
    const energy = { value: 1, unit: 'GeV' };
    expect(outsideValidity({ projectile: { species: 'alpha' }, energy }, { words: 'x' })).toEqual(
      [],
    );
  });
});

describe('the citation as a field of a version', () => {
  const content = (document: Draft['document']) => ({ title: 'x', tags: [], document });
  const cites = (version: number) =>
    content({ ...DEFAULT_DOCUMENT, interaction: { terms, citation: { ...citation, version } } });

  it('is listed among the differences, and only where it differs', () => {
    expect(differences(cites(1), cites(2), [])).toEqual([
      {
        key: '/interaction/citation',
        label: 'From the library',
        before: 'version 1 of interaction 11111111',
        after: 'version 2 of interaction 11111111',
      },
    ]);
    const bare = content({ ...DEFAULT_DOCUMENT, interaction: { terms } });
    expect(differences(cites(1), bare, [])[0]?.after).toBe('no citation');
    expect(differences(cites(1), cites(1), [])).toEqual([]);
  });

  it('is taken over with or without the terms it belongs to', () => {
    const fields = fieldsOf([cites(1), cites(2)], []);
    const take = fields.find(({ key }) => key === '/interaction/citation')?.take;
    expect(take?.(cites(1), cites(2)).document.interaction.citation?.version).toBe(2);
    const bare = content({ ...DEFAULT_DOCUMENT, interaction: { terms } });
    expect(take?.(cites(1), bare).document.interaction).toEqual({ terms });
  });
});
