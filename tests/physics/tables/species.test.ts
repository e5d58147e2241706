import { describe, expect, it } from 'vitest';
import { nuclide } from '#server/physics/tables/nuclides.ts';
import { SPECIES, species, speciesOfNuclide } from '#server/physics/tables/species.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

describe('species', () => {
  it('has every particle that the contract names', () => {
    expect(SPECIES.map(({ key }) => key)).toEqual([
      'electron',
      'positron',
      'muon-',
      'muon+',
      'proton',
      'neutron',
      'deuteron',
      'triton',
      'helion',
      'alpha',
    ]);
  });

  it('gives antiparticles one mass and opposite charges', () => {
    expect(species('positron')).toMatchObject({ mass: species('electron').mass, charge: 1 });
    expect(species('muon+')).toMatchObject({ mass: species('muon-').mass, charge: 1 });
    expect(species('muon-').charge).toBe(-1);
  });

  it.each(SPECIES.filter((entry) => entry.nuclide !== null))(
    '$key is the nucleus of $nuclide',
    (entry) => {
      const atom = nuclide(entry.nuclide ?? '');
      expect(entry).toMatchObject({
        charge: atom.atomicNumber,
        massNumber: atom.massNumber,
        spin: atom.spin,
      });
      expect(entry.identity).toBe(atom.name);
      expect(speciesOfNuclide(atom.name)).toBe(entry);
      // Independent of CODATA: the mass of AME2012 less Z electrons, up to the binding of at most 79 eV.
      const bare = atom.atomicMass * 931494103.72 - atom.atomicNumber * 510998.95069;
      expectRelative(entry.mass, bare, 3e-8);
    },
  );

  it('knows no nuclide for a neutron or an electron, which are themselves', () => {
    expect(species('neutron')).toMatchObject({
      nuclide: null,
      identity: 'neutron',
      charge: 0,
      spin: 0.5,
    });
    expect(species('electron')).toMatchObject({ nuclide: null, identity: 'electron' });
    expect(speciesOfNuclide('C-12')).toBeNull();
  });

  it('refuses an unknown name with the names there are', () => {
    expect(() => species('pion')).toThrow(
      /`pion` is not a known particle. Known: electron, .*alpha/,
    );
    expect(() => species('toString')).toThrow(/not a known particle/);
  });
});
